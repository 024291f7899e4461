import { describe, expect, it } from 'vitest';
import { analyseInPlace } from '../coast/in-place.js';
import { cases } from '../house/effort.js';
import { type CoastOptions, simulateCoast } from './coast.js';
import { shareOf } from './zone-runs.js';

/**
 * Coasts a case: of 48 beds 90 % or more hold the truth with a chance of 91 % where 95 % of all do, and of 2 % where 80 % do
 * (binomial, computed).
 */
const COASTS = cases(6, 25);

/** Whether the 95 % interval of each bed of the second taxon holds the truth on the reference's scale, over many coasts. */
async function conversions(seeds: number, options: CoastOptions) {
  const beds: { readonly alone: boolean; readonly holds: boolean }[] = [];
  let refused = 0;
  for (let seed = 1; seed <= seeds; seed++) {
    const { survey, truth } = simulateCoast({ ...options, seed });
    const findings = await analyseInPlace(survey, { reference_taxon: 'Invenus', simulations: 9 });
    if (findings.conversions[0].verdict === 'refused') refused++;
    for (const bed of findings.beds) {
      if (!bed.clock.startsWith('all taxa') || bed.taxon === 'Invenus') continue;
      const { x } = truth.beds.get(`${bed.section}/${bed.bed}`)!;
      const holds = Math.abs(bed.log_mean! - x) <= 1.96 * bed.log_se!;
      beds.push({ alone: bed.taxon === 'Altera', holds });
    }
  }
  return { beds, refused };
}

describe('beds of one taxon put on the scale of another', () => {
  it.each<[string, CoastOptions]>([
    ['a slope of 1.1', { secondTaxon: { paired: 8, alone: 8, slope: 1.1 } }],
    ['a slope of 0.9 and spread between beds', { spread: 0.03, secondTaxon: { paired: 8, alone: 8, slope: 0.9 } }],
  ])('hold the truth in at least 90 % with 8 paired beds: %s', async (_, options) => {
    const { beds, refused } = await conversions(COASTS, options);
    expect(refused).toBe(0);
    expect(beds.filter((bed) => bed.alone)).toHaveLength(COASTS * 8);
    expect(
      shareOf(
        beds.filter((bed) => bed.alone),
        (bed) => bed.holds,
      ),
    ).toBeGreaterThanOrEqual(0.9);
    expect(
      shareOf(
        beds.filter((bed) => !bed.alone),
        (bed) => bed.holds,
      ),
    ).toBeGreaterThanOrEqual(0.9);
  });

  it('hold it with 3 paired beds too, a slope of 1 assumed where it is 1.1', async () => {
    const { beds } = await conversions(COASTS, { secondTaxon: { paired: 3, alone: 8, slope: 1.1 } });
    expect(shareOf(beds, (bed) => bed.holds)).toBeGreaterThanOrEqual(0.9);
  });
});
