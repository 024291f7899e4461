/**
 * Mean silhouette of a grouping of values on a line (Rousseeuw 1987, doi:10.1016/0377-0427(87)90125-7): for each value
 * (b − a)/max(a, b), a its mean distance to the others of its group and b that to the nearest other group; 0 for a group
 * of one. Mean distances come from running sums over each group in order, so n values in K groups cost O(K n log n).
 * @param values numbers, any order
 * @param labels the group of each value
 * @returns from −1 to 1; null with one group
 * @throws RangeError when the two lists differ in length
 * @example
 * meanSilhouette([1, 2, 9, 10], [0, 0, 1, 1]) // => 0.8745098
 */
export function meanSilhouette(values: readonly number[], labels: readonly number[]): number | null {
  if (values.length !== labels.length) {
    throw new RangeError(`meanSilhouette wants a group for each of ${values.length} values, got ${labels.length}`);
  }
  const groups = new Map<number, { sorted: Float64Array; sums: Float64Array }>();
  for (const label of new Set(labels)) {
    const sorted = Float64Array.from(values.filter((_, at) => labels[at] === label)).sort();
    const sums = new Float64Array(sorted.length + 1);
    sorted.forEach((value, at) => {
      sums[at + 1] = sums[at] + value;
    });
    groups.set(label, { sorted, sums });
  }
  if (groups.size < 2) return null;
  let total = 0;
  values.forEach((value, at) => {
    const own = groups.get(labels[at])!;
    if (own.sorted.length === 1) return;
    const within = distanceSum(value, own.sorted, own.sums) / (own.sorted.length - 1);
    let nearest = Number.POSITIVE_INFINITY;
    for (const [label, { sorted, sums }] of groups) {
      if (label !== labels[at]) nearest = Math.min(nearest, distanceSum(value, sorted, sums) / sorted.length);
    }
    const larger = Math.max(within, nearest);
    if (larger > 0) total += (nearest - within) / larger;
  });
  return total / values.length;
}

/** Sum of distances from a value to all of a sorted list. */
function distanceSum(value: number, sorted: Float64Array, sums: Float64Array): number {
  // most groups lie wholly on one side
  let low = value >= sorted[sorted.length - 1] ? sorted.length : 0;
  let high = value < sorted[0] ? 0 : sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle] <= value) low = middle + 1;
    else high = middle;
  }
  const below = low * value - sums[low];
  const above = sums[sorted.length] - sums[low] - (sorted.length - low) * value;
  return Math.max(0, below) + Math.max(0, above);
}
