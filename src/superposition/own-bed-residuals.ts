import { holm, studentTCdf, studentTQuantile } from '../statistics/index.js';
import { robustScatter } from './robust-scatter.js';

/** A shell against the other sound shells of its own bed. */
export interface OwnBedResidual {
  /** x minus the mean of the others; null where the bed has no other sound shell, or x is unknown. */
  readonly residual: number | null;
  /** Residual over its standard error s √(1 + 1/n). */
  readonly t: number | null;
  /** Other sound shells of the bed behind that mean. */
  readonly others: number;
  /** Two-sided probability in a sound shell, and the same adjusted by Holm over the clock. */
  readonly p: number | null;
  readonly adjusted: number | null;
  /** Adjusted p at most alpha, with two sound neighbours or more: it is not one of its bed. */
  readonly odd: boolean;
}

/** Residuals of all shells of a clock, with the scatter they were measured by. */
export interface OwnBedResiduals {
  /** What is known of one shell, by its index; and of all, as a list that is made when it is asked for. */
  readonly of: (shell: number) => OwnBedResidual;
  readonly shells: readonly OwnBedResidual[];
  /** Residual of every shell, NaN where unknown, and the shells behind it, in plain lists: there may be a million. */
  readonly residual: Float64Array;
  readonly others: Int32Array;
  /** p of one shell, NaN where unknown. */
  readonly p: (shell: number) => number;
  /** Whether that p is at most alpha/5. */
  readonly apart: (shell: number) => boolean;
  /** As in {@link OwnBedResidual}. */
  readonly odd: (shell: number) => boolean;
  readonly s: number;
  readonly df: number;
  /** Whether s comes from the shells themselves, not from the scatter to fall back on. */
  readonly robust: boolean;
  /** Mean of the sound shells of each bed; NaN where there is none. */
  readonly means: readonly number[];
  /** Number of shells tested. */
  readonly tested: number;
}

/** Degrees of freedom of the robust scatter under which it is not used; about 4 of the classical one. */
const FEWEST_ROBUST = 2;

/** Shells tested over alpha from which most need no p. */
const MANY_TESTED = 100;

/**
 * Leave-one-out residuals of every shell from the other shells of its bed (design 7.9), with variance s²(1 + 1/n), s
 * from {@link robustScatter} so that odd shells do not hide themselves, Student's t, and Holm over all shells of the
 * clock. Odd shells are taken out one a bed at a time, the furthest first, and everything is worked out again, so that
 * two in one bed do not mask each other nor make their neighbours look odd. A bed of two cannot tell which is the odd
 * one, so none is.
 *
 * @param shells Bed and log ratio of each shell; NaN is passed over.
 * @param excluded Shells that screening sets aside: tested, but never part of a mean.
 * @param options Level alpha (0.05), and the scatter to fall back on where repeated shells give fewer than 4 degrees
 * of freedom: that of published summaries, or the assumed one with df Infinity. Without one nothing is tested there.
 */
export function ownBedResiduals(
  shells: readonly { readonly bed: number; readonly x: number }[],
  excluded: ReadonlySet<number> = new Set(),
  options: { readonly alpha?: number; readonly fallback?: { readonly s: number; readonly df: number } } = {},
): OwnBedResiduals {
  const alpha = options.alpha ?? 0.05;
  const beds = 1 + shells.reduce((most, shell) => Math.max(most, shell.bed), -1);
  const members = Array.from({ length: beds }, (): number[] => []);
  const sound = new Uint8Array(shells.length);
  shells.forEach((shell, index) => {
    if (!Number.isFinite(shell.x)) return;
    members[shell.bed].push(index);
    sound[index] = excluded.has(index) ? 0 : 1;
  });
  const soundOf = (list: readonly number[]) => list.filter((i) => sound[i] === 1).map((i) => shells[i].x);
  const robust = robustScatter(members.map(soundOf));
  const enough = robust.df >= FEWEST_ROBUST;
  const { s, df } = enough ? robust : (options.fallback ?? { s: Number.NaN, df: 0 });
  const table = blankResiduals(shells.length);
  const scattered = s > 0 && df > 0;
  const far = scattered ? studentTQuantile(1 - alpha / 10, df) : Number.POSITIVE_INFINITY;
  // A hair less than where p is 4 over the shells. Where half of them were tested, and half of those or more lie nearer,
  // Holm's rule multiplies the p of any that does by a quarter of the shells at least, and makes 1 of it.
  const many = Math.max(MANY_TESTED / alpha, shells.length / 2);
  let near = scattered && shells.length >= many ? 0.999 * studentTQuantile(1 - 2 / shells.length, df) : 0;
  let changed = members;
  for (;;) {
    for (const bed of changed) measureBed(bed, shells, sound, { s, df, near }, table);
    if (near > 0 && !farAreFew(table.t, near, many)) {
      near = 0;
      changed = members;
      continue;
    }
    const { adjusted, tested } = adjustTested(table.tail);
    const isOdd = (i: number) => adjusted[i] <= alpha && table.others[i] >= 2;
    const fits = (i: number) => sound[i] === 1 && isOdd(i);
    const furthest = members.map((bed) => furthestOf(bed, fits, table.t));
    changed = members.filter((_, bed) => furthest[bed] >= 0);
    if (changed.length === 0) {
      const { residual, t, tail, others } = table;
      const p = (i: number) => (Math.abs(t[i]) < near ? twoSided(t[i], df) : tail[i]);
      const of = (i: number): OwnBedResidual => ({
        residual: known(residual[i]),
        t: known(t[i]),
        others: others[i],
        p: known(p(i)),
        adjusted: known(adjusted[i]),
        odd: isOdd(i),
      });
      const means = members.map((bed) => meanOf(soundOf(bed)));
      return {
        of,
        get shells() {
          return shells.map((_, i) => of(i));
        },
        residual,
        others,
        p,
        odd: isOdd,
        apart: (i) => Math.abs(t[i]) >= far,
        s,
        df,
        robust: enough,
        means,
        tested,
      };
    }
    for (const index of furthest) if (index >= 0) sound[index] = 0;
  }
}

