import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LikeLast } from '../../src/output/like-last.js';
import { type TextOut, textOf, utf8 } from '../../src/output/text-out.js';

const LEADS = ['<a:', ',b:', '', ',a long lead that is copied by another way than short ones:', ',e:'];
const TAIL = '>\n';

const written = (out: TextOut, rows: readonly (readonly unknown[])[], counts = { copied: 0, anew: 0 }) => {
  const rowsLike = new LikeLast(
    out,
    LEADS.map((lead) => utf8(lead)),
    utf8(TAIL),
  );
  for (const row of rows) {
    rowsLike.begin();
    row.forEach((value, i) => {
      const same = rowsLike.same(i, value);
      counts[same ? 'copied' : 'anew']++;
      if (!same) for (const part of textFor(value).match(/.{1,4000}/gsu) ?? []) out.text(part);
    });
    rowsLike.end();
  }
  return counts;
};

const textFor = (value: unknown): string => (Array.isArray(value) ? `[${value.join(';')}]` : String(value));

const plainly = (rows: readonly (readonly unknown[])[]): string =>
  rows.map((row) => row.map((value, i) => LEADS[i] + textFor(value)).join('') + TAIL).join('');

describe('LikeLast', () => {
  // few values, so that cells often stay as they are, and some that fill a piece or run over its end
  const cell = fc.oneof(
    { weight: 20, arbitrary: fc.constantFrom<unknown>('S0', 'é', '', 1, 0.5, null, true, []) },
    { weight: 2, arbitrary: fc.constantFrom<unknown>(Number.NaN, ['x'], 'y'.repeat(5000)) },
    { weight: 1, arbitrary: fc.constantFrom<unknown>('z'.repeat(100_000), 'ü'.repeat(140_000)) },
  );
  const row = fc.array(cell, { minLength: LEADS.length, maxLength: LEADS.length });

  it('writes what writing each cell would', () => {
    const counts = { copied: 0, anew: 0 };
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 12 }), fc.integer({ min: 0, max: 5000 }), (rows, ahead) => {
        const before = 'x'.repeat(128 * 1024 - ahead);
        const text = textOf((out) => {
          for (let at = 0; at < before.length; at += 4000) out.text(before.slice(at, at + 4000));
          written(out, rows, counts);
        });
        expect(text === before + plainly(rows)).toBe(true);
      }),
      { numRuns: 150, seed: 1 },
    );
    expect(Math.min(counts.copied, counts.anew)).toBeGreaterThan(200);
  });

  it('does so over many pieces', () => {
    const rows = Array.from({ length: 20_000 }, (_, i) => [`S${i % 7 === 0 ? i : 0}`, i >> 3, null, i % 2, 'end']);
    expect(textOf((out) => void written(out, rows)) === plainly(rows)).toBe(true);
  });
});
