import type { Mixture } from './mixture.js';

/** Uncertainty of the zone means of a fit. */
export interface ZoneErrors {
  /** Standard error of each zone's mean log ratio, from its beds' errors and the spread. */
  readonly se: readonly number[];
  /** Degrees of freedom behind those errors (Satterthwaite 1946, doi:10.2307/3002019). */
  readonly df: readonly number[];
}

/**
 * Standard errors of zone means: beds, not shells, are the units that repeat, so a bed counts with 1/(tau² + se²).
 * The spread is first freed of the bias of maximum likelihood, which divides by the number of beds where that less the
 * number of zones is due. Degrees of freedom weigh those of the spread (beds less zones) and of the scatter.
 * @param fit the mixture
 * @param errors standard errors of the bed means
 * @param scatterDf degrees of freedom of the pooled scatter
 */
export function zoneErrors(fit: Mixture, errors: readonly number[], scatterDf: number): ZoneErrors {
  const n = errors.length;
  const spreadDf = Math.max(1, n - fit.k);
  const tau2 = unbiasedSpread(fit, n) ** 2;
  const se: number[] = [];
  const df: number[] = [];
  for (let j = 0; j < fit.k; j++) {
    let information = 0;
    let fromErrors = 0;
    for (let bed = 0; bed < n; bed++) {
      const r = fit.responsibilities[bed * fit.k + j];
      const total = Math.max(tau2 + errors[bed] ** 2, 1e-18);
      information += r / total;
      fromErrors += (r / total) * (errors[bed] ** 2 / total);
    }
    const variance = information > 0 ? 1 / information : Number.POSITIVE_INFINITY;
    const share = information > 0 ? fromErrors / information : 1;
    se.push(Math.sqrt(variance));
    df.push(1 / (share ** 2 / Math.max(1, scatterDf) + (1 - share) ** 2 / spreadDf));
  }
  return { se, df };
}

/** The spread tau with the n/(n − K) correction; 0 stays 0. */
export function unbiasedSpread(fit: Mixture, beds: number): number {
  return fit.tau * Math.sqrt(beds / Math.max(1, beds - fit.k));
}
