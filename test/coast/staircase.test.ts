import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MOST_STAIRCASE_RELATIONS, ONE_TERRACE_M, staircaseRelations } from '../../src/coast/staircase.js';
import type { RelationRecord } from '../../src/model/index.js';
import { relationGraph, sectionRelations } from '../../src/order/index.js';

const bed = (key: string, elevation_m: number | null) => ({ key, section: key.split('/')[0], elevation_m });
const older = (lower: string, upper: string, more: Partial<RelationRecord> = {}): RelationRecord => ({
  lower,
  upper,
  basis: 'superposition',
  kind: 'older',
  certainty: 'certain',
  row: null,
  ...more,
});
const pairs = (relations: readonly RelationRecord[]) => relations.map(({ lower, upper }) => `${lower} > ${upper}`);

describe('staircaseRelations', () => {
  it('calls the higher terrace the older, and gives only steps that no others imply', () => {
    const flight = [bed('F/T1', 4), bed('F/T3', 33), bed('F/T2', 15)];
    const { relations } = staircaseRelations(flight, [], { along: 'section' });
    expect(pairs(relations)).toEqual(['F/T3 > F/T2', 'F/T2 > F/T1']);
    expect(relations[0]).toMatchObject({ basis: 'staircase', kind: 'older', certainty: 'probable', row: null });
  });

  it('keeps to each section, or runs along the whole coast, as asked', () => {
    const beds = [bed('A/high', 20), bed('A/low', 10), bed('B/only', 5)];
    expect(pairs(staircaseRelations(beds, [], { along: 'section' }).relations)).toEqual(['A/high > A/low']);
    expect(pairs(staircaseRelations(beds, [], { along: 'coast' }).relations)).toEqual([
      'A/high > A/low',
      'A/low > B/only',
    ]);
  });

  it('does not order beds within a metre of each other', () => {
    const beds = [bed('A/x', 10), bed('B/x', 10 - ONE_TERRACE_M), bed('C/x', 10 - ONE_TERRACE_M - 0.01)];
    expect(pairs(staircaseRelations(beds, [], { along: 'coast' }).relations)).toEqual(['A/x > C/x']);
  });

  it('lets superposition win: in a stack the higher bed is the younger, and only its foot is older than lower terraces', () => {
    // a stack at 20 to 23 m, a terrace with a stack at 8 to 10 m
    const beds = [bed('A/foot', 20), bed('A/top', 23), bed('B/foot', 8), bed('B/top', 10)];
    const stacked = [older('A/foot', 'A/top'), older('B/foot', 'B/top')];
    expect(pairs(staircaseRelations(beds, stacked, { along: 'section' }).relations)).toEqual([]);
    // A/top may be a younger cover: nothing is said of it; B/top follows from B/foot
    expect(pairs(staircaseRelations(beds, stacked, { along: 'coast' }).relations)).toEqual(['A/foot > B/foot']);
  });

  it('holds the upper bed of a lower terrace against the foot of a higher one when its own foot has no ratio', () => {
    const beds = [bed('A/foot', 20), bed('B/top', 10)];
    const stacked = [older('B/foot', 'B/top')];
    expect(pairs(staircaseRelations(beds, stacked, { along: 'coast' }).relations)).toEqual(['A/foot > B/top']);
    expect(
      pairs(staircaseRelations(beds, [older('A/base', 'A/foot'), ...stacked], { along: 'coast' }).relations),
    ).toEqual([]);
  });

  it('leaves pairs alone that the table states or certain relations order, either way round', () => {
    const beds = [bed('A/x', 20), bed('B/x', 10)];
    const along = { along: 'coast' } as const;
    expect(staircaseRelations(beds, [older('B/x', 'A/x', { basis: 'inset' })], along).relations).toEqual([]);
    const probable = older('A/x', 'B/x', { basis: 'staircase', certainty: 'probable' });
    expect(staircaseRelations(beds, [probable], along).relations).toEqual([]);
    const through = [older('B/x', 'C/x', { basis: 'marker' }), older('C/x', 'A/x', { basis: 'marker' })];
    expect(staircaseRelations(beds, through, along).relations).toEqual([]);
    expect(staircaseRelations(beds, [older('A/x', 'B/x', { kind: 'same' })], along).relations).toEqual([]);
  });

  it('never closes a circle when it binds', () => {
    // two steps that each are fine alone, and two certain markers that run against them together
    const beds = [bed('A/x', 20), bed('B/x', 10), bed('C/x', 40), bed('D/x', 30)];
    const known = [older('B/x', 'C/x', { basis: 'marker' }), older('D/x', 'A/x', { basis: 'marker' })];
    const { relations, circles } = staircaseRelations(beds, known, { along: 'coast', certain: true });
    expect(() =>
      relationGraph(
        beds.map((b) => b.key),
        [...known, ...relations],
      ),
    ).not.toThrow();
    expect(relations.every((relation) => relation.certainty === 'certain')).toBe(true);
    expect(circles.length).toBeGreaterThan(0);
  });

  it('on any coast: the higher over a metre, never against superposition, never an implied pair, no circle', () => {
    const coast = fc.array(
      fc.record({
        section: fc.integer({ min: 1, max: 5 }),
        level: fc.option(fc.integer({ min: 1, max: 4 })),
        at: fc.integer({ min: 0, max: 12 }),
      }),
      { minLength: 1, maxLength: 14 },
    );
    fc.assert(
      fc.property(coast, fc.boolean(), (drawn, certain) => {
        const beds = drawn.map(({ section, at }, i) => bed(`S${section}/B${i}`, at));
        const placed = drawn.map(({ section, level }, i) => ({
          key: `S${section}/B${i}`,
          section: `S${section}`,
          place: level === null ? null : ({ kind: 'level', value: level } as const),
        }));
        const stacking = sectionRelations(placed);
        const heights = new Map(beds.map(({ key, elevation_m }) => [key, elevation_m!]));
        const { relations } = staircaseRelations(beds, stacking, { along: 'coast', certain });
        const stacks = relationGraph(
          beds.map((b) => b.key),
          stacking,
        );
        const node = new Map(beds.map(({ key }, i) => [key, stacks.node[i]]));
        for (const { lower, upper } of relations) {
          expect(heights.get(lower)! - heights.get(upper)!).toBeGreaterThan(ONE_TERRACE_M);
          expect(stacks.older[node.get(lower)!]).toEqual([]);
        }
        const names = new Set(pairs(relations));
        for (const a of relations) {
          for (const b of relations) {
            if (a.upper === b.lower) expect(names.has(`${a.lower} > ${b.upper}`)).toBe(false);
          }
        }
        relationGraph(
          beds.map((b) => b.key),
          [...stacking, ...(certain ? relations : [])],
        );
      }),
      { seed: 1, numRuns: 200 },
    );
  });

  it('holds each terrace against the next lower ones only where there are very many', () => {
    const beds = Array.from({ length: 600 }, (_, i) => bed(`S${i}/x`, i % 2 === 0 ? 20 : 5));
    const { relations, cut } = staircaseRelations(beds, [], { along: 'coast' });
    expect(cut).toBe(true);
    expect(relations.length).toBeLessThanOrEqual(MOST_STAIRCASE_RELATIONS);
  });
});
