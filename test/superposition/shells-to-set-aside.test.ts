import fc from 'fast-check';
import highsLoader from 'highs';
import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { conflictThreshold } from '../../src/superposition/conflict-threshold.js';
import { costOfShell } from '../../src/superposition/cost-of-shell.js';
import { type BedInOrder, findShellConflicts, type ShellInOrder } from '../../src/superposition/shell-conflicts.js';
import { shellsToSetAside } from '../../src/superposition/shells-to-set-aside.js';

interface SmallSurvey {
  readonly beds: readonly BedInOrder[];
  readonly shells: readonly ShellInOrder[];
  readonly costs: readonly number[];
}

const OPTIONS = { scatter: 0.02, spread: 0.02, alpha: 0.05 };

/** Beds in a random partial order over two or three sections, closed; shells with ratios that often contradict it. */
const smallSurvey: fc.Arbitrary<SmallSurvey> = fc
  .record({
    sections: fc.array(fc.integer({ min: 0, max: 2 }), { minLength: 2, maxLength: 6 }),
    ordered: fc.array(fc.boolean(), { minLength: 15, maxLength: 15 }),
    shells: fc.array(
      fc.record({ bed: fc.nat(), x: fc.integer({ min: 0, max: 12 }), cost: fc.constantFrom(1, 1, 1, 0.5, 0.75) }),
      { minLength: 2, maxLength: 14 },
    ),
  })
  .map(({ sections, ordered, shells }) => {
    const above = sections.map((_, a) => sections.map((__, b) => b > a && ordered[(5 * a + b) % 15]));
    for (let k = 0; k < sections.length; k++) {
      for (let a = 0; a < k; a++) for (let b = k; b < sections.length; b++) above[a][b] ||= above[a][k] && above[k][b];
    }
    return {
      beds: sections.map((section, a) => ({
        section: `S${section}`,
        above: sections.map((_, b) => b).filter((b) => above[a][b]),
      })),
      shells: shells.map(({ bed, x }) => ({ bed: bed % sections.length, x: x * 0.05 })),
      costs: shells.map(({ cost }) => cost),
    };
  });

/** All conflicts by their definition, pair by pair. */
function pairsInConflict({ beds, shells }: SmallSurvey): [number, number][] {
  const ordered = shells.flatMap((a, i) =>
    shells.flatMap((b, j): [number, number][] => (beds[a.bed].above.includes(b.bed) ? [[i, j]] : [])),
  );
  const z = conflictThreshold(ordered.length, OPTIONS.alpha);
  return ordered.filter(([i, j]) => {
    const tau = beds[shells[i].bed].section === beds[shells[j].bed].section ? 0 : OPTIONS.spread;
    return shells[j].x - shells[i].x > z * Math.sqrt(2 * OPTIONS.scatter ** 2 + 2 * tau ** 2);
  });
}

const solve = (survey: SmallSurvey) =>
  shellsToSetAside(findShellConflicts(survey.shells, survey.beds, OPTIONS), survey.costs);

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
      { numRuns: 300 },
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
  it('costs as much as an exact integer solver says, on thousands of small surveys', async () => {
    // The package's types describe its CommonJS form; as an ES module the default export is the loader itself.
    const highs = await (highsLoader as unknown as typeof highsLoader.default)();
    const surveys = fc.sample(smallSurvey, { numRuns: 4000, seed: 20 }).filter((s) => pairsInConflict(s).length > 0);
    expect(surveys.length).toBeGreaterThan(2000);
    // Many surveys in one model: each of ours costs at least its optimum, so equal sums mean that every one is equal.
    for (let start = 0; start < surveys.length; start += 40) {
      const batch = surveys.slice(start, start + 40);
      const name = (survey: number, shell: number) => `x${survey}_${shell}`;
      const terms = batch.flatMap((s, k) => s.costs.map((cost, i) => `${1000 * cost * 100 + 1} ${name(k, i)}`));
      const rows = batch.flatMap((s, k) => pairsInConflict(s).map(([a, b]) => `${name(k, a)} + ${name(k, b)} >= 1`));
      const binaries = batch.flatMap((s, k) => s.costs.map((_, i) => name(k, i)));
      const model = `Minimize\n ${terms.join('\n + ')}\nSubject To\n ${rows.join('\n ')}\nBinary\n ${binaries.join('\n ')}\nEnd`;
      const best = highs.solve(model).ObjectiveValue;
      let ours = 0;
      for (const survey of batch) {
        const answer = solve(survey);
        const removed = new Set(answer.shells);
        expect(pairsInConflict(survey).every(([a, b]) => removed.has(a) || removed.has(b))).toBe(true);
        expect(answer.cost).toBeCloseTo(
          answer.shells.reduce((sum, i) => sum + survey.costs[i], 0),
          9,
        );
        ours += answer.shells.reduce((sum, i) => sum + 1000 * survey.costs[i] * 100 + 1, 0);
      }
      expect(ours).toBeCloseTo(best, 3);
    }
  }, 60_000);

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

  it('takes under a second for 5,000 shells in 100 sections, right way up, half turned and upside down', () => {
    const random = createRandom(1);
    for (const [turned, correct] of [
      [0, 1],
      [0.5, 1],
      [1, -1],
    ] as const) {
      const beds: BedInOrder[] = [];
      const shells: ShellInOrder[] = [];
      for (let section = 0; section < 100; section++) {
        const first = beds.length;
        for (let level = 0; level < 8; level++) {
          beds.push({
            section: `S${section}`,
            above: Array.from({ length: 7 - level }, (_, i) => first + level + 1 + i),
          });
          const sign = random.uniform() < turned && correct > 0 ? -1 : correct;
          const count = level % 4 === 0 ? 7 : 6;
          for (let i = 0; i < count; i++) {
            const odd = random.uniform() < 0.05 ? 0.5 * random.normal() : 0;
            shells.push({ bed: first + level, x: sign * -0.26 * level + 0.06 * random.normal() + odd });
          }
        }
      }
      expect(shells.length).toBe(5000);
      const begun = performance.now();
      const found = findShellConflicts(shells, beds, { scatter: 0.06, df: 4000 });
      const answer = shellsToSetAside(
        found,
        shells.map((_, i) => costOfShell(i % 2 ? 0.5 : 0.05, false)),
      );
      expect(performance.now() - begun).toBeLessThan(1000);
      expect(answer.shells.length).toBeGreaterThan(10);
    }
  });
});
