import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sha256Base64 } from '../../src/report/sha256.js';

describe('SHA-256', () => {
  const judge = (text: string) => createHash('sha256').update(text, 'utf8').digest('base64');

  it('agrees with another implementation on any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 300 }), (text) => {
        expect(sha256Base64(text)).toBe(judge(text));
      }),
    );
  });

  it.each([0, 1, 55, 56, 63, 64, 65, 119, 120, 100_000])('agrees at %i bytes', (length) => {
    expect(sha256Base64('a'.repeat(length))).toBe(judge('a'.repeat(length)));
  });
});
