import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { findShellConflicts } from '../../src/superposition/shell-conflicts.js';
import { shellsToSetAside } from '../../src/superposition/shells-to-set-aside.js';
import { OPTIONS, pairsInConflict, smallSurvey, solve } from './small-surveys.js';

describe('findShellConflicts', () => {
  it('finds the same conflicts as a look at every pair, and they are transitive', () => {
    fc.assert(
      fc.property(smallSurvey, (survey) => {
        const found = findShellConflicts(survey.shells, survey.beds, OPTIONS);
        const listed = found.conflicts.flatMap(({ lower, bed, from }) =>
          found.sorted[bed].slice(from).map((upper) => `${lower} ${upper}`),
        );
        const expected = pairsInConflict(survey);
        expect(new Set(listed)).toEqual(new Set(expected.map(([a, b]) => `${a} ${b}`)));
        expect(found.count).toBe(expected.length);
        expect(found.asLower.reduce((sum, n) => sum + n, 0)).toBe(expected.length);
        expect(found.asUpper.reduce((sum, n) => sum + n, 0)).toBe(expected.length);
        for (const [a, b] of expected) {
          for (const [c, d] of expected) if (b === c) expect(listed).toContain(`${a} ${d}`);
        }
      }),
      { numRuns: 100 },
    );
  });

  it('passes over shells without a ratio', () => {
    const beds = [
      { section: 'A', above: [1] },
      { section: 'A', above: [] },
    ];
    const shells = [
      { bed: 0, x: Number.NaN },
      { bed: 1, x: 0 },
    ];
    expect(findShellConflicts(shells, beds, { scatter: 0.05 })).toMatchObject({ pairs: 0, count: 0 });
  });

  it('rarely finds a conflict where all beds are of one age', () => {
    const random = createRandom(4);
    const beds = Array.from({ length: 6 }, (_, i) => ({
      section: 'A',
      above: [0, 1, 2, 3, 4, 5].filter((j) => j > i),
    }));
    let any = 0;
    for (let run = 0; run < 1000; run++) {
      const shells = beds.flatMap((_, bed) => Array.from({ length: 7 }, () => ({ bed, x: 0.05 * random.normal() })));
      if (findShellConflicts(shells, beds, { scatter: 0.05 }).count > 0) any++;
    }
    expect(any / 1000).toBeLessThan(0.05);
    expect(any / 1000).toBeGreaterThan(0.005);
  });
});

describe('shellsToSetAside', () => {
  it('tells exactly which shells are in all and which in some least costly sets', () => {
    fc.assert(
      fc.property(smallSurvey, (survey) => {
        const pairs = pairsInConflict(survey);
        const n = survey.shells.length;
        let best = Number.POSITIVE_INFINITY;
        let sets: number[] = [];
        for (let mask = 0; mask < 1 << n; mask++) {
          if (!pairs.every(([a, b]) => mask & (1 << a) || mask & (1 << b))) continue;
          let cost = 0;
          for (let i = 0; i < n; i++) if (mask & (1 << i)) cost += 1000 * survey.costs[i] * 100 + 1;
          if (cost < best) [best, sets] = [cost, []];
          if (cost === best) sets.push(mask);
        }
        const answer = solve(survey);
        const everyIn = Array.from({ length: n }, (_, i) => i);
        expect(answer.inAll).toEqual(everyIn.filter((i) => sets.every((mask) => mask & (1 << i))));
        expect(answer.inSome).toEqual(
          everyIn.filter((i) => sets.some((mask) => mask & (1 << i)) && !sets.every((mask) => mask & (1 << i))),
        );
        expect(answer.unique).toBe(sets.length === 1);
        const maskOf = (shells: readonly number[]) => shells.reduce((mask, i) => mask | (1 << i), 0);
        expect(sets).toContain(maskOf(answer.shells));
        if (answer.alternative === null) expect(sets.length).toBe(1);
        else {
          expect(sets).toContain(maskOf(answer.alternative));
          expect(maskOf(answer.alternative)).not.toBe(maskOf(answer.shells));
        }
      }),
      { numRuns: 400 },
    );
  });

  it('blames the one shell that contradicts many, and reports a tie between two', () => {
    const beds = [
      { section: 'A', above: [1] },
      { section: 'A', above: [] },
    ];
    const one = [-1, -1.01, -0.99, -2].map((x) => ({ bed: 0, x }));
    const above = [-1.4, -1.41].map((x) => ({ bed: 1, x }));
    const found = findShellConflicts([...one, ...above], beds, { scatter: 0.03 });
    expect(shellsToSetAside(found, [1, 1, 1, 1, 1, 1])).toMatchObject({
      shells: [3],
      cost: 1,
      unique: true,
      inSome: [],
    });
    const tie = findShellConflicts(
      [
        { bed: 0, x: -2 },
        { bed: 1, x: -1 },
      ],
      beds,
      { scatter: 0.03 },
    );
    expect(shellsToSetAside(tie, [1, 1])).toMatchObject({ cost: 1, unique: false, inAll: [], inSome: [0, 1] });
    expect(shellsToSetAside(tie, [0.4, 1])).toMatchObject({ shells: [0], unique: true, alternative: null });
    expect(() => shellsToSetAside(tie, [1, Number.NaN])).toThrow('cost');
  });
});
