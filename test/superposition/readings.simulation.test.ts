import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { ownBedResiduals, robustScatter } from '../../src/superposition/index.js';

const draw = (random: ReturnType<typeof createRandom>, n: number, mean = 0, sd = 0.06) =>
  Array.from({ length: n }, () => mean + sd * random.normal());

describe('robustScatter', () => {
  it('is the classical scatter on clean beds, and hardly moves with an odd shell in every bed', () => {
    const random = createRandom(1);
    let clean = 0;
    let odd = 0;
    for (let run = 0; run < 50; run++) {
      const beds = Array.from({ length: 48 }, () => draw(random, 7));
      clean += robustScatter(beds).s / 50;
      odd += robustScatter(beds.map((values, i) => [...values.slice(1), values[0] + (i % 2 ? 0.4 : -0.4)])).s / 50;
    }
    expect(clean).toBeGreaterThan(0.059);
    expect(clean).toBeLessThan(0.061);
    expect(odd).toBeGreaterThan(0.056);
    expect(odd).toBeLessThan(0.067);
  });
});

describe('ownBedResiduals', () => {
  it('keeps to alpha on clean beds, many shells or few', () => {
    const own = createRandom(3);
    for (const [beds, n] of [
      [40, 6],
      [6, 4],
    ]) {
      let any = 0;
      for (let run = 0; run < 600; run++) {
        const shells = Array.from({ length: beds }, (_, bed) => draw(own, n).map((x) => ({ bed, x }))).flat();
        if (ownBedResiduals(shells).shells.some(({ odd }) => odd)) any++;
      }
      expect(any / 600, `${beds} beds of ${n}`).toBeLessThan(0.075);
    }
  });
});
