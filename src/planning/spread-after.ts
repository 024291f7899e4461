import type { BedOnClock, ClockInView } from './bed-on-clock.js';
import { varianceWith } from './unresolved-pairs.js';

/**
 * The spread tau² that a larger survey is expected to find, if the two beds truly stand where they were measured. A zone's
 * spread is estimated from how far its beds stand apart, and beds of many shells tell most of it: so a gap inside a zone
 * comes to count as spread itself once its two beds are well measured, and no number of shells may then resolve it. The
 * likelihood equation of tau² is solved with the two beds' present distances from their zones' means, and all other beds
 * as the present spread has them.
 *
 * @param view one clock; where no zones are in use it has no spread, and none is expected
 * @returns a function of the more shells of the two beds that gives tau²
 */
export function spreadAfter(
  view: ClockInView,
  pair: readonly [BedOnClock, BedOnClock],
): (more: readonly [number, number]) => number {
  const zoned = view.beds.filter((bed) => bed.row.zone !== null);
  const zones = new Set(zoned.map((bed) => bed.row.zone)).size;
  if (view.spread === null || zoned.length <= zones || pair.some((bed) => bed.row.zone === null)) {
    return () => (view.spread ?? 0) ** 2;
  }
  // what likelihood finds is too small by this factor, which the engine's spread is freed of
  const freed = zoned.length / (zoned.length - zones);
  const now = view.spread ** 2 / freed;
  const squares = pair.map((bed) => (bed.mean - zoneMean(zoned, bed.row.zone, now)) ** 2);
  // beds of as many shells have one variance, so that large surveys are as quick as small ones
  const others = new Map<number, number>();
  for (const bed of zoned) {
    if (pair.includes(bed)) continue;
    const variance = varianceWith(bed, 0);
    others.set(variance, (others.get(variance) ?? 0) + 1);
  }
  const variances = Float64Array.from(others.keys());
  const counts = Float64Array.from(others.values());
  return (more) => {
    const own = pair.map((bed, at) => varianceWith(bed, more[at]));
    const score = (t: number) => {
      let sum = 0;
      for (let at = 0; at < counts.length; at++) sum += counts[at] / (t + variances[at]) ** 2;
      sum *= now - t;
      own.forEach((variance, at) => {
        sum += (squares[at] - t) / (t + variance) ** 2;
      });
      return sum;
    };
    if (score(0) <= 0) return 0;
    let low = 0;
    let high = Math.max(now, ...squares);
    // to a millionth of the bracket
    for (let step = 0; step < 20; step++) {
      const middle = (low + high) / 2;
      if (score(middle) > 0) low = middle;
      else high = middle;
    }
    return freed * high;
  };
}

function zoneMean(beds: readonly BedOnClock[], zone: string | null, spread2: number): number {
  let sum = 0;
  let weights = 0;
  for (const bed of beds) {
    if (bed.row.zone !== zone) continue;
    const weight = 1 / (spread2 + varianceWith(bed, 0));
    sum += weight * bed.mean;
    weights += weight;
  }
  return sum / weights;
}
