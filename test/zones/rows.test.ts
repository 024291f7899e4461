import { describe, expect, it } from 'vitest';
import type { PublishedSummary, Shell } from '../../src/model/index.js';
import { createRandom, studentTQuantile } from '../../src/statistics/index.js';
import {
  adjacentZonesRows,
  assignZone,
  bedRows,
  findZones,
  leaveOneOutResidual,
  shellRows,
  zoneCountRows,
  zoneRows,
} from '../../src/zones/index.js';
import { smallClock, twoZones } from './small-clock.js';

const data = twoZones();
const zoning = findZones(data, { alpha: 0.05, zones: null, random: createRandom(1), simulations: 99 })!;
const clock = 'Invenus THAA Ile';

describe('zoneRows', () => {
  it('has a zone a row, the youngest first, with its beds, shells, mean, and ranges', () => {
    const rows = zoneRows(data, zoning);
    expect(rows).toHaveLength(2);
    const half = studentTQuantile(0.975, zoning.df[0]) * zoning.priors.se[0];
    const spread = Math.hypot(0.05, zoning.fit.tau);
    const [mean] = zoning.fit.means;
    expect(mean).toBeCloseTo(-1.995, 3);
    expect(rows[0]).toEqual({
      clock,
      zone: 'Z1',
      beds: 4,
      shells: 20,
      dl_mean: expect.closeTo(Math.exp(mean), 12),
      dl_low: expect.closeTo(Math.exp(mean - half), 12),
      dl_high: expect.closeTo(Math.exp(mean + half), 12),
      shell_low: expect.closeTo(Math.exp(mean - spread), 12),
      shell_high: expect.closeTo(Math.exp(mean + spread), 12),
      stability: null,
    });
    expect(rows[1]).toMatchObject({ zone: 'Z2', beds: 4, shells: 20 });
  });

  it('takes stability, errors and assignment from the bootstrap where there was one, and passes over empty beds', () => {
    const support = {
      stability: [0.9, null],
      meanErrors: [0.2, 0.1],
      assign: () => assignZone(-2, 0.01, zoning.priors),
    };
    const beds = data.beds.map((bed, at) => (at === 0 ? { ...bed, n: 0 } : bed));
    const rows = zoneRows({ ...data, beds }, zoning, support);
    expect(rows.map(({ beds: count, shells, stability }) => [count, shells, stability])).toEqual([
      [7, 35, 0.9],
      [0, 0, null],
    ]);
    const half = studentTQuantile(0.975, zoning.df[0]) * 0.2;
    expect(rows[0].dl_high).toBeCloseTo(Math.exp(zoning.fit.means[0] + half), 12);
  });
});

describe('zoneCountRows', () => {
  it('has every number of zones and the continuum, with the criteria known', () => {
    const criteria = new Map([[2, { gap: 1.5, gap_se: 0.1, silhouette: 0.8 }]]);
    const rows = zoneCountRows(data, zoning, criteria);
    const { choice } = zoning;
    expect(rows).toEqual([
      ...choice.mixtures.map((fit, at) => ({
        clock,
        model: String(at + 1),
        log_likelihood: fit.logLikelihood,
        bic: choice.bics[at],
        gap: at === 1 ? 1.5 : null,
        gap_se: at === 1 ? 0.1 : null,
        silhouette: at === 1 ? 0.8 : null,
        chosen: at === 1,
      })),
      {
        clock,
        model: 'continuum',
        log_likelihood: choice.continuum.logLikelihood,
        bic: choice.continuumBic,
        gap: null,
        gap_se: null,
        silhouette: null,
        chosen: false,
      },
    ]);
    expect(zoneCountRows(data, zoning)[1]).toMatchObject({ gap: null, gap_se: null, silhouette: null });
  });

  it('chooses the continuum where it is the verdict, unless a number was asked for', () => {
    const chosen = (own: Partial<typeof zoning>) =>
      zoneCountRows(data, { ...zoning, ...own }).flatMap((row) => (row.chosen ? [row.model] : []));
    expect(chosen({ verdict: 'continuum' })).toEqual(['continuum']);
    expect(chosen({ verdict: 'continuum', forced: true })).toEqual(['2']);
    expect(chosen({ verdict: 'one zone' })).toEqual(['2']);
  });
});

describe('adjacentZonesRows', () => {
  it('has each pair of neighbours, the oldest first', () => {
    const [only] = zoning.neighbours;
    const means = [...zoning.fit.means, 0];
    const three = { ...zoning, fit: { ...zoning.fit, means }, neighbours: [only, { ...only, difference: 9 }] };
    // the highest zone of the three has no shell, as where only summaries are known
    const ranks = { mann_whitney_u: 400, p_mann_whitney: expect.closeTo(1.451e-11, 14) };
    expect(adjacentZonesRows(data, three)).toEqual([
      { clock, older: 'Z3', younger: 'Z2', ...only, difference: 9, mann_whitney_u: null, p_mann_whitney: null },
      { clock, older: 'Z2', younger: 'Z1', ...only, ...ranks },
    ]);
  });
});

