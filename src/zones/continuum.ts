import { normalCdf } from '../statistics/index.js';

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
 * @param tolerance of the two ends, relative
 */
export function fitContinuum(values: readonly number[], errors: readonly number[], tolerance = 1e-10): Continuum {
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
  // The two ends hardly speak to each other, so turns at one and the other settle in a few rounds.
  for (let round = 0; round < 40; round++) {
    const before = best;
    low = goldenSection((end) => evaluate(end, high), least - 3 * widest, high - narrowest, tolerance);
    high = goldenSection((end) => evaluate(low, end), low + narrowest, most + 3 * widest + narrowest, tolerance);
    best = evaluate(low, high);
    if (Math.abs(best - before) < Math.max(1e-9, tolerance)) break;
  }
  return { low, high, logLikelihood: best };
}

function logLikelihood(values: readonly number[], errors: readonly number[], low: number, high: number): number {
  let total = -values.length * Math.log(high - low);
  for (let bed = 0; bed < values.length; bed++) {
    const a = (low - values[bed]) / errors[bed];
    const b = (high - values[bed]) / errors[bed];
    // both ends on one side: take the difference in the lower tail, where it is not lost to rounding
    const mass = a > 0 ? normalCdf(-a) - normalCdf(-b) : normalCdf(b) - normalCdf(a);
    total += Math.log(Math.max(mass, 1e-300));
  }
  return total;
}

/** Place of the largest value of a function with one peak between two ends. */
export function goldenSection(f: (x: number) => number, from: number, to: number, tolerance = 1e-10): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [low, high] = [from, to];
  let left = high - ratio * (high - low);
  let right = low + ratio * (high - low);
  let [fLeft, fRight] = [f(left), f(right)];
  while (high - low > tolerance * (1 + Math.abs(low) + Math.abs(high))) {
    if (fLeft >= fRight) {
      [high, right, fRight] = [right, left, fLeft];
      left = high - ratio * (high - low);
      fLeft = f(left);
    } else {
      [low, left, fLeft] = [left, right, fRight];
      right = low + ratio * (high - low);
      fRight = f(right);
    }
  }
  return (low + high) / 2;
}
