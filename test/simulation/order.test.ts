import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/index.js';
import { DEFAULT_OPTIONS, type Findings } from '../../src/model/index.js';
import { runTask } from '../../src/tasks.js';
import { cases } from '../house/effort.js';
import { type SimulatedCoast, simulateCoast } from './coast.js';

/*
 * Rates of the order and of the relation checks on simulated coasts of 30 beds, 4 to 8 shells a bed and 5 % between shells.
 * The stated rates are those promised. Pairs, ranks and relations of 6 coasts are hundreds already, and of 6 relations upside
 * down none may be missed; the long tests take 20 coasts.
 */
const COASTS = cases(6, 20);
const SEEDS = Array.from({ length: COASTS }, (_, at) => at + 1);
const host = { map: async (tasks: readonly Parameters<typeof runTask>[0][]) => tasks.map(runTask), progress: () => {} };

async function run(options: Parameters<typeof simulateCoast>[0]): Promise<{ coast: SimulatedCoast; found: Findings }> {
  const coast = simulateCoast(options);
  return { coast, found: await analyse(coast.survey, { ...DEFAULT_OPTIONS, simulations: 99 }, host) };
}

describe.each([
  { name: '4 zones 30 % apart', options: { upsideDown: 1 } },
  { name: '4 zones 30 % apart, 3 % between beds of a zone', options: { upsideDown: 1, spread: 0.03 } },
  { name: 'a continuum', options: { zones: 'continuum' as const, continuumRange: 0.8 } },
])('order on coasts of $name', ({ options }) => {
  it('puts distant pairs right, holds true ranks, and calls reversed only what is', { timeout: 120_000 }, async () => {
    let [pairs, right, held, beds] = [0, 0, 0, 0];
    let [swapped, told, sound, accused] = [0, 0, 0, 0];
    for (const seed of SEEDS) {
      const { coast, found } = await run({ ...options, seed });
      const truth = coast.truth.beds;
      const order = found.order.map((row) => ({ row, bed: truth.get(`${row.section}/${row.bed}`)! }));
      order.forEach(({ row, bed }, at) => {
        for (const later of order.slice(at + 1)) {
          if (Math.abs(bed.x - later.bed.x) < 0.1) continue;
          pairs++;
          if (bed.x > later.bed.x) right++;
        }
        // beds of one true ratio share a mean rank
        const before = order.filter((other) => other.bed.x > bed.x + 1e-12).length;
        const same = order.filter((other) => Math.abs(other.bed.x - bed.x) <= 1e-12).length;
        const rank = before + (same + 1) / 2;
        beds++;
        if (row.rank_low <= rank && rank <= row.rank_high) held++;
      });
      const upside = new Set(coast.truth.upsideDown.map(({ lower, upper }) => `${lower}>${upper}`));
      for (const relation of found.relations) {
        const reversed = relation.verdict_after === 'reversed';
        if (upside.has(`${relation.lower}>${relation.upper}`)) {
          swapped++;
          if (reversed) told++;
        } else if (truth.get(relation.lower)!.extent >= truth.get(relation.upper)!.extent - 1e-12) {
          sound++;
          if (reversed) accused++;
        }
      }
    }
    expect(pairs).toBeGreaterThan(50 * COASTS);
    expect(right / pairs).toBeGreaterThanOrEqual(0.98);
    expect(held / beds).toBeGreaterThanOrEqual(0.93);
    expect(sound).toBeGreaterThan(15 * COASTS);
    expect(accused / sound).toBeLessThanOrEqual(0.02);
    if ('upsideDown' in options) {
      expect(swapped).toBe(COASTS);
      expect(told / swapped).toBeGreaterThanOrEqual(0.95);
    }
  });
});
