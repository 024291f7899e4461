import { describe, expect, it } from 'vitest';
import { simulateCoast } from '../simulation/coast.js';
import { analyseInPlace, surveyOfTables } from './in-place.js';

describe('several taxa', () => {
  const taxa = simulateCoast({ seed: 3, secondTaxon: { paired: 8, alone: 8, slope: 1.1 } });

  it('each have their own clock, and the reference taxon one more that holds every bed once', async () => {
    const findings = await analyseInPlace(taxa.survey, { reference_taxon: 'Invenus' });
    const all = 'all taxa as Invenus THAA';
    expect(findings.clocks.filter((clock) => clock.main).map((clock) => clock.clock)).toEqual([
      all,
      'Invenus THAA Ile',
      'Altera THAA Ile',
    ]);
    const beds = findings.beds.filter((bed) => bed.clock === all);
    expect(new Set(beds.map((bed) => `${bed.section}/${bed.bed}`)).size).toBe(30);
    expect(beds).toHaveLength(30);
    expect(findings.order.filter((row) => row.clock === all)).toHaveLength(30);
    expect(findings.pairs.filter((row) => row.clock === all)).toHaveLength((30 * 29) / 2);
    expect(findings.correlation.some((row) => row.clock === all)).toBe(true);
    expect(findings.relations.filter((row) => row.clock === all && row.verdict_after === 'not tested')).toEqual([]);
    // every shell keeps its one row
    expect(findings.shells).toHaveLength(findings.shell_ratios.length);
    expect(findings.shells.some((row) => row.clock === all)).toBe(false);
    const kinds = (taxon: string) => beds.filter((bed) => bed.taxon === taxon);
    expect(kinds('Invenus + Altera')).toHaveLength(8);
    expect(kinds('Altera')).toHaveLength(8);
    for (const bed of beds) expect(bed.marks.includes('converted taxon')).toBe(bed.taxon !== 'Invenus');
    const [conversion] = findings.conversions;
    expect(conversion).toMatchObject({ clock: all, verdict: 'converted', converted_beds: 16, slope_fixed: false });
    expect(Math.abs(conversion.slope! - 1 / 1.1)).toBeLessThan(3 * conversion.slope_se!);
    // errors of converted beds are those of their own mean and more
    for (const bed of kinds('Altera')) {
      const own = findings.beds.find(
        (row) => row.clock === 'Altera THAA Ile' && row.section === bed.section && row.bed === bed.bed,
      )!;
      expect(bed.log_se!).toBeGreaterThan(own.log_se! * conversion.slope!);
      expect(findings.evidence.some((e) => e.clock === all && e.name === `${bed.section}/${bed.bed}`)).toBe(true);
    }
  });

  it('say why they are not converted', async () => {
    const { survey } = simulateCoast({ seed: 3, secondTaxon: { paired: 1, alone: 8 } });
    const refused = await analyseInPlace(survey, { reference_taxon: 'Invenus' });
    expect(refused.conversions).toMatchObject([{ clock: null, verdict: 'refused', paired_beds: [expect.any(String)] }]);
    expect(refused.remarks.some(({ text }) => /Altera \(THAA\) was not converted.*only one bed/.test(text))).toBe(true);
    expect(refused.clocks.some((clock) => clock.clock.startsWith('all taxa'))).toBe(false);
    const one = await analyseInPlace(simulateCoast({ seed: 3 }).survey, { reference_taxon: 'Invenus' });
    expect(one.conversions).toEqual([]);
    expect(one.remarks.some(({ text }) => /nothing to convert/.test(text))).toBe(true);
  });
});

describe('surveys at the edge', () => {
  const { survey } = simulateCoast({ seed: 4, gradient: { slope: 0.06 } });

  it('with two fractions have a clock of each', async () => {
    const free = survey.analyses.map((row) => ({
      ...row,
      fraction: 'FAA' as const,
      ratios: { Ile: row.ratios.Ile! * 1.4 },
    }));
    const both = { ...survey, analyses: [...survey.analyses, ...free] };
    const findings = await analyseInPlace(both, { gradient: 'cmat_c', reference_taxon: 'Invenus' });
    expect(findings.clocks.map((clock) => clock.clock)).toEqual(['Invenus THAA Ile', 'Invenus FAA Ile']);
    expect(findings.shells).toHaveLength(2 * survey.analyses.length);
  });

  it.each([1, 3, 6])('of one bed with %i shells are told of as they are', async (n) => {
    const [bed] = survey.beds;
    const own = survey.analyses.filter((row) => row.section === bed.section && row.bed === bed.bed).slice(0, n);
    const findings = await analyseInPlace(
      { ...survey, beds: [bed], analyses: own },
      { gradient: 'cmat_c', staircase: 'coast', reference_taxon: 'Invenus' },
    );
    expect(findings.clocks).toMatchObject([{ beds: 1, shells: own.length, verdict: 'too few beds' }]);
    expect(findings.order).toMatchObject([{ rank: 1, rank_low: 1, rank_high: 1 }]);
  });
});

