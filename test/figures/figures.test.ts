import { beforeAll, describe, expect, it } from 'vitest';
import { drawFigures } from '../../src/figures/index.js';
import { type FixtureOptions, fixture, freshFixture } from '../report/fixture.js';
import { parseMarkup } from './markup.js';

const SURVEYS: Readonly<Record<string, FixtureOptions>> = {
  example: { gradient: true },
  large: { sections: 40, beds: 150, shells: 1200, planned: false },
  huge: { sections: 80, beds: 400, shells: 6000, planned: false },
  taxa: { taxa: ['Patellina', 'Cardita'] },
  unzoned: { verdict: 'continuum', place: 'none', longNames: true, elevation: false },
  single: { sections: 1, beds: 1, shells: 1, verdict: 'too few beds', aminoAcids: ['Ile'] },
  hostile: { hostile: '"><script>alert(1)</script><img src=x onerror=alert(1)>' },
  formula: { hostile: '=1+1' },
};

type Figures = ReturnType<typeof drawFigures>;
let huge: Figures;
beforeAll(() => {
  huge = drawFigures(fixture(SURVEYS.huge));
});

describe.each(Object.keys(SURVEYS))('figures of the %s survey', (name) => {
  let figures: (Figures[number] & { readonly nodes: ReturnType<typeof parseMarkup> })[];
  beforeAll(() => {
    const drawn = name === 'huge' ? huge : drawFigures(fixture(SURVEYS[name]));
    figures = drawn.map((figure) => ({ ...figure, nodes: parseMarkup(figure.svg) }));
  });

  it('are whole SVG documents that stand alone', () => {
    expect(figures.length).toBeGreaterThanOrEqual(3);
    for (const figure of figures) {
      const { nodes } = figure;
      const [root, title, desc] = nodes;
      expect(root.name).toBe('svg');
      expect(root.attributes.get('xmlns')).toBe('http://www.w3.org/2000/svg');
      expect(root.attributes.get('role')).toBe('img');
      expect([title.name, desc.name]).toEqual(['title', 'desc']);
      expect(title.text.length).toBeGreaterThan(5);
      expect(desc.text.length).toBeGreaterThan(10);
      const allowed = [
        'svg',
        'title',
        'desc',
        'defs',
        'pattern',
        'g',
        'rect',
        'path',
        'circle',
        'line',
        'text',
        'tspan',
      ];
      expect(nodes.map((node) => node.name).filter((tag) => !allowed.includes(tag))).toEqual([]);
      // one assertion a figure: there are thousands of nodes
      const attributes = nodes.flatMap((node) => [...node.attributes]);
      expect(attributes.filter(([key]) => /^(on|href|xlink|style)/i.test(key))).toEqual([]);
      const values = attributes.map(([, value]) => value);
      expect(values.filter((value) => value.includes('url(') && !/^url\(#[\w-]+\)$/.test(value))).toEqual([]);
      expect(values.filter((value) => /NaN|undefined|Infinity|currentColor|var\(/.test(value))).toEqual([]);
    }
  });

  it('have type that every editor has, and a journal’s width', () => {
    for (const { nodes } of figures) {
      const fonts = nodes.flatMap((node) => node.attributes.get('font-family') ?? []);
      expect(new Set(fonts)).toEqual(new Set(['Helvetica, Arial, sans-serif']));
      const width = Number.parseFloat(nodes[0].attributes.get('width')!);
      expect(nodes[0].attributes.get('width')).toMatch(/mm$/);
      expect(width <= 90 || (width > 90 && width <= 180)).toBe(true);
      expect(Number.parseFloat(nodes[0].attributes.get('height')!)).toBeLessThanOrEqual(252);
      const sizes = nodes.flatMap((node) => node.attributes.get('font-size') ?? []);
      expect(sizes.filter((size) => !(Number(size) >= 7.4))).toEqual([]);
    }
  });

  it('have their own names and ids, words, and nothing by chance', () => {
    const names = figures.map((figure) => figure.name);
    expect(new Set(names).size).toBe(names.length);
    for (const figure of figures) {
      expect(figure.name).toMatch(/^[a-z0-9-]+$/);
      expect(figure.caption.length).toBeGreaterThan(30);
    }
    const ids = figures.flatMap(({ nodes }) => nodes.flatMap((node) => node.attributes.get('id') ?? []));
    expect(new Set(ids).size).toBe(ids.length);
    const used = figures.flatMap((figure) => [...figure.svg.matchAll(/url\(#([\w-]+)\)/g)].map((match) => match[1]));
    for (const id of used) expect(ids).toContain(id);
    // the same twice; a thousand shells tell as much as six thousand
    if (name === 'huge') return;
    expect(drawFigures(freshFixture(SURVEYS[name])).map((figure) => figure.svg)).toEqual(
      figures.map((figure) => figure.svg),
    );
  });
});

describe('what figures draw', () => {
  const figure = (name: string, options: FixtureOptions = {}) =>
    drawFigures(fixture(options)).find((one) => one.name === name);
  const elements = (svg: string) => parseMarkup(svg);

  it('every shell once, shape by status', () => {
    const findings = fixture();
    const nodes = elements(figure('shells')!.svg).filter((node) => node.attributes.has('data-s'));
    expect(nodes.map((node) => Number(node.attributes.get('data-s'))).sort((a, b) => a - b)).toEqual(
      findings.shells.map((_, i) => i),
    );
    for (const node of nodes) {
      const { status } = findings.shells[Number(node.attributes.get('data-s'))];
      expect(node.name).toBe(status === 'kept' ? 'circle' : 'path');
    }
  });

  it('every bed once in the correlation panel, with its name and zone', () => {
    const findings = fixture();
    const nodes = elements(figure('correlation')!.svg);
    const beds = nodes.filter((node) => node.attributes.get('class') === 'bed');
    expect(beds).toHaveLength(findings.beds.length);
    const ties = nodes.filter((node) => node.attributes.get('class')?.split(' ')[0] === 'tie');
    expect(ties.length).toBeGreaterThan(findings.section_order.length);
    for (const section of findings.section_order) expect(nodes.some((node) => node.text === section)).toBe(true);
    const reversed = findings.relations.filter((row) => row.verdict === 'reversed' || row.verdict_after === 'reversed');
    expect(reversed.length).toBeGreaterThan(0);
    for (let i = 1; i <= reversed.length; i++) expect(nodes.some((node) => node.text === `R${i}`)).toBe(true);
  });

  it('takes the slope out of shells where one is used', () => {
    const at = (options: FixtureOptions) =>
      elements(figure('shells', options)!.svg).some((node) => node.text.includes('at cmat_c'));
    expect(at({ gradient: true })).toBe(true);
    expect(at({})).toBe(false);
  });

  it('leaves out what there is nothing to show of', () => {
    expect(figure('gradient')).toBeUndefined();
    expect(figure('gradient', { gradient: true })).toBeDefined();
    expect(figure('heights', { elevation: false })).toBeUndefined();
    expect(figure('relations', { place: 'none' })).toBeUndefined();
    expect(figure('amino-acids', { aminoAcids: ['Ile'] })).toBeUndefined();
    expect(figure('zones', { verdict: 'one zone' })).toBeUndefined();
  });

  it('no figure at all of findings without a clock', () => {
    const empty = { ...fixture(), clocks: [] };
    expect(drawFigures(empty)).toEqual([]);
  });

  it('summarised where the survey is too large to draw shell by shell', () => {
    const shells = huge.find((one) => one.name === 'shells')!;
    expect(shells.title).toContain('summarised');
    for (const one of huge) expect(one.svg.length).toBeLessThan(800_000);
  });
});
