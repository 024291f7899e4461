import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { splitCells, splitRecords } from '../../src/input/split-records.js';

function records(text: string, delimiter = ','): string[][] {
  const { text: tidy, starts, ends } = splitRecords(text, delimiter);
  return starts.map((start, i) => splitCells(tidy.slice(start, ends[i]), delimiter));
}

describe('splitRecords', () => {
  it('gives the physical line of every record, also after quoted line breaks of either kind', () => {
    const text = 'a,b\n\n"x\ny",2\n3,"4\n\n5"\n6,7\n';
    expect(splitRecords(text, ',').lines).toEqual([1, 3, 5, 8]);
    expect(splitRecords(text.replaceAll('\n', '\r\n'), ',').lines).toEqual([1, 3, 5, 8]);
    expect(records(text)).toEqual([
      ['a', 'b'],
      ['x\ny', '2'],
      ['3', '4\n\n5'],
      ['6', '7'],
    ]);
  });

  it('leaves out rows of delimiters and spaces only', () => {
    expect(records('a,b\n,,\n  \n"",\n1,2')).toEqual([
      ['a', 'b'],
      ['1', '2'],
    ]);
  });

  it('goes on after a faulty row, and stops at a quote that is never closed', () => {
    const { faults, lines } = splitRecords('a,b\n"x"y,1\n2,3\n"4,5\n6,7\n', ',');
    expect(faults.map((fault) => fault.line)).toEqual([2, 4]);
    expect(lines).toEqual([1, 2, 3]);
  });

  it('reads what csv-parse reads, for tables written with quotes where needed', () => {
    const cell = fc.stringMatching(/^[a-c0-9 ,;"\n\t.]{0,8}$/);
    const table = fc.array(fc.array(cell, { minLength: 3, maxLength: 3 }), { minLength: 1, maxLength: 12 });
    fc.assert(
      fc.property(table, fc.constantFrom(',', ';', '\t'), fc.boolean(), (rows, delimiter, quoteAll) => {
        const quoted = (text: string) =>
          quoteAll || /[",;\t\n]|^ /.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
        const text = rows.map((row) => row.map(quoted).join(delimiter)).join('\n');
        const expected = (
          parse(text, { delimiter, relax_column_count: true, record_delimiter: '\n' }) as string[][]
        ).filter((row) => row.some((value) => /[^\s"]/.test(value.replaceAll(delimiter, ''))));
        const found = records(text, delimiter).filter((row) =>
          row.some((value) => /[^\s"]/.test(value.replaceAll(delimiter, ''))),
        );
        expect(found).toEqual(expected);
      }),
      { numRuns: 500 },
    );
  });
});
