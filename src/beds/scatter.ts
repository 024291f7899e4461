import type { Scatter } from '../model/index.js';

/** Scatter assumed where the clock has too few repeated shells: shells of one bed differ by 5 to 10 % (common practice). */
export const ASSUMED_SCATTER = 0.07;

/**
 * No shells of one bed agree better than this on log ratios: one preparation analysed twice differs by more (1 to 3 %, common
 * practice). Less than that are copies, or ratios rounded until they are equal, and would make every difference certain.
 */
export const LEAST_SCATTER = 0.005;

/** Degrees of freedom under which the scatter is assumed, not estimated. */
export const FEWEST_DEGREES_OF_FREEDOM = 4;

/** A published standard deviation of log ratios between `n` shells. */
export interface PublishedScatter {
  readonly sd: number;
  readonly n: number;
}

/**
 * Pooled standard deviation of log ratios between the shells of one bed: s² = Σ SS / Σ (n − 1) (design 7.1).
 * @param beds log ratios of the shells of each bed
 * @param published standard deviations that published summaries give, pooled with n − 1
 * @returns the scatter, its degrees of freedom, and whether it was assumed: 0.07 because those are fewer than 4, or
 *   {@link LEAST_SCATTER} because the shells agree better than can be
 * @example
 * pooledScatter([[-1.1, -1.0, -0.9], [-2.05, -1.95, -2, -2]]).df // => 5
 */
export function pooledScatter(
  beds: readonly (readonly number[])[],
  published: readonly PublishedScatter[] = [],
): Scatter {
  let sumOfSquares = 0;
  let df = 0;
  for (const values of beds) {
    if (values.length < 2) continue;
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    for (const value of values) sumOfSquares += (value - mean) ** 2;
    df += values.length - 1;
  }
  for (const { sd, n } of published) {
    if (n < 2) continue;
    sumOfSquares += sd ** 2 * (n - 1);
    df += n - 1;
  }
  if (df < FEWEST_DEGREES_OF_FREEDOM) return { s: ASSUMED_SCATTER, df, assumed: true };
  const s = Math.sqrt(sumOfSquares / df);
  return s >= LEAST_SCATTER ? { s, df, assumed: false } : { s: LEAST_SCATTER, df, assumed: true };
}

/**
 * Degrees of freedom to give the scatter in tests. An assumed scatter stands for a range of 5 to 10 %, a relative error of
 * about 18 %, as an estimate on 15 degrees of freedom has.
 */
export function testingDf({ df, assumed }: Scatter): number {
  return assumed ? 15 : df;
}
