import type { ProblemList } from './problem-list.js';
import type { Cell, Table } from './table.js';

/** Warns of rows and laboratory numbers that come twice, while a shells table is read. */
export interface RepeatWatch {
  readonly row: (cells: readonly Cell[], row: number) => void;
  /** @param analysis what the number stands for: the same number on other injections of one shell is no repeat */
  readonly labId: (id: string, shell: string, analysis: string, row: number, column: number) => void;
}

/** Makes the watch over one table. */
export function createRepeatWatch(table: Table, problems: ProblemList): RepeatWatch {
  const rows = new Map<number, number>();
  const ids = new Map<string, { row: number; shell: string; analyses: string | Set<string> }>();

  const row: RepeatWatch['row'] = (cells, at) => {
    const print = fingerprint(cells);
    const first = rows.get(print);
    if (first === undefined) {
      rows.set(print, at);
      return;
    }
    const before = table.cells(first);
    if (before.length !== cells.length || !before.every((cell, i) => String(cell) === String(cells[i]))) return;
    problems.warning(
      'row twice',
      { file: table.file, line: table.line(at) },
      `The row is the same as line ${table.line(first)} in every cell, and both are counted. Delete one if it was pasted twice.`,
    );
  };

  const labId: RepeatWatch['labId'] = (id, shell, analysis, at, column) => {
    const known = ids.get(id);
    if (known === undefined) {
      ids.set(id, { row: at, shell, analyses: analysis });
      return;
    }
    const again = typeof known.analyses === 'string' ? known.analyses === analysis : known.analyses.has(analysis);
    if (known.shell === shell && !again) {
      if (typeof known.analyses === 'string') known.analyses = new Set([known.analyses]);
      known.analyses.add(analysis);
      return;
    }
    problems.warning(
      'lab_id twice',
      { file: table.file, line: table.line(at), column: table.header[column] },
      `The laboratory number "${id}" also stands on line ${table.line(known.row)}, ${known.shell === shell ? 'for the same analysis' : 'for another shell'}. Both rows are counted: check that none was pasted or numbered wrongly.`,
    );
  };
  return { row, labId };
}

/** A number that nearly always differs between rows that differ (two 26-bit multiplicative hashes side by side). */
function fingerprint(cells: readonly Cell[]): number {
  let a = 17;
  let b = 31;
  for (const cell of cells) {
    const text = typeof cell === 'string' ? cell : String(cell);
    for (let i = 0; i < text.length; i += 1) {
      const code = text.charCodeAt(i);
      a = (Math.imul(a, 31) + code) | 0;
      b = (Math.imul(b, 16_777_619) ^ code) | 0;
    }
    a = (Math.imul(a, 31) + 1) | 0;
    b = (Math.imul(b, 16_777_619) ^ 1) | 0;
  }
  return (a >>> 6) * 67_108_864 + (b >>> 6);
}
