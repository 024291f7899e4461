import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { benjaminiHochberg, holm } from '../../src/statistics/index.js';

const pValues = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 30 });

describe('adjusted p-values', () => {
  it('say the same as the step procedures themselves, at any level', () => {
    fc.assert(
      fc.property(pValues, fc.double({ min: 0.001, max: 0.5, noNaN: true }), (p, level) => {
        const sorted = [...p].sort((x, y) => x - y);
        const n = p.length;
        // Benjamini and Hochberg: reject the k smallest, k the last with p(k) ≤ k level / n
        let k = 0;
        sorted.forEach((value, i) => {
          if ((n / (i + 1)) * value <= level) k = i + 1;
        });
        expect(benjaminiHochberg(p).filter((q) => q <= level).length).toBe(k);
        // Holm: reject upwards until the first with (n − i) p(i) > level
        const stop = sorted.findIndex((value, i) => Math.min(1, (n - i) * value) > level);
        expect(holm(p).filter((q) => q <= level).length).toBe(stop < 0 ? n : stop);
      }),
    );
  });

  it('keep the order given, never fall, and stay at most 1', () => {
    fc.assert(
      fc.property(pValues, (p) => {
        const frozen = Object.freeze([...p]);
        for (const adjust of [benjaminiHochberg, holm]) {
          const adjusted = adjust(frozen);
          adjusted.forEach((q, i) => {
            expect(q).toBeGreaterThanOrEqual(p[i]);
            expect(q).toBeLessThanOrEqual(1);
          });
          expect(adjust([...p].reverse())).toEqual([...adjusted].reverse());
        }
      }),
    );
    expect([benjaminiHochberg([]), holm([])]).toEqual([[], []]);
    expect(benjaminiHochberg(Float64Array.of(0.2))).toEqual([0.2]);
  });

  it('refuse what is no probability', () => {
    for (const bad of [NaN, -0.1, 1.1]) {
      expect(() => benjaminiHochberg([0.5, bad])).toThrow(/benjaminiHochberg needs p-values from 0 to 1/);
      expect(() => holm([0.5, bad])).toThrow(RangeError);
    }
  });
});
