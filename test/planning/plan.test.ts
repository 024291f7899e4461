import { describe, expect, it } from 'vitest';
import type { AdjacentZonesRow, PlanRow } from '../../src/model/index.js';
import { boundedBy } from '../../src/planning/bracketing.js';
import { knownOrder } from '../../src/planning/known-order.js';
import { plan } from '../../src/planning/plan.js';
import { createRandom, studentTCdf } from '../../src/statistics/index.js';
import { cases } from '../house/effort.js';
import { datedCoast } from './dated-coast.js';
import { type MadeBed, madeFindings } from './findings.js';

const bed = (name: string, mean: number, shells: number, more: Partial<MadeBed> = {}): MadeBed => {
  const [section, own] = name.split('/');
  return { section, bed: own, mean, shells, ...more };
};
const ofKind = (rows: readonly PlanRow[], kind: PlanRow['kind']) => rows.filter((row) => row.kind === kind);

describe('plan: separate beds', () => {
  const beds = [bed('A/1', -1.5, 3), bed('B/1', -1.58, 6), bed('C/1', -2, 5), bed('D/1', -2.004, 5)];

  it('names every unresolved pair of neighbours, more shells for the bed that has fewer', () => {
    const [first, second] = ofKind(plan(madeFindings(beds)).rows, 'separate beds');
    expect(first).toMatchObject({ beds: ['A/1', 'B/1'], rank: 1 });
    expect(first.shells[0]).toBe(first.shells[1] + 3);
    expect(first.power).toBeGreaterThanOrEqual(0.8);
    expect(first.chance).toBeLessThan(first.power!);
    expect(first.settles).toMatch(/whether A\/1 is older than B\/1, with 8\d % power if the gap 0\.080 ± 0\.049/);
    expect(second).toMatchObject({ beds: ['C/1', 'D/1'], shells: [], total: null, power: null });
    expect(second.settles).toMatch(
      /^No number of shells is promised to split C\/1 and D\/1.*over 50 shells.*may truly be as old/,
    );
  });

  it('promises nothing where beds of one age differ as much between sections', () => {
    const [first] = ofKind(plan(madeFindings(beds, { spread: 0.06 })).rows, 'separate beds');
    expect(first.settles).toMatch(/no more than beds of one age differ between sections/);
  });

  it('ranks by what is settled in the whole order, not by the fewest shells', () => {
    // the pair of few shells stands alone; the one of more shells is tangled with two others
    const lone = [bed('A/1', -1, 4), bed('B/1', -1.1, 3)];
    const crowd = [
      bed('C/1', -2, 4),
      bed('D/1', -2.09, 4),
      bed('E/1', -2.03, 30),
      bed('F/1', -2.04, 30),
      bed('G/1', -2.035, 30),
    ];
    const rows = ofKind(plan(madeFindings([...lone, ...crowd])).rows, 'separate beds').filter(
      (row) => row.total !== null,
    );
    const worth = rows.map((row) => row.pairs_gained! / row.total!);
    expect([...worth].sort((a, b) => b - a)).toEqual(worth);
  });

  it('leaves out pairs that the field settles', () => {
    const relation = { lower: 'A/1', upper: 'A/2', verdict_after: 'tied' as const };
    const same = [bed('A/1', -1.5, 4), bed('A/2', -1.5, 4)];
    const free = madeFindings(same);
    expect(ofKind(plan(free).rows, 'separate beds')).toHaveLength(1);
    expect(ofKind(plan(madeFindings(same, { relations: [relation] })).rows, 'separate beds')).toHaveLength(0);
    const tied = { ...relation, kind: 'same' as const, verdict_after: 'agrees' as const };
    expect(ofKind(plan(madeFindings(same, { relations: [tied] })).rows, 'separate beds')).toHaveLength(0);
  });

  it('joins beds stated to be as old, as the order does', () => {
    const relations = [{ lower: 'B/1', upper: 'B/2', kind: 'same' as const }];
    const found = madeFindings([bed('A/1', -1.5, 5), bed('B/1', -1.44, 4), bed('B/2', -1.6, 4), bed('C/1', -3, 5)], {
      relations,
    });
    // in the order the deposit of B stands at -1.52
    const order = ['A/1', 'B/1', 'B/2', 'C/1'].map((key, at) => ({
      ...found.order[0],
      section: key[0],
      bed: key[2],
      rank: [1, 2, 2, 4][at],
      resolved: [false, null, true, null][at],
    }));
    const pairs = found.pairs.map((row) =>
      row.bed_a === 'A/1' && row.bed_b[0] === 'B'
        ? { ...row, p_a_older: 0.69 }
        : row.bed_a === 'B/1' && row.bed_b === 'B/2'
          ? { ...row, p_a_older: 0 }
          : row,
    );
    const rows = ofKind(plan({ ...found, order, pairs }).rows, 'separate beds');
    expect(rows).toHaveLength(1);
    expect(rows[0].gap).toBeCloseTo(0.02, 9);
    expect(rows[0].settles).toMatch(/split A\/1 and B\/1 \(as old as B\/2\)/);
    expect(ofKind(plan({ ...found, order, pairs }).rows, 'strengthen bed').map((row) => row.beds[0])).not.toContain(
      'B/2',
    );
  });

  it('takes the smaller gap where other beds pull two together in the order', () => {
    const found = madeFindings([bed('A/1', -1.5, 4), bed('B/1', -1.57, 4), bed('C/1', -3, 5)]);
    const alone = ofKind(plan(found).rows, 'separate beds')[0];
    const pairs = found.pairs.map((row) => (row.bed_b === 'B/1' ? { ...row, p_a_older: 0.8 } : row));
    const pulled = ofKind(plan({ ...found, pairs }).rows, 'separate beds')[0];
    expect(pulled.total).toBeGreaterThan(alone.total!);
    expect(pulled.settles).toMatch(/gap 0\.070 ± 0\.049 in ln\(D\/L\), in the order 0\.0\d+,/);
  });

  it('resolves a pair in 75 to 85 % of surveys with the shells it asks for, by its own criterion', () => {
    for (const [seed, gap, few] of [
      [1, 0.07, 3],
      [2, 0.05, 5],
      [3, 0.09, 2],
    ]) {
      const coast = [bed('A/1', -1.5, few), bed('B/1', -1.5 - gap, 4), bed('C/1', -2.5, 4), bed('D/1', -3.5, 4)];
      const [row] = ofKind(plan(madeFindings(coast)).rows, 'separate beds');
      expect(row.beds).toEqual(['A/1', 'B/1']);
      const random = createRandom(seed);
      const counts = coast.map(({ shells }, at) => shells + (at < 2 ? row.shells[at] : 0));
      const runs = 20000;
      let resolved = 0;
      for (let run = 0; run < runs; run++) {
        // a whole survey is drawn anew, and its scatter worked out from its own shells
        let squares = 0;
        const means = counts.map((count, at) => {
          const x = Array.from({ length: count }, () => coast[at].mean + 0.07 * random.normal());
          const mean = x.reduce((sum, value) => sum + value, 0) / count;
          squares += x.reduce((sum, value) => sum + (value - mean) ** 2, 0);
          return mean;
        });
        const df = counts.reduce((sum, count) => sum + count - 1, 0);
        const error = Math.sqrt((squares / df) * (1 / counts[0] + 1 / counts[1]));
        // probability of being older in the order: flat prior, scatter by its own posterior
        if (studentTCdf((means[0] - means[1]) / error, df) >= 0.95) resolved++;
      }
      expect(resolved / runs).toBeGreaterThan(0.75);
      expect(resolved / runs).toBeLessThan(0.85);
      expect(resolved / runs).toBeCloseTo(row.power!, 1.5);
    }
  });
});

