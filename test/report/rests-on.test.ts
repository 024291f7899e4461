import { describe, expect, it } from 'vitest';
import type { ConversionFinding, Findings } from '../../src/model/index.js';
import { renderReport } from '../../src/report/index.js';
import { type FixtureOptions, fixture } from './fixture.js';

const words = (markup: string) => markup.replace(/<[^>]+>/g, '').replace(/\s+/g, ' ');
const partOf = (html: string, id: string) =>
  html.match(new RegExp(`<section id="${id}"[\\s\\S]*?</section>`))?.[0] ?? '';
const drawn = new WeakMap<Findings, string>();

/** The page of these findings, drawn once. */
const page = (findings: Findings) => {
  const html = drawn.get(findings) ?? renderReport(findings);
  drawn.set(findings, html);
  return html;
};
const part = (findings: Findings, id: string) => partOf(page(findings), id);

describe('what to collect or date next', () => {
  it('says the lines in words, has a table of all, and the criterion', () => {
    const findings = fixture();
    const next = part(findings, 'next');
    const text = words(next);
    const dated = findings.plan.filter((row) => row.kind === 'date beds');
    expect(dated.length).toBeGreaterThan(0);
    for (const row of dated) expect(text).toContain(row.settles);
    expect(text).toContain(findings.plan_criterion);
    for (const note of findings.plan_notes) expect(text).toContain(note);
    const table = next.slice(next.indexOf('<details>'));
    expect(table.match(/<tr/g)).toHaveLength(findings.plan.length + 1);
    // every bed it names can be lit up
    expect(next.match(/<li data-b="\d+/g)!.length).toBeGreaterThan(0);
  });

  it('says why there is no plan', () => {
    const text = words(part({ ...fixture(), plan: [], plan_criterion: '', plan_notes: ['Too many beds.'] }, 'next'));
    expect(text).toContain('Too many beds.');
    expect(part({ ...fixture(), plan: [], plan_criterion: '', plan_notes: [] }, 'next')).toBe('');
  });
});

describe('methods', () => {
  const methods = (options: FixtureOptions, changes: Partial<Findings> = {}) =>
    part(Object.keys(changes).length > 0 ? { ...fixture(options), ...changes } : fixture(options), 'methods');

  it('number the sources as they come, name each, and list no other', () => {
    for (const options of [
      {},
      { gradient: true },
      { aminoAcids: ['Ile'] as const },
      { verdict: 'too few beds' as const },
    ]) {
      const html = methods(options);
      const text = words(html.slice(0, html.indexOf('<h3>Settings')));
      const numbers = [...text.matchAll(/ \((\d+(?:, \d+)*)\)/g)].flatMap((match) => match[1].split(', ').map(Number));
      const firsts = [...new Set(numbers)];
      expect(firsts).toEqual(firsts.map((_, i) => i + 1));
      const list = html.slice(html.indexOf('<ol class="sources">'));
      expect(list.slice(0, list.indexOf('</ol>')).match(/<li>/g)).toHaveLength(firsts.length);
    }
  });

  it('speak of what ran and of nothing else', () => {
    const full = words(methods({ gradient: true }));
    for (const said of [
      'linear discriminant',
      'k-means',
      'slope of the log ratio along cmat_c',
      'gap statistic',
      'Gibbs',
    ])
      expect(full).toContain(said);
    expect(full).not.toMatch(
      /bootstrap of the likelihood ratio|Taxa are put|Laboratories|staircase follow|Published means/,
    );
    const bare = words(
      methods(
        { aminoAcids: ['Ile'], verdict: 'too few beds', sections: 1, beds: 1, shells: 3 },
        {
          zone_counts: [],
          diagnostics: [],
          relations: [],
          sections: [],
          plan: [],
        },
      ),
    );
    expect(bare).toContain('Too few beds have a mean');
    expect(bare).not.toMatch(
      /discriminant|k-means|gap statistic|mixture|Gibbs|minimum cut|order-restricted|power of the/,
    );
    const evidence = [
      {
        clock: 'x',
        about: 'clock' as const,
        name: 'x',
        sentences: ['A bootstrap of 4 zones against 3 gives p = 0.01.'],
      },
    ];
    expect(words(methods({}, { evidence }))).toContain('a parametric bootstrap of the likelihood ratio decides');
    const inputs = [{ role: 'standards' as const, file: 's.csv', sha256: 'ab'.repeat(32), rows: 3 }];
    expect(words(methods({}, { inputs }))).toContain('Laboratories were put on one scale');
  });
});

describe('what numbers are worth', () => {
  it('is said of stability, and of p-values of groups found in the same data', () => {
    const html = page(fixture());
    expect(words(partOf(html, 'findings'))).toContain(
      'test groups that were found in these same data and so come out too small',
    );
    expect(words(partOf(html, 'findings'))).toContain('Stability: how much of a zone comes back');
    expect(words(partOf(html, 'number-of-zones'))).toContain('found in the same data flatters them');
    expect(words(partOf(page(fixture({ verdict: 'continuum' })), 'number-of-zones'))).not.toContain('flatters');
  });

  it('is said at the head of every part and with every table that rests on an assumed scatter', () => {
    const findings = fixture({ gradient: true });
    const beds = findings.beds.map((bed) => ({ ...bed, marks: [...bed.marks, 'assumed scatter' as const] }));
    const html = page({ ...findings, beds });
    const note = 'rests on an assumed scatter between shells of one bed: 0.061';
    const ids = [...html.matchAll(/<section id="([^"]+)"/g)].map((match) => match[1]);
    for (const id of ids.filter((one) => !['tables', 'methods', 'cautions'].includes(one)))
      expect(words(partOf(html, id)), id).toContain(note);
    for (const table of partOf(html, 'tables').split('<details>').slice(1))
      expect(words(table).includes(note), table.slice(0, 80)).toBe(!table.includes('Warnings about the input'));
    expect(words(partOf(html, 'methods'))).toContain('scatter is assumed to be 0.061');
    expect(words(page(findings))).not.toContain('assumed scatter between');
  });
});

describe('several taxa on one scale', () => {
  const findings = fixture({ taxa: ['Patellina', 'Cardita'] });
  const clock = findings.clocks[0].clock;
  const conversion: ConversionFinding = {
    clock,
    taxon: 'Cardita',
    reference: 'Patellina',
    fraction: 'THAA',
    from_clock: findings.clocks.at(-1)!.clock,
    to_clock: clock,
    paired_beds: ['a/1', 'b/2', 'c/3'],
    slope: 1,
    slope_se: 0,
    slope_fixed: true,
    intercept: -0.2,
    intercept_se: 0.03,
    extra_scatter: 0,
    chi_squared: 2.5,
    df: 2,
    converted_beds: 7,
    verdict: 'converted',
    reason: 'Only 3 pairs.',
  };

  it('are spoken of as all taxa, and the conversion is shown with its errors', () => {
    const html = page({ ...findings, conversions: [conversion] });
    expect(words(partOf(html, 'findings'))).toContain(
      'shells of all taxa (Patellina and Cardita), put on the scale of Patellina, from',
    );
    const taxa = words(partOf(html, 'taxa'));
    for (const said of ['converted', '1 (fixed)', '−0.2 ± 0.03', '2.5 (2)', 'Only 3 pairs.'])
      expect(taxa).toContain(said);
    expect(words(partOf(html, 'methods'))).toContain('Taxa are put on the scale of Patellina');
  });

  it('that were refused keep their own words, and the refusal is shown', () => {
    const refused = { ...conversion, clock: null, slope: null, verdict: 'refused' as const, reason: 'one pair only' };
    const html = page({ ...findings, conversions: [refused] });
    expect(words(partOf(html, 'findings'))).toContain('shells of Patellina from');
    expect(words(partOf(html, 'taxa'))).toContain('one pair only');
    expect(partOf(page(findings), 'taxa')).toBe('');
  });
});
