import type { SummaryOfShells } from '../model/index.js';
import type { BedEntry } from './bed-register.js';
import type { ProblemList } from './problem-list.js';
import type { RowMeasures } from './row-measures.js';
import type { RowReader } from './row-reader.js';
import type { ShellsLayout } from './shells-layout.js';
import { type Cell, isBlank } from './table.js';

/** A row without a shell is a summary: of `n` shells, or of one where a mean alone is given. */
export function summaryOf(
  layout: ShellsLayout,
  cells: readonly Cell[],
  row: number,
  shell: string,
  measures: RowMeasures,
  reader: RowReader,
  problems: ProblemList,
): SummaryOfShells | null {
  const column = layout.columns.at('n');
  const n = reader.number(cells, row, column);
  const sound = n === null || (Number.isInteger(n) && n >= 1 && n <= 1_000_000);
  if (!sound) {
    problems.error('n', reader.place(row, column), `n is ${n}; it is the number of shells, a whole number from 1.`);
    return null;
  }
  if (shell !== '') {
    if (measures.hasSd || (n !== null && n > 1)) {
      problems.warning(
        'n with shell',
        reader.place(row),
        `The row names shell "${shell}", so its n and standard deviation are not used: they belong to rows that sum up several shells and name none.`,
      );
    }
    return null;
  }
  if (measures.hasSd && n === null && isBlank(cells[column])) {
    problems.error(
      'sd without n',
      column < 0 ? reader.place(row) : reader.place(row, column),
      'The row gives a standard deviation but not the number of shells. Write that number into the column n.',
    );
  } else if (measures.hasSd && n === 1) {
    problems.error(
      'sd of one shell',
      reader.place(row, column),
      'n is 1, and one shell has no standard deviation between shells. Correct n, or empty the cell of the standard deviation.',
    );
  } else if (n === null && isBlank(cells[column]) && measures.filled) {
    problems.warning(
      'mean alone',
      reader.place(row),
      'The row has neither shell nor n: it counts as one shell, which says nothing of the scatter. Name the shell, or give n (and the standard deviation).',
    );
  }
  return { n: n ?? 1, sd: measures.sd };
}

/** Counts the shells of a taxon in a bed, as far as one and more than one are told apart. */
export function countShell(
  shells: BedEntry['shells'],
  taxon: string,
  shell: string,
  summary: SummaryOfShells | null,
  line: number,
): void {
  const known = shells.get(taxon);
  const n = summary?.n ?? 1;
  if (known === undefined) shells.set(taxon, { count: n, only: shell, line });
  else if (summary !== null || shell !== known.only) known.count += n;
}
