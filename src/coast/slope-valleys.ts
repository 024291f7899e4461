import { MOST_ZONES, partition } from '../zones/index.js';
import { type BedsOnGradient, takeOut } from './slope-profile.js';

/** A slope at which zones come out clearest among its neighbours, and about how many zones it gives. */
export interface Valley {
  readonly slope: number;
  readonly zones: number;
}

/** Slopes tried. */
const GRID = 241;

/**
 * Slopes worth a closer look: on an even grid from −limit to limit, the beds are partitioned exactly for each number of
 * zones once the slope is taken out, and scored by the BIC of the classification likelihood (Symons 1981,
 * doi:10.2307/2530520). Every bed given to its own zone: quick, and good enough to find the valleys.
 * @returns low points of the score, the lowest first
 */
export function slopeValleys(beds: BedsOnGradient, limit: number): { valleys: Valley[]; step: number } {
  const step = (2 * limit) / (GRID - 1);
  const weights = beds.errors.map((se) => 1 / Math.max(se * se, 1e-12));
  const scores = Array.from({ length: GRID }, (_, at) => {
    const slope = -limit + at * step;
    return { slope, ...roughBic(takeOut(beds, slope), beds.errors, weights) };
  });
  const bicAt = (at: number): number => scores[at]?.bic ?? Number.POSITIVE_INFINITY;
  const valleys = scores
    .filter(({ bic }, at) => bic <= bicAt(at - 1) && bic <= bicAt(at + 1))
    .sort((a, b) => a.bic - b.bic || a.slope - b.slope);
  return { valleys, step };
}

/** Least BIC over numbers of zones, given up after three in a row that are no better. */
function roughBic(values: readonly number[], errors: readonly number[], weights: readonly number[]) {
  let best = { bic: Number.POSITIVE_INFINITY, zones: 1 };
  let worse = 0;
  for (let k = 1; k <= Math.min(MOST_ZONES, values.length - 1) && worse < 3; k++) {
    const bic = classificationBic(values, errors, partition(values, weights, k), k);
    if (bic < best.bic) [best, worse] = [{ bic, zones: k }, 0];
    else worse++;
  }
  return best;
}

function classificationBic(
  values: readonly number[],
  errors: readonly number[],
  labels: readonly number[],
  k: number,
): number {
  const n = values.length;
  const sums = new Float64Array(k);
  const counts = new Float64Array(k);
  for (let at = 0; at < n; at++) {
    sums[labels[at]] += values[at];
    counts[labels[at]]++;
  }
  let excess = 0;
  for (let at = 0; at < n; at++) {
    excess += (values[at] - sums[labels[at]] / counts[labels[at]]) ** 2 - errors[at] ** 2;
  }
  const tau2 = Math.max(0, excess / n);
  let total = 0;
  for (let at = 0; at < n; at++) {
    const variance = Math.max(tau2 + errors[at] ** 2, 1e-12);
    const d = values[at] - sums[labels[at]] / counts[labels[at]];
    total += Math.log(counts[labels[at]] / n) - 0.5 * Math.log(2 * Math.PI * variance) - (0.5 * d * d) / variance;
  }
  return -2 * total + 2 * k * Math.log(n);
}