/** Residuals by shell, NaN where unknown. */
interface ResidualTable {
  readonly residual: Float64Array;
  readonly t: Float64Array;
  /** p, or 1 in place of one that can't matter. */
  readonly tail: Float64Array;
  readonly others: Int32Array;
}

function blankResiduals(shells: number): ResidualTable {
  const unknown = () => new Float64Array(shells).fill(Number.NaN);
  return { residual: unknown(), t: unknown(), tail: unknown(), others: new Int32Array(shells) };
}

/** Fills in the shells of one bed, each held against the sound others. */
function measureBed(
  bed: readonly number[],
  shells: readonly { readonly x: number }[],
  sound: Uint8Array,
  { s, df, near }: { readonly s: number; readonly df: number; readonly near: number },
  { residual, t, tail, others }: ResidualTable,
): void {
  // taken from one of the bed, so that equal ratios differ by 0 and not by rounding
  const origin = bed.length === 0 ? 0 : shells[bed[0]].x;
  let sum = 0;
  let count = 0;
  for (const i of bed) {
    if (sound[i] === 0) continue;
    sum += shells[i].x - origin;
    count++;
  }
  for (const i of bed) {
    const own = shells[i].x - origin;
    const rest = count - sound[i];
    others[i] = rest;
    if (rest === 0) {
      residual[i] = t[i] = tail[i] = Number.NaN;
      continue;
    }
    residual[i] = own - (sound[i] === 1 ? sum - own : sum) / rest;
    if (!(s > 0) || !(df > 0)) continue;
    t[i] = residual[i] / (s * Math.sqrt(1 + 1 / rest));
    tail[i] = Math.abs(t[i]) < near ? 1 : twoSided(t[i], df);
  }
}

const twoSided = (t: number, df: number): number => 2 * studentTCdf(-Math.abs(t), df);

/** Whether many shells were tested, at least half of which lie nearer to their beds than a limit. */
function farAreFew(t: Float64Array, limit: number, many: number): boolean {
  let tested = 0;
  let far = 0;
  for (let i = 0; i < t.length; i++) {
    if (Number.isNaN(t[i])) continue;
    tested++;
    if (Math.abs(t[i]) >= limit) far++;
  }
  return tested >= many && 2 * far <= tested;
}

/** The shell of a bed that stands furthest off among those that fit; -1 where none does. */
function furthestOf(bed: readonly number[], fits: (index: number) => boolean, t: Float64Array): number {
  let best = -1;
  for (const i of bed) if (fits(i) && (best < 0 || Math.abs(t[i]) > Math.abs(t[best]))) best = i;
  return best;
}

const known = (value: number): number | null => (Number.isNaN(value) ? null : value);

const meanOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

/** Holm over the shells that were tested; NaN for the others. */
function adjustTested(p: Float64Array): { adjusted: Float64Array; tested: number } {
  const values = new Float64Array(p.length);
  let tested = 0;
  for (let i = 0; i < p.length; i++) if (!Number.isNaN(p[i])) values[tested++] = p[i];
  const levels = holm(values.subarray(0, tested));
  const adjusted = new Float64Array(p.length);
  for (let i = 0, at = 0; i < p.length; i++) adjusted[i] = Number.isNaN(p[i]) ? Number.NaN : levels[at++];
  return { adjusted, tested };
}
