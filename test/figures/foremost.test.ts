import fc from 'fast-check';
import { expect, it } from 'vitest';
import { foremost } from '../../src/figures/foremost.js';
import { extent } from '../../src/figures/numbers.js';

it('gives what a stable sort puts first, and leaves the rows as they were', () => {
  const rows = fc.array(fc.integer({ min: 0, max: 9 }), { maxLength: 60 });
  fc.assert(
    fc.property(rows, fc.integer({ min: 1, max: 12 }), (keys, most) => {
      const given = keys.map((key, place) => ({ key, place }));
      const before = [...given];
      const compare = (a: { key: number }, b: { key: number }) => a.key - b.key;
      expect(foremost(given, most, compare)).toEqual([...given].sort(compare).slice(0, most));
      expect(given).toEqual(before);
    }),
  );
});

it('finds the ends of more values than a call takes arguments', () => {
  const many = Array.from({ length: 400_000 }, (_, i) => (i * 7919) % 400_000);
  expect(extent(many, (value) => value)).toEqual([0, 399_999]);
  expect(
    extent(
      many,
      (value) => value - 2,
      (value) => value + 3,
    ),
  ).toEqual([-2, 400_002]);
  expect(extent([], (value: number) => value)).toEqual([Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]);
});