describe('plan: strengthen bed', () => {
  it('puts the bed first whose shells settle most, and grows with the shells', () => {
    const beds = [
      bed('A/1', -1.5, 2),
      bed('B/1', -1.57, 20),
      bed('C/1', -1.44, 20),
      bed('D/1', -1.52, 3),
      bed('E/1', -3, 2),
    ];
    const rows = ofKind(plan(madeFindings(beds)).rows, 'strengthen bed');
    expect(rows.slice(0, 3).map((row) => [row.beds[0], row.total, row.rank])).toEqual([
      ['A/1', 3, 1],
      ['A/1', 5, 1],
      ['A/1', 10, 1],
    ]);
    expect(rows[1].pairs_gained).toBeGreaterThan(rows[0].pairs_gained!);
    expect(rows.some((row) => row.beds[0] === 'E/1')).toBe(false);
  });

  it('expects as many pairs as turn out to be resolved, over coasts drawn with errors', () => {
    const random = createRandom(9);
    let expected = 0;
    let turnedOut = 0;
    const s = 0.07;
    for (let run = 0; run < 3000; run++) {
      // the truth about means just measured, under a flat prior
      const measured = [-1.5, -1.56, -1.46];
      const counts = [3, 6, 9];
      const truth = measured.map((mean, at) => mean + (s / Math.sqrt(counts[at])) * random.normal());
      const fresh = truth[0] + (s / Math.sqrt(10)) * random.normal();
      const later = (3 * measured[0] + 10 * fresh) / 13;
      for (const at of [1, 2]) {
        const error = s * Math.sqrt(1 / 13 + 1 / counts[at]);
        if (Math.abs(later - measured[at]) > 1.6448536269514722 * error) turnedOut++;
      }
    }
    const beds = [bed('A/1', -1.5, 3), bed('B/1', -1.56, 6), bed('C/1', -1.46, 9)];
    // a hundred beds far off make the scatter as good as known
    const far = Array.from({ length: 100 }, (_, at) => bed(`X${at}/1`, 5 + at, 50));
    const rows = ofKind(plan(madeFindings([...beds, ...far]), { strengthen: 200 }).rows, 'strengthen bed');
    const known = knownOrder(madeFindings(beds));
    expected = rows.find((row) => row.beds[0] === 'A/1' && row.total === 10)!.pairs_gained!;
    // both pairs of A are unresolved now
    expect(known.olderThan(0, 1)).toBeLessThan(0.95);
    expect(known.olderThan(2, 0)).toBeLessThan(0.95);
    expect(expected).toBeCloseTo(turnedOut / 3000, 1);
  });
});

