import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';
import { inversionChances } from './inversion-chances.js';
import { kendallInterval } from './kendall-interval.js';
import { normalCdf } from './normal.js';
import { tieSizes } from './ranks.js';

/** Up to this many values, none tied, the exact distribution is worked out. */
const EXACT_UP_TO = 100;

/** Options of the test of tau-b. */
export interface KendallOptions {
  /** Confidence of the interval, default 0.95. */
  readonly level?: number;
}

/** Kendall's tau-b and its test. */
export interface KendallTauB {
  /** −1 to 1; NaN when one of the lists has only one value. */
  readonly tau: number;
  readonly low: number;
  readonly high: number;
  /** Pairs that both lists put in the same order. */
  readonly concordant: number;
  /** Pairs that the lists put in opposite orders. */
  readonly discordant: number;
  /** Two-sided p-value of no agreement. */
  readonly p: number;
  readonly exact: boolean;
}

/**
 * How well do two lists agree on an order? Kendall's tau-b, which allows for ties (Kendall 1945, 10.1093/biomet/33.3.239).
 * p is exact up to 100 values without ties, else normal with the variance of Kendall (1970, Rank Correlation Methods).
 * The interval is that of {@link kendallInterval}.
 *
 * @param x at least 2 values
 * @param y as many values
 * @throws RangeError when lists differ in length, are too short, or hold a value that is not finite
 * @example
 * ```ts
 * kendallTauB([1, 2, 3, 4], [1, 3, 2, 4]).tau; // => 0.6666666666666666
 * ```
 */
export function kendallTauB(x: Numbers, y: Numbers, { level = 0.95 }: KendallOptions = {}): KendallTauB {
  requireNumbers('kendallTauB', 'x', x, 2);
  requireNumbers('kendallTauB', 'y', y, 2);
  requireThat(x.length === y.length, 'kendallTauB', 'two lists of one length', x.length, y.length);
  requireThat(level > 0 && level < 1, 'kendallTauB', 'a level between 0 and 1', level);
  const n = x.length;
  let concordant = 0;
  let discordant = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      const sign = Math.sign(x[i] - x[j]) * Math.sign(y[i] - y[j]);
      if (sign > 0) concordant++;
      else if (sign < 0) discordant++;
    }
  }
  const tiesX = tieSizes(x);
  const tiesY = tieSizes(y);
  const pairs = (n * (n - 1)) / 2;
  const score = concordant - discordant;
  const room = Math.sqrt((pairs - sum(tiesX, pairsOf)) * (pairs - sum(tiesY, pairsOf)));
  const exact = tiesX.length === 0 && tiesY.length === 0 && n <= EXACT_UP_TO;
  // One list is all ties: nothing to compare.
  if (room === 0) return { tau: NaN, low: -1, high: 1, concordant, discordant, p: 1, exact };
  const tau = score / room;
  const p = exact ? exactP(n, discordant) : normalP(n, score, tiesX, tiesY);
  return { tau, ...kendallInterval(n, tau, level), concordant, discordant, p, exact };
}

function pairsOf(size: number): number {
  return (size * (size - 1)) / 2;
}

function sum(values: readonly number[], of: (m: number) => number): number {
  return values.reduce((total, m) => total + of(m), 0);
}

function exactP(n: number, discordant: number): number {
  const chances = inversionChances(n);
  const few = Math.min(discordant, pairsOf(n) - discordant);
  let tail = 0;
  for (let d = 0; d <= few; d++) tail += chances[d];
  return Math.min(1, 2 * tail);
}

function normalP(n: number, score: number, tiesX: readonly number[], tiesY: readonly number[]): number {
  const first = (m: number) => m * (m - 1) * (2 * m + 5);
  const second = (m: number) => m * (m - 1) * (m - 2);
  const third = (m: number) => m * (m - 1);
  let variance = (first(n) - sum(tiesX, first) - sum(tiesY, first)) / 18;
  variance += (sum(tiesX, third) * sum(tiesY, third)) / (2 * n * (n - 1));
  if (n > 2) variance += (sum(tiesX, second) * sum(tiesY, second)) / (9 * n * (n - 1) * (n - 2));
  return Math.min(1, 2 * normalCdf(-Math.abs(score) / Math.sqrt(variance)));
}
