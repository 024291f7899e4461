import { describe, expect, it } from 'vitest';
import { createRandom, grubbs } from '../../src/statistics/index.js';

describe('grubbs', () => {
  it('keeps its level on normal values', () => {
    const random = createRandom(4);
    let called = 0;
    const rounds = 8000;
    for (let round = 0; round < rounds; round++) {
      if (grubbs(Array.from({ length: 7 }, () => random.normal())).outlier) called++;
    }
    expect(Math.abs(called / rounds - 0.05)).toBeLessThan(0.01);
  });
});