describe('published summaries', () => {
  it('stand beside shells in means, scatter, zones, order and relations', async () => {
    const rows = ['section,bed,level,taxon,shell,n,A/I,A/I sd'];
    for (const [shell, ratio] of [0.142, 0.15, 0.146, 0.139, 0.151].entries())
      rows.push(`Shell Bay,top,2,T,${shell},,${ratio},`);
    for (const [shell, ratio] of [0.41, 0.4, 0.43, 0.39].entries()) rows.push(`Shell Bay,low,1,T,${shell},,${ratio},`);
    rows.push('Table Point,top,2,T,,8,0.147,0.009', 'Table Point,low,1,T,,6,0.405,0.026', 'Lone Rock,bed,1,T,,,0.4,');
    // one bed holds both: four shells of its own and a published six
    rows.push('Shell Bay,low,1,T,,6,0.405,0.02');
    const findings = await analyseInPlace(await surveyOfTables({ shells: rows.join('\n') }));
    const bed = (key: string) => findings.beds.find((row) => `${row.section}/${row.bed}` === key)!;
    expect(findings.clocks).toMatchObject([{ beds: 5, shells: 5 + 4 + 8 + 6 + 1 + 6, verdict: 'zones', zones: 2 }]);
    expect(bed('Shell Bay/low').shells).toBe(10);
    expect(bed('Shell Bay/low').dl_mean).toBeCloseTo((0.41 + 0.4 + 0.43 + 0.39 + 6 * 0.405) / 10, 10);
    expect(findings.beds.map((row) => row.zone)).toEqual(findings.beds.map((row) => (row.bed === 'top' ? 'Z1' : 'Z2')));
    expect(bed('Lone Rock/bed').shells).toBe(1);
    expect(bed('Lone Rock/bed').marks).toContain('one shell');
    expect(bed('Lone Rock/bed').log_se).toBeCloseTo(findings.clocks[0].scatter, 10);
    expect(findings.problems.some(({ message }) => /counts as one shell/.test(message))).toBe(true);
    expect(findings.relations.map((row) => row.verdict_after)).toEqual(['agrees', 'agrees']);
    expect(findings.order).toHaveLength(5);
    // df: 4 + 3 of shells, 7 + 5 + 5 published
    const squares = (values: number[]) => {
      const logs = values.map(Math.log);
      const mean = logs.reduce((sum, v) => sum + v, 0) / logs.length;
      return logs.reduce((sum, v) => sum + (v - mean) ** 2, 0);
    };
    const published = (mean: number, sd: number, n: number) => (n - 1) * Math.log1p((sd / mean) ** 2);
    const total =
      squares([0.142, 0.15, 0.146, 0.139, 0.151]) +
      squares([0.41, 0.4, 0.43, 0.39]) +
      published(0.147, 0.009, 8) +
      published(0.405, 0.026, 6) +
      published(0.405, 0.02, 6);
    expect(findings.clocks[0].scatter).toBeCloseTo(Math.sqrt(total / 24), 10);
  });

  it('of several amino acids, with and without shells, make an index or a clock without falling over', async () => {
    const head = 'section,bed,level,taxon,shell,n,D/L Ile,D/L Ile sd,D/L Val,D/L Val sd';
    const tables = [
      'P,a,1,T,,6,0.4,0.02,0.3,0.02',
      'P,b,2,T,,6,0.2,0.01,0.15,0.01',
      'Q,a,1,T,,6,0.41,0.02,0.31,0.02',
      'Q,b,2,T,,6,0.21,0.01,0.14,0.01',
    ];
    const only = await analyseInPlace(await surveyOfTables({ shells: [head, ...tables].join('\n') }));
    expect(only.clocks.filter((clock) => clock.main)).toMatchObject([{ beds: 4, shells: 24 }]);
    expect(only.relations.map((row) => row.verdict_after)).toEqual(['agrees', 'agrees']);
    const shells = [0.2, 0.21, 0.19, 0.4, 0.42, 0.38].map(
      (ratio, i) => `R,${i < 3 ? 'b' : 'a'},${i < 3 ? 2 : 1},T,${i},,${ratio},,${0.75 * ratio},`,
    );
    const both = await analyseInPlace(await surveyOfTables({ shells: [head, ...tables, ...shells].join('\n') }));
    expect(both.clocks.filter((clock) => clock.main)).toMatchObject([{ beds: 6, shells: 30 }]);
    expect(both.relations.map((row) => row.verdict_after)).toEqual(['agrees', 'agrees', 'agrees']);
  });
});