describe('bedRows', () => {
  const notes = () => ({
    place: { kind: 'level', value: 4 } as const,
    marks: ['shallow burial'] as const,
    reading: 'reading',
  });
  const clockOf = smallClock([
    { level: -2, offsets: [0.1, -0.1], aside: [0.5] },
    { level: -1.5, offsets: [] },
    { level: -1.5, offsets: [0] },
  ]);
  const summary = (own: Partial<PublishedSummary>) =>
    ({
      section: 'S',
      bed: '1',
      taxon: 'Invenus',
      fraction: 'THAA',
      amino_acid: 'Ile',
      mean: 0.2,
      sd: 0.03,
      n: 3,
      ...own,
    }) as PublishedSummary;
  const rows = (summaries: readonly PublishedSummary[], own = {}) =>
    bedRows({ data: clockOf, zoning: null, shells: [], summaries, notes, ...own });
  const dl = [Math.exp(-1.9), Math.exp(-2.1)];
  const mean = (dl[0] + dl[1]) / 2;
  const sd = Math.abs(dl[0] - dl[1]) / Math.SQRT2;

  it('has the statistics of the shells kept, and no zone without zones', () => {
    const found = rows([]);
    expect(found[0]).toEqual({
      clock,
      section: 'S',
      bed: '1',
      place: 4,
      taxon: 'Invenus',
      shells: 2,
      set_aside: 1,
      dl_mean: expect.closeTo(mean, 12),
      dl_sd: expect.closeTo(sd, 12),
      dl_se: expect.closeTo(sd / Math.SQRT2, 12),
      log_mean: -2,
      log_se: 0.05 / Math.SQRT2,
      zone: null,
      zone_probability: null,
      second_zone: null,
      second_probability: null,
      straddles: false,
      marks: ['shallow burial'],
      reading: 'reading',
    });
    const none = { dl_mean: null, dl_sd: null, dl_se: null };
    expect(found[1]).toMatchObject({ shells: 0, set_aside: 0, ...none, log_mean: null, log_se: null });
    expect(found[2]).toMatchObject({
      shells: 1,
      dl_mean: expect.closeTo(Math.exp(-1.5), 12),
      dl_sd: null,
      dl_se: null,
    });
    const bare = rows([], { notes: () => ({ place: null, marks: [], reading: '' }) });
    expect(bare[0]).toMatchObject({ place: null, marks: [], reading: '' });
  });

  it('has the zone of the fit, or of the assignment given, and none for an empty bed', () => {
    const found = rows([], { zoning });
    const own = assignZone(-2, 0.05 / Math.SQRT2, zoning.priors);
    expect(found[0]).toMatchObject({
      zone: 'Z1',
      zone_probability: own.probability,
      second_zone: 'Z2',
      second_probability: own.secondProbability,
      straddles: false,
    });
    expect(found[1]).toMatchObject({ zone: null, zone_probability: null, second_zone: null, second_probability: null });
    const assign = (x: number, error: number) => ({
      ...assignZone(x, error, zoning.priors),
      zone: 4,
      probability: 0.7,
      second: null,
      secondProbability: null,
      straddles: true,
    });
    expect(rows([], { zoning, assign })[2]).toMatchObject({
      zone: 'Z5',
      zone_probability: 0.7,
      second_zone: null,
      second_probability: null,
      straddles: true,
    });
  });

  it('joins published summaries of its taxon, fraction and amino acid', () => {
    // two shells and 3 published of mean 0.2 and sd 0.03
    const [bed] = rows([summary({})]);
    const joint = (dl[0] + dl[1] + 0.6) / 5;
    const squares = (dl[0] - joint) ** 2 + (dl[1] - joint) ** 2 + 3 * (0.2 - joint) ** 2 + 2 * 0.03 ** 2;
    expect(bed.dl_mean).toBeCloseTo(joint, 12);
    expect(bed.dl_sd).toBeCloseTo(Math.sqrt(squares / 4), 12);
    expect(bed.dl_se).toBeCloseTo(Math.sqrt(squares / 4 / 5), 12);
    const others = [
      { taxon: 'Other' },
      { fraction: 'FAA' },
      { amino_acid: 'Val' },
      { bed: '9' },
      { section: 'T' },
    ] as const;
    for (const own of others)
      expect(rows([summary(own as Partial<PublishedSummary>)])[0].dl_mean).toBeCloseTo(mean, 12);
    // two summaries of one bed; one without an sd leaves that of the bed unknown, unless it is of one shell
    const two = rows([summary({}), summary({ mean: 0.3, sd: null, n: 2 })])[0];
    expect(two.dl_mean).toBeCloseTo((dl[0] + dl[1] + 0.6 + 0.6) / 7, 12);
    expect([two.dl_sd, two.dl_se]).toEqual([null, null]);
    const single = rows([summary({ mean: 0.3, sd: null, n: 1 })])[0];
    const middle = (dl[0] + dl[1] + 0.3) / 3;
    const left = (dl[0] - middle) ** 2 + (dl[1] - middle) ** 2 + (0.3 - middle) ** 2;
    expect(single.dl_sd).toBeCloseTo(Math.sqrt(left / 2), 12);
  });

  it('takes the bed mean of an index for what was published of it', () => {
    const index = {
      ...clockOf,
      clock: { ...clockOf.clock, amino_acids: ['Ile', 'Val'] as const, weights: [0.5, 0.5] },
      beds: clockOf.beds.map((bed, at) => (at === 0 ? { ...bed, n: 6, mean: -1.9 } : bed)),
    };
    const [bed] = bedRows({ data: index, zoning: null, shells: [], summaries: [summary({})], notes });
    expect(bed.dl_mean).toBeCloseTo((dl[0] + dl[1] + 4 * Math.exp(-1.9)) / 6, 12);
    expect(bed.dl_sd).toBeNull();
    const [plain] = bedRows({ data: index, zoning: null, shells: [], summaries: [], notes });
    expect(plain.dl_mean).toBeCloseTo(mean, 12);
    expect(plain.dl_sd).toBeCloseTo(sd, 12);
  });
});

