import { describe, expect, it } from 'vitest';
import type { ScreeningMark } from '../../src/model/index.js';
import { readShells } from '../../src/superposition/index.js';
import { type OddShell, smallCoast } from './small-coast.js';

const mark = (name: 'high serine' | 'low yield', evidence: string) =>
  ({ shell: 0, mark: name, evidence }) as unknown as ScreeningMark;

const odd: readonly OddShell[] = [
  // 25: in A/3 with the ratio of A/1; 26: in A/2 with that of A/4
  { bed: 2, off: 0.5 },
  { bed: 1, off: -0.5 },
  // 27 and 28: too high in A/4 and too low in A/1, Val off by itself
  { bed: 3, off: 0.4, val: 0.4 },
  { bed: 0, off: -0.3, val: -0.4 },
  // 29 and 30: nothing but a mark
  { bed: 0, off: 0.02, marks: [mark('high serine', 'serine is high')] },
  { bed: 0, off: 0.01, marks: [mark('low yield', 'the yield is low')] },
  // 31: a little too high in A/2, between the zones
  { bed: 1, off: 0.12 },
];

const SURE = 'p under 0.000001; adjusted for 31 shells p under 0.000001';
const NOT_THIS = 'No least costly set of shells that would remove all conflicts holds it: other shells are to blame.';
const THIS = 'Every least costly set of shells that would remove all conflicts holds it.';

