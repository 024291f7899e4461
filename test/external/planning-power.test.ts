import { describe, expect, it } from 'vitest';
import { resolvingPower } from '../../src/planning/power.js';
import { shellsNeeded } from '../../src/planning/shells-needed.js';

/*
 * computed in R 4.2:
 *   power.t.test(delta = d, sd = 1, power = .8, alternative = "one.sided" or "two.sided")$n
 *   power.t.test(n = 7, delta = d, sd = 1, alternative = …)$power
 */
const FROM_R: readonly (readonly [difference: number, sides: 1 | 2, n: number, powerOfSeven: number])[] = [
  [0.5, 1, 50.150799, 0.223110239],
  [0.5, 2, 63.765764, 0.136200713],
  [0.75, 1, 22.690317, 0.374111095],
  [0.75, 2, 28.899625, 0.252177528],
  [1, 1, 13.097773, 0.547449671],
  [1, 2, 16.714768, 0.405697115],
  [1.5, 1, 6.298691, 0.840863818],
  [1.5, 2, 8.06031, 0.73132786],
  [2, 1, 3.987012, 0.969581522],
  [2, 2, 5.090008, 0.929070248],
];

describe("power of two beds against R's power.t.test", () => {
  it.each(FROM_R)('difference %d, %d-sided: %d shells a bed, power %d with 7', (gap, sides, n, power) => {
    expect(resolvingPower({ gap, scatter: 1, shells: [7, 7], df: 'own' }, { sides })).toBeCloseTo(power, 6);
    const found = shellsNeeded({ gap, scatter: 1, shells: [2, 2], df: 'own' }, { sides, most: 100 });
    const shells = found!.more.map((more) => more + 2);
    for (const count of shells) expect(Math.abs(count - n)).toBeLessThanOrEqual(1);
  });
});
