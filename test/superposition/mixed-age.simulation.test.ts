import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { mixedAgeBeds } from '../../src/superposition/index.js';

describe('mixedAgeBeds', () => {
  it('calls few clean beds wide, and few wide beds two groups', () => {
    let wide = 0;
    let groups = 0;
    for (let run = 0; run < 200; run++) {
      const own = createRandom(run);
      const beds = Array.from({ length: 20 }, () => Array.from({ length: 6 }, () => 0.06 * own.normal()));
      if (mixedAgeBeds(beds, own.fork(1)).some(({ verdict }) => verdict !== 'none')) wide++;
      const broad = Array.from({ length: 7 }, () => 0.5 * own.normal());
      if (mixedAgeBeds([...beds, broad], own.fork(1))[20].verdict === 'mixed age') groups++;
    }
    expect(wide / 200).toBeLessThan(0.1);
    expect(groups / 200).toBeLessThan(0.1);
  });

  it('finds most beds of two ages two zones apart', () => {
    let found = 0;
    for (let run = 0; run < 100; run++) {
      const own = createRandom(run);
      const beds = Array.from({ length: 20 }, () => Array.from({ length: 8 }, () => 0.06 * own.normal()));
      beds.push(Array.from({ length: 8 }, (_, i) => (i < 4 ? 0.52 : 0) + 0.06 * own.normal()));
      if (mixedAgeBeds(beds, own.fork(1))[20].verdict === 'mixed age') found++;
    }
    expect(found).toBeGreaterThan(90);
  });
});
