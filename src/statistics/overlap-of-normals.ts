import { requireThat } from './check.js';
import { normalCdf } from './normal.js';

/**
 * Overlap coefficient of two normals: the area under the lower of the two curves, 0 to 1 (Inman and Bradley 1989,
 * 10.1080/03610928908830127). 2Φ(−1) = 0.3173 for equal standard deviations whose ±1 sd ranges just touch.
 *
 * @param sd1 standard deviation of the first, 0 or more; a spike (sd 0) overlaps only the same spike
 * @param sd2 standard deviation of the second, 0 or more
 * @throws RangeError when a mean is not finite or an sd is not a finite number from 0 upwards
 * @example
 * ```ts
 * overlapOfNormals(70, 4, 65, 3.5); // => 0.5028719270195425
 * ```
 */
export function overlapOfNormals(mean1: number, sd1: number, mean2: number, sd2: number): number {
  requireNormals('overlapOfNormals', mean1, sd1, mean2, sd2);
  const narrow = Math.min(sd1, sd2);
  const wide = Math.max(sd1, sd2);
  if (narrow === 0) return wide === 0 && mean1 === mean2 ? 1 : 0;
  // In units of the narrow curve: it is N(0, 1), the wide one N(delta, ratio).
  const delta = Math.abs(mean1 - mean2) / narrow;
  const ratio = wide / narrow;
  if (ratio === 1) return 2 * normalCdf(-delta / 2);
  const { left, right } = crossings(delta, ratio);
  const wideBetween = normalCdf((right - delta) / ratio) - normalCdf((left - delta) / ratio);
  return Math.min(1, normalCdf(left) + normalCdf(-right) + wideBetween);
}

/**
 * Where the curves of two normals cross between their means, so that a value on either side is likelier under the nearer
 * one; null when they do not cross there (one curve lies above the other at both means) or the means are equal.
 *
 * @param sd1 standard deviation of the first, above 0
 * @param sd2 standard deviation of the second, above 0
 * @throws RangeError when a mean is not finite or an sd is not a finite number above 0
 * @example
 * ```ts
 * equalDensityCut(0, 1, 3, 1); // => 1.5
 * ```
 */
export function equalDensityCut(mean1: number, sd1: number, mean2: number, sd2: number): number | null {
  requireNormals('equalDensityCut', mean1, sd1, mean2, sd2);
  requireThat(sd1 > 0 && sd2 > 0, 'equalDensityCut', 'standard deviations above 0', sd1, sd2);
  if (mean1 === mean2) return null;
  const [narrowMean, narrow, wideMean, wide] = sd1 <= sd2 ? [mean1, sd1, mean2, sd2] : [mean2, sd2, mean1, sd1];
  const delta = Math.abs(wideMean - narrowMean) / narrow;
  const { right } = crossings(delta, wide / narrow);
  return right <= delta ? narrowMean + Math.sign(wideMean - narrowMean) * narrow * right : null;
}

/**
 * Where N(0, 1) and N(delta, ratio), delta ≥ 0 and ratio ≥ 1, have equal densities: the roots of
 * (ratio² − 1) z² + 2 delta z = delta² + 2 ratio² ln ratio, solved without cancellation.
 */
function crossings(delta: number, ratio: number): { left: number; right: number } {
  const curvature = (ratio - 1) * (ratio + 1);
  const constant = delta * delta + 2 * ratio * ratio * Math.log1p(ratio - 1);
  const reach = delta + Math.sqrt(delta * delta + curvature * constant);
  return { left: -reach / curvature, right: constant / reach };
}

function requireNormals(who: string, mean1: number, sd1: number, mean2: number, sd2: number): void {
  const finite = Number.isFinite(mean1) && Number.isFinite(mean2);
  requireThat(finite, who, 'finite means', mean1, mean2);
  const spreads = sd1 >= 0 && sd2 >= 0 && sd1 < Infinity && sd2 < Infinity;
  requireThat(spreads, who, 'standard deviations from 0 upwards', sd1, sd2);
}
