import type { StandardRecord } from '../model/index.js';
import { checkRatio } from './check-ratio.js';
import { aminoAcidOf } from './column-names.js';
import { matchColumns, warnOfUnknownColumns } from './match-columns.js';
import { ownValue } from './own-value.js';
import type { ProblemList } from './problem-list.js';
import { createRowReader } from './row-reader.js';
import { settleDecimal } from './settle-decimal.js';
import { squash } from './squash.js';
import type { Table } from './table.js';

const NAMES: Readonly<Record<string, string>> = {
  lab: 'lab',
  laboratory: 'lab',
  standard: 'standard',
  aminoacid: 'amino_acid',
  dl: 'dl',
  dlratio: 'dl',
};
const COLUMNS = ['lab', 'standard', 'amino_acid', 'dl'] as const;

/** Key of a header of the standards table. */
export function standardsKey(header: string): string | null {
  return ownValue(NAMES, squash(header));
}

/** Reads the table of interlaboratory standards. */
export function readStandards(table: Table, problems: ProblemList): StandardRecord[] {
  const match = matchColumns(table, standardsKey, problems);
  const { at } = match;
  warnOfUnknownColumns(table, match.unknown, COLUMNS, () => null, problems);
  const missing = COLUMNS.filter((column) => at(column) < 0);
  for (const column of missing) {
    problems.error(
      `no ${column} column`,
      { file: table.file, line: table.headerLine },
      `The standards table has no column "${column}". Wanted are lab, standard, amino_acid and dl.`,
    );
  }
  if (missing.length > 0) return [];
  const reader = createRowReader(table, settleDecimal(table, [at('dl')], problems), problems);
  const standards: StandardRecord[] = [];
  reader.forEachRow((cells, row) => {
    const lab = reader.neededName(cells, row, at('lab'), 'lab');
    const standard = reader.neededName(cells, row, at('standard'), 'standard');
    const name = reader.neededName(cells, row, at('amino_acid'), 'amino acid');
    const amino = aminoAcidOf(name);
    if (name !== '' && amino === null) {
      problems.error(
        'amino acid',
        reader.place(row, at('amino_acid')),
        `"${name}" is no amino acid that is read here. Wanted is one of Asx, Glx, Ser, Ala, Val, Phe, Leu, Ile, Tyr, Met.`,
      );
    }
    reader.neededName(cells, row, at('dl'), 'D/L ratio');
    const dl = reader.number(cells, row, at('dl'));
    if (lab === '' || standard === '' || amino === null || dl === null) return;
    if (!checkRatio(dl, amino, () => reader.place(row, at('dl')), problems)) return;
    standards.push({ file: table.file, line: table.line(row), lab, standard, amino_acid: amino, dl });
  });
  return standards;
}
