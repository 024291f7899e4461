import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { checkSections } from '../../src/superposition/section-consistency.js';

describe('checkSections', () => {
  it('has the right size at equal means, with estimated scatter too', () => {
    const random = createRandom(7);
    for (const df of [Number.POSITIVE_INFINITY, 6]) {
      let rejected = 0;
      const runs = 1500;
      for (let run = 0; run < runs; run++) {
        const factor = Number.isFinite(df) ? Math.sqrt((2 * random.gamma(df / 2)) / df) : 1;
        const beds = [0.03, 0.05, 0.03, 0.08].map((se, rank) => ({
          rank,
          mean: se * random.normal(),
          se: se * factor,
        }));
        const [check] = checkSections([{ section: 'A', beds }], random.fork(run), { df, simulations: 200 });
        if ((check?.p_order ?? 1) <= 0.05) rejected++;
      }
      expect(rejected / runs).toBeGreaterThan(0.035);
      expect(rejected / runs).toBeLessThan(0.066);
    }
  });
});
