import { type BedRegister, PLACE_KINDS } from './bed-register.js';
import { decimalsIn, readableColumns, sortUnknown } from './gradient-columns.js';
import { LIMITS } from './limits.js';
import { matchColumns, warnOfUnknownColumns } from './match-columns.js';
import { ownValue } from './own-value.js';
import { placeColumns, readPlace } from './place-columns.js';
import type { ProblemList } from './problem-list.js';
import { readNumber, tidyNumber } from './read-number.js';
import { createRowReader } from './row-reader.js';
import { settleDecimal } from './settle-decimal.js';
import { PLACE_NAMES, shellsKey } from './shells-columns.js';
import { squash } from './squash.js';
import type { Table } from './table.js';

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
  const extra = readableColumns(table, numeric, sign).slice(0, LIMITS.gradientColumns);
  const unread = [...other, ...numeric.filter((index) => !extra.includes(index))].sort((a, b) => a - b);
  warnOfUnknownColumns(table, unread, COLUMNS, () => null, problems);

  const reader = createRowReader(table, sign, problems);
  const places = placeColumns(at);
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
    const row_ = { file: table.file, line: table.line(row) };
    const entry = section === '' || bed === '' ? null : beds.enter(section, bed, () => row_);
    readPlace(places, cells, row, entry, reader, beds, problems);
    for (const { column } of places) {
      // A place that can't be read has its problem already.
      const value =
        typeof cells[column] === 'number' ? cells[column] : readNumber(tidyNumber(String(cells[column])), sign);
      if (Number.isFinite(value)) columns.push([table.header[column], value]);
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