describe('readShells', () => {
  const { shells, residuals, conflicts, toSetAside } = readShells(smallCoast(odd));
  const finding = (at: number) => shells[at];

  it('reads a shell of an older deposit, and one of a younger', () => {
    expect(finding(25)).toEqual({
      status: 'set aside',
      reading: 'reworked from an older deposit',
      confidence: 'high',
      sentences: [
        `Its ratio of 0.368 lies 64.9 % above the mean of the 6 other sound shells of its bed (17 standard errors, ${SURE}).`,
        'Its 3 amino acids tell the same extent of racemization (p = 0.42).',
        'Its ratio fits Z4 (probability 1), not Z2, the zone of its bed. It would fit in A/1, which lies below its bed.',
        'It is higher than 8 shells of beds below it by more than chance allows.',
        THIS,
      ],
    });
    expect(finding(26)).toEqual({
      status: 'set aside',
      reading: 'intruded from a younger deposit',
      confidence: 'high',
      sentences: [
        `Its ratio of 0.174 lies 39.3 % below the mean of the 6 other sound shells of its bed (17 standard errors, ${SURE}).`,
        'Its 3 amino acids tell the same extent of racemization (p = 0.34).',
        'Its ratio fits Z1 (probability 1), not Z3, the zone of its bed. It would fit in A/4, which lies above its bed.',
        'It is lower than 8 shells of beds above it by more than chance allows.',
        THIS,
      ],
    });
  });

  it('reads shells whose amino acids disagree', () => {
    expect(finding(27)).toEqual({
      status: 'set aside',
      reading: 'altered',
      confidence: 'high',
      sentences: [
        `Its ratio of 0.259 lies 49.2 % above the mean of the 6 other sound shells of its bed (13.6 standard errors, ${SURE}).`,
        'Its 3 amino acids disagree (p under 0.000001): Val stands out, too high by 21.6 standard deviations for the rest.',
        'It is higher than 2 shells of beds below it by more than chance allows.',
        THIS,
      ],
    });
    expect(finding(28)).toMatchObject({
      status: 'set aside',
      reading: 'contaminated by younger amino acids',
      confidence: 'high',
      sentences: [
        `Its ratio of 0.273 lies 26 % below the mean of the 7 other sound shells of its bed (10.3 standard errors, ${SURE}).`,
        'Its 3 amino acids disagree (p under 0.000001): Val stands out, too low by 21.9 standard deviations for the rest.',
        'It would fit in A/2, which lies above its bed.',
        'It is lower than 1 shell of beds above it by more than chance allows.',
        NOT_THIS,
      ],
    });
  });

  it('reads shells that screening marked', () => {
    expect(finding(29)).toMatchObject({
      status: 'set aside',
      reading: 'contaminated by younger amino acids',
      confidence: 'moderate',
      sentences: [
        'Its ratio of 0.375 lies 1.9 % above the mean of the 7 other sound shells of its bed (0.647 standard errors, p = 0.53; adjusted for 31 shells p = 1).',
        'Screening: serine is high.',
        'Its 3 amino acids tell the same extent of racemization (p = 0.61).',
      ],
    });
    expect(finding(30)).toMatchObject({
      status: 'doubtful',
      reading: 'none',
      confidence: null,
      sentences: [
        'Its ratio of 0.372 lies 1.04 % above the mean of the 6 other sound shells of its bed (0.351 standard errors, p = 0.73; adjusted for 31 shells p = 1).',
        'Screening: the yield is low.',
      ],
    });
  });

  it('reads a shell that only its own bed speaks against', () => {
    expect(finding(31)).toEqual({
      status: 'set aside',
      reading: 'reworked from an older deposit',
      confidence: 'moderate',
      sentences: [
        'Its ratio of 0.323 lies 12.8 % above the mean of the 6 other sound shells of its bed (4.09 standard errors, p = 0.00073; adjusted for 31 shells p = 0.02).',
        'Its 3 amino acids tell the same extent of racemization (p = 0.6).',
        'Its ratio fits no zone: an older deposit that the survey does not hold, or something else.',
      ],
    });
  });

  it('keeps the rest, and tells those in a conflict that others are to blame', () => {
    const kept = shells.slice(0, 25);
    expect(
      kept.every(({ status, reading, confidence }) => status === 'kept' && reading === 'none' && confidence === null),
    ).toBe(true);
    // below the shell moved up into A/3, and above the one moved down into A/2
    const told = kept.flatMap(({ sentences }, at) => (sentences.length > 0 ? [at] : []));
    expect(told).toEqual([6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16, 17]);
    expect(finding(16).sentences.slice(1)).toEqual([
      'It is lower than 1 shell of beds above it by more than chance allows.',
      'It is higher than 1 shell of beds below it by more than chance allows.',
      NOT_THIS,
    ]);
    expect(finding(24)).toEqual({
      status: 'kept',
      reading: 'none',
      confidence: null,
      sentences: [],
    });
    expect(finding(0).sentences).toEqual([]);
  });

  it('gives what the readings rest on', () => {
    expect(toSetAside).toEqual({
      shells: [25, 26, 27],
      cost: 1.2,
      unique: true,
      inAll: [25, 26, 27],
      inSome: [],
      alternative: null,
    });
    expect(residuals.s).toBeCloseTo(0.027251528736, 8);
    expect(residuals.tested).toBe(31);
    // 9, 8, 7 and 7 shells, one of those in A/1 screened out: 8 · 22 + 8 · 14 + 7 · 7
    expect(conflicts).toMatchObject({ count: 16, pairs: 337 });
    expect(conflicts.z).toBeCloseTo(4.822772825, 6);
  });

  it('does without zones', () => {
    const bare = readShells(smallCoast(odd, { zones: [] })).shells;
    expect(bare.map(({ status, reading }) => [status, reading])).toEqual(
      shells.map(({ status, reading }) => [status, reading]),
    );
    expect(bare[25].sentences[2]).toBe('It would fit in A/1, which lies below its bed.');
    expect(bare[26].sentences[2]).toBe('It would fit in A/4, which lies above its bed.');
    expect(bare[31].sentences).toHaveLength(2);
  });

  it('takes the gradient out of what is compared between beds, and leaves it in the ratio', () => {
    const plain = smallCoast(odd);
    const gradients = [0.1, -0.2, 0.05, 0, 0.3];
    const slope = 0.5;
    const moved = {
      ...plain,
      data: {
        ...plain.data,
        slope,
        beds: plain.data.beds.map((bed, at) => ({ ...bed, gradient: gradients[at] })),
        shells: plain.data.shells.map((shell) => ({ ...shell, x: shell.x + slope * gradients[shell.bed] })),
      },
    };
    const found = readShells(moved);
    expect(found.toSetAside).toEqual(toSetAside);
    expect(found.shells.map(({ status }) => status)).toEqual(shells.map(({ status }) => status));
    expect(found.residuals.residual[25]).toBeCloseTo(0.5003333333, 8);
    expect(found.shells[25].sentences[0]).toContain(`Its ratio of ${Number(Math.exp(-1 + 0.025).toPrecision(3))} lies`);
  });

  it('says of a bed that contradicts as a whole that its shells are not to blame', () => {
    // all of A/4 where A/2 is: six shells and the bed mean are against A/3
    const raised = [0, 0.03, -0.025, 0.012, -0.04, 0.021].map((off): OddShell => ({ bed: 4, off: off + 0.9 }));
    const plain = smallCoast(raised);
    const found = readShells({ ...plain, above: [[1, 2, 3, 4], [2, 3, 4], [3, 4], [4], []] });
    const last = found.shells.slice(-6);
    expect(last.map(({ status, reading }) => [status, reading])).toEqual(last.map(() => ['kept', 'none']));
    for (const { sentences } of last)
      expect(sentences[sentences.length - 1]).toBe(
        'Its bed as a whole contradicts superposition: that is a matter of the bed or of the relation, not of this shell.',
      );
  });

  it('gives the same with the readings of a pass before, whatever has changed since', () => {
    const plain = smallCoast(odd);
    const before = readShells(plain);
    const told = (found: typeof before) => ({
      shells: found.shells.map((shell) => ({ ...shell })),
      cut: found.toSetAside,
      conflicts: found.conflicts.count,
      z: found.conflicts.z,
    });
    const { data } = plain;
    const across = [[1, 2, 3, 4], [2, 3], [3], [], []];
    const tilted = { ...data, slope: 0.3, beds: data.beds.map((bed, at) => ({ ...bed, gradient: at % 2 })) };
    for (const next of [
      plain,
      { ...plain, zones: plain.zones.slice(1) },
      { ...plain, spread: 0.5 },
      { ...plain, spread: 0.05, above: across },
      { ...plain, data: tilted },
      { ...plain, data: { ...data, scatter: { ...data.scatter, s: 0.2 } } },
    ]) {
      expect(told(readShells(next, before))).toEqual(told(readShells(next)));
    }
    // a bed of another section above, and a spread that makes its shells no conflict
    const first = readShells({ ...plain, above: across });
    expect(told(readShells({ ...plain, above: across, spread: 0.5 }, first))).toEqual(
      told(readShells({ ...plain, above: across, spread: 0.5 })),
    );
    // shells too few to give a scatter: that of the clock counts, and when it changes so do the residuals
    const few = {
      ...plain,
      data: { ...data, shells: data.shells.map((shell, at) => ({ ...shell, x: at % 6 < 2 ? shell.x : Number.NaN })) },
    };
    const wide = { ...few, data: { ...few.data, scatter: { s: 0.4, df: 3, assumed: true } } };
    expect(told(readShells(wide, readShells(few)))).toEqual(told(readShells(wide)));
    const back = readShells({ ...plain, data: tilted });
    expect(told(readShells(plain, back))).toEqual(told(before));
  });

  it('refuses lists that do not fit the clock', () => {
    const plain = smallCoast([]);
    const wrong = (given: Partial<typeof plain>) => () => readShells({ ...plain, ...given });
    const wanted = 'readShells: wanted logs and marks for 25 shells and relations for 5 beds, got';
    expect(wrong({ logs: [] })).toThrow(new RangeError(`${wanted} 0, 25 and 5`));
    expect(wrong({ marks: [] })).toThrow(new RangeError(`${wanted} 25, 0 and 5`));
    expect(wrong({ above: [] })).toThrow(new RangeError(`${wanted} 25, 25 and 0`));
  });
});
