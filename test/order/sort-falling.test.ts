import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fallingSorter } from '../../src/order/sort-falling.js';

const plainly = (values: readonly number[]) => values.map((_, at) => at).sort((a, b) => values[b] - values[a] || a - b);

describe('fallingSorter', () => {
  it('sorts as a sort by comparison does: the largest first, equals by position', () => {
    const even = fc.double({ min: -3, max: 3, noNaN: true });
    // many equal, some far away, so that buckets crowd
    const value = fc.oneof(even, fc.constantFrom(-1, -1, 0, 0.5), fc.double({ min: -1e9, max: 1e9, noNaN: true }));
    fc.assert(
      fc.property(fc.array(value, { maxLength: 120 }), (values) => {
        expect([...fallingSorter(values.length)(Object.freeze(values))]).toEqual(plainly(values));
      }),
    );
  });

  it('sorts crowds, twins, and values that hardly differ', () => {
    const crowd = [...Array.from({ length: 70 }, (_, at) => 1e-7 * ((at * 37) % 70)), 1e9, -1e9];
    const few = [...Array.from({ length: 20 }, (_, at) => 1e-7 * ((at * 7) % 20)), 1e9];
    for (const values of [crowd, few, new Array<number>(50).fill(2), [0, 5e-324, 0, 5e-324], [3], [], [1, 2], [2, 1]]) {
      expect([...fallingSorter(values.length)(values)]).toEqual(plainly(values));
    }
  });

  it('is the same sorter again for other values', () => {
    const sort = fallingSorter(4);
    expect([...sort([0.1, 0.4, 0.2, 0.3])]).toEqual([1, 3, 2, 0]);
    expect([...sort([5, 5, 9, -1])]).toEqual([2, 0, 1, 3]);
    expect([...sort(Float64Array.of(1, 2, 3, 4))]).toEqual([3, 2, 1, 0]);
  });
});
