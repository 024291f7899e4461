import type { Remark } from '../model/index.js';
import { caution, counted, finding, someOf } from './remark-words.js';
import type { Staircase } from './staircase.js';

/**
 * What is said of the staircase of one clock: how many relations were derived, or why none was.
 * @param elevations number of beds with an elevation
 */
export function staircaseRemarks(clock: string, staircase: Staircase | null, elevations: number): Remark[] {
  if (staircase === null) return [];
  const { relations, circles, cut } = staircase;
  if (relations.length === 0) {
    const why =
      elevations < 2
        ? 'fewer than 2 beds have an elevation_m'
        : 'no two beds stand on different terraces that superposition leaves unordered';
    return [caution(`No staircase relation was derived, since ${why}.`, clock)];
  }
  const binding =
    relations[0].certainty === 'certain' ? 'They bind the order.' : 'They are checked, and do not bind the order.';
  const remarks = [
    finding(
      `${counted(relations.length, 'staircase relation')} derived from elevations, the higher terrace the older. ${binding}`,
      clock,
    ),
  ];
  if (circles.length > 0) {
    const named = circles.map(({ lower, upper }) => `${lower} > ${upper}`);
    remarks.push(
      caution(
        `${counted(circles.length, 'staircase relation')} left out, since other relations say the opposite: ${someOf(named)}.`,
        clock,
      ),
    );
  }
  if (cut) {
    remarks.push(caution(`So many beds stand on terraces that each was held against the next lower ones only.`, clock));
  }
  return remarks;
}
