import fc from 'fast-check';
import highsLoader from 'highs';
import { describe, expect, it } from 'vitest';
import { cases } from '../house/effort.js';
import { pairsInConflict, smallSurvey, solve } from './small-surveys.js';

describe('shellsToSetAside', () => {
  it('costs as much as an exact integer solver says, on very many small surveys', async () => {
    // The package's types describe its CommonJS form; as an ES module the default export is the loader itself.
    const highs = await (highsLoader as unknown as typeof highsLoader.default)();
    const surveys = fc
      .sample(smallSurvey, { numRuns: cases(1200, 4000), seed: 20 })
      .filter((s) => pairsInConflict(s).length > 0);
    expect(surveys.length).toBeGreaterThan(cases(600, 2000));
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
});
