import type { Mixture } from './mixture.js';

/** Uncertainty of the zone means of a fit. */
export interface ZoneErrors {
  /** Standard error of each zone's mean log ratio, from its beds' errors and the spread. */
  readonly se: readonly number[];
  /** Degrees of freedom behind those errors. */
  readonly df: readonly number[];
}

/**
 * Standard errors of zone means: beds, not shells, are the units that repeat, so a bed counts with 1/(tau² + se²).
 * The spread is first freed of the bias of maximum likelihood, which divides by the number of beds where that less the
 * number of zones is due. Where a spread was found, errors have the degrees of freedom of that, beds less zones, and grow with
 * what the beds still scatter beyond it (Hartung and Knapp 2001, doi:10.1002/sim.791); where none was, those of the scatter.
 * @param fit the mixture
 * @param errors standard errors of the bed means
 * @param scatterDf degrees of freedom of the pooled scatter
 * @param values the bed means; without them errors don't grow with what is left
 */
export function zoneErrors(
  fit: Mixture,
  errors: readonly number[],
  scatterDf: number,
  values?: readonly number[],
): ZoneErrors {
  const n = errors.length;
  const spreadDf = Math.max(1, n - fit.k);
  const tau2 = unbiasedSpread(fit, n) ** 2;
  const excess = fit.tau > 0 && values ? Math.max(1, squaresLeft(fit, values, errors, tau2) / spreadDf) : 1;
  const se: number[] = [];
  const df: number[] = [];
  for (let j = 0; j < fit.k; j++) {
    let information = 0;
    for (let bed = 0; bed < n; bed++) {
      information += fit.responsibilities[bed * fit.k + j] / Math.max(tau2 + errors[bed] ** 2, 1e-18);
    }
    se.push(information > 0 ? Math.sqrt(excess / information) : Number.POSITIVE_INFINITY);
    df.push(fit.tau > 0 ? spreadDf : Math.max(1, scatterDf));
  }
  return { se, df };
}

/** Sum of squares of the beds about their zones, in units of their whole variances. */
function squaresLeft(fit: Mixture, values: readonly number[], errors: readonly number[], tau2: number): number {
  let sum = 0;
  for (let bed = 0; bed < values.length; bed++) {
    const variance = Math.max(tau2 + errors[bed] ** 2, 1e-18);
    for (let j = 0; j < fit.k; j++) {
      sum += (fit.responsibilities[bed * fit.k + j] * (values[bed] - fit.means[j]) ** 2) / variance;
    }
  }
  return sum;
}

/** The spread tau with the n/(n − K) correction; 0 stays 0. */
export function unbiasedSpread(fit: Mixture, beds: number): number {
  return fit.tau * Math.sqrt(beds / Math.max(1, beds - fit.k));
}
