/** Mean and standard deviation of log ratios. */
export interface LogSummary {
  readonly mean: number;
  readonly sd: number | null;
}

/**
 * Turns a published mean and standard deviation of D/L into those of ln(D/L), for lognormal scatter:
 * sd² = ln(1 + (sd/mean)²), mean = ln(mean) − sd²/2, so that published beds and beds of single shells are on one scale.
 * Source: Aitchison and Brown 1957, The Lognormal Distribution, chapter 2 (from memory).
 * @param mean arithmetic mean of D/L, above 0
 * @param sd standard deviation between shells of D/L; null where none was published
 * @param fallback standard deviation of the log ratio to centre with when sd is null. Default 0
 * @example
 * logSummary(0.141, 0.026).sd // => 0.1828579
 */
export function logSummary(mean: number, sd: number | null, fallback = 0): LogSummary {
  if (!(mean > 0)) throw new RangeError(`logSummary wants a mean D/L above 0, got ${mean}`);
  if (sd === null) return { mean: Math.log(mean) - fallback ** 2 / 2, sd: null };
  const variance = Math.log1p((sd / mean) ** 2);
  return { mean: Math.log(mean) - variance / 2, sd: Math.sqrt(variance) };
}
