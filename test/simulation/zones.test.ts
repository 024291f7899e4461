import { describe, expect, it } from 'vitest';
import { cases, LONG } from '../house/effort.js';
import { oneWayP } from './one-way-p.js';
import { calibration, coverage, falseZones, fourAminoAcids, indexGain, recovery } from './zone-rates.js';
import { shareOf, zoneCoasts } from './zone-runs.js';

/*
 * Rates over simulated coasts with a known truth, seeds from 1 upwards. Limits are those promised, not what was measured:
 * with n coasts a true rate p is seen within 2 sqrt(p(1 − p)/n). Few coasts leave the limits as they are and so see only
 * larger faults: of 14 coasts more than 1 is called zones with a chance of 95 % where 30 % of all are, 80 % where 20 % are
 * (binomial, computed). The long tests take as many as the old limits want, and `npm run rates` measures
 * the same over many more.
 */

/** Coasts a rate of 10 % is judged by. */
const JUDGED = cases(14, 60);
/** Coasts of zones that are there. */
const ZONED = cases(24, 50);

const step = (percent: number): number => Math.log(1 + percent / 100);

describe('zones where there are none', () => {
  it('are found on at most 10 % of coasts: a continuum, one zone, one zone with a spread', async () => {
    expect(await falseZones(JUDGED, { zones: 'continuum' })).toBeLessThanOrEqual(0.1);
    expect(await falseZones(JUDGED, { zones: 1 })).toBeLessThanOrEqual(0.1);
    expect(await falseZones(JUDGED, { zones: 1, spread: 0.04 })).toBeLessThanOrEqual(0.1);
  });

  it('are found on at most 10 % of coasts along which one zone slopes', async () => {
    // 2 % a degree over 8 degrees, no gradient asked for: the slope alone must not make zones
    expect(await falseZones(JUDGED, { zones: 1, gradient: { slope: 0.02 } })).toBeLessThanOrEqual(0.1);
  });
});

describe('zones that are there', () => {
  it('come back in number and in their beds: 4 zones 30 % apart, 3 zones 20 % apart', async () => {
    for (const coast of [
      { zones: 4, spacing: step(30) },
      { zones: 3, spacing: step(20) },
    ]) {
      const { rightNumber, rand } = await recovery(ZONED, coast);
      expect(rightNumber).toBeGreaterThanOrEqual(0.9);
      expect(rand).toBeGreaterThanOrEqual(0.95);
    }
  });

  it('come back the surer the further apart, with more beds and with more shells', async () => {
    // of few coasts the means have errors of 0.05 to 0.2, and lie 0.6 to 0.8 apart
    const near = (await recovery(cases(5, 25), { zones: 3, spacing: step(8) })).rand;
    const far = (await recovery(cases(5, 25), { zones: 3, spacing: step(20) })).rand;
    expect(far).toBeGreaterThan(near + 0.2);
    const few = (await recovery(cases(4, 25), { zones: 3, spacing: step(10), beds: 15 })).rand;
    const many = (await recovery(cases(4, 25), { zones: 3, spacing: step(10), beds: 60 })).rand;
    expect(many).toBeGreaterThan(few + 0.1);
    const poor = (await recovery(cases(4, 25), { zones: 3, spacing: step(12), shells: [2, 3] })).rand;
    const rich = (await recovery(cases(4, 25), { zones: 3, spacing: step(12), shells: [8, 12] })).rand;
    expect(rich).toBeGreaterThan(poor + 0.2);
    // 150 coasts in the long tests: some minutes where other tests keep both cores busy
  }, 400_000);
});

describe('zone probabilities', () => {
  it('are right as often as they say, within 5 points in every decile that holds 50 beds or more', async () => {
    const coasts = [
      { zones: 4, spacing: step(30), spread: 0.03 },
      { zones: 3, spacing: step(15), spread: 0.02 },
      { zones: 3, spacing: step(12) },
      { zones: 3, spacing: step(10) },
      { zones: 3, spacing: step(12), shells: [1, 6] as const, beds: 60 },
    ];
    // to be told the number of zones saves the choice, which takes most of the time
    const deciles = await calibration(cases(15, 25), coasts, !LONG);
    const judged = deciles.filter(({ beds }) => beds >= 50);
    expect(judged.length).toBeGreaterThan(1);
    for (const { beds, said, right } of judged) {
      // 5 points, and twice the error of the share beside; `npm run rates` judges over ten times as many coasts
      expect(Math.abs(said - right)).toBeLessThan(0.05 + 2 * Math.sqrt((said * (1 - said)) / beds));
    }
  });
});

describe('the 95 % interval of a zone’s mean', () => {
  it('covers the true mean of 93 to 97 % of zones or so, with a spread between beds too', async () => {
    const without = [
      { zones: 4, spacing: step(30) },
      { zones: 3, spacing: step(20) },
    ];
    const withSpread = without.map((coast) => ({ ...coast, spread: 0.02 }));
    // few coasts are judged together: 300 zones and more, so that either limit can be missed
    for (const coasts of LONG ? [without, withSpread] : [[...without, ...withSpread]]) {
      // told their number as above, to save the choice
      const { zones, covered } = await coverage(ZONED, coasts, !LONG);
      expect(zones).toBeGreaterThan(300);
      // 93 to 97 %, and twice the error of the share beside
      const error = 2 * Math.sqrt((0.95 * 0.05) / zones);
      expect(covered).toBeGreaterThan(0.93 - error / 2);
      expect(covered).toBeLessThan(0.97 + error);
    }
  });
});

describe('beds of one zone that differ', () => {
  it('stay one zone although a test of their shells gives p of 0.001, when a spread explains them', async () => {
    const runs = await zoneCoasts(JUDGED, { zones: 1, spread: 0.04 });
    const differing = runs.filter(({ data }) => {
      const shells = data.beds.map((bed) => bed.shells.map((at) => data.shells[at].x));
      return oneWayP(shells) <= 0.001;
    });
    expect(differing.length).toBeGreaterThan((50 / 60) * JUDGED);
    expect(shareOf(differing, ({ zoning }) => zoning.fit.k === 1)).toBeGreaterThanOrEqual(0.9);
  });
});

describe('the index of four amino acids', () => {
  it('groups beds better than the best single one, with zones 15 % apart', async () => {
    const { index, bestSingle } = await indexGain(cases(8, 15), {
      zones: 4,
      spacing: step(15),
      scatter: 0.06,
      aminoAcids: fourAminoAcids(0),
    });
    expect(index).toBeGreaterThanOrEqual(bestSingle + 0.05);
  });

  it('is never worse by more than 0.02 when three of four are noise', async () => {
    const { index, bestSingle } = await indexGain(cases(8, 40), {
      zones: 3,
      spacing: step(15),
      aminoAcids: fourAminoAcids(3),
    });
    expect(index).toBeGreaterThanOrEqual(bestSingle - 0.02);
  });
});
