import { medianOfSorted } from '../statistics/index.js';

/** Share of shells taken to be odd, and their standard deviation about their bed (log ratios, beyond s). */
const ODD_SHARE = 0.05;
const ODD_SPREAD = 0.5;
/** An s below this, log ratios, is rounding of the table, not scatter. */
const SMALLEST = 1e-6;

/** Scatter that odd shells do not inflate. */
export interface RobustScatter {
  /** Standard deviation between shells of a bed; NaN with no bed of two shells. */
  readonly s: number;
  /** Degrees of freedom that the estimate is worth: fewer than shells less beds, since odd shells were weighed down. */
  readonly df: number;
  /** Mean of each bed, odd shells weighed down; NaN for a bed without shells. */
  readonly means: readonly number[];
}

/**
 * Pooled standard deviation of log ratios between the shells of one bed, when some shells may be odd. Each shell is
 * either sound, N(bed mean, s²), or odd, N(bed mean, s² + 0.5²), with 1 in 20 odd; s and the bed means are those of
 * greatest likelihood (EM from bed medians), s² divided by the sound shells less one a bed. A shell weighs in by its
 * probability of being sound: nearly fully up to 2 s, hardly beyond 4 s. What the weights take from the variance of
 * sound shells is given back. The degrees of freedom, 0.93 of the weights less one a bed, less 2, are what simulated
 * clean beds of 3 to 7 shells were worth (variance of s² over 1,500 runs), at the cautious end.
 *
 * Source: contaminated normal, Tukey 1960; EM, Dempster, Laird and Rubin 1977, 10.1111/j.2517-6161.1977.tb01600.x.
 *
 * @param beds Log ratios of the shells of each bed.
 * @example
 * const beds = [[0, 0.1, 0.05, 0.9], [-1, -0.9, -0.95], [0.4, 0.5, 0.45], [0.2, 0.3, 0.25]];
 * robustScatter(beds).s // => 0.051003
 */
export function robustScatter(beds: readonly (readonly number[])[]): RobustScatter {
  const { values, start } = endToEnd(beds);
  const sizeOf = (bed: number) => start[bed + 1] - start[bed];
  const means = new Float64Array(beds.length);
  const deviations = new Float64Array(values.length);
  let known = 0;
  for (let bed = 0; bed < beds.length; bed++) {
    means[bed] = sizeOf(bed) === 0 ? Number.NaN : medianOfSorted(values.slice(start[bed], start[bed + 1]).sort());
    if (sizeOf(bed) < 2) continue;
    for (let at = start[bed]; at < start[bed + 1]; at++) deviations[known++] = Math.abs(values[at] - means[bed]);
  }
  if (known === 0) return { s: Number.NaN, df: 0, means: [...means] };
  // Deviations from the median of a small bed run short; 1.2 makes up for most of it, the iteration for the rest.
  let s = Math.max(SMALLEST, 1.2 * 1.4826 * medianOfSorted(deviations.subarray(0, known).sort()));
  let df = 0;
  for (let turn = 0; turn < 200; turn++) {
    let squares = 0;
    df = 0;
    const odds = oddsOfOdd(s);
    for (let bed = 0; bed < beds.length; bed++) {
      // about the last mean, so that no digits are lost
      const about = means[bed];
      let total = 0;
      let sum = 0;
      let sumOfSquares = 0;
      for (let at = start[bed]; at < start[bed + 1]; at++) {
        const off = values[at] - about;
        const weight = soundness(off, odds);
        total += weight;
        sum += weight * off;
        sumOfSquares += weight * off * off;
      }
      if (sizeOf(bed) > 1) {
        squares += Math.max(0, sumOfSquares - (sum * sum) / total);
        df += Math.max(0, total - 1);
      }
      means[bed] = about + sum / total;
    }
    if (!(df > 0)) break;
    const now = Math.max(SMALLEST, Math.sqrt(squares / df / varianceLeft(s)));
    const settled = Math.abs(now - s) < 1e-9 * s;
    s = now;
    if (settled) break;
  }
  return { s, df: Math.max(Math.min(df, 1), 0.93 * df - 2), means: [...means] };
}

/** The values of all beds in one list; those of bed b from start[b] to start[b + 1] − 1. */
function endToEnd(beds: readonly (readonly number[])[]): { values: Float64Array; start: Int32Array } {
  const start = new Int32Array(beds.length + 1);
  for (let bed = 0; bed < beds.length; bed++) start[bed + 1] = start[bed] + beds[bed].length;
  const values = new Float64Array(start[beds.length]);
  for (let bed = 0; bed < beds.length; bed++) values.set(beds[bed], start[bed]);
  return { values, start };
}

/** The ratio of the densities, odd to sound, a deviation d off the bed is atZero · exp(growth · d²). */
interface Odds {
  readonly atZero: number;
  readonly growth: number;
}

/** Probability that a shell this far off its bed is sound: 1/(1 + ratio of the densities). */
const soundness = (deviation: number, { atZero, growth }: Odds): number =>
  1 / (1 + atZero * Math.exp(growth * deviation * deviation));

function oddsOfOdd(s: number): Odds {
  const wide = Math.hypot(s, ODD_SPREAD);
  return {
    atZero: ODD_SHARE / wide / ((1 - ODD_SHARE) / s),
    growth: 0.5 / (s * s) - 0.5 / (wide * wide),
  };
}

/** Share of the variance of sound shells that the weights leave: E[w z²] / E[w] for a standard normal z. */
function varianceLeft(s: number): number {
  const odds = oddsOfOdd(s);
  let weights = 0;
  let squares = 0;
  for (let z = 0.05; z < 7; z += 0.1) {
    const mass = soundness(z * s, odds) * Math.exp(-0.5 * z * z);
    weights += mass;
    squares += mass * z * z;
  }
  return squares / weights;
}
