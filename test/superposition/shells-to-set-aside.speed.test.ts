import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { costOfShell } from '../../src/superposition/cost-of-shell.js';
import { type BedInOrder, findShellConflicts, type ShellInOrder } from '../../src/superposition/shell-conflicts.js';
import { shellsToSetAside } from '../../src/superposition/shells-to-set-aside.js';

describe('shellsToSetAside', () => {
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
