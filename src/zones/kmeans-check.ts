import { kmeans } from 'ml-kmeans';
import { Matrix } from 'ml-matrix';
import { inverseSquareRoot } from '../beds/index.js';
import { adjustedRandIndex } from '../statistics/index.js';

/** What the check is made from. */
export interface KMeansCheckInput {
  /** Mean log ratios of each bed, amino acids in order; NaN where not measured. */
  readonly means: readonly (readonly number[])[];
  /** Pooled covariance of log ratios between shells of one bed, as the index gives it. */
  readonly within: readonly (readonly number[])[];
  /** Zone of each bed. */
  readonly labels: readonly number[];
  /** Whole number from which every start draws. */
  readonly seed: number;
  /** k-means++ starts. Default 20. */
  readonly starts?: number;
}

/** The grouping of k-means, and how it agrees with the zones. */
export interface KMeansCheck {
  /** Adjusted Rand index with the zones over the beds that were grouped. */
  readonly rand: number;
  /** Group of each bed, 0 the one of the smallest mean; null where an amino acid was not measured. */
  readonly groups: readonly (number | null)[];
  /** Sum of squared whitened distances of the best start. */
  readonly withinSum: number;
}

/**
 * An independent check of the zones on an index: k-means (MacQueen 1967) with several k-means++ starts (Arthur and
 * Vassilvitskii 2007) on the beds' mean log ratios, whitened by the covariance of shells within beds, with as many groups
 * as there are zones. It knows nothing of the index's direction, of beds' errors or of the mixture; where it agrees
 * (adjusted Rand index near 1, Hubert and Arabie 1985, doi:10.1007/BF01908075) the zones don't hang on those.
 * @returns null with fewer than 2 zones, or fewer measured beds than zones
 */
export function kmeansCheck({ means, within, labels, seed, starts = 20 }: KMeansCheckInput): KMeansCheck | null {
  const measured = means.flatMap((row, bed) => (row.every(Number.isFinite) ? [bed] : []));
  const zones = new Set(measured.map((bed) => labels[bed])).size;
  const points = whiten(
    measured.map((bed) => means[bed]),
    within,
  );
  const distinct = new Set(points.map((point) => point.join(' '))).size;
  if (zones < 2 || distinct < zones) return null;
  let best: { clusters: number[]; sum: number } | null = null;
  for (let start = 0; start < starts; start++) {
    const { clusters, centroids } = kmeans(points, zones, { initialization: 'kmeans++', seed: seed * 1009 + start });
    const sum = points.reduce((total, point, at) => total + squaredDistance(point, centroids[clusters[at]]), 0);
    if (best === null || sum < best.sum - 1e-12) best = { clusters, sum };
  }
  const ranked = rankGroups(best!.clusters, measured, means);
  const groups = new Array<number | null>(means.length).fill(null);
  measured.forEach((bed, at) => {
    groups[bed] = ranked[at];
  });
  const rand = adjustedRandIndex(
    ranked,
    measured.map((bed) => labels[bed]),
  );
  return { rand, groups, withinSum: best!.sum };
}

function whiten(rows: readonly (readonly number[])[], within: readonly (readonly number[])[]): number[][] {
  if (rows.length === 0) return [];
  const whitening = inverseSquareRoot(new Matrix(within.map((row) => [...row])));
  return new Matrix(rows.map((row) => [...row])).mmul(whitening).to2DArray();
}

const squaredDistance = (a: readonly number[], b: readonly number[]): number =>
  a.reduce((sum, value, at) => sum + (value - b[at]) ** 2, 0);

/** Groups renamed by their mean over all amino acids, the smallest (youngest) first. */
function rankGroups(
  clusters: readonly number[],
  measured: readonly number[],
  means: readonly (readonly number[])[],
): number[] {
  const sums = new Map<number, { sum: number; count: number }>();
  clusters.forEach((cluster, at) => {
    const entry = sums.get(cluster) ?? { sum: 0, count: 0 };
    entry.sum += means[measured[at]].reduce((total, value) => total + value, 0);
    entry.count++;
    sums.set(cluster, entry);
  });
  const mean = (cluster: number): number => sums.get(cluster)!.sum / sums.get(cluster)!.count;
  const order = [...sums.keys()].sort((a, b) => mean(a) - mean(b));
  return clusters.map((cluster) => order.indexOf(cluster));
}
