import type { DateRecord, Findings } from '../../src/model/index.js';
import type { Random } from '../../src/statistics/index.js';
import { type MadeBed, madeFindings } from './findings.js';

/** A coast whose beds have true ages. */
export interface DatedCoast {
  readonly findings: Findings;
  /** True zone of each bed, 0 the youngest. */
  readonly zone: readonly number[];
  readonly beds: readonly MadeBed[];
}

/** Ages of the zones of the invented coast, thousand years. */
export const ZONE_AGES = [82, 126, 205, 330];

/** Findings of beds in zones `step` apart, 5 shells a bed, each bed in a section of its own, with the spread given. */
export function datedCoast(
  random: Random,
  { step = Math.log(1.3), spread = 0.03, perZone = 6, scatter = 0.05 } = {},
): DatedCoast {
  const zone: number[] = [];
  const beds: MadeBed[] = [];
  const sd = Math.hypot(spread, scatter / Math.sqrt(5));
  for (let i = 0; i < perZone * ZONE_AGES.length; i++) {
    const truth = i % ZONE_AGES.length;
    const mean = -2 + truth * step + sd * random.normal();
    const weights = ZONE_AGES.map((_, k) => Math.exp(-((mean + 2 - k * step) ** 2) / (2 * sd * sd)));
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    const best = weights.indexOf(Math.max(...weights));
    zone.push(truth);
    beds.push({
      section: `S${i}`,
      bed: '1',
      mean,
      shells: 5,
      zone: `Z${best + 1}`,
      zoneProbability: weights[best] / total,
    });
  }
  return { findings: madeFindings(beds, { scatter, spread }), zone, beds };
}

/** Dates of the given beds, drawn from the ages with 5 % errors. */
export function drawnDates(random: Random, beds: readonly number[], ages: (bed: number) => number): DateRecord[] {
  return beds.map((bed, at) => {
    const age = ages(bed);
    const measured = age * (1 + 0.05 * random.normal());
    return {
      section: `S${bed}`,
      bed: '1',
      age_ka: measured,
      error_ka: 0.05 * age,
      limit: 'equal',
      method: 'U-series',
      file: 'dates.csv',
      line: at + 2,
    };
  });
}
