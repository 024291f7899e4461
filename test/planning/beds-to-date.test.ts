import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bedsToDate } from '../../src/planning/beds-to-date.js';
import { type BitSet, emptySet, include } from '../../src/planning/bit-set.js';
import { boundedBy, type OlderAndYounger } from '../../src/planning/bracketing.js';

/** Beds with intervals on a line: one is known to be older than another where its interval lies wholly above. */
function fromIntervals(intervals: readonly (readonly [number, number])[]): OlderAndYounger {
  const sets = (test: (a: number, b: number) => boolean): BitSet[] =>
    intervals.map((_, a) => {
      const set = emptySet(intervals.length);
      intervals.forEach((_, b) => {
        if (test(a, b)) include(set, b);
      });
      return set;
    });
  const above = (a: number, b: number) => intervals[a][0] > intervals[b][1];
  return { younger: sets(above), older: sets((a, b) => above(b, a)) };
}

/** All sets of `count` of the numbers under `size`. */
function* choices(size: number, count: number, from = 0): Generator<number[]> {
  if (count === 0) yield [];
  else for (let i = from; i < size; i++) for (const rest of choices(size, count - 1, i + 1)) yield [i, ...rest];
}

/** Any order: bits of a random acyclic graph, closed. */
function fromArcs(size: number, arcs: readonly boolean[]): OlderAndYounger {
  const reach = Array.from({ length: size }, () => new Set<number>());
  let at = 0;
  for (let a = size - 1; a >= 0; a--) {
    for (let b = a + 1; b < size; b++) {
      if (arcs[at++]) {
        reach[a].add(b);
        for (const c of reach[b]) reach[a].add(c);
      }
    }
  }
  const younger = reach.map((set) => {
    const bits = emptySet(size);
    for (const b of set) include(bits, b);
    return bits;
  });
  const older = reach.map((_, b) => {
    const bits = emptySet(size);
    for (let a = 0; a < size; a++) if (reach[a].has(b)) include(bits, a);
    return bits;
  });
  return { younger, older };
}

function bestByTryingAll(known: OlderAndYounger, count: number) {
  let best = { bracketed: -1, bounded: -1 };
  for (const choice of choices(known.younger.length, count)) {
    const found = boundedBy(known, choice);
    if (found.bracketed > best.bracketed || (found.bracketed === best.bracketed && found.bounded > best.bounded)) {
      best = found;
    }
  }
  return best;
}

describe('bedsToDate', () => {
  it('is as good as trying every choice, on any order of up to 10 beds and for budgets to 4', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 10 }).chain((size) =>
          fc.tuple(
            fc.constant(size),
            fc.array(
              fc.integer({ min: 0, max: 99 }).map((n) => n < 25),
              {
                minLength: (size * (size - 1)) / 2,
                maxLength: (size * (size - 1)) / 2,
              },
            ),
            fc.integer({ min: 1, max: 4 }),
          ),
        ),
        ([size, arcs, count]) => {
          const known = fromArcs(size, arcs);
          const found = bedsToDate(known, count);
          expect(found.proven).toBe(true);
          const wanted = bestByTryingAll(known, Math.min(count, size));
          expect({ bracketed: found.bracketed, bounded: found.bounded }).toEqual(wanted);
          expect(boundedBy(known, found.beds)).toEqual(wanted);
        },
      ),
      { seed: 7, numRuns: 300 },
    );
  });

  it('is as good as trying every choice among beds known by intervals', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: 0, max: 40 }), fc.integer({ min: 0, max: 15 })), {
          minLength: 3,
          maxLength: 25,
        }),
        fc.integer({ min: 1, max: 3 }),
        (beds, count) => {
          const known = fromIntervals(beds.map(([low, width]) => [low, low + width] as const));
          const found = bedsToDate(known, count);
          expect(found.proven).toBe(true);
          expect(found.most).toBe(found.bracketed);
          expect(found.bracketed).toBe(bestByTryingAll(known, count).bracketed);
        },
      ),
      { seed: 8, numRuns: 60 },
    );
  });

  it('takes both ends of a chain with two dates', () => {
    const chain = fromIntervals([0, 1, 2, 3, 4].map((x) => [x, x] as const));
    expect(bedsToDate(chain, 2)).toMatchObject({ beds: [4, 0], bracketed: 3, bounded: 3, proven: true });
  });

  it('prefers sound beds among those that bracket as many', () => {
    const known = fromIntervals([9, 9, 9, 5, 5, 1, 1].map((x) => [x, x] as const));
    expect(bedsToDate(known, 2, { soundness: [0.2, 0.9, 0.5, 1, 1, 0.3, 0.8] }).beds).toEqual([1, 6]);
  });

  it('names a bound where patience runs out', () => {
    const known = fromIntervals(
      Array.from({ length: 30 }, (_, i) => [(i * 17) % 30, ((i * 17) % 30) + (i % 6)] as const),
    );
    const found = bedsToDate(known, 5, { patience: 1 });
    expect(found.most).toBeGreaterThanOrEqual(bedsToDate(known, 5).bracketed);
    expect(found.most).toBeGreaterThanOrEqual(found.bracketed);
  });

  it('settles 400 beds and 3 dates quickly', () => {
    const known = fromIntervals(
      Array.from({ length: 400 }, (_, i) => [(i * 149) % 400, ((i * 149) % 400) + 30 + ((i * 31) % 40)] as const),
    );
    const before = performance.now();
    expect(bedsToDate(known, 3).proven).toBe(true);
    expect(performance.now() - before).toBeLessThan(4000);
  });

  it('refuses a budget that is no number of beds', () => {
    expect(() => bedsToDate(fromIntervals([[0, 0]]), 0)).toThrow(/whole number above 0, got 0/);
    expect(() => bedsToDate(fromIntervals([[0, 0]]), Number.NaN)).toThrow(/budget/);
  });
});
