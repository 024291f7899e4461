import type { Findings } from '../model/index.js';
import { FINDINGS_FIELDS } from './findings-fields.js';
import { LikeLast } from './like-last.js';
import { writeNumber } from './number-text.js';
import type { AnyFields, AnyShape } from './shape.js';
import { type TextOut, utf8 } from './text-out.js';

/** Significant digits of a number in results.json: beyond any measurement, and short of the last bits of arithmetic. */
export const RESULTS_DIGITS = 12;

/**
 * Writes results.json: keys in the order of their descriptions, one row of a table a line, numbers with at most 12
 * significant digits. The same findings give the same bytes.
 *
 * @throws Error naming the part when a number is not finite where unknown is not allowed, or a part is missing.
 */
export function writeResultsJson(out: TextOut, findings: Findings): void {
  const parts = Object.entries(FINDINGS_FIELDS);
  for (let i = 0; i < parts.length; i++) {
    const [name, shape] = parts[i];
    const value = (findings as unknown as Record<string, unknown>)[name];
    out.text(`${i === 0 ? '{' : ','}\n${JSON.stringify(name)}: `);
    try {
      if (shape.type === 'list') writeRows(out, name, shape.items, value as readonly unknown[]);
      else writeValue(out, patternOf(shape), value);
    } catch (error) {
      if (!(error instanceof Unwritable)) throw error;
      throw new Error(`results.json, ${name}${error.within.join('')}: ${error.message}`);
    }
  }
  out.text('\n}\n');
}

function writeRows(out: TextOut, name: string, shape: AnyShape, rows: readonly unknown[]): void {
  if (!Array.isArray(rows)) throw new Error(`results.json: a list of ${name} was wanted, ${rows} came`);
  const pattern = patternOf(shape);
  // rows with all their fields are written like the one before them
  const whole =
    pattern.type === 'object' && pattern.fields.length > 0 && pattern.fields.every((field) => !field.optional);
  const likeLast = whole ? new LikeLast(out, leadsOf(pattern.fields), utf8('}')) : null;
  let at = 0;
  try {
    for (; at < rows.length; at++) {
      out.text(at === 0 ? '[\n' : ',\n');
      const row = rows[at];
      if (likeLast && typeof row === 'object' && row !== null) writeRow(likeLast, out, pattern.fields, row);
      else writeValue(out, pattern, row);
    }
  } catch (error) {
    throw placed(error, `[${at}]`);
  }
  out.text(rows.length === 0 ? '[]' : '\n]');
}

const leadsOf = (fields: readonly FieldPattern[]) => fields.map(({ first, later }, i) => (i === 0 ? first : later));

function writeRow(likeLast: LikeLast, out: TextOut, fields: readonly FieldPattern[], row: object): void {
  likeLast.begin();
  let at = 0;
  try {
    for (; at < fields.length; at++) {
      const value = (row as Record<string, unknown>)[fields[at].name];
      if (!likeLast.same(at, value)) writeValue(out, fields[at].pattern, value);
    }
  } catch (error) {
    throw placed(error, `.${fields[at].name}`);
  }
  likeLast.end();
}

/** A value that its shape does not allow, and the fields it stands in. */
class Unwritable extends Error {
  readonly within: string[] = [];
}

function placed(error: unknown, place: string): unknown {
  if (error instanceof Unwritable) error.within.unshift(place);
  return error;
}

/** A shape made ready for a million values. All patterns have the same fields, so that one function writes them fast. */
interface Pattern {
  readonly type: AnyShape['type'];
  readonly nullable: boolean;
  /** Most significant digits of a number. */
  readonly digits: number;
  /** Of a list or map. */
  readonly items: Pattern | null;
  /** Of an object. */
  readonly fields: readonly FieldPattern[];
  /** Of an object that may lack any of its fields. */
  readonly sparse: boolean;
}

interface FieldPattern {
  readonly name: string;
  /** The key with what stands before it: as the first of its object, and further on. */
  readonly first: Uint8Array;
  readonly later: Uint8Array;
  readonly optional: boolean;
  readonly pattern: Pattern;
}

function patternOf(shape: AnyShape): Pattern {
  const fields = shape.type === 'object' ? fieldPatterns(shape.fields) : [];
  return {
    type: shape.type,
    nullable: shape.nullable === true,
    digits: shape.type === 'integer' ? 15 : RESULTS_DIGITS,
    items: shape.type === 'list' || shape.type === 'map' ? patternOf(shape.items) : null,
    fields,
    sparse: fields.length > 0 && fields.every(({ optional }) => optional),
  };
}

function fieldPatterns(fields: AnyFields): FieldPattern[] {
  return Object.entries(fields).map(([name, shape]) => ({
    name,
    first: utf8(`{${JSON.stringify(name)}:`),
    later: utf8(`,${JSON.stringify(name)}:`),
    optional: shape.optional === true,
    pattern: patternOf(shape),
  }));
}

function writeValue(out: TextOut, pattern: Pattern, value: unknown): void {
  if (value === null || value === undefined) {
    writeUnknown(out, pattern, value);
    return;
  }
  switch (pattern.type) {
    case 'number':
    case 'integer':
      if (Number.isFinite(value)) writeNumber(out, value as number, pattern.digits);
      else writeUnknown(out, pattern, value);
      break;
    case 'text':
    case 'choice':
      if (typeof value === 'string') out.json(value);
      else out.text(JSON.stringify(value));
      break;
    case 'list':
      writeList(out, pattern.items as Pattern, value as readonly unknown[]);
      break;
    case 'map':
      writeMap(out, pattern.items as Pattern, value as Record<string, unknown>);
      break;
    case 'object':
      writeObject(out, pattern, value);
      break;
    default:
      out.text(JSON.stringify(value));
  }
}

function writeUnknown(out: TextOut, { type, nullable }: Pattern, value: unknown): void {
  if (!nullable) throw new Unwritable(`a ${type} was wanted, ${value} came`);
  out.text('null');
}

function writeList(out: TextOut, items: Pattern, values: readonly unknown[]): void {
  out.text('[');
  for (let at = 0; at < values.length; at++) {
    if (at > 0) out.text(',');
    writeValue(out, items, values[at]);
  }
  out.text(']');
}

function writeObject(out: TextOut, { fields, sparse }: Pattern, value: object): void {
  let empty = true;
  let at = 0;
  // once all that a sparse object has is written, the rest is not looked for
  let left = sparse ? Object.keys(value).length : fields.length;
  try {
    for (; at < fields.length && left > 0; at++) {
      const { name, first, later, optional, pattern } = fields[at];
      const own = (value as Record<string, unknown>)[name];
      if (optional && own === undefined) continue;
      left--;
      out.bytes(empty ? first : later);
      empty = false;
      writeValue(out, pattern, own);
    }
  } catch (error) {
    throw placed(error, `.${fields[at].name}`);
  }
  out.text(empty ? '{}' : '}');
}

function writeMap(out: TextOut, items: Pattern, value: Record<string, unknown>): void {
  let before = '{';
  for (const [key, item] of Object.entries(value)) {
    out.text(before);
    out.json(key);
    out.text(':');
    before = ',';
    try {
      writeValue(out, items, item);
    } catch (error) {
      throw placed(error, `.${key}`);
    }
  }
  out.text(before === '{' ? '{}' : '}');
}
