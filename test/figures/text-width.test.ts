import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shorten, textWidth, wrapText } from '../../src/figures/text-width.js';

describe('the width of type', () => {
  it('knows the widths of Helvetica', () => {
    // Adobe Core 14 font metrics, Helvetica: H 722, i 222, space 278, 0 556 (from memory)
    expect(textWidth('H', 1000)).toBe(722);
    expect(textWidth('i', 1000)).toBe(222);
    expect(textWidth(' 0', 1000)).toBe(834);
    expect(textWidth('~', 1000)).toBe(584);
  });

  it('shortens to the width asked for and keeps both ends', () => {
    fc.assert(
      fc.property(
        fc.string({ unit: 'grapheme', minLength: 4, maxLength: 60 }),
        fc.integer({ min: 40, max: 200 }),
        (text, width) => {
          const short = shorten(text, 9, width);
          expect(textWidth(short, 9)).toBeLessThanOrEqual(width);
          if (textWidth(text, 9) <= width) expect(short).toBe(text);
          else expect(short).toContain('…');
        },
      ),
    );
    expect(shorten('Sorrel Hythe/4', 9, 48)).toMatch(/^Sor.*\/4$/);
  });

  it('wraps at spaces and never drops a word without a sign', () => {
    expect(wrapText('Old Harbour Steps', 10, 50, 3)).toEqual(['Old', 'Harbour', 'Steps']);
    const lines = wrapText('one two three four five six', 10, 40, 2);
    expect(lines).toHaveLength(2);
    expect(lines[1]).toContain('…');
  });
});
