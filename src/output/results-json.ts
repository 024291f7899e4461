import type { Findings } from '../model/index.js';
import { fieldOf } from './field-of.js';
import { FINDINGS_FIELDS } from './findings-fields.js';
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
      else writerOf(out, shape)(value);
    } catch (error) {
      if (!(error instanceof Unwritable)) throw error;
      throw new Error(`results.json, ${name}${error.within.join('')}: ${error.message}`);
    }
  }
  out.text('\n}\n');
}

function writeRows(out: TextOut, name: string, shape: AnyShape, rows: readonly unknown[]): void {
  if (!Array.isArray(rows)) throw new Error(`results.json: a list of ${name} was wanted, ${rows} came`);
  const write = writerOf(out, shape);
  let at = 0;
  try {
    for (; at < rows.length; at++) {
      out.text(at === 0 ? '[\n' : ',\n');
      write(rows[at]);
    }
  } catch (error) {
    throw placed(error, `[${at}]`);
  }
  out.text(rows.length === 0 ? '[]' : '\n]');
}

/** A value that its shape does not allow, and the fields it stands in. */
class Unwritable extends Error {
  readonly within: string[] = [];
}

function placed(error: unknown, place: string): unknown {
  if (error instanceof Unwritable) error.within.unshift(place);
  return error;
}

/** Writes a value of one shape. Made once a list, since a survey has a million rows. */
type Writer = (value: unknown) => void;

function writerOf(out: TextOut, shape: AnyShape): Writer {
  const unknown: Writer = (value) => {
    if (!shape.nullable) throw new Unwritable(`a ${shape.type} was wanted, ${value} came`);
    out.text('null');
  };
  const known = knownWriter(out, shape, unknown);
  return (value) => (value === null || value === undefined ? unknown(value) : known(value));
}

function knownWriter(out: TextOut, shape: AnyShape, unknown: Writer): Writer {
  switch (shape.type) {
    case 'number':
    case 'integer': {
      const digits = shape.type === 'integer' ? 15 : RESULTS_DIGITS;
      return (value) => (Number.isFinite(value) ? writeNumber(out, value as number, digits) : unknown(value));
    }
    case 'list':
      return listWriter(out, writerOf(out, shape.items));
    case 'map':
      return mapWriter(out, writerOf(out, shape.items));
    case 'object':
      return objectWriter(out, shape.fields);
    case 'text':
    case 'choice':
      return (value) => (typeof value === 'string' ? out.json(value) : out.text(JSON.stringify(value)));
    default:
      return (value) => out.text(JSON.stringify(value));
  }
}

function listWriter(out: TextOut, write: Writer): Writer {
  return (value) => {
    const items = value as readonly unknown[];
    out.text('[');
    for (let at = 0; at < items.length; at++) {
      if (at > 0) out.text(',');
      write(items[at]);
    }
    out.text(']');
  };
}

function objectWriter(out: TextOut, fields: AnyFields): Writer {
  const parts = Object.entries(fields).map(([name, shape]) => ({
    name,
    field: fieldOf(name),
    first: utf8(`{${JSON.stringify(name)}:`),
    later: utf8(`,${JSON.stringify(name)}:`),
    optional: shape.optional === true,
    write: writerOf(out, shape),
  }));
  return (value) => {
    let empty = true;
    let at = 0;
    try {
      for (; at < parts.length; at++) {
        const { field, first, later, optional, write } = parts[at];
        const own = field(value as object);
        if (optional && own === undefined) continue;
        out.bytes(empty ? first : later);
        empty = false;
        write(own);
      }
    } catch (error) {
      throw placed(error, `.${parts[at].name}`);
    }
    out.text(empty ? '{}' : '}');
  };
}

function mapWriter(out: TextOut, write: Writer): Writer {
  return (value) => {
    let before = '{';
    for (const [key, item] of Object.entries(value as Record<string, unknown>)) {
      out.text(`${before}${JSON.stringify(key)}:`);
      before = ',';
      try {
        write(item);
      } catch (error) {
        throw placed(error, `.${key}`);
      }
    }
    out.text(before === '{' ? '{}' : '}');
  };
}
