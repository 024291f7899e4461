import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeText } from '../../src/input/decode-text.js';
import { surveyFromBytes } from '../../src/input/index.js';
import { utf8 } from './survey-of.js';

const TABLE = 'section,bed,taxon,shell,A/I\nMöwenkap,1,Patellina,a,0.4\nMöwenkap,1,Patellina,b,0.41\n';

function utf16(text: string, littleEndian: boolean, mark: boolean): Uint8Array {
  const units = [...(mark ? '\ufeff' : ''), ...text].join('');
  const bytes = new Uint8Array(units.length * 2);
  const view = new DataView(bytes.buffer);
  for (let i = 0; i < units.length; i += 1) view.setUint16(i * 2, units.charCodeAt(i), littleEndian);
  return bytes;
}

const windows1252 = (text: string) =>
  Uint8Array.from([...text].map((letter) => (letter === '€' ? 0x80 : letter.charCodeAt(0))));

describe('encodings', () => {
  it.each([
    ['UTF-8', utf8(TABLE)],
    ['UTF-8 with a mark', utf8(`\ufeff${TABLE}`)],
    ['UTF-16 LE with a mark', utf16(TABLE, true, true)],
    ['UTF-16 BE with a mark', utf16(TABLE, false, true)],
    ['UTF-16 LE', utf16(TABLE, true, false)],
    ['UTF-16 BE', utf16(TABLE, false, false)],
    ['Windows-1252', windows1252(TABLE)],
  ])('%s', async (_name, bytes) => {
    const { survey, problems } = await surveyFromBytes({ shells: { file: 's.csv', bytes } });
    expect(problems.filter((p) => p.severity === 'error')).toEqual([]);
    expect(survey?.analyses.map((a) => a.section)).toEqual(['Möwenkap', 'Möwenkap']);
  });

  it('the euro sign is Windows-1252, not Latin-1', () => {
    expect(decodeText(windows1252('price €5'))).toEqual({ text: 'price €5', encoding: 'Windows-1252' });
  });

  it('text comes back from UTF-8 and from UTF-16 with a mark', () => {
    const text = fc.stringMatching(/^[ -;=-~äöüßéñ±√€µ°\n]{0,80}$/u);
    fc.assert(
      fc.property(text, fc.boolean(), (written, little) => {
        expect(decodeText(utf8(written))).toEqual({ text: written, encoding: 'UTF-8' });
        expect(decodeText(utf16(written, little, true))).toMatchObject({ text: written });
      }),
    );
  });

  it('line breaks of every kind', async () => {
    for (const end of ['\n', '\r\n', '\r']) {
      const { survey } = await surveyFromBytes({ shells: { file: 's.csv', bytes: utf8(TABLE.replaceAll('\n', end)) } });
      expect(survey?.analyses.map((a) => a.line)).toEqual([2, 3]);
    }
  });
});

describe('names', () => {
  const read = async (section: string) => {
    const { survey, problems } = await surveyFromBytes({
      shells: { file: 's.csv', bytes: utf8(`section,bed,taxon,shell,A/I\n"${section}",1,P,a,0.4\n`) },
    });
    return survey?.analyses[0].section ?? problems.find((p) => p.severity === 'error')!;
  };

  it('are trimmed, composed, and freed of signs without width', async () => {
    expect(await read('  Mo\u0308wen\u00a0\u00a0kap\u200b ')).toBe('Möwen kap');
    expect(await read('two\nlines')).toBe('two lines');
  });

  it('with control characters are refused', async () => {
    expect(await read('Cape\u0007')).toMatchObject({ line: 2, column: 'section', severity: 'error' });
  });

  it('beyond 10,000 characters are refused', async () => {
    expect(await read('x'.repeat(10_001))).toMatchObject({ line: 2, column: 'section' });
    expect(await read('x'.repeat(10_000))).toHaveLength(10_000);
  });
});
