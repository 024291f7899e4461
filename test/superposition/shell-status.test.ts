import { describe, expect, it } from 'vitest';
import { confidenceOfReading, matchZone, readingOfShell, statusOfShell } from '../../src/superposition/index.js';

type StatusCase = Parameters<typeof statusOfShell>[0];
type ConfidenceCase = Parameters<typeof confidenceOfReading>[0];

const own = { residual: 0.3, t: 4, others: 6, p: 0.04, adjusted: 0.025, odd: true };

describe('statusOfShell, one thing changed at a time', () => {
  const base: StatusCase = {
    own,
    marks: [],
    reading: 'altered',
    cut: 'none',
    wholeBed: false,
    crowded: false,
    alpha: 0.05,
  };
  const status = (given: Partial<StatusCase>, shell: Partial<typeof own> = {}) =>
    statusOfShell({ ...base, ...given, own: { ...own, ...shell } });

  it('sets aside what its own bed convicts at half of alpha', () => {
    expect(status({})).toBe('set aside');
    expect(status({}, { adjusted: 0.0251 })).toBe('kept');
    expect(status({}, { odd: false })).toBe('kept');
    expect(status({ reading: 'none' })).toBe('kept');
    expect(status({ crowded: true })).toBe('kept');
    expect(status({ alpha: 0.049 })).toBe('kept');
    expect(statusOfShell({ ...base, own: { ...own, adjusted: null } })).toBe('kept');
  });

  it('sets aside what every cut holds and its own bed supports at alpha', () => {
    const weak = { odd: false, p: 0.05 };
    expect(status({ cut: 'all' }, weak)).toBe('set aside');
    expect(status({ cut: 'all' }, { odd: false, p: 0.051 })).toBe('doubtful');
    expect(status({ cut: 'some' }, weak)).toBe('doubtful');
    expect(status({ cut: 'all', wholeBed: true }, weak)).toBe('kept');
    expect(status({ cut: 'all', reading: 'none' }, weak)).toBe('doubtful');
    expect(status({ cut: 'all', crowded: true }, weak)).toBe('doubtful');
    expect(statusOfShell({ ...base, cut: 'all', own: { ...own, odd: false, p: null } })).toBe('doubtful');
  });

  it('doubts at a fifth of alpha, at any mark, and sets aside what is screened out', () => {
    expect(status({}, { odd: false, p: 0.01 })).toBe('doubtful');
    expect(status({}, { odd: false, p: 0.0101 })).toBe('kept');
    expect(status({ marks: ['low yield'] }, { odd: false })).toBe('doubtful');
    expect(status({ marks: ['high serine'], reading: 'none' }, { odd: false })).toBe('set aside');
  });
});

