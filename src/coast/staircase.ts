import type { RelationRecord } from '../model/index.js';

/** Beds whose elevations differ by no more than this many metres are one terrace, and are not ordered. */
export const ONE_TERRACE_M = 1;

/** Most relations derived; with more, each terrace is held against the next lower ones only. */
export const MOST_STAIRCASE_RELATIONS = 20_000;

/** A bed that has a ratio, as the staircase needs it. */
export interface BedOnStaircase {
  /** `section/bed`. */
  readonly key: string;
  readonly section: string;
  /** Elevation of the deposit above present sea level, metres. */
  readonly elevation_m: number | null;
}

/** How staircase relations are derived. */
export interface StaircaseOptions {
  /** `section`: a flight of terraces logged as one section; `coast`: one flight along the whole coast. */
  readonly along: 'section' | 'coast';
  /** Whether they bind the order; they are `probable` otherwise. Default false. */
  readonly certain?: boolean;
}

/** Relations of the staircase, and what kept others from being derived. */
export interface Staircase {
  readonly relations: readonly RelationRecord[];
  /** Relations left out since they would close a circle with certain ones; only where `certain` is asked for. */
  readonly circles: readonly { readonly lower: string; readonly upper: string }[];
  /** Whether more than {@link MOST_STAIRCASE_RELATIONS} followed, so that the furthest steps were left out. */
  readonly cut: boolean;
}

/**
 * On a coast that rises, the higher terrace is the older (DESIGN 5): the bed at the higher elevation is `lower`, that is
 * older, in the relation. Beds stacked in one exposure have elevations too, and there the higher is the younger, so
 * superposition always wins:
 * - the older side of a relation is only a bed with none below it, the foot of its terrace: what lies on it may be younger;
 * - beds that certain relations order already, directly or through others, are left alone, and so are pairs of the table;
 * - beds within {@link ONE_TERRACE_M} metre of each other are one terrace.
 *
 * Only steps that don't follow from others are given (a > b and b > c stand for a > c).
 * @param beds beds that have a mean
 * @param known superposition of the sections and the relations table
 * @example
 * const beds = [
 *   { key: 'Fell/T2', section: 'Fell', elevation_m: 31 },
 *   { key: 'Fell/T1', section: 'Fell', elevation_m: 8.5 },
 * ];
 * staircaseRelations(beds, [], { along: 'section' }).relations[0].lower // => 'Fell/T2'
 */
export function staircaseRelations(
  beds: readonly BedOnStaircase[],
  known: readonly RelationRecord[],
  { along, certain = false }: StaircaseOptions,
): Staircase {
  const order = knownOrder(known);
  const stated = new Set(known.flatMap(({ lower, upper }) => [pair(lower, upper), pair(upper, lower)]));
  const flights = along === 'coast' ? [beds] : [...bySection(beds).values()];
  const total = beds.length;
  const all: RelationRecord[] = [];
  let cut = false;
  for (const flight of flights) {
    const steps = stepsOf(flight, order, stated, Math.max(1, Math.floor(MOST_STAIRCASE_RELATIONS / total)));
    cut ||= steps.cut;
    for (const [lower, upper] of steps.pairs) {
      const certainty = certain ? 'certain' : 'probable';
      all.push({ lower, upper, basis: 'staircase', kind: 'older', certainty, row: null });
    }
  }
  if (!certain) return { relations: all, circles: [], cut };
  const relations: RelationRecord[] = [];
  const circles: { lower: string; upper: string }[] = [];
  for (const relation of all) {
    const { lower, upper } = relation;
    if (order.younger(upper).has(lower)) circles.push({ lower, upper });
    else {
      order.add(lower, upper);
      relations.push(relation);
    }
  }
  return { relations, circles, cut };
}

const pair = (lower: string, upper: string): string => `${lower}\u0001${upper}`;

