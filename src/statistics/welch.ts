import type { Numbers } from './check.js';
import { requireThat } from './check.js';
import { studentTCdf, studentTQuantile } from './student-t.js';
import { requireSummary, type Summary, summarise } from './summary.js';

/** Outcome of Welch's t test. */
export interface Welch {
  /** First mean minus second. */
  readonly difference: number;
  readonly se: number;
  readonly t: number;
  /** Degrees of freedom after Welch and Satterthwaite, mostly a fraction. */
  readonly df: number;
  /** Two-sided. */
  readonly p: number;
  /** Ends of the interval of the difference. */
  readonly low: number;
  readonly high: number;
}

/** Options of Welch's t test. */
export interface WelchOptions {
  /** Confidence of the interval, default 0.95. */
  readonly level?: number;
}

/**
 * Do two groups of unequal scatter have the same mean? Welch's t test (1947, 10.1093/biomet/34.1-2.28).
 *
 * @param a at least 2 values
 * @param b at least 2 values
 * @throws RangeError when a group has fewer than 2 values or a value is not finite
 * @example
 * ```ts
 * welchTTest([1, 2, 3], [2, 3, 4]).t; // => -1.224744871391589
 * ```
 */
export function welchTTest(a: Numbers, b: Numbers, options: WelchOptions = {}): Welch {
  return welchFromSummaries(summarise(a), summarise(b), options);
}

/**
 * {@link welchTTest} from means, standard deviations and numbers. Two groups without any scatter give p = 0 when their
 * means differ and p = 1 when not.
 *
 * @throws RangeError when a mean is not finite, an sd is below 0, or an n is under 2
 * @example
 * ```ts
 * welchFromSummaries({ mean: 0.335, sd: 0.028, n: 19 }, { mean: 0.471, sd: 0.038, n: 9 }).t; // => -9.5758597
 * ```
 */
export function welchFromSummaries(a: Summary, b: Summary, { level = 0.95 }: WelchOptions = {}): Welch {
  requireSummary('welchFromSummaries', a, 2);
  requireSummary('welchFromSummaries', b, 2);
  requireThat(level > 0 && level < 1, 'welchFromSummaries', 'a level between 0 and 1', level);
  const difference = a.mean - b.mean;
  const varianceA = a.sd ** 2 / a.n;
  const varianceB = b.sd ** 2 / b.n;
  const se = Math.sqrt(varianceA + varianceB);
  if (se === 0) {
    const t = difference === 0 ? 0 : Math.sign(difference) * Infinity;
    return { difference, se, t, df: a.n + b.n - 2, p: t === 0 ? 1 : 0, low: difference, high: difference };
  }
  const shareA = varianceA / (varianceA + varianceB);
  const df = 1 / (shareA ** 2 / (a.n - 1) + (1 - shareA) ** 2 / (b.n - 1));
  const t = difference / se;
  const reach = -studentTQuantile((1 - level) / 2, df) * se;
  const p = Math.min(1, 2 * studentTCdf(-Math.abs(t), df));
  return { difference, se, t, df, p, low: difference - reach, high: difference + reach };
}
