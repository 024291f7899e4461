import { holm, studentTCdf } from '../statistics/index.js';
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
  readonly shells: readonly OwnBedResidual[];
  readonly s: number;
  readonly df: number;
  /** Mean of the sound shells of each bed; NaN where there is none. */
  readonly means: readonly number[];
  /** Number of shells tested. */
  readonly tested: number;
}

/** Degrees of freedom of the robust scatter under which it is not used; about 4 of the classical one. */
const FEWEST_ROBUST = 2;

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
  shells.forEach((shell, index) => {
    if (Number.isFinite(shell.x)) members[shell.bed].push(index);
  });
  const sound = shells.map((shell, index) => Number.isFinite(shell.x) && !excluded.has(index));
  const robust = robustScatter(members.map((list) => list.filter((i) => sound[i]).map((i) => shells[i].x)));
  const { s, df } = robust.df >= FEWEST_ROBUST ? robust : (options.fallback ?? { s: Number.NaN, df: 0 });

  for (;;) {
    const raw = shells.map((shell, index) => ownResidual(shell.x, index, members[shell.bed], sound, shells, s, df));
    const tested = raw.filter(({ p }) => p !== null).length;
    const adjusted = holmOverTested(raw.map(({ p }) => p));
    const results = raw.map((result, i): OwnBedResidual => {
      const level = adjusted[i];
      return { ...result, adjusted: level, odd: level !== null && level <= alpha && result.others >= 2 };
    });
    const furthest = members.map((list) =>
      list
        .filter((i) => sound[i] && results[i].odd)
        .reduce<number | null>(
          (best, i) => (best === null || Math.abs(results[i].t ?? 0) > Math.abs(results[best].t ?? 0) ? i : best),
          null,
        ),
    );
    if (furthest.every((index) => index === null)) {
      const means = members.map((list) => meanOf(list.filter((i) => sound[i]).map((i) => shells[i].x)));
      return { shells: results, s, df, means, tested };
    }
    for (const index of furthest) if (index !== null) sound[index] = false;
  }
}

type RawResidual = Omit<OwnBedResidual, 'adjusted' | 'odd'>;

function ownResidual(
  x: number,
  index: number,
  bed: readonly number[],
  sound: readonly boolean[],
  shells: readonly { readonly x: number }[],
  s: number,
  df: number,
): RawResidual {
  const others = bed.filter((i) => i !== index && sound[i]);
  if (!Number.isFinite(x) || others.length === 0) {
    return { residual: null, t: null, others: others.length, p: null };
  }
  const residual = x - meanOf(others.map((i) => shells[i].x));
  if (!(s > 0) || !(df > 0)) return { residual, t: null, others: others.length, p: null };
  const t = residual / (s * Math.sqrt(1 + 1 / others.length));
  return { residual, t, others: others.length, p: 2 * studentTCdf(-Math.abs(t), df) };
}

const meanOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

function holmOverTested(p: readonly (number | null)[]): (number | null)[] {
  const adjusted = holm(p.filter((value) => value !== null));
  let at = 0;
  return p.map((value) => (value === null ? null : adjusted[at++]));
}
