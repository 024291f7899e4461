import type { Analysis } from '../model/index.js';
import type { ProblemList } from './problem-list.js';
import type { Table } from './table.js';

/** Warns of rows that come twice, word for word, while a table is read. */
export interface RowWatch {
  readonly row: (row: number) => void;
}

/** Makes the watch over one table: a hash table of row numbers, in 16 bytes a row. */
export function createRowWatch(table: Table, problems: ProblemList): RowWatch {
  let size = 16;
  while (size < 2 * table.length) size *= 2;
  const slots = new Int32Array(size);
  const checks = new Int32Array(size);
  return {
    row: (row) => {
      const { a, b } = table.print(row);
      let slot = Math.imul(a ^ (a >>> 15), 0x2c1b3c6d) & (size - 1);
      while (slots[slot] !== 0) {
        const before = slots[slot] - 1;
        if (checks[slot] === b && sameRow(table, before, row)) {
          problems.warning(
            'row twice',
            { file: table.file, line: table.line(row) },
            `The row is the same as line ${table.line(before)} in every cell, and both are counted. Delete one if it was pasted twice.`,
          );
          return;
        }
        slot = (slot + 1) & (size - 1);
      }
      slots[slot] = row + 1;
      checks[slot] = b;
    },
  };
}

function sameRow(table: Table, a: number, b: number): boolean {
  const [cellsA, cellsB] = [table.cells(a), table.cells(b)];
  return cellsA.length === cellsB.length && cellsA.every((cell, i) => String(cell) === String(cellsB[i]));
}

/**
 * Warns of laboratory numbers that come twice: for another shell, or for the same fraction, preparation and injection
 * (in the long form, of the same amino acid) of one shell. Several injections of one shell under one number are no
 * repeat.
 */
export function warnOfRepeatedIds(analyses: readonly Analysis[], column: string, problems: ProblemList): void {
  const first = new Map<string, number>();
  const more = new Map<string, Set<string>>();
  analyses.forEach((analysis, index) => {
    const id = analysis.lab_id;
    if (id === null) return;
    const before = first.get(id);
    if (before === undefined) {
      first.set(id, index);
      return;
    }
    const other = analyses[before];
    const sameShell =
      other.shell === analysis.shell &&
      other.bed === analysis.bed &&
      other.section === analysis.section &&
      other.taxon === analysis.taxon;
    let known = more.get(id);
    if (known === undefined) {
      known = new Set([kindOf(other)]);
      more.set(id, known);
    }
    const kind = kindOf(analysis);
    if (sameShell && !known.has(kind)) {
      known.add(kind);
      return;
    }
    problems.warning(
      'lab_id twice',
      { file: analysis.file, line: analysis.line, column },
      `The laboratory number "${id}" also stands on line ${other.line}, for ${sameShell ? 'the same analysis' : 'another shell'}. Both rows are counted: check that none was pasted or numbered wrongly.`,
    );
  });
}

function kindOf({ fraction, preparation, injection, ratios }: Analysis): string {
  return [fraction, preparation, injection, Object.keys(ratios).join(' ')].join('\u0000');
}
