import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';

/** A group of values told by three numbers. */
export interface Summary {
  readonly mean: number;
  /** Standard deviation between values, with n − 1. */
  readonly sd: number;
  readonly n: number;
}

/**
 * Mean, standard deviation (n − 1; 0 for one value) and number of values. The mean is corrected once by the mean of the
 * residuals, so that a large common part of the values costs no digits.
 *
 * @throws RangeError when there is no value or a value is not finite
 * @example
 * ```ts
 * summarise([1, 2, 3]); // => { mean: 2, sd: 1, n: 3 }
 * ```
 */
export function summarise(values: Numbers): Summary {
  const { mean, squares, n } = momentsOf('summarise', values);
  return { mean, sd: n > 1 ? Math.sqrt(squares / (n - 1)) : 0, n };
}

/** Mean, sum of squared distances from it, and number of values. */
export function momentsOf(who: string, values: Numbers): { mean: number; squares: number; n: number } {
  requireNumbers(who, 'values', values);
  const n = values.length;
  let sum = 0;
  for (let i = 0; i < n; i++) sum += values[i];
  const rough = sum / n;
  let rest = 0;
  for (let i = 0; i < n; i++) rest += values[i] - rough;
  const mean = rough + rest / n;
  let squares = 0;
  for (let i = 0; i < n; i++) squares += (values[i] - mean) ** 2;
  return { mean, squares, n };
}

/** Refuses a summary with a mean that is not finite, an sd below 0, or too few values. */
export function requireSummary(who: string, { mean, sd, n }: Summary, atLeast: number): void {
  requireThat(Number.isFinite(mean), who, 'a finite mean', mean);
  requireThat(sd >= 0 && sd < Infinity, who, 'an sd from 0 upwards', sd);
  requireThat(Number.isInteger(n) && n >= atLeast, who, `a whole n of at least ${atLeast}`, n);
}
