/**
 * Kolmogorov's distance between a sample and a distribution, times √n. For draws from that distribution it lies above
 * 1.95 once in a thousand times.
 */
export function kolmogorov(sample: ArrayLike<number>, cdf: (x: number) => number): number {
  const sorted = Float64Array.from(sample).sort();
  const n = sorted.length;
  let most = 0;
  for (let i = 0; i < n; i++) {
    const at = cdf(sorted[i]);
    most = Math.max(most, (i + 1) / n - at, at - i / n);
  }
  return most * Math.sqrt(n);
}
