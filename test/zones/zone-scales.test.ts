import { describe, expect, it } from 'vitest';
import { fitMixture, zoneScales } from '../../src/zones/index.js';

describe('zoneScales', () => {
  const fit = fitMixture([-2, -2.01, -1, -1.01], [0.02, 0.02, 0.02, 0.02], 2);

  it('is the scatter of each zone over the pooled one, drawn a little to 1', () => {
    const scatters = [4, 4, 1, 1].map((variance) => ({ squares: variance * 8, df: 8 }));
    // pooled variance 2.5; (64/2.5 + 4)/20 and (16/2.5 + 4)/20
    const [young, old] = zoneScales(fit, scatters);
    expect(young).toBeCloseTo(Math.sqrt(1.48), 12);
    expect(old).toBeCloseTo(Math.sqrt(0.52), 12);
  });

  it('is 1 where no bed has two shells, or none scatters', () => {
    expect(
      zoneScales(
        fit,
        [1, 2, 3, 4].map(() => ({ squares: 0, df: 0 })),
      ),
    ).toEqual([1, 1]);
    expect(
      zoneScales(
        fit,
        [1, 2, 3, 4].map(() => ({ squares: 0, df: 5 })),
      ),
    ).toEqual([1, 1]);
  });
});