describe('plan: check bed', () => {
  it('asks first for the bed in the most reversed relations, and for both groups of a mixed one', () => {
    const beds = [
      bed('A/1', -1.5, 5),
      bed('A/2', -1.2, 3),
      bed('A/3', -1.6, 5),
      bed('B/1', -2, 6, { marks: ['mixed age'] }),
    ];
    const reversed = { verdict: 'reversed', verdict_after: 'reversed' } as const;
    const found = madeFindings(beds, {
      relations: [
        { lower: 'A/1', upper: 'A/2', ...reversed },
        { lower: 'A/3', upper: 'A/2', ...reversed },
      ],
    });
    const rows = ofKind(plan(found).rows, 'check bed');
    expect(rows.map((row) => row.beds[0])).toEqual(['A/2', 'A/1', 'A/3', 'B/1']);
    expect(rows[0].settles).toMatch(/reversed relations to A\/1 and A\/3/);
    expect(rows[3].settles).toMatch(/shells of two ages/);
    for (const row of rows) expect(row.total).toBeGreaterThanOrEqual(5);
  });

  it('has nothing to check on a sound coast', () => {
    expect(ofKind(plan(madeFindings([bed('A/1', -1, 5), bed('B/1', -2, 5)])).rows, 'check bed')).toEqual([]);
  });
});

describe('plan: separate zones', () => {
  const zones = (difference: number, overlap: number, shells: number, spread = 0) => {
    const beds = [bed('A/1', -1.5, shells, { zone: 'Z2' }), bed('B/1', -1.5 - difference, shells, { zone: 'Z1' })];
    const row = { clock: 'Invenus THAA Ile', older: 'Z2', younger: 'Z1', difference, overlap, verdict: 'not resolved' };
    const found = madeFindings(beds, { spread, rest: { adjacent_zones: [row as AdjacentZonesRow] } });
    return ofKind(plan(found).rows, 'separate zones');
  };

  it('asks for the shells that a comparison of ranks needs to reach the level at all', () => {
    const [row] = zones(0.4, 0.01, 3);
    expect(row).toMatchObject({ beds: ['A/1', 'B/1'], shells: [1, 1], total: 2 });
    expect(row.settles).toMatch(/whether Z2 and Z1 are distinct/);
  });

  it('promises nothing of zones whose shells overlap too much, and new beds where the spread is what hides them', () => {
    expect(zones(0.1, 0.6, 5)[0].settles).toMatch(
      /^No number of shells is promised to part Z2 and Z1: their shells overlap by 0\.60/,
    );
    expect(zones(0.3, 0.2, 8, 0.1)[0]).toMatchObject({ total: null, shells: [] });
    expect(zones(0.32, 0.2, 8, 0.1)[0].settles).toMatch(/new beds? of each|No number/);
  });

  it('leaves distinct zones alone', () => {
    const found = madeFindings([bed('A/1', -1, 5, { zone: 'Z2' }), bed('B/1', -2, 5, { zone: 'Z1' })], {
      rest: { adjacent_zones: [{ clock: 'Invenus THAA Ile', verdict: 'distinct' } as AdjacentZonesRow] },
    });
    expect(ofKind(plan(found).rows, 'separate zones')).toEqual([]);
  });
});

