import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import {
  bootstrapLikelihoodRatio,
  bootstrapP,
  chooseModel,
  leadOfZones,
  STRICTER,
  settleChoice,
} from '../../src/zones/index.js';
import { cases } from '../house/effort.js';
import { beds, inPlace } from './drawn-beds.js';

describe('settleChoice', () => {
  it('takes zones that BIC hides when few coasts without zones look so much like them', async () => {
    let hidden = 0;
    let found = 0;
    for (let seed = 1; seed <= 60 && hidden < cases(8, 12); seed++) {
      // three zones of 10 beds some 5 standard errors apart; the youngest scatters more than the error says, the oldest less
      const random = createRandom(seed);
      const values = [
        [-2.25, 0.061],
        [-2, 0.042],
        [-1.74, 0.033],
      ].flatMap(([mean, sd]) => Array.from({ length: 10 }, () => mean + sd * random.normal()));
      const errors = values.map(() => 0.047);
      const choice = chooseModel(values, errors);
      if (choice.verdict === 'zones') continue;
      hidden++;
      const { map } = inPlace();
      const settled = await settleChoice(choice, values, errors, { alpha: 0.05, seed, simulations: 399, map });
      const tests = settled.comparisons.filter(({ of }) => of === 'any');
      const zones = settled.choice.verdict === 'zones';
      // never without a test, nor against one
      expect(zones).toBe(tests.length > 0 && tests.every(({ p, level }) => p <= level));
      for (const { level } of tests) expect(level).toBeCloseTo(0.05 * STRICTER, 12);
      if (zones && settled.choice.bestZones === 3) found++;
    }
    expect(hidden).toBeGreaterThan(5);
    expect(found).toBeGreaterThanOrEqual(2);
  });

  it('takes no zones on most even stretches, and draws little where they are plain', async () => {
    // of 20 stretches 3 or more are taken for zones with a chance of 96 % where 30 % of all are (binomial, computed)
    const stretches = cases(20, 40);
    let taken = 0;
    for (let seed = 1; seed <= stretches; seed++) {
      const random = createRandom(500 + seed);
      const values = Array.from({ length: 24 }, () => -2 + 0.8 * random.uniform() + 0.03 * random.normal());
      const errors = values.map(() => 0.03);
      const { map, count } = inPlace();
      const { choice, comparisons } = await settleChoice(chooseModel(values, errors), values, errors, {
        alpha: 0.05,
        seed,
        simulations: 399,
        map,
      });
      if (choice.verdict === 'zones') taken++;
      // one round does unless p is near the level
      for (const { p, repeats } of comparisons) if (p > 0.2) expect(repeats).toBe(100);
      expect(count.repeats).toBe(comparisons.reduce((sum, { repeats }) => sum + repeats, 0));
    }
    expect(taken).toBeLessThanOrEqual(stretches / 10);
  });

  it('takes away zones that BIC sees in one with a spread, when a bootstrap does not support them', async () => {
    let fooled = 0;
    let mended = 0;
    for (let seed = 1; seed <= 60; seed++) {
      const { values, errors } = beds([-2], 12, seed, 0.02, 0.03);
      const choice = chooseModel(values, errors);
      if (choice.verdict !== 'zones') continue;
      fooled++;
      const { map } = inPlace();
      const settled = await settleChoice(choice, values, errors, { alpha: 0.05, seed, simulations: 199, map });
      const tests = settled.comparisons.filter(({ of }) => of === 'any');
      expect(tests.length).toBeGreaterThan(0);
      expect(settled.choice.verdict === 'zones').toBe(tests.every(({ p, level }) => p <= level));
      if (settled.choice.verdict !== 'zones') mended++;
    }
    expect(fooled).toBeGreaterThan(2);
    expect(mended).toBeGreaterThan(0);
  });

  it('has p-values that are even where the simpler model holds', () => {
    // 60 samples of one zone: p of 2 against 1 at or below 0.2 in about 12; 3 to 23 spans 99.9 % of chance
    let low = 0;
    for (let seed = 1; seed <= 60; seed++) {
      const { values, errors } = beds([-2], 15, 1000 + seed, 0.02, 0.02);
      const { mixtures } = chooseModel(values, errors, 0, 2);
      const ratio = 2 * (mixtures[1].logLikelihood - mixtures[0].logLikelihood);
      const { means, weights, tau } = mixtures[0];
      const simpler = { kind: 'zones' as const, means, weights, tau };
      const drawn = bootstrapLikelihoodRatio({ errors, simpler, zones: 2, seed, first: 0, repeats: 49 });
      if (bootstrapP(ratio, drawn) <= 0.2) low++;
    }
    expect(low).toBeGreaterThanOrEqual(3);
    expect(low).toBeLessThanOrEqual(23);
  });
});

describe('the number of zones', () => {
  it('does not hang on where the scale of log ratios begins, nor on its unit', () => {
    for (const { values, errors } of [
      beds([-2, -1.75, -1.5], 8, 3, 0.04),
      beds([-2], 20, 5, 0.03, 0.03),
      beds([-2, -1.9, -1.8, -1.5], 6, 9, 0.03),
    ]) {
      const plain = chooseModel(values, errors);
      const lead = leadOfZones(values, errors);
      for (const shift of [-0.04, -0.013, 0.0007, 0.02, 0.31]) {
        const moved = values.map((value) => value + shift);
        const choice = chooseModel(moved, errors);
        expect([choice.verdict, choice.bestZones]).toEqual([plain.verdict, plain.bestZones]);
        for (const [at, bic] of choice.bics.slice(0, 4).entries()) expect(bic).toBeCloseTo(plain.bics[at], 3);
        expect(Math.abs(leadOfZones(moved, errors) - lead)).toBeLessThan(0.05);
      }
      for (const scale of [0.5, 0.98, 1.04, 3]) {
        const scaled = values.map((value) => value * scale);
        const choice = chooseModel(
          scaled,
          errors.map((error) => error * scale),
        );
        expect([choice.verdict, choice.bestZones]).toEqual([plain.verdict, plain.bestZones]);
        // every density falls by the scale, the same for all models
        expect(choice.continuumBic - choice.bics[2]).toBeCloseTo(plain.continuumBic - plain.bics[2], 3);
      }
    }
  });
});
