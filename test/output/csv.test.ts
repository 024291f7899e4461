import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { csvCell, textCell, writeCsv } from '../../src/output/csv.js';
import { numberText } from '../../src/output/number-text.js';
import type { AnyShape } from '../../src/output/shape.js';
import { textOf } from '../../src/output/text-out.js';

const text: AnyShape = { type: 'text', description: '' };
const number: AnyShape = { type: 'number', description: '' };

/** What a reader that knows the escape gets back. */
const unescaped = (cell: string) => (/^'+[=+\-@\t\r\n\uFF1D\uFF0B\uFF0D\uFF20]/.test(cell) ? cell.slice(1) : cell);

const nasty = fc.oneof(
  fc.string({ unit: 'binary' }),
  fc.string({ unit: fc.constantFrom('=', '+', '-', '@', '\t', '\r', '\n', '"', ',', ';', "'", 'a', '1', '.') }),
);

describe('texts in CSV', () => {
  it('come back as they were through another CSV reader, whatever is in them', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(nasty, nasty), { minLength: 1, maxLength: 5 }), (rows) => {
        const columns = [0, 1].map((i) => ({ header: `c${i}`, shape: text, value: (row: string[]) => row[i] }));
        const file = textOf((out) => writeCsv(out, 't.csv', columns, rows as unknown as string[][]));
        const read = parse(file, { record_delimiter: '\n', bom: false }) as string[][];
        expect(read.slice(1).map((row) => row.map(unescaped))).toEqual(rows);
      }),
    );
  });

  it('never start as a formula does, unless they are plain numbers', () => {
    fc.assert(
      fc.property(nasty, (value) => {
        const cell = parse(`${textCell(value)}\n`, { record_delimiter: '\n', relax_column_count: true })[0]?.[0] ?? '';
        if (/^[=+\-@\t\r\n]/.test(cell)) expect(Number.isFinite(Number(cell))).toBe(true);
      }),
    );
  });

  it.each([
    ['=1+1', "'=1+1"],
    ['+1+1', "'+1+1"],
    ['-2+3', "'-2+3"],
    ['@SUM(A1)', "'@SUM(A1)"],
    ['\t=1', "'\t=1"],
    ['-0.12', '-0.12'],
    ['-3', '-3'],
    ['+2e5', '+2e5'],
    ['a=b', 'a=b'],
    ["'=1", "''=1"],
    ["it's", "it's"],
    ['say "no", twice', '"say ""no"", twice"'],
    ['\uFF1D1', "'\uFF1D1"],
  ])('%j is written %j', (value, cell) => {
    expect(csvCell(text, value)).toBe(cell);
  });

  it('escapes the items of a list one by one', () => {
    expect(csvCell({ type: 'list', items: text, description: '' }, ['A', '=B', 'C,D'])).toBe(`"A;'=B;C,D"`);
    expect(csvCell({ type: 'list', items: text, description: '' }, [])).toBe('');
  });
});

describe('numbers in CSV', () => {
  it.each([
    [0.1 + 0.2, '0.3'],
    [-0, '0'],
    [-0.12, '-0.12'],
    [123456789, '123457000'],
    [0.000012345678, '0.0000123457'],
    [1.3e-35, '1.3e-35'],
    [999999.5, '1000000'],
    [1 / 3, '0.333333'],
  ])('%d is written %s', (value, cell) => {
    expect(csvCell(number, value)).toBe(cell);
  });

  it('keeps every digit of a count', () => {
    expect(csvCell({ type: 'integer', description: '' }, 12345678)).toBe('12345678');
  });

  it('are within half a unit of the sixth digit, and have no more digits than that', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        const cell = numberText(value, 6);
        expect(Math.abs(Number(cell) - value)).toBeLessThanOrEqual(Math.abs(value) * 5.0001e-6 + Number.MIN_VALUE);
        const digits = cell.replace(/e.*/, '').replace(/[-.]/g, '').replace(/^0+/, '').replace(/0+$/, '');
        expect(digits.length).toBeLessThanOrEqual(6);
        if (Math.abs(value) >= 1e-6 && Math.abs(value) < 1e21) expect(cell).not.toContain('e');
      }),
    );
  });

  it('that are not finite are unknown where that is allowed, and a fault with its place elsewhere', () => {
    expect(csvCell({ ...number, nullable: true }, Number.NaN)).toBe('');
    const columns = [{ header: 'scatter', shape: number, value: (row: number) => row }];
    expect(() => textOf((out) => writeCsv(out, 'clocks.csv', columns, [1, Number.NaN]))).toThrow(
      'clocks.csv, line 3, column scatter',
    );
  });
});

it('booleans are true and false, unknown is empty', () => {
  const boolean: AnyShape = { type: 'boolean', description: '', nullable: true };
  expect([true, false, null].map((value) => csvCell(boolean, value))).toEqual(['true', 'false', '']);
});
