import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { TextOut, textOf, utf8 } from '../../src/output/text-out.js';

const any = fc.string({ unit: 'binary', maxLength: 80 });

describe('TextOut', () => {
  it('gives on what was written, as UTF-8, over the seams of its pieces too', () => {
    fc.assert(
      fc.property(fc.array(any, { minLength: 1, maxLength: 6 }), fc.integer({ min: 0, max: 400 }), (texts, ahead) => {
        // the texts start a little before a piece is full
        const filling = 'x'.repeat(128 * 1024 - ahead);
        const pieces: Buffer[] = [];
        const out = new TextOut((bytes) => pieces.push(Buffer.from(bytes)));
        for (let at = 0; at < filling.length; at += 40) out.text(filling.slice(at, at + 40));
        for (const text of texts) {
          out.text(text);
          out.json(text);
          out.bytes(utf8(text));
          out.ascii(10);
        }
        out.flush();
        const wanted = filling + texts.map((text) => `${text}${JSON.stringify(text)}${text}\n`).join('');
        expect(Buffer.concat(pieces).equals(Buffer.from(wanted))).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it('writes a text longer than a piece after what stands before it', () => {
    const long = 'é"\\'.repeat(60_000);
    const written = textOf((out) => {
      out.text('before ');
      out.text(long);
      out.json(long);
    });
    expect(written === `before ${long}${JSON.stringify(long)}`).toBe(true);
  });

  it('gives nothing where nothing was written', () => {
    let given = 0;
    const out = new TextOut(() => given++);
    out.text('');
    out.flush();
    expect(given).toBe(0);
    expect(textOf(() => {})).toBe('');
  });
});
