import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { drawFigures } from '../../src/figures/index.js';
import { renderReport } from '../../src/report/index.js';
import { type FixtureOptions, fixture, freshFixture } from './fixture.js';

const drawn = new Map<string, string>();

/** The page of a survey, drawn once. */
const page = (options: FixtureOptions = {}) => {
  const key = JSON.stringify(options);
  const html = drawn.get(key) ?? renderReport(fixture(options));
  drawn.set(key, html);
  return html;
};
const between = (text: string, start: string, end: string) => {
  const from = text.indexOf(start) + start.length;
  return text.slice(from, text.indexOf(end, from));
};
const words = (markup: string) => markup.replace(/<[^>]+>/g, '').replace(/\s+/g, ' ');
const lead = (options: FixtureOptions = {}) => words(between(page(options), '<div class="lead">', '</div>'));

describe('the page', () => {
  it('lets in nothing but its own style and script, by their hashes', () => {
    const html = page();
    const policy = between(html, 'Content-Security-Policy" content="', '"');
    const hash = (text: string) => `'sha256-${createHash('sha256').update(text, 'utf8').digest('base64')}'`;
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain(`style-src ${hash(between(html, '<style>', '</style>'))}`);
    expect(policy).toContain(`script-src ${hash(between(html, '<script>', '</script>'))}`);
    expect(policy).not.toMatch(/unsafe|https?:|\*/);
    expect(html).not.toMatch(/\sstyle="/);
    expect(html.replaceAll('http://www.w3.org/2000/svg', '')).not.toMatch(/(src|href|action)="(?!#|data:,)/);
  });

  it('stands in the order of the plan', () => {
    const ids = [...page({ gradient: true }).matchAll(/<section id="([^"]+)"/g)].map((match) => match[1]);
    expect(ids).toEqual([
      'findings',
      'shells',
      'correlation',
      'order',
      'heights',
      'relations',
      'amino-acids',
      'odd',
      'number-of-zones',
      'gradient',
      'next',
      'tables',
      'methods',
      'cautions',
    ]);
  });

  it('says what was found in plain sentences', () => {
    const text = lead();
    expect(text).toContain('200 shells of Patellina from 36 beds in 12 sections');
    expect(text).toContain('4 aminozones');
    expect(text).toMatch(
      /Of 24 tested field relations, 20 agree, 2 are tied within error and 2 are reversed: R1 \(.+ below .+\) and R2/,
    );
    expect(text).toContain('One more was reversed until odd shells were set aside.');
    expect(text).toContain('4 shells were set aside');
    expect(lead({ verdict: 'continuum' })).toContain('a continuum: no zones are supported');
    expect(lead({ verdict: 'one zone' })).toContain('one extent of racemization');
    expect(lead({ sections: 1, beds: 1, shells: 3, verdict: 'too few beds', odd: false })).toContain(
      'No shell was set aside.',
    );
    expect(lead({ place: 'none' })).toContain('No field relation could be tested');
  });

  it('says so when zones were forced', () => {
    const findings = fixture();
    const forced = {
      ...findings,
      clocks: findings.clocks.map((clock) => ({ ...clock, verdict: 'continuum' as const })),
    };
    expect(words(renderReport(forced))).toContain('You asked for 4 zones');
  });

  it('gives every figure a number, a title, a caption, a text alternative and a button', () => {
    const html = page();
    const figures = drawFigures(fixture());
    for (const [i, figure] of figures.entries()) {
      const block = between(html, `<figure id="fig-${figure.name}"`, '</figure>');
      expect(block).toContain(`<b>Figure ${i + 1}.</b>`);
      expect(block).toContain(figure.title);
      expect(block).toContain(`data-save="${figure.name}"`);
      expect(block).toContain('<desc');
      expect(words(block)).toContain(figure.caption.slice(0, 30));
    }
    expect(html.match(/<figure /g)).toHaveLength(figures.length);
  });

  it('has ids once, and links that lead somewhere', () => {
    for (const options of [{}, { taxa: ['Patellina', 'Cardita'] }, { sections: 40, beds: 150, shells: 1200 }]) {
      const html = page(options);
      const ids = [...html.matchAll(/\sid="([^"]+)"/g)].map((match) => match[1]);
      expect(new Set(ids).size).toBe(ids.length);
      const known = new Set(ids);
      const lost = [...html.matchAll(/href="#([^"]+)"/g)].map((match) => match[1]).filter((id) => !known.has(id));
      expect(lost).toEqual([]);
    }
  });

  it.each([
    '"><script>alert(1)</script><img src=x onerror=alert(1)>',
    '</script><script>alert(1)//',
    '=1+1',
    "'onmouseover='x",
  ])('escapes the name %s everywhere', (name) => {
    const html = page({ hostile: name, taxa: [`Patellina ${name}`] });
    expect(html.match(/<script[ >]/g)).toHaveLength(2);
    expect(html.match(/<\/script>/g)).toHaveLength(2);
    expect(html).not.toContain('<img');
    const data = JSON.parse(between(html, 'id="data">', '</script>')) as {
      beds: Record<string, [number, string[], string]>;
    };
    expect(data.beds[0][2]).toContain(name);
  });

  it('puts reversed relations first, each with its reading and evidence', () => {
    const findings = fixture();
    const worst = findings.relations.filter((row) => row.verdict_after === 'reversed').sort((a, b) => a.z! - b.z!)[0];
    const html = renderReport({
      ...findings,
      evidence: [
        {
          clock: worst.clock,
          about: 'relation',
          name: `${worst.lower} > ${worst.upper}`,
          sentences: ['First <word>.', 'Second word.'],
        },
      ],
    });
    const entry = between(html, '<li id="relation-0-R1"', '</ul></li>');
    expect(words(entry)).toContain(worst.reading);
    expect(entry).toContain('First &lt;word&gt;.');
    expect(entry).toContain('<li>Second word.</li>');
    expect(words(entry)).toContain(`${worst.lower} below ${worst.upper}: reversed`);
  });

  it('shows cautions, settings, sources and input checksums', () => {
    const text = words(page());
    expect(text).toContain('The order is relative');
    expect(text).toContain('hot concentrated acid');
    expect(text).toContain('licensed practice');
    expect(text).toContain('ab'.repeat(32));
    expect(text).toMatch(/Benjamini, Y\. and Hochberg/);
  });

  it('is small: under 2 MB for the example, under 5 MB for 100,000 shells', () => {
    expect(page().length).toBeLessThan(2e6);
    expect(page({ sections: 40, beds: 150, shells: 1200 }).length).toBeLessThan(2e6);
    const huge = page({ sections: 200, beds: 4000, shells: 100_000 });
    expect(huge.length).toBeLessThan(5e6);
    expect(huge).toContain('100,000 shells');
  });

  it('is the same bytes twice', () => {
    expect(renderReport(freshFixture())).toBe(page());
  });
});
