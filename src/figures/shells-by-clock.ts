import type { ClockRow, ShellRow } from '../model/index.js';
import { bedKey } from './bed-key.js';

/** One shell with its number in findings.shells. */
export interface ShellView {
  readonly id: number;
  readonly row: ShellRow;
}

/** The shells of one bed on one clock. */
export interface ShellsOfBed {
  /** Their numbers in the list of all shells. */
  readonly shells: Int32Array;
  /** Those that are set aside or doubtful. */
  readonly odd: readonly ShellView[];
}

interface Group {
  readonly number: number;
  readonly odd: ShellView[];
  count: number;
}

/** The shells of each of these clocks, and within it by `section/bed`, in the order of `all`. */
export function shellsByClock(
  all: readonly ShellRow[],
  clocks: readonly ClockRow[],
): ReadonlyMap<string, ReadonlyMap<string, ShellsOfBed>> {
  const byClock = new Map(clocks.map(({ clock }) => [clock, new Map<string, Group>()]));
  const groups: Group[] = [];
  const groupOfShell = new Int32Array(all.length).fill(-1);
  let last: ShellRow | null = null;
  let own: Group | null = null;
  for (let id = 0; id < all.length; id++) {
    const row = all[id];
    // shells of one bed mostly follow each other, and then need no look-up
    if (last === null || row.bed !== last.bed || row.section !== last.section || row.clock !== last.clock)
      own = groupIn(byClock.get(row.clock), bedKey(row), groups);
    last = row;
    if (own === null) continue;
    groupOfShell[id] = own.number;
    own.count++;
    if (row.status !== 'kept') own.odd.push({ id, row });
  }
  const numbers = numbersByGroup(groupOfShell, groups);
  return mapped(byClock, (beds) => mapped(beds, ({ number, odd }) => ({ shells: numbers[number], odd })));
}

function groupIn(beds: Map<string, Group> | undefined, key: string, groups: Group[]): Group | null {
  if (beds === undefined) return null;
  const known = beds.get(key);
  if (known !== undefined) return known;
  const group: Group = { number: groups.length, odd: [], count: 0 };
  groups.push(group);
  beds.set(key, group);
  return group;
}

/** Numbers of the shells of each group, all of them parts of one array. */
function numbersByGroup(groupOfShell: Int32Array, groups: readonly Group[]): Int32Array[] {
  const ends = new Int32Array(groups.length);
  let total = 0;
  groups.forEach((group, i) => {
    ends[i] = total;
    total += group.count;
  });
  const numbers = new Int32Array(total);
  groupOfShell.forEach((group, id) => {
    if (group >= 0) numbers[ends[group]++] = id;
  });
  return groups.map((group, i) => numbers.subarray(ends[i] - group.count, ends[i]));
}

const mapped = <From, To>(map: ReadonlyMap<string, From>, to: (value: From) => To): Map<string, To> =>
  new Map([...map].map(([key, value]) => [key, to(value)]));
