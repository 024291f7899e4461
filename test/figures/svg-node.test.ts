import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { element, escapeMarkup, round, SvgNode } from '../../src/figures/svg-node.js';
import { parseMarkup } from './markup.js';

describe('the drawing document', () => {
  it('writes any text and attribute so that it stays one element', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), fc.string({ unit: 'binary' }), (text, value) => {
        const xml = element('text', { title: value }, text).outerHTML;
        const parsed = parseMarkup(xml);
        expect(parsed.map((node) => node.name)).toEqual(['text']);
        // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what must not be there
        expect(xml).not.toMatch(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/);
      }),
    );
  });

  it('replaces what XML cannot hold', () => {
    expect(escapeMarkup('a\u0000b\ud800c')).toBe('a\ufffdb\ufffdc');
    expect(escapeMarkup('\u{1F41A}')).toBe('\u{1F41A}');
  });

  it('moves, inserts and removes children as a document does', () => {
    const parent = new SvgNode('g');
    const [a, b, c] = ['a', 'b', 'c'].map((name) => new SvgNode(name));
    parent.append(a, c);
    parent.insertBefore(b, c);
    expect(parent.outerHTML).toBe('<g><a/><b/><c/></g>');
    expect(a.nextSibling).toBe(b);
    parent.appendChild(a);
    expect(parent.outerHTML).toBe('<g><b/><c/><a/></g>');
    b.remove();
    expect(b.parentNode).toBeNull();
    expect(parent.children.map((node) => node.tagName)).toEqual(['c', 'a']);
    parent.textContent = 'x<';
    expect(parent.outerHTML).toBe('<g>x&lt;</g>');
  });

  it('rounds to hundredths without a minus zero', () => {
    expect(Object.is(round(-0.001), 0)).toBe(true);
    expect(round(1.005)).toBeCloseTo(1, 1);
    expect(element('a', { x: -0.004, y: null, z: undefined }).outerHTML).toBe('<a x="0"/>');
  });
});
