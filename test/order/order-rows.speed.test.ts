import { describe, expect, it } from 'vitest';
import { MOST_BEDS_IN_PAIRS, pairRows, rankBeds } from '../../src/order/index.js';
import { bed, posteriorOf } from './posterior-of.js';

// b of Bay is the oldest in all draws; the two `a` share a deposit; b of Cove is older than they in one draw of four
const posterior = posteriorOf([
  [2, 2, 3, 2],
  [4, 4, 2, 4],
  [2, 2, 3, 2],
  [1, 1, 1, 1],
]);
const tied = [0, 1, 0, 2];

describe('pairRows', () => {
  it('takes every k-th draw where all would take too long, and gives no pairs above 400 beds', () => {
    const many = Array.from({ length: MOST_BEDS_IN_PAIRS }, (_, at) => bed('S', String(at)));
    // 79,800 pairs of 1,000 draws: every second draw is used, and only those have bed 0 the older
    const draws = 1000;
    const ranks = new Uint32Array(many.length * draws);
    for (let at = 0; at < many.length; at++) {
      for (let draw = 0; draw < draws; draw++) ranks[at * draws + draw] = draw % 2 === 0 ? at + 1 : many.length - at;
    }
    const large = { ...posterior, beds: many.length, draws, ranks };
    const ranking = { ...rankBeds(posterior, tied), sequence: many.map((_, at) => at) };
    const rows = pairRows('clock', many, large, ranking, () => 0.5);
    expect(rows).toHaveLength(79_800);
    expect(rows[0]).toMatchObject({ bed_a: 'S/0', bed_b: 'S/1', p_a_older: 1, p_same_zone: 0.5 });
    expect(pairRows('clock', [...many, bed('S', 'x')], large, ranking, () => 0.5)).toEqual([]);
  });
});
