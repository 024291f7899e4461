import type { Findings } from '../model/index.js';
import { FINDINGS_FIELDS } from './findings-fields.js';
import { numberText } from './number-text.js';
import type { AnyFields, AnyShape } from './shape.js';

/** Significant digits of a number in results.json: beyond any measurement, and short of the last bits of arithmetic. */
export const RESULTS_DIGITS = 12;

/**
 * results.json in pieces: keys in the order of their descriptions, one row of a table a line, numbers with at most
 * 12 significant digits. The same findings give the same bytes.
 *
 * @throws Error naming the part when a number is not finite where unknown is not allowed, or a part is missing.
 */
export function* resultsPieces(findings: Findings): Generator<string> {
  const parts = Object.entries(FINDINGS_FIELDS);
  for (let i = 0; i < parts.length; i++) {
    const [name, shape] = parts[i];
    const value = (findings as unknown as Record<string, unknown>)[name];
    yield `${i === 0 ? '{' : ','}\n${JSON.stringify(name)}: `;
    if (shape.type === 'list') yield* listPieces(name, shape.items, value as readonly unknown[]);
    else yield named(name, () => writerOf(shape)(value));
  }
  yield '\n}\n';
}

function* listPieces(name: string, shape: AnyShape, items: readonly unknown[]): Generator<string> {
  if (!Array.isArray(items)) throw new Error(`results.json: a list of ${name} was wanted, ${items} came`);
  if (items.length === 0) {
    yield '[]';
    return;
  }
  const write = writerOf(shape);
  let at = 0;
  const row = () => write(items[at]);
  let piece = '[\n';
  for (; at < items.length; at++) {
    piece += named(name, row, () => `[${at}]`);
    piece += at + 1 < items.length ? ',\n' : '\n]';
    if (piece.length > 50_000) {
      yield piece;
      piece = '';
    }
  }
  yield piece;
}

/** Runs a writer; a value that can't be written is told with the part it stands in. */
function named(name: string, write: () => string, place: () => string = () => ''): string {
  try {
    return write();
  } catch (error) {
    if (!(error instanceof Unwritable)) throw error;
    throw new Error(`results.json, ${name}${place()}${error.within.join('')}: ${error.message}`);
  }
}

/** A value that its shape does not allow, and the fields it stands in. */
class Unwritable extends Error {
  readonly within: string[] = [];
}

/** Text of a value of one shape. Made once a list, since a survey has a million rows. */
type Writer = (value: unknown) => string;

function writerOf(shape: AnyShape): Writer {
  const unknown: Writer = (value) => {
    if (shape.nullable) return 'null';
    throw new Unwritable(`a ${shape.type} was wanted, ${value} came`);
  };
  const known = knownWriter(shape, unknown);
  return (value) => (value === null || value === undefined ? unknown(value) : known(value));
}

function knownWriter(shape: AnyShape, unknown: Writer): Writer {
  switch (shape.type) {
    case 'number':
    case 'integer': {
      const digits = shape.type === 'integer' ? 15 : RESULTS_DIGITS;
      return (value) => (Number.isFinite(value) ? numberText(value as number, digits) : unknown(value));
    }
    case 'list': {
      const item = writerOf(shape.items);
      return (value) => {
        const items = value as readonly unknown[];
        return items.length === 0 ? '[]' : `[${items.map(item).join(',')}]`;
      };
    }
    case 'map':
      return mapWriter(writerOf(shape.items));
    case 'object':
      return objectWriter(shape.fields);
    case 'text':
    case 'choice':
      return textWriter();
    default:
      return (value) => JSON.stringify(value);
  }
}

/** The same text often stands in row after row. */
function textWriter(): Writer {
  let last: unknown;
  let text = '';
  return (value) => {
    if (value !== last) {
      last = value;
      text = JSON.stringify(value);
    }
    return text;
  };
}

function objectWriter(fields: AnyFields): Writer {
  const parts = Object.entries(fields).map(([name, shape]) => ({
    name,
    key: `${JSON.stringify(name)}:`,
    optional: shape.optional === true,
    write: writerOf(shape),
  }));
  return (value) => {
    const object = value as Record<string, unknown>;
    let text = '{';
    for (const { name, key, optional, write } of parts) {
      const own = object[name];
      if (optional && own === undefined) continue;
      if (text.length > 1) text += ',';
      try {
        text += key + write(own);
      } catch (error) {
        if (error instanceof Unwritable) error.within.unshift(`.${name}`);
        throw error;
      }
    }
    return `${text}}`;
  };
}

function mapWriter(write: Writer): Writer {
  return (value) => {
    const entries = Object.entries(value as Record<string, unknown>).map(([key, item]) => {
      try {
        return `${JSON.stringify(key)}:${write(item)}`;
      } catch (error) {
        if (error instanceof Unwritable) error.within.unshift(`.${key}`);
        throw error;
      }
    });
    return `{${entries.join(',')}}`;
  };
}
