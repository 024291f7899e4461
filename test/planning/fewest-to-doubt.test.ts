import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fewestToDoubt } from '../../src/planning/fewest-to-doubt.js';

/** All smallest covers, by trying every subset. */
function byTryingAll(size: number, conflicts: readonly (readonly [number, number])[]) {
  let best: number[][] = [];
  let fewest = size + 1;
  for (let bits = 0; bits < 1 << size; bits++) {
    if (!conflicts.every(([a, b]) => bits & (1 << a) || bits & (1 << b))) continue;
    const members = Array.from({ length: size }, (_, i) => i).filter((i) => bits & (1 << i));
    if (members.length < fewest) [best, fewest] = [[], members.length];
    if (members.length === fewest) best.push(members);
  }
  const all = Array.from({ length: size }, (_, i) => i);
  return {
    fewest,
    inSome: all.filter((i) => best.some((set) => set.includes(i))),
    inEvery: all.filter((i) => best.every((set) => set.includes(i))),
  };
}

describe('fewestToDoubt', () => {
  it('agrees with trying every subset, on conflicts of things with a place in the order and an age', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: 0, max: 6 }), fc.integer({ min: 0, max: 9 })), {
          minLength: 1,
          maxLength: 10,
        }),
        (things) => {
          const conflicts: [number, number][] = [];
          things.forEach(([place, age], i) => {
            things.forEach(([otherPlace, otherAge], j) => {
              if (place < otherPlace && otherAge - age > 2) conflicts.push([i, j]);
            });
          });
          expect(fewestToDoubt(things.length, conflicts)).toEqual(byTryingAll(things.length, conflicts));
        },
      ),
      { seed: 5, numRuns: 300 },
    );
  });

  it('doubts nothing where nothing conflicts', () => {
    expect(fewestToDoubt(3, [])).toEqual({ fewest: 0, inSome: [], inEvery: [] });
  });
});
