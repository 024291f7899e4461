import { type BedRegister, PLACE_KINDS } from './bed-register.js';
import { matchColumns, warnOfUnknownColumns } from './match-columns.js';
import { ownValue } from './own-value.js';
import type { ProblemList } from './problem-list.js';
import { type DecimalSign, readNumber, tidyNumber } from './read-number.js';
import { createRowReader } from './row-reader.js';
import { settleDecimal } from './settle-decimal.js';
import { PLACE_NAMES, shellsKey } from './shells-columns.js';
import { NEGATIVE_DEPTH } from './shells-table.js';
import { squash } from './squash.js';
import { isBlank, type Table } from './table.js';

/** Numbers of the beds table that bedorder knows by name. */
export const BED_NUMBERS = ['elevation_m', 'latitude', 'longitude', 'coast_km', 'cmat_c', 'burial_m'] as const;
type BedNumber = (typeof BED_NUMBERS)[number];

const NAMES: Readonly<Record<string, string>> = {
  elevationm: 'elevation_m',
  elevation: 'elevation_m',
  elevationmetres: 'elevation_m',
  elevationmeters: 'elevation_m',
  latitude: 'latitude',
  lat: 'latitude',
  longitude: 'longitude',
  long: 'longitude',
  lon: 'longitude',
  lng: 'longitude',
  coastkm: 'coast_km',
  cmatc: 'cmat_c',
  cmat: 'cmat_c',
  burialm: 'burial_m',
  burialdepthm: 'burial_m',
  note: 'note',
  notes: 'note',
};

/** Names of the beds table's columns, for suggestions. */
const COLUMNS: readonly string[] = ['section', 'bed', ...PLACE_KINDS, ...BED_NUMBERS, 'note'];

/** Key of a header of the beds table. Whatever else the shells table has, such as a taxon, is not known here. */
export function bedsKey(header: string): string | null {
  const plain = squash(header);
  const known = ownValue(NAMES, plain) ?? ownValue(PLACE_NAMES, plain);
  if (known !== null) return known;
  const key = shellsKey(header);
  return key === 'section' || key === 'bed' ? key : null;
}

/** What the beds table says of one bed beyond its place. */
export interface BedDetails {
  readonly numbers: Readonly<Partial<Record<BedNumber, number>>>;
  readonly note: string | null;
  readonly columns: Readonly<Record<string, number>>;
}

/** Reads the beds table: enters its beds and places, and gives the details a bed, by `section` then `bed`. */
export function readBeds(table: Table, beds: BedRegister, problems: ProblemList): Map<string, Map<string, BedDetails>> {
  const details = new Map<string, Map<string, BedDetails>>();
  const match = matchColumns(table, bedsKey, problems);
  const { at } = match;
  for (const needed of ['section', 'bed']) {
    if (at(needed) < 0) {
      problems.error(
        `no ${needed} column`,
        { file: table.file, line: table.headerLine },
        `The beds table has no column "${needed}". Add it: every row needs its section and bed, named as in the shells table.`,
      );
    }
  }
  if (at('section') < 0 || at('bed') < 0) return details;
  const known = [...PLACE_KINDS, ...BED_NUMBERS].map(at).filter((index) => index >= 0);
  const { numeric, other } = sortUnknown(table, match.unknown);
  const sign = settleDecimal(table, decimalsIn(table, known) ? known : [...known, ...numeric], problems);
  const extra = readableColumns(table, numeric, sign);
  const unread = [...other, ...numeric.filter((index) => !extra.includes(index))].sort((a, b) => a - b);
  warnOfUnknownColumns(table, unread, COLUMNS, () => null, problems);

  const reader = createRowReader(table, sign, problems);
  const firstRows = new Map<string, number>();
  reader.forEachRow((cells, row) => {
    const section = reader.neededName(cells, row, at('section'), 'section');
    const bed = reader.neededName(cells, row, at('bed'), 'bed');
    const numbers: Partial<Record<BedNumber, number>> = {};
    const columns: [string, number][] = [];
    for (const name of BED_NUMBERS) {
      const value = reader.number(cells, row, at(name));
      if (value === null) continue;
      const fault = outOfRange(name, value);
      if (fault !== null) problems.error('range', reader.place(row, at(name)), fault);
      numbers[name] = value;
      columns.push([table.header[at(name)], value], [name, value]);
    }
    let given: string | null = null;
    const row_ = { file: table.file, line: table.line(row) };
    const entry = section === '' || bed === '' ? null : beds.enter(section, bed, () => row_);
    for (const kind of PLACE_KINDS) {
      const value = reader.number(cells, row, at(kind));
      if (value === null) continue;
      columns.push([table.header[at(kind)], value]);
      const place = { ...row_, column: table.header[at(kind)] };
      if (given !== null) {
        problems.error(
          'two kinds in a row',
          place,
          `The row gives ${given} and ${kind} as well. Give one kind of place for a whole section.`,
        );
      } else if (kind === 'depth_m' && value < 0) problems.error('negative depth', place, NEGATIVE_DEPTH(value));
      else if (entry !== null) beds.setPlace(entry, kind, value, () => place);
      given ??= kind;
    }
    for (const index of extra) {
      const value = reader.number(cells, row, index);
      if (value !== null) columns.push([table.header[index], value]);
    }
    const note = reader.name(cells, row, at('note')) || null;
    if (section === '' || bed === '') return;
    let ofSection = details.get(section);
    if (ofSection === undefined) {
      ofSection = new Map();
      details.set(section, ofSection);
    }
    const now: BedDetails = { numbers, note, columns: Object.fromEntries(columns) };
    const before = ofSection.get(bed);
    const key = `${section}\u0000${bed}`;
    if (before === undefined) {
      ofSection.set(bed, now);
      firstRows.set(key, row);
      return;
    }
    noteSecondRow(before, now, `${section}/${bed}`, table.line(firstRows.get(key)!), row_, problems);
  });
  return details;
}

