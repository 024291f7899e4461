import { median } from '../statistics/index.js';

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
  let means = beds.map((values) => (values.length === 0 ? Number.NaN : median(values)));
  const deviations = beds.flatMap((values, bed) =>
    values.length < 2 ? [] : values.map((x) => Math.abs(x - means[bed])),
  );
  if (deviations.length === 0) return { s: Number.NaN, df: 0, means };
  // Deviations from the median of a small bed run short; 1.2 makes up for most of it, the iteration for the rest.
  let s = Math.max(SMALLEST, 1.2 * 1.4826 * median(deviations));
  let df = 0;
  for (let turn = 0; turn < 200; turn++) {
    let squares = 0;
    df = 0;
    const weightAt = soundnessAt(s);
    means = beds.map((values, bed) => {
      let total = 0;
      let sum = 0;
      let sumOfSquares = 0;
      // about the last mean, so that no digits are lost
      for (const x of values) {
        const off = x - means[bed];
        const weight = weightAt(off);
        total += weight;
        sum += weight * off;
        sumOfSquares += weight * off * off;
      }
      if (values.length > 1) {
        squares += Math.max(0, sumOfSquares - (sum * sum) / total);
        df += Math.max(0, total - 1);
      }
      return values.length === 0 ? Number.NaN : means[bed] + sum / total;
    });
    if (!(df > 0)) break;
    const now = Math.max(SMALLEST, Math.sqrt(squares / df / varianceLeft(s)));
    const settled = Math.abs(now - s) < 1e-9 * s;
    s = now;
    if (settled) break;
  }
  return { s, df: Math.max(Math.min(df, 1), 0.93 * df - 2), means };
}

/** Probability that a shell this far off its bed is sound: 1/(1 + ratio of the densities, odd to sound). */
function soundnessAt(s: number): (deviation: number) => number {
  const wide = Math.hypot(s, ODD_SPREAD);
  const atZero = ODD_SHARE / wide / ((1 - ODD_SHARE) / s);
  const growth = 0.5 / (s * s) - 0.5 / (wide * wide);
  return (deviation) => 1 / (1 + atZero * Math.exp(growth * deviation * deviation));
}

/** Share of the variance of sound shells that the weights leave: E[w z²] / E[w] for a standard normal z. */
function varianceLeft(s: number): number {
  const weightAt = soundnessAt(s);
  let weights = 0;
  let squares = 0;
  for (let z = 0.05; z < 7; z += 0.1) {
    const mass = weightAt(z * s) * Math.exp(-0.5 * z * z);
    weights += mass;
    squares += mass * z * z;
  }
  return squares / weights;
}
