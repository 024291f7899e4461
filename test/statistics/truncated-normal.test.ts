import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createRandom, sampleTruncatedNormal } from '../../src/statistics/index.js';

describe('sampleTruncatedNormal', () => {
  // One line a way of drawing: whole, by rejection from the normal, the uniform or the exponential, on either side and on
  // either side of where one takes over from the other. The simulations judge the distributions; these sums of 200 draws
  // were computed with this code once they had passed, and say that the same seed gives the same draws.
  it.each([
    [-Infinity, Infinity, 599.305290535861],
    [-1, 2, 611.9009484853192],
    [-0.3, 0.5, 603.3718484279058],
    [-1.25, 1.25, 596.5104064976869],
    [-1.3, 1.3, 599.1434733039052],
    [0, Infinity, 641.4031000460125],
    [0.1, 2.45, 638.346314057193],
    [0.1, 2.55, 638.4505167452812],
    [0.2, 4, 647.8165391689311],
    [0.44, 3.1, 656.2309329134944],
    [0.46, 3.1, 653.0274400856416],
    [0.5, Infinity, 654.7228212428395],
    [0.5, 0.9, 633.9044720690367],
    [2, Infinity, 716.7755254408285],
    [3, 3.2, 754.2426656073862],
    [3, 5, 762.6433928808624],
    [20, Infinity, 1602.1645068935456],
    [20, 20.01, 1600.2259148257072],
    [-Infinity, -6, 292.9724544469853],
    [-5, -4.9, 352.81803612796654],
    [-9, -1, 525.5620798412007],
    [-Infinity, 1.5, 592.2384212989994],
    [-4, 0, 558.5968999539874],
  ])('draws on [%d, %d] what it always drew', (a, b, wanted) => {
    const random = createRandom(11);
    let sum = 0;
    for (let i = 0; i < 200; i++) sum += sampleTruncatedNormal(random, 3, 0.25, 3 + 0.25 * a, 3 + 0.25 * b);
    expect(sum).toBeCloseTo(wanted, 9);
  });

  it('stays inside any interval, however far or narrow', () => {
    const random = createRandom(13);
    const number = fc.double({ min: -1e6, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(number, fc.double({ min: 1e-6, max: 1e3, noNaN: true }), number, number, (mean, sd, u, v) => {
        const [low, high] = u < v ? [u, v] : [v, u];
        for (const [a, b] of [
          [low, high],
          [low, Infinity],
          [-Infinity, high],
        ]) {
          const x = sampleTruncatedNormal(random, mean, sd, a, b);
          expect(x >= a && x <= b && Number.isFinite(x)).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
    const far = sampleTruncatedNormal(random, 0, 1e-320, 1, 2);
    expect(far).toBe(1);
  });

  it('gives the value of an interval of one point', () => {
    expect(sampleTruncatedNormal(createRandom(1), 0, 1, 9, 9)).toBe(9);
  });

  it('refuses an interval upside down, sd 0 and NaN', () => {
    const random = createRandom(1);
    expect(() => sampleTruncatedNormal(random, 0, 1, 2, 1)).toThrow(/low at most high.*got 2, 1/);
    expect(() => sampleTruncatedNormal(random, 0, 0, 1, 2)).toThrow(RangeError);
    expect(() => sampleTruncatedNormal(random, NaN, 1, 1, 2)).toThrow(RangeError);
    expect(() => sampleTruncatedNormal(random, 0, 1, NaN, 2)).toThrow(RangeError);
    expect(() => sampleTruncatedNormal(random, 0, 1, Infinity, Infinity)).toThrow(RangeError);
  });
});
