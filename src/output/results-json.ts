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
    else yield jsonText(shape, value, name);
  }
  yield '\n}\n';
}

function* listPieces(name: string, shape: AnyShape, items: readonly unknown[]): Generator<string> {
  if (!Array.isArray(items)) throw new Error(`results.json: a list of ${name} was wanted, ${items} came`);
  if (items.length === 0) {
    yield '[]';
    return;
  }
  let piece = '[\n';
  for (let i = 0; i < items.length; i++) {
    piece += `${jsonText(shape, items[i], `${name}[${i}]`)}${i + 1 < items.length ? ',\n' : '\n]'}`;
    if (piece.length > 50_000) {
      yield piece;
      piece = '';
    }
  }
  yield piece;
}

function jsonText(shape: AnyShape, value: unknown, where: string): string {
  if (value === null || value === undefined) return unknownText(shape, value, where);
  switch (shape.type) {
    case 'number':
    case 'integer':
      if (!Number.isFinite(value)) return unknownText(shape, value, where);
      return numberText(value as number, shape.type === 'integer' ? 15 : RESULTS_DIGITS);
    case 'list':
      return `[${(value as readonly unknown[]).map((item) => jsonText(shape.items, item, where)).join(',')}]`;
    case 'map':
      return mapText(shape.items, value as Record<string, unknown>, where);
    case 'object':
      return objectText(shape.fields, value as Record<string, unknown>, where);
    default:
      return JSON.stringify(value);
  }
}

function unknownText(shape: AnyShape, value: unknown, where: string): string {
  if (shape.nullable) return 'null';
  throw new Error(`results.json, ${where}: a ${shape.type} was wanted, ${value} came`);
}

function objectText(fields: AnyFields, value: Record<string, unknown>, where: string): string {
  let text = '';
  for (const name in fields) {
    if (fields[name].optional && value[name] === undefined) continue;
    text += `${text === '' ? '' : ','}"${name}":${jsonText(fields[name], value[name], `${where}.${name}`)}`;
  }
  return `{${text}}`;
}

function mapText(items: AnyShape, value: Record<string, unknown>, where: string): string {
  const entries = Object.entries(value);
  return `{${entries.map(([key, item]) => `${JSON.stringify(key)}:${jsonText(items, item, `${where}.${key}`)}`).join(',')}}`;
}
