import { describe, expect, it } from 'vitest';
import type { AminoAcid, ClockData } from '../../src/model/index.js';
import { studentTCdf } from '../../src/statistics/index.js';
import { aminoAcidVotes, bedScatters } from '../../src/zones/index.js';
import { smallClock } from './small-clock.js';

/** One amino acid by the means of its beds; null where a bed has none, undefined where it does not know the bed. */
function voter(
  aminoAcid: AminoAcid,
  means: readonly (number | null | undefined)[],
  own: { se?: number; df?: number; spread?: number } = {},
) {
  const { se = 0.02, df = 12, spread = 0 } = own;
  const plain = smallClock(means.map(() => ({ level: 0, offsets: [0] })));
  const data: ClockData = {
    ...plain,
    beds: plain.beds.flatMap((bed, at) => {
      const mean = means[at];
      if (mean === undefined) return [];
      return [mean === null ? { ...bed, n: 0, mean: Number.NaN } : { ...bed, n: 4, mean, se }];
    }),
    scatter: { s: 0.05, df, assumed: false },
  };
  return { aminoAcid, data, spread };
}

const OPTIONS = { clock: 'Invenus THAA index', alpha: 0.05 };
const pairs = (voters: ReturnType<typeof voter>[], own = {}) =>
  aminoAcidVotes(voters, { ...OPTIONS, ...own }).map(({ bed_a, bed_b }) => `${bed_a} ${bed_b}`);
const p = (difference: number, se: number, df: number) =>
  2 * studentTCdf(-Math.abs(difference) / (se * Math.SQRT2), df);

describe('aminoAcidVotes to the number', () => {
  it('gives each vote with its chance, of those that know both beds', () => {
    const found = aminoAcidVotes(
      [
        voter('Ile', [-2, -1.8]),
        voter('Val', [-1.7, -1.8], { df: 5 }),
        voter('Glx', [-2, null]),
        voter('Asx', [undefined, -2]),
      ],
      OPTIONS,
    );
    expect(found).toEqual([
      {
        clock: 'Invenus THAA index',
        bed_a: 'S/1',
        bed_b: 'S/2',
        votes: [
          { amino_acid: 'Ile', older: 'S/2', p: expect.closeTo(p(0.2, 0.02, 12), 12) },
          { amino_acid: 'Val', older: 'S/1', p: expect.closeTo(p(0.1, 0.02, 5), 12) },
        ],
      },
    ]);
    // a scatter of no degrees of freedom is taken for one of 1, which proves nothing
    expect(pairs([voter('Ile', [-2, -1.8], { df: 0 }), voter('Val', [-1.7, -1.8])])).toEqual([]);
  });

  it('takes the weaker of the two strongest votes, times the number of votes', () => {
    // Ile and Val stand against each other at t = 2.5: two-sided 0.0124 each, 0.0248 of two, 0.0497 of four
    const off = 2.5 * 0.02 * Math.SQRT2;
    const against = (ile: number, val: number, ...rest: ReturnType<typeof voter>[]) =>
      pairs([voter('Ile', [-2, -2 + ile], { df: 1e6 }), voter('Val', [-2, -2 - val], { df: 1e6 }), ...rest]);
    const level = (code: AminoAcid) => voter(code, [-2, -2], { df: 1e6 });
    expect(against(off, off)).toEqual(['S/1 S/2']);
    expect(against(off, off, level('Glx'), level('Asx'))).toEqual(['S/1 S/2']);
    expect(against(off, off, level('Glx'), level('Asx'), level('Phe'))).toEqual([]);
    // one strong vote does not carry a weak one, whichever it is
    expect(against(5 * off, 0.9 * off, level('Glx'), level('Asx'))).toEqual([]);
    expect(against(0.9 * off, 5 * off, level('Glx'), level('Asx'))).toEqual([]);
    // under 1.96 there is no vote to speak of
    expect(against(0.78 * off, 5 * off)).toEqual([]);
    expect(against(5 * off, 0.78 * off)).toEqual([]);
    expect(against(5 * off, -5 * off)).toEqual([]);
  });

  it('counts all pairs judged in the adjustment', () => {
    const off = 2.5 * 0.02 * Math.SQRT2;
    const more = (count: number) => {
      const rest = Array.from({ length: count }, () => null);
      const ile = voter('Ile', [-2, -2 + off, ...rest.map(() => -2 + off / 2)], { df: 1e6 });
      const val = voter('Val', [-2, -2 - off, ...rest.map(() => -2 - off / 2)], { df: 1e6 });
      return pairs([ile, val]);
    };
    expect(more(0)).toEqual(['S/1 S/2']);
    // 3 pairs: 3 · 0.0248
    expect(more(1)).toEqual([]);
  });

  it('adds the spread of the clock to each bed', () => {
    const spread = (value: number) =>
      pairs([voter('Ile', [-2, -1.8], { spread: value }), voter('Val', [-1.8, -2], { spread: value })]);
    expect(spread(0)).toEqual(['S/1 S/2']);
    expect(spread(0.03)).toEqual(['S/1 S/2']);
    // 0.2 / √(2 (0.02² + 0.1²)) = 1.39
    expect(spread(0.1)).toEqual([]);
    // beds without error and spread say nothing
    expect(pairs([voter('Ile', [-2, -1.8], { se: 0 }), voter('Val', [-1.8, -2])])).toEqual([]);
  });

  it('gives the surest first, equals in the order of the beds, and no more than asked for', () => {
    // beds 1 to 3 in falling and rising order, 4 like 3
    const three = [voter('Ile', [-2, -1.8, -1.5, -1.5]), voter('Val', [-1.5, -1.7, -2, -2])];
    const all = ['S/1 S/3', 'S/1 S/4', 'S/2 S/3', 'S/2 S/4', 'S/1 S/2'];
    expect(pairs(three)).toEqual(all);
    expect(pairs(three, { most: 2 })).toEqual(all.slice(0, 2));
    expect(pairs(three, { alpha: 1e-12 })).toEqual([]);
    expect(pairs([three[0]])).toEqual([]);
    const many = Array.from({ length: 8 }, (_, at) => -2 + 0.2 * at);
    expect(
      pairs([
        voter('Ile', many),
        voter(
          'Val',
          many.map((mean) => -4 - mean),
        ),
      ]),
    ).toHaveLength(20);
  });
});

describe('bedScatters', () => {
  it('is the sum of squares of the kept shells about their mean', () => {
    const data = smallClock([
      { level: -2, offsets: [0.1, -0.1, 0.3], aside: [5] },
      { level: -1, offsets: [0.1] },
      { level: -1, offsets: [] },
      { level: -3, offsets: [0.05, -0.05] },
    ]);
    // 0, −0.2 and 0.2 about the mean of the first
    expect(bedScatters(data, [3, 0, 1, 2])).toEqual([
      { squares: expect.closeTo(0.005, 12), df: 1 },
      { squares: expect.closeTo(0.08, 12), df: 2 },
      { squares: 0, df: 0 },
      { squares: 0, df: 0 },
    ]);
  });
});
