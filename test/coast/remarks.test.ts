import { describe, expect, it } from 'vitest';
import { simulateCoast } from '../simulation/coast.js';
import { analyseInPlace } from './in-place.js';

const texts = (remarks: readonly { readonly text: string }[]) => remarks.map((remark) => remark.text).join('\n');

describe('what is said of a gradient', () => {
  const warm = simulateCoast({ seed: 4, beds: 24, gradient: { slope: 0.06 } }).survey;

  it('warns where temperature varies and no slope was asked for', async () => {
    const { remarks } = await analyseInPlace(warm);
    expect(texts(remarks)).toMatch(/temperature differs by 8 °C.*about 20 % faster.*--gradient cmat_c/);
  });

  it('is silent within a degree, and warns of latitude where no temperature is known', async () => {
    const mild = { ...warm, beds: warm.beds.map((bed) => ({ ...bed, cmat_c: 10 + (bed.cmat_c! - 10) / 10 })) };
    expect(texts((await analyseInPlace(mild)).remarks)).not.toMatch(/temperature|latitude/);
    const bare = warm.beds.map((bed, i) => ({ ...bed, cmat_c: null, latitude: -48 - 0.1 * i }));
    expect(texts((await analyseInPlace({ ...warm, beds: bare })).remarks)).toMatch(
      /span 2\.3° of latitude.*18 to 22 %.*--gradient latitude/,
    );
  });

  it('tells the slope, its interval and both BIC, with the slope out of every corrected figure', async () => {
    const { remarks, gradients, clocks, beds, relations, sites } = await analyseInPlace(warm, { gradient: 'cmat_c' });
    expect(gradients[0].used).toBe(true);
    expect(texts(remarks)).toMatch(
      /Ratios change by 0\.0\d+ per unit of cmat_c \(95 % 0\.0\d+ to 0\.0\d+\).*BIC.*taken out/,
    );
    expect(texts(remarks)).not.toMatch(/temperature differs/);
    const { slope, centre } = gradients[0];
    expect(clocks[0]).toMatchObject({ slope, slope_low: gradients[0].slope_low, slope_high: gradients[0].slope_high });
    const at = new Map(sites.map((site) => [`${site.section}/${site.bed}`, site.gradient!]));
    for (const bed of beds) {
      const key = `${bed.section}/${bed.bed}`;
      // the uncorrected arithmetic mean and the corrected log mean differ by the slope, and by the scatter squared
      const taken = Math.log(bed.dl_mean!) - bed.log_mean!;
      expect(taken).toBeCloseTo(slope * (at.get(key)! - centre), 2);
    }
    const mean = new Map(beds.map((bed) => [`${bed.section}/${bed.bed}`, bed.log_mean!]));
    for (const { lower, upper, difference } of relations) {
      expect(difference).toBeCloseTo(mean.get(lower)! - mean.get(upper)!, 10);
    }
  });

  it('says so where the ratios support no slope, and leaves the ratios as they are', async () => {
    const flat = simulateCoast({ seed: 5, beds: 24, gradient: { slope: 0 } }).survey;
    const [asked, plain] = await Promise.all([analyseInPlace(flat, { gradient: 'cmat_c' }), analyseInPlace(flat)]);
    expect(texts(asked.remarks)).toMatch(/support no slope along cmat_c.*None is taken out/);
    expect(asked.beds.map((bed) => bed.log_mean)).toEqual(plain.beds.map((bed) => bed.log_mean));
  });

  it('names beds without a value, and a column that does not vary', async () => {
    const beds = warm.beds.map((bed, i) => (i === 0 ? { ...bed, columns: { coast_km: 0 } } : bed));
    const missing = await analyseInPlace({ ...warm, beds }, { gradient: 'cmat_c' });
    expect(texts(missing.remarks)).toMatch(/1 bed has no cmat_c \(S01\/B1\) and stands uncorrected/);
    const constant = warm.beds.map((bed) => ({ ...bed, columns: { cmat_c: 12 } }));
    const none = await analyseInPlace({ ...warm, beds: constant }, { gradient: 'cmat_c' });
    expect(texts(none.remarks)).toMatch(/No slope along cmat_c was fitted/);
    expect(none.gradients).toEqual([]);
  });
});

describe('what is said of a staircase', () => {
  const { survey, truth } = simulateCoast({ seed: 6, beds: 24 });
  const rising = survey.beds.map((bed) => {
    const { extent } = truth.beds.get(`${bed.section}/${bed.bed}`)!;
    return { ...bed, elevation_m: 60 + 25 * extent };
  });

  it('gives rows that are checked, and an order that is not bound by them', async () => {
    const along = await analyseInPlace({ ...survey, beds: rising }, { staircase: 'coast' });
    const rows = along.relations.filter((relation) => relation.basis === 'staircase');
    expect(rows.length).toBeGreaterThan(10);
    expect(rows.every((row) => row.certainty === 'probable' && row.verdict_after !== 'not tested')).toBe(true);
    expect(rows.filter((row) => row.verdict_after === 'agrees').length).toBeGreaterThan(0.9 * rows.length);
    expect(texts(along.remarks)).toMatch(/staircase relations derived.*do not bind the order/);
    const plain = await analyseInPlace({ ...survey, beds: rising });
    expect(along.order).toEqual(plain.order);
  });

  it('finds every step reversed on a coast that stands on its head, and binds nothing even when certain', async () => {
    const sunk = rising.map((bed) => ({ ...bed, elevation_m: 100 - bed.elevation_m }));
    const { relations, order } = await analyseInPlace(
      { ...survey, beds: sunk },
      { staircase: 'coast', staircase_certain: true },
    );
    const rows = relations.filter((relation) => relation.basis === 'staircase');
    expect(rows.every((row) => row.certainty === 'certain')).toBe(true);
    expect(rows.filter((row) => row.verdict_after === 'reversed').length).toBeGreaterThan(0.8 * rows.length);
    const oldest = truth.beds.get(`${order[0].section}/${order[0].bed}`)!;
    expect(oldest.rankLow).toBe(1);
  });

  it('says why there is none', async () => {
    expect(texts((await analyseInPlace(survey, { staircase: 'section' })).remarks)).toMatch(
      /No staircase relation was derived, since fewer than 2 beds have an elevation_m/,
    );
  });
});
