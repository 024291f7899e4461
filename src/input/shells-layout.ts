import { AMINO_ACIDS, type AminoAcid } from '../model/index.js';
import { isBareAminoAcid, measureOf } from './column-names.js';
import { type ColumnMatch, matchColumns, warnOfUnknownColumns } from './match-columns.js';
import type { ProblemList } from './problem-list.js';
import { SHELLS_COLUMNS, shellsHint, shellsKey } from './shells-columns.js';
import type { Table } from './table.js';

/** The columns of one amino acid in the wide form; -1 where absent. */
export interface MeasureColumns {
  readonly amino: AminoAcid;
  readonly ratio: number;
  readonly sd: number;
  readonly concentration: number;
}

/** Where everything stands in one shells table. */
export interface ShellsLayout {
  readonly columns: ColumnMatch;
  /** True for one row an amino acid. */
  readonly long: boolean;
  readonly measures: readonly MeasureColumns[];
  /** Every column that holds numbers. */
  readonly numeric: readonly number[];
}

const NUMERIC = ['level', 'height_m', 'depth_m', 'n', 'dl', 'dl_sd', 'concentration', 'serine'] as const;

/** Matches the columns of a shells table; null when a needed one is missing. */
export function layoutOfShells(table: Table, problems: ProblemList): ShellsLayout | null {
  const columns = matchColumns(table, shellsKey, problems);
  const at = columns.at;
  const long = at('amino_acid') >= 0 && at('dl') >= 0;
  const measures = AMINO_ACIDS.map((amino) => ({
    amino,
    ratio: at(`ratio ${amino}`),
    sd: at(`sd ${amino}`),
    concentration: at(`concentration ${amino}`),
  })).filter((m) => m.ratio >= 0 || m.sd >= 0 || m.concentration >= 0);
  const wide = measures.some((m) => m.ratio >= 0);
  const head = { file: table.file, line: table.headerLine };

  const unknown = [...columns.unknown];
  for (const key of long ? [] : ['amino_acid', 'dl', 'dl_sd', 'concentration'])
    if (at(key) >= 0 && wide) unknown.push(at(key));
  warnOfUnknownColumns(table, unknown, SHELLS_COLUMNS, shellsHint, problems);

  let complete = true;
  for (const needed of ['section', 'bed', 'taxon']) {
    if (at(needed) >= 0) continue;
    complete = false;
    problems.error(`no ${needed} column`, head, `The table has no column "${needed}". ${missingAdvice(table, needed)}`);
  }
  if (!long && !wide) {
    complete = false;
    problems.error('no ratio column', head, `The table has no column of D/L ratios. ${ratioAdvice(table, columns)}`);
  }
  if (long && wide) {
    complete = false;
    problems.error(
      'two forms',
      head,
      'The table has the columns amino_acid and dl, and ratio columns such as ' +
        `"${table.header[measures.find((m) => m.ratio >= 0)!.ratio]}" as well. Give the ratios in one form only.`,
    );
  }
  for (const m of long ? [] : measures) {
    if (m.sd < 0 || m.ratio >= 0) continue;
    complete = false;
    problems.error(
      'sd without ratio',
      { ...head, column: table.header[m.sd] },
      `The table has a standard deviation of ${m.amino}, but no ratio. Add the column "D/L ${m.amino}", or leave the standard deviation out.`,
    );
  }
  complete = sameUnits(table, measures, problems) && complete;
  if (!complete) return null;
  const numeric = [...NUMERIC.map(at), ...measures.flatMap((m) => [m.ratio, m.sd, m.concentration])].filter(
    (index) => index >= 0,
  );
  return { columns, long, measures, numeric };
}

function missingAdvice(table: Table, needed: string): string {
  const candidate = table.header.find((header) => shellsHint(header)?.includes(`call it ${needed}`));
  if (candidate !== undefined) return `Perhaps "${candidate}" is meant: rename it.`;
  return `Add it: every row needs its section, bed and taxon. Found were: ${shortList(table.header)}.`;
}

function ratioAdvice(table: Table, columns: ColumnMatch): string {
  const bare = table.header.find((header, i) => columns.unknown.includes(i) && isBareAminoAcid(header));
  if (bare !== undefined) return `If "${bare}" holds a ratio, call it "D/L ${bare}".`;
  const lonely = columns.at('dl') >= 0 ? 'amino_acid' : columns.at('amino_acid') >= 0 ? 'dl' : null;
  if (lonely !== null)
    return `With one row an amino acid both columns "amino_acid" and "dl" are needed; "${lonely}" is missing.`;
  return `Wanted is one column an amino acid, such as "D/L Asx" or "A/I", or the columns "amino_acid" and "dl". Found were: ${shortList(table.header)}.`;
}

function shortList(header: readonly string[]): string {
  const shown = header.slice(0, 12).map((name) => `"${name.length > 40 ? `${name.slice(0, 40)}…` : name}"`);
  return shown.join(', ') + (header.length > 12 ? ` and ${header.length - 12} more` : '');
}

/** Concentrations stand in one unit: their ratios are used across amino acids. */
function sameUnits(table: Table, measures: readonly MeasureColumns[], problems: ProblemList): boolean {
  let first: { unit: string; header: string } | null = null;
  for (const { concentration } of measures) {
    if (concentration < 0) continue;
    const header = table.header[concentration];
    const unit = measureOf(header)?.unit;
    if (unit === null || unit === undefined) continue;
    first ??= { unit, header };
    if (unit.replace(/\s/g, '') === first.unit.replace(/\s/g, '')) continue;
    problems.error(
      'two units',
      { file: table.file, line: table.headerLine, column: header },
      `"${first.header}" and "${header}" have different units. Give all concentrations in one unit.`,
    );
    return false;
  }
  return true;
}
