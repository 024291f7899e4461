import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { runTask } from '../../src/tasks.js';
import { bedScatters, chooseModel, settleChoice } from '../../src/zones/index.js';
import { zoneCoast } from '../simulation/zone-runs.js';

describe('settleChoice with zones that scatter unequally', () => {
  it('splits a wide zone less often than without a word of its scatter', async () => {
    const map = async (tasks: readonly Parameters<typeof runTask>[0][]) => tasks.map(runTask);
    let plain = 0;
    let told = 0;
    for (let seed = 1; seed <= 25; seed++) {
      const random = createRandom(seed);
      // the youngest zone lies 1.7 times as wide as its errors say, the others less than theirs
      const values = [
        [-2.6, 0.085],
        [-1.9, 0.03],
        [-1.2, 0.03],
      ].flatMap(([mean, sd]) => Array.from({ length: 10 }, () => mean + sd * random.normal()));
      const errors = values.map(() => 0.05);
      const scatters = values.map((_, bed) => ({ squares: (bed < 10 ? 2.9 : 0.36) * 0.0125 * 5, df: 5 }));
      const choice = chooseModel(values, errors);
      const options = { alpha: 0.05, seed, simulations: 99, map };
      if ((await settleChoice(choice, values, errors, options)).choice.bestZones > 3) plain++;
      if ((await settleChoice(choice, values, errors, { ...options, scatters })).choice.bestZones > 3) told++;
    }
    expect(plain).toBeGreaterThan(2);
    expect(told).toBeLessThan(plain / 2);
  });
});

describe('zoneScales', () => {
  it('adds up to the scatter of the clock over all beds', async () => {
    const { data, zoning } = await zoneCoast({ zones: 3, seed: 4 });
    const scatters = bedScatters(data, zoning.beds);
    const squares = scatters.reduce((sum, bed) => sum + bed.squares, 0);
    const df = scatters.reduce((sum, bed) => sum + bed.df, 0);
    expect(df).toBe(data.scatter.df);
    expect(Math.sqrt(squares / df)).toBeCloseTo(data.scatter.s, 10);
  });
});