describe('confidenceOfReading, point by point', () => {
  const base: ConfidenceCase = {
    own: { ...own, adjusted: 0.5, others: 3 },
    status: 'set aside',
    reading: 'reworked from an older deposit',
    agreementP: null,
    marks: [],
    sourceFits: false,
    inConflict: false,
  };
  const sure = (given: Partial<ConfidenceCase>, shell: Partial<ConfidenceCase['own']> = {}) =>
    confidenceOfReading({ ...base, ...given, own: { ...base.own, ...shell } });
  // each of these three is worth a point, so with them one point more is high and one less is low
  const three = { sourceFits: true, inConflict: true, agreementP: 0.05 } as const;
  const two = { sourceFits: true, inConflict: true } as const;

  it('has none for no reading', () => {
    expect(sure({ ...three, reading: 'none' }, { adjusted: 0.001 })).toBeNull();
  });

  it('counts the own bed: two points up to 0.01, one up to 0.05, one for four neighbours', () => {
    expect(sure({})).toBe('low');
    expect(sure(two)).toBe('low');
    expect(sure(two, { adjusted: 0.05 })).toBe('moderate');
    expect(sure(two, { adjusted: 0.0501 })).toBe('low');
    expect(sure(two, { adjusted: 0.01 })).toBe('high');
    expect(sure(two, { adjusted: 0.0101 })).toBe('moderate');
    expect(sure(two, { adjusted: null })).toBe('low');
    expect(sure(two, { others: 4 })).toBe('moderate');
    expect(sure({ sourceFits: true }, { others: 4 })).toBe('low');
  });

  it('counts conflicts, and a source for what was moved', () => {
    expect(sure(three)).toBe('moderate');
    expect(sure({ ...three, inConflict: false })).toBe('low');
    expect(sure({ ...three, sourceFits: false })).toBe('low');
    expect(sure({ ...three, reading: 'intruded from a younger deposit' })).toBe('moderate');
    // no source is wanted for what was altered in place
    expect(sure({ ...three, reading: 'altered', agreementP: 0.001 }, { others: 4 })).toBe('moderate');
  });

  it('counts amino acids that agree for what was moved, and that disagree for what was altered', () => {
    expect(sure({ ...three, agreementP: 0.049 })).toBe('low');
    const altered = { reading: 'altered', inConflict: true } as const;
    expect(sure({ ...altered, agreementP: 0.001 }, { others: 4 })).toBe('moderate');
    expect(sure({ ...altered, agreementP: 0.0011 }, { others: 4 })).toBe('low');
    expect(sure({ ...altered, agreementP: 0.9 }, { others: 4 })).toBe('low');
  });

  it('is never high where two readings are open, or the shell is not set aside', () => {
    const all = { sourceFits: true, inConflict: true, agreementP: 0.0001 } as const;
    const strong = { adjusted: 0.001, others: 6 };
    for (const reading of ['reworked or altered', 'intruded or contaminated'] as const) {
      expect(sure({ ...all, reading }, strong)).toBe('moderate');
      // the amino acids decide nothing there
      expect(sure({ ...all, reading }, { adjusted: 0.05 })).toBe('low');
    }
    expect(sure({ ...three, status: 'doubtful' }, strong)).toBe('moderate');
    expect(sure(three, strong)).toBe('high');
  });

  it('counts high serine twice, for contamination only', () => {
    const serine = { reading: 'contaminated by younger amino acids', marks: ['high serine'] } as const;
    expect(sure(serine, { others: 4 })).toBe('moderate');
    expect(sure({ ...serine, marks: ['low yield'] }, { others: 4 })).toBe('low');
    expect(sure({ ...serine, reading: 'altered' }, { others: 4 })).toBe('low');
    expect(sure({ ...serine, inConflict: true }, { others: 4 })).toBe('high');
  });
});

describe('readingOfShell with marks', () => {
  it('takes either mark of disagreement for disagreement, and any mark for a doubt', () => {
    expect(readingOfShell('high', true, ['rate order'])).toBe('altered');
    expect(readingOfShell('low', true, ['rate order'])).toBe('contaminated by younger amino acids');
    expect(readingOfShell('low', null, ['discordant ratios'])).toBe('contaminated by younger amino acids');
    expect(readingOfShell('low', true, ['low yield'])).toBe('intruded or contaminated');
    expect(readingOfShell('high', true, ['high serine'])).toBe('reworked or altered');
    expect(readingOfShell('within', true, [])).toBe('none');
    expect(readingOfShell('within', null, ['low yield'])).toBe('none');
  });
});

describe('matchZone to the number', () => {
  const zones = [
    { name: 'Z1', mean: -2, sd: 0.03, weight: 0.75 },
    { name: 'Z2', mean: -1.9, sd: 0.1, weight: 0.25 },
  ];

  it('weighs zones by their share, width and distance', () => {
    const scatter = 0.04;
    const density = (x: number, at: number) => {
      const sd = Math.hypot(scatter, zones[at].sd);
      return (zones[at].weight / sd) * Math.exp(-0.5 * ((x - zones[at].mean) / sd) ** 2);
    };
    for (const [x, best] of [
      [-1.97, 0],
      [-1.9, 1],
      [-2.1, 0],
    ]) {
      const found = matchZone(x, scatter, zones)!;
      expect(found.zone).toBe(zones[best]);
      expect(found.probability).toBeCloseTo(density(x, best) / (density(x, 0) + density(x, 1)), 12);
      expect(found.distance).toBeCloseTo((x - zones[best].mean) / Math.hypot(scatter, zones[best].sd), 12);
    }
  });

  it('fits none beyond 3 standard deviations, or without scatter', () => {
    const one = [{ name: 'Z1', mean: 0, sd: 3, weight: 1 }];
    expect(matchZone(15, 4, one)?.distance).toBe(3);
    expect(matchZone(-15, 4, one)?.distance).toBe(-3);
    expect(matchZone(15.01, 4, one)).toBeNull();
    expect(matchZone(-15.01, 4, one)).toBeNull();
    expect(matchZone(0, 0, one)).toBeNull();
    expect(matchZone(0, Number.NaN, one)).toBeNull();
  });
});