function noteSecondRow(
  before: BedDetails,
  now: BedDetails,
  name: string,
  firstLine: number,
  at: { file: string; line: number },
  problems: ProblemList,
): void {
  for (const [column, value] of Object.entries(now.columns)) {
    const known = ownValue(before.columns, column);
    if (known === null || known === value || (PLACE_KINDS as readonly string[]).includes(column)) continue;
    problems.error(
      'bed twice',
      { ...at, column },
      `Bed ${name} has ${column} ${value} here and ${known} on line ${firstLine}. Give each bed one row.`,
    );
    return;
  }
  problems.warning(
    'bed twice',
    at,
    `Bed ${name} also stands on line ${firstLine}; the first row is used. Give each bed one row.`,
  );
}

function outOfRange(name: BedNumber, value: number): string | null {
  if (name === 'latitude' && !(Math.abs(value) <= 90))
    return `A latitude of ${value} is not between -90 and 90 degrees.`;
  if (name === 'longitude' && !(Math.abs(value) <= 180))
    return `A longitude of ${value} is not between -180 and 180 degrees.`;
  if (name === 'burial_m' && !(value >= 0)) return `burial_m is ${value}; the thickness of a cover can't be below 0.`;
  if (name === 'cmat_c' && !(Math.abs(value) <= 60)) return `cmat_c is ${value}; wanted are degrees Celsius.`;
  return null;
}

const NUMBER_LIKE = /^[+-]?(?:\d+[.,]?\d*|[.,]\d+)(?:[eE][+-]?\d{1,4})?$/;

/** Parts the columns without a known name into those that hold numbers only, for `--gradient`, and the others. */
function sortUnknown(table: Table, unknown: readonly number[]): { numeric: number[]; other: number[] } {
  const filled = new Map(unknown.map((index) => [index, 0]));
  const text = new Set<number>(unknown.filter((index) => table.header[index] === ''));
  for (let row = 0; row < table.length; row += 1) {
    const cells = table.cells(row);
    for (const index of unknown) {
      const cell = cells[index];
      if (isBlank(cell) || text.has(index)) continue;
      filled.set(index, filled.get(index)! + 1);
      if (typeof cell !== 'number' && (typeof cell !== 'string' || !NUMBER_LIKE.test(tidyNumber(cell))))
        text.add(index);
    }
  }
  const isNumeric = (index: number) => !text.has(index) && filled.get(index)! > 0;
  return { numeric: unknown.filter(isNumeric), other: unknown.filter((index) => !isNumeric(index)) };
}

function decimalsIn(table: Table, columns: readonly number[]): boolean {
  for (let row = 0; row < table.length; row += 1) {
    const cells = table.cells(row);
    if (columns.some((index) => typeof cells[index] === 'string' && /\d[.,]\d/.test(cells[index] as string)))
      return true;
  }
  return false;
}

/** The columns of which every filled cell is a number with the file's decimal sign. */
function readableColumns(table: Table, columns: readonly number[], sign: DecimalSign): number[] {
  const left = new Set(columns);
  for (let row = 0; row < table.length && left.size > 0; row += 1) {
    const cells = table.cells(row);
    for (const index of left) {
      const cell = cells[index];
      if (typeof cell === 'string' && !isBlank(cell) && Number.isNaN(readNumber(tidyNumber(cell), sign)))
        left.delete(index);
    }
  }
  return [...left];
}
