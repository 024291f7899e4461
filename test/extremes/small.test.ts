import { describe, expect, it } from 'vitest';
import { found, said } from './found.js';
import { foursOfBeds, oneSection, shellsTable } from './surveys.js';

describe('surveys of almost nothing', () => {
  it('one shell: too few beds to group, and no order to speak of', async () => {
    const { findings } = await found({ shells: shellsTable([['A', 'b', 1, 1, 0.3]]) });
    expect(findings.clocks[0]).toMatchObject({ verdict: 'too few beds', shells: 1, beds: 1, scatter: 0.07 });
    expect(findings.order).toHaveLength(1);
    expect(findings.order[0]).toMatchObject({ rank: 1, rank_low: 1, rank_high: 1, p_older_than_next: null });
    expect(findings.beds[0].marks).toContain('provisional');
    expect(said(findings)).toMatch(/0\.07 is assumed/);
  });

  it('one bed of six shells: its scatter is measured, its zone is not', async () => {
    const shells = shellsTable([0.3, 0.31, 0.29, 0.33, 0.28, 0.3].map((ratio, k) => ['A', 'b', 1, k, ratio] as const));
    const { findings } = await found({ shells });
    // R: sd(log(c(.3,.31,.29,.33,.28,.3))) (computed)
    expect(findings.clocks[0].scatter).toBeCloseTo(0.0565025, 6);
    expect(findings.clocks[0].verdict).toBe('too few beds');
  });

  it('two beds: the lower is the older where the ratios say so', async () => {
    const { findings } = await found({ shells: oneSection(2) });
    expect(findings.order.map(({ bed }) => bed)).toEqual(['b0', 'b1']);
    expect(findings.relations[0].verdict).toBe('agrees');
  });

  it('two taxa with one shell each are never put in one order', async () => {
    const shells = 'section,bed,taxon,shell,level,A/I\nA,low,Mya,1,1,0.3\nA,high,Patella,1,2,0.2\n';
    const { findings } = await found({ shells });
    expect(findings.clocks.map(({ taxon }) => taxon)).toEqual(['Mya', 'Patella']);
    expect(findings.order.map(({ rank }) => rank)).toEqual([1, 1]);
    expect(findings.relations.every(({ verdict }) => verdict === 'not tested')).toBe(true);
  });

  it('only published means', async () => {
    const shells =
      'section,bed,taxon,level,n,A/I,A/I sd\nA,low,Mya,1,5,0.4,0.03\nA,high,Mya,2,6,0.2,0.02\nB,only,Mya,1,7,0.41,0.03\n';
    const { findings, report } = await found({ shells });
    expect(findings.shells).toEqual([]);
    expect(findings.clocks[0].shells).toBe(18);
    expect(findings.order.at(-1)?.bed).toBe('high');
    expect(report).toContain('A/high');
  });

  it('every bed one shell: a scatter is assumed, and no bed is called sure of its own', async () => {
    const { findings } = await found({ shells: foursOfBeds(60, 1) }, { simulations: 99 });
    expect(findings.clocks[0].scatter).toBe(0.07);
    expect(findings.beds.every(({ marks }) => marks.includes('assumed scatter') && marks.includes('provisional'))).toBe(
      true,
    );
    expect(said(findings)).toMatch(/0\.07 is assumed/);
  });
});

describe('surveys without a difference', () => {
  const alike = (step: number) =>
    shellsTable(
      Array.from({ length: 10 }, (_, b) =>
        [0, 1, 2].map((k) => [`S${b % 3}`, `b${b}`, b + 1, k, Number((0.3 + step * (3 * b + k)).toFixed(7))] as const),
      ).flat(),
    );

  it.each([
    ['all ratios equal', 0],
    ['ratios 1e-6 apart', 1e-6],
  ])('%s: one zone, a scatter that is told to be assumed, and nothing reversed', async (_, step) => {
    const { findings } = await found({ shells: alike(step) });
    expect(findings.clocks[0]).toMatchObject({ verdict: 'one zone', zones: 1, scatter: 0.005 });
    expect(said(findings)).toMatch(/closer than one shell analysed twice/);
    expect(findings.adjacent_zones).toEqual([]);
    expect(findings.relations.filter(({ verdict }) => verdict === 'reversed')).toEqual([]);
    expect(findings.shells.every(({ status }) => status === 'kept')).toBe(true);
    // beds of different sections can't be told apart
    for (const pair of findings.pairs) {
      if (pair.bed_a.split('/')[0] === pair.bed_b.split('/')[0]) continue;
      expect(Math.max(pair.p_a_older, 1 - pair.p_a_older)).toBeLessThan(0.9999);
    }
  });
});

describe('beds that lose all their shells', () => {
  it('stay in the tables, without a mean and without a zone', async () => {
    const rows = ['A', 'B'].flatMap((section, s) =>
      ['low', 'mid', 'high'].flatMap((bed, b) =>
        [0, 1, 2, 3].map((k) => {
          const ratio = (0.4 - 0.13 * b) * (1 + 0.02 * k);
          const serine = section === 'A' && bed === 'mid' ? 0.95 : 0.3;
          return `${section},${bed},Mya,${k},${b + 1},${ratio.toFixed(3)},${(ratio * 0.7).toFixed(3)},${serine + 0.01 * s}\n`;
        }),
      ),
    );
    const { findings } = await found({
      shells: `section,bed,taxon,shell,level,D/L Asx,A/I,L-Ser/L-Asp\n${rows.join('')}`,
    });
    const bed = findings.beds.find((row) => row.section === 'A' && row.bed === 'mid');
    expect(bed).toMatchObject({ shells: 0, set_aside: 4, dl_mean: null, log_mean: null, log_se: null, zone: null });
    expect(findings.shells.filter((row) => row.section === 'A' && row.bed === 'mid')).toHaveLength(4);
    expect(findings.order.some((row) => row.section === 'A' && row.bed === 'mid')).toBe(false);
    for (const row of findings.relations.filter(({ lower, upper }) => `${lower} ${upper}`.includes('A/mid'))) {
      expect(row).toMatchObject({ verdict_after: 'not tested' });
    }
  });

  it('all of them: the survey is told to have nothing left, without a fault', async () => {
    const rows = ['low', 'high'].flatMap((bed, b) =>
      [0, 1, 2].map((k) => `A,${bed},Mya,${k},${b + 1},${0.4 - 0.1 * b},1.1\n`),
    );
    const { findings } = await found({ shells: `section,bed,taxon,shell,level,D/L Asx,L-Ser/L-Asp\n${rows.join('')}` });
    expect(findings.order).toEqual([]);
    expect(findings.beds.every(({ shells }) => shells === 0)).toBe(true);
    expect(findings.clocks[0].verdict).toBe('too few beds');
  });
});
