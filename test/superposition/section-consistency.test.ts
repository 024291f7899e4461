import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { checkSections, type PlacedBed } from '../../src/superposition/section-consistency.js';

function section(name: string, means: readonly number[], se = 0.1) {
  return { section: name, beds: means.map((mean, index): PlacedBed => ({ rank: index + 1, mean, se })) };
}

describe('checkSections', () => {
  it('finds nothing against a section in order', () => {
    const [check] = checkSections([section('A', [-0.5, -0.6, -0.9])], createRandom(1));
    expect(check).toMatchObject({ section: 'A', beds: 3, statistic: 0, p_order: 1, verdict: 'consistent' });
    expect(check?.fitted).toEqual([-0.5, -0.6, -0.9]);
  });

  it('does not order beds of equal place, nor count beds without a mean', () => {
    const beds: PlacedBed[] = [
      { rank: 1, mean: -0.4, se: 0.1 },
      { rank: 1, mean: -0.9, se: 0.1 },
      { rank: 2, mean: -0.8, se: 0.1 },
      { rank: 3, mean: Number.NaN, se: Number.NaN },
    ];
    const [check] = checkSections([{ section: 'A', beds }], createRandom(1));
    expect(check).toMatchObject({ beds: 3, statistic: 0, verdict: 'consistent' });
    const [alone] = checkSections([{ section: 'B', beds: beds.slice(0, 2) }], createRandom(1));
    expect(alone).toMatchObject({ statistic: null, p_order: null, verdict: 'not tested' });
  });

  it('adjusts over sections, and can still convict one among many', () => {
    const sections = [
      section('bad', [-1, -0.5, -0.4]),
      ...Array.from({ length: 99 }, (_, i) => section(`S${i}`, [-0.5, -0.6])),
    ];
    const checks = checkSections(sections, createRandom(1));
    expect(checks.filter((check) => check.verdict === 'inconsistent').map((check) => check.section)).toEqual(['bad']);
  });

  it('gives the same answer for the same seed, and refuses options that make no sense', () => {
    const sections = [section('A', [-0.7, -0.6, -0.65])];
    expect(checkSections(sections, createRandom(3))).toEqual(checkSections(sections, createRandom(3)));
    expect(() => checkSections(sections, createRandom(3), { alpha: 2 })).toThrow('alpha');
    expect(() => checkSections(sections, createRandom(3), { df: 0 })).toThrow('df');
    expect(() => checkSections(sections, createRandom(3), { simulations: Number.NaN })).toThrow('simulations');
  });
});
