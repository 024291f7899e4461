import type { AnyShape } from './shape.js';

/** A value that is not what its description says. */
export interface Misfit {
  /** Fields and places on the way to it, such as `shells[3].dl`. */
  readonly where: string;
  readonly wanted: string;
  /** What came instead, cut where it is long. */
  readonly came: string;
}

/**
 * The first value within `value` that does not fit its description; null when all do. Fields that the description does not
 * name are passed over, and so is which word of a vocabulary a text is: a later version may know more of either.
 *
 * @param where name of the value
 * @example
 * misfitOf({ type: 'list', description: '', items: { type: 'number', description: '' } }, [1, 'two'], 'sizes')?.where // => 'sizes[1]'
 */
export function misfitOf(shape: AnyShape, value: unknown, where: string): Misfit | null {
  if (value === undefined) return shape.optional ? null : misfit(where, wordFor(shape), value);
  if (value === null) return shape.nullable ? null : misfit(where, wordFor(shape), value);
  switch (shape.type) {
    case 'boolean':
    case 'number':
      return typeof value === shape.type ? null : misfit(where, wordFor(shape), value);
    case 'integer':
      return Number.isInteger(value) ? null : misfit(where, wordFor(shape), value);
    case 'text':
    case 'choice':
      return typeof value === 'string' ? null : misfit(where, wordFor(shape), value);
    case 'list': {
      if (!Array.isArray(value)) return misfit(where, wordFor(shape), value);
      for (let i = 0; i < value.length; i++) {
        const found = misfitOf(shape.items, value[i], '');
        if (found !== null) return { ...found, where: `${where}[${i}]${found.where}` };
      }
      return null;
    }
    case 'map':
      return misfitWithin(wordFor(shape), () => shape.items, null, value, where);
    case 'object':
      return misfitWithin(wordFor(shape), (name) => shape.fields[name], Object.keys(shape.fields), value, where);
    case 'either':
      return shape.of.some((one) => misfitOf(one, value, '') === null) ? null : misfit(where, wordFor(shape), value);
  }
}

/** @param names fields looked at; null for all there are */
function misfitWithin(
  wanted: string,
  shapeOf: (name: string) => AnyShape,
  names: readonly string[] | null,
  value: unknown,
  where: string,
): Misfit | null {
  if (typeof value !== 'object' || Array.isArray(value)) return misfit(where, wanted, value);
  const object = value as Record<string, unknown>;
  for (const name of names ?? Object.keys(object)) {
    const found = misfitOf(shapeOf(name), object[name], '');
    if (found !== null) return { ...found, where: `${where}.${name}${found.where}` };
  }
  return null;
}

function wordFor({ type }: AnyShape): string {
  if (type === 'map' || type === 'object') return 'an object';
  if (type === 'integer') return 'a whole number';
  if (type === 'either') return 'one of its kinds';
  return `a ${type === 'choice' ? 'text' : type}`;
}

function misfit(where: string, wanted: string, value: unknown): Misfit {
  const came = JSON.stringify(value) ?? 'nothing';
  return { where, wanted, came: came.length > 40 ? `${came.slice(0, 40)}…` : came };
}
