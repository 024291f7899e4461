import { describe, expect, it } from 'vitest';
import { heightOf, sectionRelations } from '../../src/order/index.js';

const bed = (name: string, kind: 'level' | 'height_m' | 'depth_m', value: number | null, section = 'Cove') => ({
  key: `${section}/${name}`,
  section,
  place: value === null ? null : { kind, value },
});
const pairs = (beds: Parameters<typeof sectionRelations>[0]) =>
  sectionRelations(beds).map(({ lower, upper }) => `${lower}<${upper}`);

describe('sectionRelations', () => {
  it('puts deeper below shallower, higher above lower, whatever the order of rows', () => {
    expect(pairs([bed('a', 'depth_m', 1), bed('b', 'depth_m', 3), bed('c', 'depth_m', 2)])).toEqual([
      'Cove/b<Cove/c',
      'Cove/c<Cove/a',
    ]);
    expect(pairs([bed('a', 'height_m', 4.5), bed('b', 'height_m', -1)])).toEqual(['Cove/b<Cove/a']);
    expect(heightOf({ kind: 'depth_m', value: 2 })).toBe(-2);
  });

  it('does not order beds at one place, of two sections, or without a place', () => {
    expect(pairs([bed('a', 'level', 1), bed('b', 'level', 1), bed('c', 'level', 2)])).toEqual([
      'Cove/a<Cove/c',
      'Cove/b<Cove/c',
    ]);
    expect(pairs([bed('a', 'level', 1), bed('b', 'level', 2, 'Bay'), bed('c', 'level', null)])).toEqual([]);
  });

  it('gives certain superposition, the oldest first, of no row of a table', () => {
    expect(sectionRelations([bed('a', 'level', 10), bed('b', 'level', 9)])).toEqual([
      { lower: 'Cove/b', upper: 'Cove/a', basis: 'superposition', kind: 'older', certainty: 'certain', row: null },
    ]);
  });
});
