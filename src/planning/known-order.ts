import type { Findings } from '../model/index.js';
import { normalCdf, studentTCdf } from '../statistics/index.js';
import { bedKey, clocksInView } from './bed-on-clock.js';
import { type BitSet, emptySet, include, includeAll, includes } from './bit-set.js';

/** What a run knows of which of two beds is the older, over all its main clocks. */
export interface KnownOrder {
  /** `section/bed`, in the order of the results. */
  readonly beds: readonly string[];
  readonly indexOf: ReadonlyMap<string, number>;
  /** Probability that bed a is older than bed b; 1 where a certain field relation that holds says so. */
  readonly olderThan: (a: number, b: number) => number;
  /** Probability that both stand in one zone of a clock; 0 where they share no clock. */
  readonly sameZone: (a: number, b: number) => number;
  /** Whether the field says, as certain and unrefuted, that both are as old; a bed is as old as itself. */
  readonly asOld: (a: number, b: number) => boolean;
  /** Beds known to be younger, and known to be older, than each bed: probability 1 − alpha or more, and what follows from it. */
  readonly younger: readonly BitSet[];
  readonly older: readonly BitSet[];
}

/**
 * Gathers the order of a run into pairs. Probabilities come from pairs.csv, or where a survey is too large for that
 * table, from the bed means (Student's t with their errors, tau between sections), as the order itself has them but for
 * the pull of other beds. Certain relations that are not reversed hold with what follows from them. Where two
 * clocks, or measurement and field, say opposite things of a pair at 1 − alpha, its order counts as unknown.
 *
 * @param alpha A pair is known at 1 − alpha. Default: the level of the run.
 */
export function knownOrder(findings: Findings, alpha: number = findings.options.alpha): KnownOrder {
  const measured = findings.beds.filter((row) => row.log_mean !== null).map(bedKey);
  const beds = [...new Set([...measured, ...findings.relations.flatMap((row) => [row.lower, row.upper])])];
  const size = beds.length;
  const indexOf = new Map(beds.map((key, index) => [key, index]));
  const p = new Float64Array(size * size);
  const zone = new Float64Array(size * size);
  const raise = (table: Float64Array, a: number, b: number, value: number) => {
    table[a * size + b] = Math.max(table[a * size + b], value);
  };
  readPairs(findings, indexOf, (a, b, older, same) => {
    raise(p, a, b, older);
    raise(p, b, a, 1 - older);
    raise(zone, a, b, same);
    raise(zone, b, a, same);
  });
  const field = fieldOrder(findings, indexOf);
  for (let a = 0; a < size; a++) {
    for (let b = 0; b < size; b++) {
      if (includes(field.younger[a], b)) p[a * size + b] = 1;
      else if (field.asOld(a, b)) p[a * size + b] = 0;
    }
  }
  for (let a = 0; a < size; a++) {
    for (let b = 0; b < a; b++) {
      if (p[a * size + b] >= 1 - alpha && p[b * size + a] >= 1 - alpha) {
        p[a * size + b] = 0.5;
        p[b * size + a] = 0.5;
      }
    }
  }
  const direct = beds.map((_, a) => {
    const set = emptySet(size);
    for (let b = 0; b < size; b++) {
      if (a === b || !(p[a * size + b] >= 1 - alpha)) continue;
      for (const tied of field.membersWith(b)) if (tied !== a) include(set, tied);
    }
    return set;
  });
  const { below, above } = withoutCircles(closed(direct));
  return {
    beds,
    indexOf,
    olderThan: (a, b) => p[a * size + b],
    sameZone: (a, b) => zone[a * size + b],
    asOld: field.asOld,
    younger: below,
    older: above,
  };
}

/** Every pair that a main clock speaks of, from pairs.csv or from the means. */
function readPairs(
  findings: Findings,
  indexOf: ReadonlyMap<string, number>,
  tell: (a: number, b: number, older: number, same: number) => void,
): void {
  const tabled = new Set<string>();
  for (const row of findings.pairs) {
    const a = indexOf.get(row.bed_a);
    const b = indexOf.get(row.bed_b);
    if (a === undefined || b === undefined) continue;
    tabled.add(row.clock);
    tell(a, b, row.p_a_older, row.p_same_zone ?? 0);
  }
  for (const view of clocksInView(findings)) {
    if (tabled.has(view.clock)) continue;
    // past a thousand degrees of freedom the two agree to 3 digits in the far tail, and the normal is much faster
    const below = (z: number) => (view.df > 1000 ? normalCdf(z) : studentTCdf(z, view.df));
    for (let i = 0; i < view.beds.length; i++) {
      for (let j = 0; j < i; j++) {
        const [one, two] = [view.beds[i], view.beds[j]];
        const variance =
          one.shellVariance + one.otherVariance + two.shellVariance + two.otherVariance + view.spreadVariance(one, two);
        const older = below((one.mean - two.mean) / Math.sqrt(variance));
        const same =
          one.row.zone !== null && one.row.zone === two.row.zone
            ? (one.row.zone_probability ?? 0) * (two.row.zone_probability ?? 0)
            : 0;
        tell(indexOf.get(one.key)!, indexOf.get(two.key)!, older, same);
      }
    }
  }
}

/** What certain relations that hold say, with what follows: beds younger than each, and beds as old. */
function fieldOrder(findings: Findings, indexOf: ReadonlyMap<string, number>) {
  const size = indexOf.size;
  const group = Array.from({ length: size }, (_, index) => index);
  const rootOf = (index: number): number => {
    let root = index;
    while (group[root] !== root) root = group[root];
    return root;
  };
  const holds = findings.relations.filter((row) => row.certainty === 'certain' && row.verdict_after !== 'reversed');
  for (const row of holds) {
    if (row.kind === 'same') group[rootOf(indexOf.get(row.lower)!)] = rootOf(indexOf.get(row.upper)!);
  }
  const roots = group.map((_, index) => rootOf(index));
  const members = new Map<number, number[]>();
  roots.forEach((root, index) => {
    members.set(root, [...(members.get(root) ?? []), index]);
  });
  const direct = roots.map(() => emptySet(size));
  for (const row of holds) {
    if (row.kind !== 'older') continue;
    const uppers = members.get(roots[indexOf.get(row.upper)!])!;
    for (const a of members.get(roots[indexOf.get(row.lower)!])!) for (const b of uppers) include(direct[a], b);
  }
  return {
    younger: closed(direct),
    asOld: (a: number, b: number) => roots[a] === roots[b],
    membersWith: (bed: number) => members.get(roots[bed])!,
  };
}

/** Everything that can be reached, by Warshall's rule (Warshall 1962, Journal of the ACM 9, 11–12). */
function closed(direct: readonly BitSet[]): BitSet[] {
  const reached = direct.map((set) => set.slice());
  for (let via = 0; via < reached.length; via++) {
    for (let a = 0; a < reached.length; a++) {
      if (a !== via && includes(reached[a], via)) includeAll(reached[a], reached[via]);
    }
  }
  return reached;
}

/** Drops every pair that is said both ways round, and turns the sets about. */
function withoutCircles(reached: readonly BitSet[]): { below: BitSet[]; above: BitSet[] } {
  const below = reached.map(() => emptySet(reached.length));
  const above = reached.map(() => emptySet(reached.length));
  for (let a = 0; a < reached.length; a++) {
    for (let b = 0; b < reached.length; b++) {
      if (a !== b && includes(reached[a], b) && !includes(reached[b], a)) {
        include(below[a], b);
        include(above[b], a);
      }
    }
  }
  return { below, above };
}
