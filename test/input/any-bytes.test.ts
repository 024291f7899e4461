import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { datesFromBytes, surveyFromBytes } from '../../src/input/index.js';
import { settingsFromBytes } from '../../src/input/settings.js';
import { utf8 } from './survey-of.js';

const SOUND =
  'section,bed,taxon,shell,level,D/L Asx,A/I,lab_id\nA,1,Patellina,a,1,0.4,0.3,L1\nA,2,Patellina,b,2,0.3,0.2,L2\n';
const file = (bytes: Uint8Array) => ({ file: 'any', bytes });

/** A survey without an error, or an error and no survey; no text of the program's own faults. */
async function isSettled(bytes: Uint8Array, others: Record<string, { file: string; bytes: Uint8Array }> = {}) {
  const { survey, problems } = await surveyFromBytes({ shells: file(bytes), ...others });
  expect(survey === null).toBe(problems.some((p) => p.severity === 'error'));
  for (const problem of problems) {
    expect(problem.message).not.toMatch(/undefined|NaN\b(?!")|\[object|TypeError/);
    expect(problem.line === null || (Number.isInteger(problem.line) && problem.line >= 1)).toBe(true);
  }
  for (const analysis of survey?.analyses ?? []) {
    for (const ratio of Object.values(analysis.ratios)) expect(ratio > 0 && ratio <= 1.5).toBe(true);
  }
}

describe('whatever the bytes, the outcome is a survey or a message', () => {
  it('any bytes as shells', async () => {
    await fc.assert(
      fc.asyncProperty(fc.uint8Array({ maxLength: 300 }), (bytes) => isSettled(bytes)),
      { numRuns: 500 },
    );
  });

  it('bytes that start as a zip archive', async () => {
    await fc.assert(
      fc.asyncProperty(fc.uint8Array({ maxLength: 300 }), (bytes) =>
        isSettled(Uint8Array.from([0x50, 0x4b, 3, 4, ...bytes])),
      ),
      { numRuns: 200 },
    );
  });

  it('a sound table with pieces changed', async () => {
    const piece = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 12 }),
      fc.constantFrom(
        '"',
        ',',
        '\n',
        '\r',
        ';',
        '\t',
        '0',
        '1e309',
        '-',
        '\u0000',
        '\ufeff',
        '__proto__',
        'section',
        'n',
        '039',
        '1e-320',
      ),
    );
    await fc.assert(
      fc.asyncProperty(fc.nat(SOUND.length), fc.nat(8), piece, (at, length, text) =>
        isSettled(utf8(SOUND.slice(0, at) + text + SOUND.slice(at + length))),
      ),
      { numRuns: 500 },
    );
  });

  it('any text as beds, relations, standards and aliases', async () => {
    const heads = ['section,bed,level', 'lower,upper,kind', 'lab,standard,amino_acid,dl', 'name,taxon'];
    const body = fc.string({ unit: fc.constantFrom(...'A1,/\n"2.older;same'), maxLength: 60 });
    await fc.assert(
      fc.asyncProperty(body, body, body, body, (...bodies) => {
        const [beds, relations, standards, aliases] = bodies.map((text, i) => file(utf8(`${heads[i]}\n${text}`)));
        return isSettled(utf8(SOUND), { beds, relations, standards, aliases });
      }),
      { numRuns: 300 },
    );
  });

  it('any bytes as dates and as settings', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.oneof(fc.uint8Array({ maxLength: 200 }), fc.string({ maxLength: 200 }).map(utf8)),
        async (bytes) => {
          const dates = await datesFromBytes(file(bytes));
          expect(dates.dates === null).toBe(dates.problems.some((p) => p.severity === 'error'));
          const settings = await settingsFromBytes(file(bytes));
          expect(settings.settings === null).toBe(settings.problems.some((p) => p.severity === 'error'));
        },
      ),
      { numRuns: 500 },
    );
  });
});