function bySection(beds: readonly BedOnStaircase[]): Map<string, BedOnStaircase[]> {
  const sections = new Map<string, BedOnStaircase[]>();
  for (const bed of beds) sections.set(bed.section, [...(sections.get(bed.section) ?? []), bed]);
  return sections;
}

/** Pairs of one flight that no other pair implies: older, younger. */
function stepsOf(
  flight: readonly BedOnStaircase[],
  order: KnownOrder,
  stated: ReadonlySet<string>,
  mostOfOne: number,
): { pairs: [string, string][]; cut: boolean } {
  const placed = flight
    .flatMap(({ key, elevation_m }) => (elevation_m === null ? [] : [{ key, at: elevation_m }]))
    .sort((a, b) => b.at - a.at || (a.key < b.key ? -1 : 1));
  const foot = placed.map(({ key }) => !order.liesOnAnother(key));
  const pairs: [string, string][] = [];
  let cut = false;
  placed.forEach(({ key, at }, high) => {
    if (!foot[high]) return;
    const older = order.older(key);
    const younger = order.younger(key);
    let next: number | null = null;
    const steps: string[] = [];
    for (let low = high + 1; low < placed.length; low++) {
      const other = placed[low];
      if (at - other.at <= ONE_TERRACE_M) continue;
      // below the next terrace but one, every step follows from those to the next
      if (next !== null && next - other.at > ONE_TERRACE_M) break;
      if (older.has(other.key) || younger.has(other.key) || stated.has(pair(key, other.key))) continue;
      if (foot[low] && next === null) next = other.at;
      if (steps.length === mostOfOne) {
        cut = true;
        break;
      }
      steps.push(other.key);
    }
    // a bed that lies on the foot of its own terrace follows from the step to that foot
    const here = new Set(steps);
    for (const step of steps) {
      if (![...order.older(step)].some((below) => here.has(below))) pairs.push([key, step]);
    }
  });
  return { pairs, cut };
}

/** What certain relations say of beds, directly or through others. */
interface KnownOrder {
  readonly older: (key: string) => ReadonlySet<string>;
  readonly younger: (key: string) => ReadonlySet<string>;
  readonly liesOnAnother: (key: string) => boolean;
  readonly add: (lower: string, upper: string) => void;
}

function knownOrder(known: readonly RelationRecord[]): KnownOrder {
  const up = new Map<string, string[]>();
  const down = new Map<string, string[]>();
  const link = (map: Map<string, string[]>, from: string, to: string): void => {
    const list = map.get(from);
    if (list === undefined) map.set(from, [to]);
    else list.push(to);
  };
  const add = (lower: string, upper: string): void => {
    link(up, lower, upper);
    link(down, upper, lower);
  };
  const onAnother = new Set<string>();
  for (const { lower, upper, basis, kind, certainty } of known) {
    if (basis === 'superposition' && kind === 'older') onAnother.add(upper);
    if (certainty !== 'certain') continue;
    add(lower, upper);
    // as old as each other: a step both ways keeps whatever is known of the one for the other
    if (kind === 'same') add(upper, lower);
  }
  const cache = new Map<string, ReadonlySet<string>>();
  const remembered = (way: string, key: string, next: ReadonlyMap<string, readonly string[]>): ReadonlySet<string> => {
    const found = cache.get(way + key) ?? reached(key, next);
    cache.set(way + key, found);
    return found;
  };
  return {
    older: (key) => remembered('<', key, down),
    younger: (key) => remembered('>', key, up),
    liesOnAnother: (key) => onAnother.has(key),
    add: (lower, upper) => {
      add(lower, upper);
      cache.clear();
    },
  };
}

function reached(start: string, next: ReadonlyMap<string, readonly string[]>): Set<string> {
  const seen = new Set<string>();
  const waiting = [...(next.get(start) ?? [])];
  while (waiting.length > 0) {
    const key = waiting.pop()!;
    if (seen.has(key)) continue;
    seen.add(key);
    waiting.push(...(next.get(key) ?? []));
  }
  return seen;
}
