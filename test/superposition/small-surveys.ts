import fc from 'fast-check';
import { conflictThreshold } from '../../src/superposition/conflict-threshold.js';
import { type BedInOrder, findShellConflicts, type ShellInOrder } from '../../src/superposition/shell-conflicts.js';
import { shellsToSetAside } from '../../src/superposition/shells-to-set-aside.js';

/** Beds in an order, shells, and what each costs to give up. */
export interface SmallSurvey {
  readonly beds: readonly BedInOrder[];
  readonly shells: readonly ShellInOrder[];
  readonly costs: readonly number[];
}

/** Scatter, spread and level of the small surveys. */
export const OPTIONS = { scatter: 0.02, spread: 0.02, alpha: 0.05 };

/** Beds in a random partial order over two or three sections, closed; shells with ratios that often contradict it. */
export const smallSurvey: fc.Arbitrary<SmallSurvey> = fc
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
export function pairsInConflict({ beds, shells }: SmallSurvey): [number, number][] {
  const ordered = shells.flatMap((a, i) =>
    shells.flatMap((b, j): [number, number][] => (beds[a.bed].above.includes(b.bed) ? [[i, j]] : [])),
  );
  const z = conflictThreshold(ordered.length, OPTIONS.alpha);
  return ordered.filter(([i, j]) => {
    const tau = beds[shells[i].bed].section === beds[shells[j].bed].section ? 0 : OPTIONS.spread;
    return shells[j].x - shells[i].x > z * Math.sqrt(2 * OPTIONS.scatter ** 2 + 2 * tau ** 2);
  });
}

/** Least costly shells of a small survey. */
export const solve = (survey: SmallSurvey) =>
  shellsToSetAside(findShellConflicts(survey.shells, survey.beds, OPTIONS), survey.costs);
