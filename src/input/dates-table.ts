import type { DateLimit, DateRecord, InputFile, Problem } from '../model/index.js';
import { matchColumns, warnOfUnknownColumns } from './match-columns.js';
import { ownValue } from './own-value.js';
import { createProblemList, type ProblemList } from './problem-list.js';
import { type FileBytes, readTable } from './read-table.js';
import { createRowReader } from './row-reader.js';
import { settleDecimal } from './settle-decimal.js';
import { sha256 } from './sha256.js';
import { squash } from './squash.js';
import { isBlank, type Table } from './table.js';

const NAMES: Readonly<Record<string, string>> = {
  section: 'section',
  bed: 'bed',
  ageka: 'age_ka',
  errorka: 'error_ka',
  limit: 'limit',
  method: 'method',
};
const COLUMNS = ['section', 'bed', 'age_ka', 'error_ka', 'limit', 'method'] as const;
const LIMITS_OF_AGE: Readonly<Record<string, DateLimit>> = { equal: 'equal', older: 'older', younger: 'younger' };

/** Key of a header of the dates table. */
export function datesKey(header: string): string | null {
  return ownValue(NAMES, squash(header));
}

/** Dates, or none when any problem is an error. */
export interface DatesResult {
  readonly dates: DateRecord[] | null;
  /** The file for results; null when it was refused. */
  readonly input: InputFile | null;
  readonly problems: Problem[];
}

/** Reads the dates table from the bytes of a CSV, TSV, semicolon-separated or .xlsx file. */
export async function datesFromBytes(
  source: FileBytes,
  sheet?: string,
  problems: ProblemList = createProblemList(),
): Promise<DatesResult> {
  const kind = {
    isKnown: (header: string) => datesKey(header) !== null,
    wanted: 'section, bed, age_ka, error_ka, limit, method',
    sheet,
  };
  const table = await readTable(source, kind, problems);
  const dates = table === null ? [] : readRows(table, problems);
  const list = problems.list();
  if (table === null || problems.hasErrors()) return { dates: null, input: null, problems: list };
  const input: InputFile = { role: 'dates', file: source.file, sha256: await sha256(source.bytes), rows: table.length };
  return { dates, input, problems: list };
}

function readRows(table: Table, problems: ProblemList): DateRecord[] {
  const match = matchColumns(table, datesKey, problems);
  const { at } = match;
  warnOfUnknownColumns(table, match.unknown, COLUMNS, hintOf, problems);
  const missing = (['section', 'bed', 'age_ka', 'error_ka'] as const).filter((column) => at(column) < 0);
  for (const column of missing) {
    problems.error(
      `no ${column} column`,
      { file: table.file, line: table.headerLine },
      `The dates table has no column "${column}". Wanted are section, bed, age_ka and error_ka (one standard deviation), in thousand years.`,
    );
  }
  if (missing.length > 0) return [];
  const numeric = [at('age_ka'), at('error_ka')];
  const reader = createRowReader(table, settleDecimal(table, numeric, problems), problems);
  const dates: DateRecord[] = [];
  reader.forEachRow((cells, row) => {
    const section = reader.neededName(cells, row, at('section'), 'section');
    const bed = reader.neededName(cells, row, at('bed'), 'bed');
    const numberIn = (column: 'age_ka' | 'error_ka'): number | null => {
      if (isBlank(cells[at(column)])) {
        reader.neededName(cells, row, at(column), column);
        return null;
      }
      const value = reader.number(cells, row, at(column));
      if (value === null || value > 0 || (value === 0 && column === 'age_ka')) return value;
      const why = column === 'age_ka' ? 'an age is not below 0' : 'an error is above 0; write one standard deviation';
      problems.error('date number', reader.place(row, at(column)), `${column} is ${value}; ${why}.`);
      return null;
    };
    const age_ka = numberIn('age_ka');
    const error_ka = numberIn('error_ka');
    const written = reader.name(cells, row, at('limit'));
    const limit = written === '' ? 'equal' : ownValue(LIMITS_OF_AGE, squash(written));
    if (limit === null) {
      problems.error(
        'limit',
        reader.place(row, at('limit')),
        `"${written}" is no limit. Write equal, older (the bed is older than the date) or younger.`,
      );
    }
    if (section === '' || bed === '' || age_ka === null || error_ka === null || limit === null) return;
    const method = reader.name(cells, row, at('method')) || null;
    dates.push({ file: table.file, line: table.line(row), section, bed, age_ka, error_ka, limit, method });
  });
  return dates;
}

function hintOf(header: string): string | null {
  const plain = squash(header);
  if (/^(age|date)/.test(plain)) return 'wanted is age_ka, in thousand years';
  if (/^(error|err|sd|1s|sigma|uncertainty)/.test(plain))
    return 'wanted is error_ka, one standard deviation in thousand years';
  return null;
}
