import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DEFAULT_OPTIONS, type Shell } from '../../src/model/index.js';
import {
  discordantRatios,
  freeBelowTotal,
  highSerine,
  lowYield,
  rateOrder,
  replicatesDisagree,
  screenBeds,
  screenedOut,
  screenShells,
} from '../../src/screening/index.js';
import { createRandom } from '../../src/statistics/index.js';
import { cleanShells, shell } from './shells.js';

const limits = DEFAULT_OPTIONS.screening;
const marked = (marks: readonly { readonly shell: number }[]) => marks.map((mark) => mark.shell);

/** The first shell with one ratio multiplied. */
function spoilt(shells: readonly Shell[], index: number, code: 'Asx' | 'Ala' | 'Val', factor: number): Shell[] {
  return shells.map((own, i) =>
    i === index ? { ...own, ratios: { ...own.ratios, [code]: (own.ratios[code] ?? 1) * factor } } : own,
  );
}

describe('high serine', () => {
  it('marks at and above the limit, and not where serine was not measured', () => {
    const shells = [0.79, 0.8, 1.3, null, Number.NaN].map((serine_ratio) => shell({ serine_ratio }));
    const marks = highSerine(shells, limits);
    expect(marked(marks)).toEqual([1, 2]);
    expect(marks[1]).toEqual({
      shell: 2,
      mark: 'high serine',
      evidence: 'L-Ser/L-Asp is 1.3, at or above the limit of 0.8',
    });
    expect(marked(highSerine(shells, { ...limits, serine_ratio: 1 }))).toEqual([2]);
  });
});

describe('discordant ratios', () => {
  it('rarely marks clean shells, over long and short ranges of ages, many shells or few', () => {
    const random = createRandom(5);
    for (const [count, zones, runs] of [
      [400, 6, 12],
      [150, 4, 30],
      [40, 3, 80],
      [12, 2, 200],
      [60, 1, 60],
    ]) {
      let marks = 0;
      for (let run = 0; run < runs; run++) marks += discordantRatios(cleanShells(random, count, zones), limits).length;
      expect(marks / (count * runs), `${count} shells in ${zones} zones`).toBeLessThan(0.0025);
    }
  });

  it('marks an amino acid out of step, names it, and is not led astray by one shell in ten', () => {
    const clean = cleanShells(createRandom(6), 120);
    const [mark] = discordantRatios(spoilt(clean, 7, 'Ala', 1.8), limits);
    expect(mark.shell).toBe(7);
    expect(mark.evidence).toMatch(/Ala.*over all pairs Ala stands out, too high$/);
    let many = clean;
    for (let i = 0; i < 120; i += 10) many = spoilt(many, i, 'Val', 0.5);
    expect(marked(discordantRatios(many, limits))).toEqual([0, 10, 20, 30, 40, 50, 60, 70, 80, 90, 100, 110]);
  });

  it('keeps taxa and fractions apart, and says nothing of fewer than 10 shells', () => {
    const clean = cleanShells(createRandom(6), 60);
    const other = spoilt(clean, 0, 'Ala', 1.8)
      .slice(0, 9)
      .map((own) => ({ ...own, taxon: 'Altera' }));
    expect(discordantRatios(other, limits)).toEqual([]);
    expect(discordantRatios([...clean, ...other], limits)).toEqual(discordantRatios(clean, limits));
  });

  it('survives ratios that are all the same', () => {
    const same = Array.from({ length: 20 }, () => shell({ ratios: { Asx: 0.3, Glx: 0.2 } }));
    expect(screenShells(same)).toEqual([]);
  });
});

describe('rate order', () => {
  it('learns the order of the taxon and marks a slow amino acid ahead of a fast one', () => {
    const clean = cleanShells(createRandom(8), 80);
    expect(rateOrder(clean, limits)).toEqual([]);
    const [mark, ...others] = rateOrder(spoilt(clean, 3, 'Val', 2.6), limits);
    expect(others).toEqual([]);
    expect(mark).toMatchObject({ shell: 3, mark: 'rate order' });
    expect(mark.evidence).toMatch(/^Val is ahead of (Ala|Glx|Asx) by .* in 9\d|100 % of the taxon/);
  });

  it('marks none where amino acids run level', () => {
    const random = createRandom(9);
    const level = Array.from({ length: 100 }, (_, i) =>
      shell({
        shell: String(i),
        ratios: { Ala: Math.exp(-1 + 0.1 * random.normal()), Leu: Math.exp(-1 + 0.1 * random.normal()) },
      }),
    );
    expect(rateOrder(level, limits)).toEqual([]);
  });
});

describe('free below total', () => {
  const total = shell({ ratios: { Asx: 0.3, Ile: 0.2 } });
  const free = (Asx: number, Ile: number, name = 'a') => shell({ fraction: 'FAA', shell: name, ratios: { Asx, Ile } });

  it('marks both rows of a shell whose free ratio is under the total beyond error', () => {
    const marks = freeBelowTotal([total, free(0.5, 0.15)], limits);
    expect(marks.map(({ shell: index, mark }) => [index, mark])).toEqual([
      [0, 'free below total'],
      [1, 'free below total'],
    ]);
    expect(marks[0].evidence).toContain('Ile 0.15 free against 0.2 total');
    expect(marks[0].evidence).not.toContain('Asx');
  });

  it('pairs by section, bed, taxon and shell only, and allows for the error of two analyses', () => {
    expect(freeBelowTotal([total, free(0.5, 0.15, 'b')], limits)).toEqual([]);
    expect(freeBelowTotal([total, free(0.5, 0.195)], limits)).toEqual([]);
    expect(freeBelowTotal([total, { ...free(0.5, 0.1), taxon: 'Altera' }], limits)).toEqual([]);
  });
});

