import { conflictThreshold } from './conflict-threshold.js';

/** A shell as the search for conflicts needs it. */
export interface ShellInOrder {
  /** Index into the beds. */
  readonly bed: number;
  /** Log ratio, gradient taken out where one is used. */
  readonly x: number;
}

/** A bed with those above it. */
export interface BedInOrder {
  readonly section: string;
  /**
   * Indices of all beds that certain relations place above this one, directly or through others (transitively closed).
   */
  readonly above: readonly number[];
}

/** Options of {@link findShellConflicts}. */
export interface ConflictOptions {
  /** Scatter s between shells of a bed. */
  readonly scatter: number;
  /** Degrees of freedom of the scatter. Default Infinity. */
  readonly df?: number;
  /** Spread tau; counts between beds of different sections only. Default 0. */
  readonly spread?: number;
  /** Level over all pairs together. Default 0.05. */
  readonly alpha?: number;
}

/** The upper shells one shell is in conflict with, one entry a bed: all of `uppers[bed]` from position `from` on. */
export interface ConflictsWithBed {
  readonly lower: number;
  readonly bed: number;
  readonly from: number;
}

/** All conflicts of a survey, without a list of pairs. */
export interface ShellConflicts {
  /** Shells of each bed by rising x. */
  readonly sorted: readonly (readonly number[])[];
  readonly conflicts: readonly ConflictsWithBed[];
  /** Pairs of shells that superposition orders. */
  readonly pairs: number;
  /** Pairs of shells in conflict. */
  readonly count: number;
  /** Limit z in standard deviations of a difference. */
  readonly z: number;
  /** Conflicts of each shell, as the lower and as the upper one. */
  readonly asLower: readonly number[];
  readonly asUpper: readonly number[];
}

/**
 * Finds shells that contradict superposition (design 7.8): the one in the lower bed has the smaller log ratio by more
 * than z·√2·s (between sections z·√(2s² + 2τ²)), z from {@link conflictThreshold}. Conflicts are transitive: if a lies
 * below b and b below c, both in conflict, then so are a and c, since the shortfalls add.
 * A shell whose x is not a number has no conflict.
 *
 * @param shells Shells of one clock.
 * @param beds Beds of the clock; `above` must be transitively closed.
 */
export function findShellConflicts(
  shells: readonly ShellInOrder[],
  beds: readonly BedInOrder[],
  options: ConflictOptions,
): ShellConflicts {
  const { scatter, spread = 0 } = options;
  if (!(scatter >= 0)) throw new RangeError(`findShellConflicts: scatter must not be negative, got ${scatter}`);
  const sorted = beds.map((): number[] => []);
  shells.forEach((shell, index) => {
    if (Number.isFinite(shell.x)) sorted[shell.bed].push(index);
  });
  for (const members of sorted) members.sort((a, b) => shells[a].x - shells[b].x);
  const pairs = beds.reduce(
    (sum, bed, index) => sum + bed.above.reduce((n, upper) => n + sorted[index].length * sorted[upper].length, 0),
    0,
  );
  const z = conflictThreshold(pairs, options.alpha, options.df);
  const within = z * Math.SQRT2 * scatter;
  const between = z * Math.sqrt(2 * scatter * scatter + 2 * spread * spread);

  const conflicts: ConflictsWithBed[] = [];
  const asLower = new Array<number>(shells.length).fill(0);
  const asUpper = new Array<number>(shells.length).fill(0);
  let count = 0;
  beds.forEach((bed, index) => {
    for (const upper of bed.above) {
      const members = sorted[upper];
      const gap = beds[upper].section === bed.section ? within : between;
      let from = 0;
      for (const lower of sorted[index]) {
        while (from < members.length && shells[members[from]].x <= shells[lower].x + gap) from++;
        if (from === members.length) break;
        conflicts.push({ lower, bed: upper, from });
        count += members.length - from;
        asLower[lower] += members.length - from;
        for (let at = from; at < members.length; at++) asUpper[members[at]]++;
      }
    }
  });
  return { sorted, conflicts, pairs, count, z, asLower, asUpper };
}

/**
 * Conflicts one by one, the widest first, up to a number that a reader can take in.
 *
 * @param conflicts From {@link findShellConflicts}.
 * @param shells The same shells.
 * @param most Default 1000.
 * @returns Indices of the two shells, and how far the lower falls short of the upper in log ratios.
 */
export function listConflicts(
  conflicts: ShellConflicts,
  shells: readonly ShellInOrder[],
  most = 1000,
): { lower: number; upper: number; shortfall: number }[] {
  type Pair = { lower: number; upper: number; shortfall: number };
  const wider = (a: Pair, b: Pair) => b.shortfall - a.shortfall || a.lower - b.lower || a.upper - b.upper;
  let kept: Pair[] = [];
  let narrowest = Number.NEGATIVE_INFINITY;
  for (const { lower, bed, from } of conflicts.conflicts) {
    for (let at = from; at < conflicts.sorted[bed].length; at++) {
      const upper = conflicts.sorted[bed][at];
      const shortfall = shells[upper].x - shells[lower].x;
      if (shortfall < narrowest) continue;
      kept.push({ lower, upper, shortfall });
      // a large survey has millions of pairs, so what can't be among the widest any more is let go in between
      if (kept.length < 4 * most + 1000) continue;
      kept = kept.sort(wider).slice(0, most);
      narrowest = kept.length < most ? narrowest : kept[most - 1].shortfall;
    }
  }
  return kept.sort(wider).slice(0, most);
}
