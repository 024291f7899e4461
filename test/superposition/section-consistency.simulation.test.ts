import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { checkSections, type PlacedBed } from '../../src/superposition/section-consistency.js';

function section(name: string, means: readonly number[], se = 0.1) {
  return { section: name, beds: means.map((mean, index): PlacedBed => ({ rank: index + 1, mean, se })) };
}

describe('checkSections', () => {
  it('gives the published weights 1/3, 1/2, 1/6 with three equal levels', () => {
    // Barlow and others 1972, level probabilities of three equal weights (from memory; the simulation agrees).
    const means = [-1, -0.9, -0.8];
    const [check] = checkSections([section('A', means)], createRandom(2), { simulations: 40_000 });
    const t = check?.statistic ?? 0;
    expect(t).toBeCloseTo(2, 8);
    // R: 0.5 * pchisq(2, 1, lower = FALSE) + pchisq(2, 2, lower = FALSE)/3 = 0.2012761 (computed)
    expect(check?.p_order).toBeCloseTo(0.2012761, 2);
  });

  it('gives half a chi-square with two levels, up to the simulated weight', () => {
    // Σ w (m − m*)² = 2 · 0.2²/0.1² ; R: 0.5 * pchisq(8, 1, lower = FALSE) = 0.00233886749052363 (computed)
    const [check] = checkSections([section('A', [-0.9, -0.5])], createRandom(1), { simulations: 20_000 });
    expect(check?.statistic).toBeCloseTo(8, 10);
    expect(Math.abs((check?.p_order ?? 1) / 0.00233886749052363 - 1)).toBeLessThan(0.03);
    expect(check?.fitted).toEqual([expect.closeTo(-0.7, 10), expect.closeTo(-0.7, 10)]);
  });

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