describe('plan: date beds', () => {
  it('brackets at least as many beds as any other choice of up to 3, on simulated coasts', () => {
    const random = createRandom(31);
    for (let run = 0; run < 12; run++) {
      const { findings } = datedCoast(random, { perZone: 4, step: 0.1 + 0.02 * run, spread: 0.03 });
      const known = knownOrder(findings);
      const size = known.beds.length;
      for (const row of ofKind(plan(findings).rows, 'date beds')) {
        expect(row.proven_best).toBe(true);
        let most = 0;
        for (let a = 0; a < size; a++) {
          if (row.rank === 1) most = Math.max(most, boundedBy(known, [a]).bracketed);
          for (let b = a + 1; row.rank > 1 && b < size; b++) {
            if (row.rank === 2) most = Math.max(most, boundedBy(known, [a, b]).bracketed);
            for (let c = b + 1; row.rank === 3 && c < size; c++) {
              most = Math.max(most, boundedBy(known, [a, b, c]).bracketed);
            }
          }
        }
        expect(row.beds_bracketed).toBe(most);
        expect(
          boundedBy(
            known,
            row.beds.map((key) => known.indexOf.get(key)!),
          ).bracketed,
        ).toBe(most);
      }
    }
  });

  it('takes the sound one of beds that bracket as many, and says what speaks against the others', () => {
    const beds = [
      bed('A/1', -1, 6, { zone: 'Z3' }),
      bed('B/1', -1, 6, { zone: 'Z3', marks: ['mixed age'] }),
      bed('C/1', -1.5, 6, { zone: 'Z2' }),
      bed('D/1', -2, 2, { zone: 'Z1' }),
    ];
    const rows = ofKind(plan(madeFindings(beds)).rows, 'date beds');
    expect(rows[1]).toMatchObject({ beds: ['A/1', 'D/1'], beds_bracketed: 1 });
    expect(rows[1].settles).toMatch(
      /No other 2 beds bracket more\. But D\/1 rests on 2 shells; C\/1 in its place brackets 0/,
    );
  });

  it('keeps the budget', () => {
    const found = madeFindings([bed('A/1', -1, 6), bed('B/1', -2, 6), bed('C/1', -3, 6)]);
    expect(ofKind(plan(found, { dates: 2 }).rows, 'date beds')).toHaveLength(2);
    expect(ofKind(plan(found, { dates: 0 }).rows, 'date beds')).toHaveLength(0);
    expect(() => plan(found, { dates: Number.NaN })).toThrow(/dates must be a whole number/);
  });
});

describe('plan of any findings', () => {
  it('gives the same lines without pairs.csv, as for more than 400 beds', () => {
    const { findings } = datedCoast(createRandom(41), { perZone: 4 });
    const without = plan({ ...findings, pairs: [] }).rows.map((row) => [row.kind, row.beds.join()]);
    // pairs of the made findings take the scatter as known, the means Student's t: the lines agree but at the very limit
    const withPairs = plan(findings).rows.map((row) => [row.kind, row.beds.join()]);
    expect(without.filter(([kind]) => kind === 'separate beds').length).toBeGreaterThanOrEqual(
      withPairs.filter(([kind]) => kind === 'separate beds').length,
    );
  });

  it('has no lines and no fault where there is nothing', () => {
    expect(plan(madeFindings([])).rows).toEqual([]);
    expect(plan(madeFindings([bed('A/1', -1, 1)])).rows.map((row) => row.kind)).toEqual(['date beds']);
  });

  // the longest may grow with the square of the beds
  const many = cases(500, 1000);
  it(`plans ${many} beds in seconds`, () => {
    const { findings } = datedCoast(createRandom(42), { perZone: many / 4 });
    // of the processor, so that a busy machine fails no test
    const before = process.cpuUsage();
    plan({ ...findings, pairs: [] });
    const { user, system } = process.cpuUsage(before);
    expect((user + system) / 1e6).toBeLessThan(30 * (many / 1000) ** 2);
  });

  it('states its criterion', () => {
    expect(plan(madeFindings([])).criterion).toMatch(/probability of 95 % or more.*as in order\.csv.*power of 80 %/);
  });
});