describe('shellRows', () => {
  const clockOf = smallClock([{ level: -2, offsets: [0.1, -0.2], aside: [0.5], gradient: 0.4 }], 0.5);
  const shells = clockOf.shells.map(
    (_, at) =>
      ({
        section: 'S',
        bed: '1',
        taxon: 'Invenus',
        shell: `s${at}`,
        lab_ids: [`L${at}`],
        preparations: 2,
      }) as unknown as Shell,
  );
  const notes = (at: number) =>
    ({ status: 'doubtful', marks: ['low yield'], reading: at === 0 ? 'altered' : 'none', confidence: 'low' }) as const;

  it('has the ratio as measured, the residual within its bed, and the zone with the gradient taken out', () => {
    const x = -2 + 0.2 + 0.1;
    const own = assignZone(-1.9, 0.05, zoning.priors);
    expect(shellRows(clockOf, zoning, shells, notes)[0]).toEqual({
      clock,
      section: 'S',
      bed: '1',
      taxon: 'Invenus',
      shell: 's0',
      lab_id: ['L0'],
      preparations: 2,
      dl: Math.exp(x),
      log_ratio: x,
      residual: expect.closeTo(0.3, 12),
      status: 'doubtful',
      zone: 'Z1',
      zone_probability: expect.closeTo(own.probability, 12),
      marks: ['low yield'],
      reading: 'altered',
      confidence: 'low',
    });
    expect(shellRows(clockOf, null, shells, notes)[1]).toMatchObject({
      shell: 's1',
      reading: 'none',
      zone: null,
      zone_probability: null,
    });
    const assign = (value: number, error: number) => {
      expect(error).toBe(0.05);
      return { ...own, zone: value > -1.7 ? 2 : 0, probability: 0.6 };
    };
    const rows = shellRows(clockOf, zoning, shells, notes, assign);
    expect(rows.map(({ zone, zone_probability }) => [zone, zone_probability])).toEqual([
      ['Z1', 0.6],
      ['Z1', 0.6],
      ['Z3', 0.6],
    ]);
  });

  it('leaves a shell out of the mean it is held against', () => {
    expect(leaveOneOutResidual(clockOf, 0)).toBeCloseTo(0.3, 12);
    expect(leaveOneOutResidual(clockOf, 1)).toBeCloseTo(-0.3, 12);
    // set aside: it is not in the mean of −2.05
    expect(leaveOneOutResidual(clockOf, 2)).toBeCloseTo(0.55, 12);
    const lone = smallClock([
      { level: -2, offsets: [0.1], aside: [0.5] },
      { level: -1, offsets: [], aside: [0] },
    ]);
    expect(leaveOneOutResidual(lone, 0)).toBeNull();
    expect(leaveOneOutResidual(lone, 1)).toBeCloseTo(0.4, 12);
    expect(leaveOneOutResidual(lone, 2)).toBeNull();
  });
});