describe('replicates disagree', () => {
  const replicated = (random: ReturnType<typeof createRandom>, sd: number, name: string) =>
    shell({
      shell: name,
      replicates: [0, 1].map(() => ({
        Asx: 0.4 * Math.exp(sd * random.normal()),
        Ile: 0.2 * Math.exp(sd * random.normal()),
      })),
    });

  it('rarely marks shells whose preparations differ as usual', () => {
    const random = createRandom(10);
    let marks = 0;
    for (let run = 0; run < 100; run++) {
      marks += replicatesDisagree(
        Array.from({ length: 40 }, (_, i) => replicated(random, 0.02, String(i))),
        limits,
      ).length;
    }
    expect(marks / 4000).toBeLessThan(0.0025);
  });

  it('marks one that differs far more, once, and needs 8 shells to learn from', () => {
    const random = createRandom(11);
    const shells = Array.from({ length: 30 }, (_, i) => replicated(random, 0.02, String(i)));
    shells[4] = {
      ...shells[4],
      replicates: [
        { Asx: 0.4, Ile: 0.2 },
        { Asx: 0.6, Ile: 0.3 },
      ],
    };
    const marks = replicatesDisagree(shells, limits);
    expect(marked(marks)).toEqual([4]);
    expect(marks[0].evidence).toContain('differ by 50 %');
    expect(replicatesDisagree(shells.slice(0, 7), limits)).toEqual([]);
  });
});

describe('low yield', () => {
  it('marks totals far under the median of the taxon, and passes over shells with an amino acid missing', () => {
    const shells = [100, 110, 90, 105, 20, 95].map((amount, i) =>
      shell({ shell: String(i), concentrations: { Asx: amount, Glx: amount / 2 } }),
    );
    const part = shell({ shell: 'part', concentrations: { Asx: 15 } });
    const marks = lowYield([...shells, part], limits);
    expect(marked(marks)).toEqual([4]);
    expect(marks[0].evidence).toContain('Asx, Glx is 20.5 % of');
    expect(lowYield(shells.slice(2), limits)).toEqual([]);
  });
});

describe('all rules', () => {
  it('give marks by shell, one a rule, and set aside by high serine or two rules only', () => {
    const clean = cleanShells(createRandom(12), 60).map((own, i) =>
      i % 20 === 4 ? { ...own, serine_ratio: 0.9 } : own,
    );
    const marks = screenShells(spoilt(clean, 3, 'Val', 2.6));
    expect(marks.map(({ shell: index, mark }) => [index, mark])).toEqual([
      [3, 'discordant ratios'],
      [3, 'rate order'],
      [4, 'high serine'],
      [24, 'high serine'],
      [44, 'high serine'],
    ]);
    expect(screenedOut(['discordant ratios', 'rate order'])).toBe(true);
    expect(screenedOut(['high serine'])).toBe(true);
    expect(screenedOut(['low yield'])).toBe(false);
    expect(screenedOut([])).toBe(false);
  });

  it('do not change what they are given, nor hang on the order of the shells', () => {
    const shells = spoilt(cleanShells(createRandom(13), 50), 9, 'Ala', 2);
    const names = (list: readonly Shell[]) =>
      screenShells(list)
        .map(({ shell: index, mark, evidence }) => `${list[index].shell} ${mark} ${evidence}`)
        .sort();
    const expected = names(shells);
    Object.freeze(shells);
    for (const own of shells) Object.freeze(own.ratios);
    fc.assert(
      fc.property(fc.shuffledSubarray(shells, { minLength: 50, maxLength: 50 }), (list) => {
        expect(names(list)).toEqual(expected);
      }),
      { numRuns: 15 },
    );
  });

  it('keep up with 5,000 shells of eight amino acids', () => {
    const random = createRandom(14);
    const codes = ['Asx', 'Glx', 'Ser', 'Ala', 'Val', 'Phe', 'Leu', 'Ile'] as const;
    const shells = Array.from({ length: 5000 }, (_, i) => {
      const x = -2 + 0.3 * (i % 5);
      const ratios = Object.fromEntries(codes.map((code, a) => [code, Math.exp(x - 0.1 * a + 0.05 * random.normal())]));
      return shell({ shell: String(i), ratios });
    });
    const begun = performance.now();
    screenShells(shells);
    expect(performance.now() - begun).toBeLessThan(8000);
  });
});

describe('screenBeds', () => {
  it('marks shallow, provisional and single-shell beds', () => {
    const beds = [
      { burial_m: 0.99, shells: 5 },
      { burial_m: 1, shells: 4 },
      { burial_m: null, shells: 1 },
      { burial_m: 5, shells: 0 },
    ];
    expect(screenBeds(beds).map(({ bed, mark }) => [bed, mark])).toEqual([
      [0, 'shallow burial'],
      [1, 'provisional'],
      [2, 'one shell'],
      [2, 'provisional'],
    ]);
  });
});
