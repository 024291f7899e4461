import { describe, expect, it } from 'vitest';
import { correctAnalyses, laboratoryOffsets } from '../../src/coast/laboratory-offsets.js';
import type { StandardRecord, Survey } from '../../src/model/index.js';
import { simulateCoast } from '../simulation/coast.js';
import { analyseInPlace } from './in-place.js';

const standard = (lab: string, name: string, dl: number): StandardRecord => ({
  file: 'standards.csv',
  line: 2,
  lab,
  standard: name,
  amino_acid: 'Ile',
  dl,
});

/** Beds in sections with an even number were measured by South, which reads 15 % high. */
function twoLaboratories(seed: number): { survey: Survey; honest: Survey } {
  const { survey: honest } = simulateCoast({ seed, beds: 24, sections: 8, zones: 3 });
  const analyses = honest.analyses.map((row) => {
    const south = Number(row.section.slice(1)) % 3 === 0;
    return { ...row, lab: south ? 'South' : 'North', ratios: south ? { Ile: row.ratios.Ile! * 1.15 } : row.ratios };
  });
  return { survey: { ...honest, analyses }, honest };
}

const STANDARDS = ['A', 'B', 'C', 'D', 'E', 'F'].flatMap((name, i) => [
  standard('North', name, 0.1 + 0.1 * i),
  standard('South', name, (0.1 + 0.1 * i) * 1.15 * (1 + 0.01 * (i % 2 === 0 ? 1 : -1))),
]);

describe('laboratoryOffsets', () => {
  const { survey } = twoLaboratories(1);

  it('gives the mean log ratio of each laboratory against the one with most shells, with its error', () => {
    const [offset, ...rest] = laboratoryOffsets(STANDARDS, survey.analyses);
    expect(rest).toEqual([]);
    expect(offset).toMatchObject({ lab: 'South', reference: 'North', amino_acid: 'Ile', standards: 6, assumed: false });
    const d = [1.01, 0.99, 1.01, 0.99, 1.01, 0.99].map((f) => Math.log(1.15 * f));
    const mean = d.reduce((sum, v) => sum + v, 0) / 6;
    const sd = Math.sqrt(d.reduce((sum, v) => sum + (v - mean) ** 2, 0) / 5);
    expect(offset.offset).toBeCloseTo(mean, 12);
    expect(offset.se).toBeCloseTo(sd / Math.sqrt(6), 12);
  });

  it('assumes 7 % for each measurement where standards are too few to show their error', () => {
    const [offset] = laboratoryOffsets(STANDARDS.slice(0, 2), survey.analyses);
    expect(offset.assumed).toBe(true);
    expect(offset.se).toBeCloseTo(0.07 * Math.SQRT2, 12);
  });

  it('gives none without a shared standard, and averages repeats', () => {
    expect(laboratoryOffsets([standard('South', 'A', 0.2), standard('North', 'B', 0.2)], survey.analyses)).toEqual([]);
    const repeats = [standard('South', 'A', 0.2), standard('South', 'A', 0.45), standard('North', 'A', 0.3)];
    expect(laboratoryOffsets(repeats, survey.analyses)[0].offset).toBeCloseTo(0, 12);
  });

  it('scales ratios and published standard deviations alike', () => {
    const offsets = laboratoryOffsets(STANDARDS, survey.analyses);
    const south = survey.analyses.find((row) => row.lab === 'South')!;
    const published = { ...south, summary: { n: 5, sd: { Ile: 0.02 } } };
    const [corrected] = correctAnalyses([published], offsets);
    const factor = Math.exp(-offsets[0].offset);
    expect(corrected.ratios.Ile).toBeCloseTo(south.ratios.Ile! * factor, 12);
    expect(corrected.summary!.sd.Ile).toBeCloseTo(0.02 * factor, 12);
    const north = survey.analyses.find((row) => row.lab === 'North')!;
    expect(correctAnalyses([north], offsets)[0]).toBe(north);
  });
});

describe('a survey of two laboratories', () => {
  it('is put on one scale by standards, with the error in the beds that were moved and only there', async () => {
    const { survey, honest } = twoLaboratories(2);
    const [plain, mended] = await Promise.all([
      analyseInPlace(honest),
      analyseInPlace({ ...survey, standards: STANDARDS }),
    ]);
    const [offset] = laboratoryOffsets(STANDARDS, survey.analyses);
    plain.beds.forEach((before, i) => {
      const after = mended.beds[i];
      const south = Number(before.section.slice(1)) % 3 === 0;
      const shift = south ? Math.log(1.15) - offset.offset : 0;
      expect(after.log_mean).toBeCloseTo(before.log_mean! + shift, 10);
      expect(after.log_se).toBeCloseTo(south ? Math.hypot(before.log_se!, offset.se) : before.log_se!, 10);
    });
    expect(mended.remarks.map((remark) => remark.text).join('\n')).toMatch(
      /laboratory South were put on the scale of North by shared standards; it read Ile \+15 %/,
    );
    expect(mended.remarks.some((remark) => /mixes laboratories/.test(remark.text))).toBe(false);
  });

  it('is warned of without standards, with the beds that mix them; so are methods', async () => {
    const { survey } = twoLaboratories(3);
    const mixed = survey.analyses.map((row, i) => (i === 0 ? { ...row, lab: 'South' } : row));
    const texts = (await analyseInPlace({ ...survey, analyses: mixed })).remarks;
    const said = texts.find((remark) => /mixes laboratories/.test(remark.text))!;
    expect(said.level).toBe('caution');
    expect(said.text).toMatch(/No shared standards tie them.*5 to 21 %.*1 bed mixes them: S01\/B1\./);
    const methods = survey.analyses.map((row, i) => ({ ...row, lab: 'North', method: i % 2 === 0 ? 'HPLC' : 'GC' }));
    const findings = await analyseInPlace({ ...survey, analyses: methods });
    expect(findings.remarks.some((remark) => /mixes methods: HPLC, GC\..*beds mix them/.test(remark.text))).toBe(true);
    expect(findings.remarks.some((remark) => /mixes laboratories/.test(remark.text))).toBe(false);
  });
});
