import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';
import { farthest } from './grubbs.js';
import { studentTQuantile } from './student-t.js';

/** One step: the most extreme value left, and its limit. */
export interface EsdStep {
  /** Place in the list of the value taken out at this step. */
  readonly index: number;
  /** Its distance from the mean of what was left, in standard deviations. */
  readonly statistic: number;
  readonly limit: number;
}

/** Outliers found, and every step. */
export interface GeneralizedEsd {
  /** Places of the outliers in the list, most extreme first. */
  readonly outliers: readonly number[];
  /** All steps, also those past the last outlier. */
  readonly steps: readonly EsdStep[];
}

/**
 * Outliers among normal values when their number is unknown: the generalized extreme studentized deviate procedure
 * (Rosner 1983, 10.1080/00401706.1983.10487848). There are as many outliers as the last step above its limit says, even if
 * earlier steps lie below theirs, so that outliers can't hide each other.
 *
 * @param values at least 3; below about 15 the limits are rough
 * @param maxOutliers most that are looked for, up to the number of values − 2
 * @param alpha chance of calling any outlier where there is none, default 0.05
 * @throws RangeError when values are too few or not finite, or maxOutliers or alpha is out of range
 * @example
 * ```ts
 * generalizedEsd([1, 2, 3, 2, 1, 2, 3, 2, 30, 31], 3).outliers; // => [9, 8]
 * ```
 */
export function generalizedEsd(values: Numbers, maxOutliers: number, alpha = 0.05): GeneralizedEsd {
  requireNumbers('generalizedEsd', 'values', values, 3);
  const n = values.length;
  const counts = Number.isInteger(maxOutliers) && maxOutliers >= 1 && maxOutliers <= n - 2;
  requireThat(counts, 'generalizedEsd', `a whole maxOutliers from 1 to ${n - 2}`, maxOutliers);
  requireThat(alpha > 0 && alpha < 1, 'generalizedEsd', 'an alpha between 0 and 1', alpha);
  const left = Array.from(values, (value, index) => ({ value, index }));
  const steps: EsdStep[] = [];
  let found = 0;
  while (steps.length < maxOutliers) {
    const { g, index } = farthest(
      'generalizedEsd',
      left.map(({ value }) => value),
      'both',
    );
    const df = left.length - 2;
    const t = -studentTQuantile(alpha / (2 * left.length), df);
    const limit = ((left.length - 1) * t) / Math.sqrt((df + t * t) * left.length);
    steps.push({ index: left[index].index, statistic: g, limit });
    if (g > limit) found = steps.length;
    left.splice(index, 1);
  }
  return { outliers: steps.slice(0, found).map(({ index }) => index), steps };
}
