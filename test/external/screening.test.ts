import { describe, expect, it } from 'vitest';
import { DEFAULT_OPTIONS } from '../../src/model/index.js';
import { rateOrder, screenBeds, screenShells } from '../../src/screening/index.js';
import { createRandom } from '../../src/statistics/index.js';
import { shell } from '../screening/shells.js';

describe('published facts behind screening', () => {
  it('limits are those of common practice', () => {
    // L-Ser/L-Asp 0.8, burial 1 m, 5 shells a bed: common practice.
    expect(DEFAULT_OPTIONS.screening).toMatchObject({ serine_ratio: 0.8, burial_m: 1, shells_a_bed: 5 });
    expect(screenBeds([{ burial_m: 0.5, shells: 4 }]).map(({ mark }) => mark)).toEqual([
      'shallow burial',
      'provisional',
    ]);
  });

  it('finds the unsuitable shells where they are 6 % of 481, and few others', () => {
    // 6 % of 481 shells were unsuitable; high serine and the Asp–Glu D/L relation are among the signs: Kosnik and
    // Kaufman
    // 2008, Quaternary Geochronology 3, 328–341, abstract, seen. Reproducibility: Asp 2 %, Glu 3 %: Kaufman and Manley
    // 1998, seen. The shells here are invented.
    const random = createRandom(481);
    const bad = new Set(Array.from({ length: 29 }, (_, i) => 7 + i * 16));
    const shells = Array.from({ length: 481 }, (_, i) => {
      const age = -1.6 + 0.3 * (i % 4);
      const own = 0.04 * random.normal();
      const asp = Math.exp(age + own + 0.02 * random.normal() - (bad.has(i) ? 0.35 : 0));
      const glu = Math.exp(1.2 * age - 0.4 + own + 0.03 * random.normal());
      const serine_ratio = bad.has(i) && i % 2 === 1 ? 0.8 + 0.3 * random.uniform() : 0.3 + 0.3 * random.uniform();
      return shell({ shell: String(i), ratios: { Asx: asp, Glx: glu }, serine_ratio });
    });
    const marked = new Set(screenShells(shells).map((mark) => mark.shell));
    expect([...bad].every((i) => marked.has(i))).toBe(true);
    expect([...marked].filter((i) => !bad.has(i)).length).toBeLessThanOrEqual(2);
  });

  it('lets the published order of rates stand, and marks a shell that turns it round', () => {
    // Asp >= Ala > Leu > Val in Mercenaria and Anadara: Mirecki, MS thesis, University of Delaware, handle/19716/13229,
    // seen.
    const random = createRandom(2);
    const shells = Array.from({ length: 60 }, (_, i) => {
      const x = -1.8 + 0.25 * (i % 4);
      const error = () => 0.04 * random.normal();
      const ratios = {
        Asx: Math.exp(x + 0.3 + error()),
        Ala: Math.exp(x + 0.25 + error()),
        Leu: Math.exp(x - 0.3 + error()),
        Val: Math.exp(x - 0.7 + error()),
      };
      return shell({ shell: String(i), ratios });
    });
    expect(rateOrder(shells, DEFAULT_OPTIONS.screening)).toEqual([]);
    const turned = shells.map((own, i) =>
      i === 5 ? { ...own, ratios: { ...own.ratios, Val: 1.3 * (own.ratios.Leu ?? 1) } } : own,
    );
    expect(rateOrder(turned, DEFAULT_OPTIONS.screening).map((mark) => mark.shell)).toEqual([5]);
  });
});
