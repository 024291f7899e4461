import { normalCdf } from '../statistics/index.js';
import { goldenSection } from './golden-section.js';

/** Standard errors from an end beyond which the normal holds all its mass to the last digit. */
const INSIDE = 9;

/** True bed values spread evenly between two ends, seen with known errors. */
export interface Continuum {
  readonly low: number;
  readonly high: number;
  readonly logLikelihood: number;
}

/**
 * Fits the rival of zones: true log ratios uniform between two ends, seen with the beds' own errors,
 * p(m) = [Φ((high − m)/se) − Φ((low − m)/se)] / (high − low) (design 7.3). Two parameters.
 * @param values bed means of log ratios, at least one
 * @param errors their standard errors, 0 or more
 * @param tolerance of the two ends, relative; the square root of rounding is all that a peak can be told to
 */
export function fitContinuum(values: readonly number[], errors: readonly number[], tolerance = 1e-8): Continuum {
  const least = Math.min(...values);
  const most = Math.max(...values);
  const range = most - least;
  const widest = Math.max(...errors);
  const narrowest = Math.max(1e-9, 1e-6 * range);
  const floored = errors.map((se) => Math.max(se, 1e-9));
  const evaluate = (low: number, high: number): number => logLikelihood(values, floored, low, high);
  let low = least;
  let high = Math.max(most, least + narrowest);
  let best = evaluate(low, high);
  const precision = tolerance * (1 + Math.abs(least) + Math.abs(most));
  // The two ends hardly speak to each other, so turns at one and the other settle in a few rounds.
  for (let round = 0; round < 40; round++) {
    const before = best;
    low = goldenSection((end) => evaluate(end, high), least - 3 * widest, high - narrowest, precision);
    high = goldenSection((end) => evaluate(low, end), low + narrowest, most + 3 * widest + narrowest, precision);
    best = evaluate(low, high);
    if (Math.abs(best - before) < Math.max(1e-9, tolerance)) break;
  }
  return { low, high, logLikelihood: best };
}

/** The normal's mass below z; what lies far outside is lost beside any mass that it is taken from. */
const below = (z: number): number => (z > INSIDE ? 1 : z < -38 ? 0 : normalCdf(z));

function logLikelihood(values: readonly number[], errors: readonly number[], low: number, high: number): number {
  let total = -values.length * Math.log(high - low);
  for (let bed = 0; bed < values.length; bed++) {
    const a = (low - values[bed]) / errors[bed];
    const b = (high - values[bed]) / errors[bed];
    // well inside, the whole mass: most beds
    if (a < -INSIDE && b > INSIDE) continue;
    // both ends on one side: take the difference in the lower tail, where it is not lost to rounding
    const mass = a > 0 ? below(-a) - below(-b) : below(b) - below(a);
    total += Math.log(Math.max(mass, 1e-300));
  }
  return total;
}
