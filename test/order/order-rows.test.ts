import { describe, expect, it } from 'vitest';
import { orderRows, pairRows, probabilityOlder, rankBeds } from '../../src/order/index.js';
import { bed, posteriorOf } from './posterior-of.js';

const beds = [bed('Cove', 'a'), bed('Cove', 'b'), bed('Bay', 'a'), bed('Bay', 'b')];
// b of Bay is the oldest in all draws; the two `a` share a deposit; b of Cove is older than they in one draw of four
const posterior = posteriorOf([
  [2, 2, 3, 2],
  [4, 4, 2, 4],
  [2, 2, 3, 2],
  [1, 1, 1, 1],
]);
const tied = [0, 1, 0, 2];

describe('probabilityOlder', () => {
  it('is the share of draws with the smaller rank; beds of one deposit are never the older', () => {
    expect(probabilityOlder(posterior, 3, 0)).toBe(1);
    expect(probabilityOlder(posterior, 0, 3)).toBe(0);
    expect(probabilityOlder(posterior, 0, 1)).toBe(0.75);
    expect(probabilityOlder(posterior, 1, 2)).toBe(0.25);
    expect(probabilityOlder(posterior, 0, 2)).toBe(0);
  });
});

describe('rankBeds', () => {
  it('orders by mean rank, lets tied beds share the smaller rank, and keeps them together', () => {
    const { sequence, rank, rankMean, rankLow, rankHigh } = rankBeds(posterior, tied);
    expect(sequence).toEqual([3, 0, 2, 1]);
    expect(rank).toEqual([2, 4, 2, 1]);
    expect(rankMean).toEqual([2.25, 3.5, 2.25, 1]);
    expect(rankLow).toEqual([2, 2, 2, 1]);
    expect(rankHigh).toEqual([3, 4, 3, 1]);
  });

  it('keeps beds of one deposit side by side where all mean ranks are equal, and counts from 1', () => {
    const even = posteriorOf([[1], [1], [1], [1]]);
    expect(rankBeds(even, [1, 0, 1, 0])).toMatchObject({ sequence: [1, 3, 0, 2], rank: [3, 1, 3, 1] });
  });

  it('leaves 2.5 % of the draws on either side of the interval', () => {
    // ranks 1 … 80 once each: 2 below and 2 above
    const one = posteriorOf([Array.from({ length: 80 }, (_, at) => ((at * 37) % 80) + 1)]);
    expect(rankBeds(one, [0])).toMatchObject({ rankLow: [3], rankHigh: [78], rankMean: [40.5] });
    // ranks sort as numbers, not as text
    expect(rankBeds(posteriorOf([[9, 10, 100]]), [0])).toMatchObject({ rankLow: [9], rankHigh: [100] });
  });
});

describe('orderRows', () => {
  const rows = (alpha: number) =>
    orderRows('Invenus THAA Ile', beds, ['Z1', 'Z1', null, 'Z2'], tied, posterior, rankBeds(posterior, tied), alpha);

  it('has a row a bed, the oldest first, with the probability of the next', () => {
    const common = { clock: 'Invenus THAA Ile' };
    expect(rows(0.05)).toEqual([
      {
        ...common,
        rank: 1,
        section: 'Bay',
        bed: 'b',
        zone: 'Z2',
        rank_low: 1,
        rank_high: 1,
        p_older_than_next: 1,
        resolved: true,
      },
      // tied to the next: nothing to say of which is the older
      {
        ...common,
        rank: 2,
        section: 'Cove',
        bed: 'a',
        zone: 'Z1',
        rank_low: 2,
        rank_high: 3,
        p_older_than_next: null,
        resolved: null,
      },
      {
        ...common,
        rank: 2,
        section: 'Bay',
        bed: 'a',
        zone: null,
        rank_low: 2,
        rank_high: 3,
        p_older_than_next: 0.75,
        resolved: false,
      },
      {
        ...common,
        rank: 4,
        section: 'Cove',
        bed: 'b',
        zone: 'Z1',
        rank_low: 2,
        rank_high: 4,
        p_older_than_next: null,
        resolved: null,
      },
    ]);
  });

  it('takes a pair for resolved from 1 − alpha on', () => {
    expect(rows(0.25).map(({ resolved }) => resolved)).toEqual([true, null, true, null]);
    expect(rows(0.24).map(({ resolved }) => resolved)).toEqual([true, null, false, null]);
  });
});

describe('pairRows', () => {
  it('has every pair once, the one that stands earlier in the order first', () => {
    const same = (a: number, b: number) => (a === 3 ? null : (10 * a + b) / 100);
    const rows = pairRows('Invenus THAA Ile', beds, posterior, rankBeds(posterior, tied), same);
    const row = (bed_a: string, bed_b: string, p_a_older: number, p_same_zone: number | null) => {
      return { clock: 'Invenus THAA Ile', bed_a, bed_b, p_a_older, p_same_zone };
    };
    expect(rows).toEqual([
      row('Bay/b', 'Cove/a', 1, null),
      row('Bay/b', 'Bay/a', 1, null),
      row('Bay/b', 'Cove/b', 1, null),
      row('Cove/a', 'Bay/a', 0, 0.02),
      row('Cove/a', 'Cove/b', 0.75, 0.01),
      row('Bay/a', 'Cove/b', 0.75, 0.21),
    ]);
  });
});
