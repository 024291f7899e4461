import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  counted,
  figure,
  probability,
  safe,
  styleFor,
  textTable,
  thousands,
  wrap,
} from '../../src/commands/terminal.js';

const words = fc.array(fc.string({ unit: fc.constantFrom('a', 'b', '/', '"'), minLength: 1, maxLength: 12 }), {
  minLength: 1,
  maxLength: 40,
});

describe('wrap', () => {
  it('keeps every word, and no line is longer than asked', () => {
    fc.assert(
      fc.property(words, fc.integer({ min: 20, max: 80 }), fc.integer({ min: 0, max: 6 }), (parts, width, hang) => {
        const lines = wrap(parts.join(' '), width, hang).split('\n');
        expect(lines.flatMap((line) => line.trim().split(' '))).toEqual(parts);
        for (const line of lines) expect(line.length).toBeLessThanOrEqual(width);
        for (const line of lines.slice(1)) expect(line.startsWith(' '.repeat(hang))).toBe(true);
      }),
    );
  });

  it('keeps the indent of the first line, and counts no colour', () => {
    expect(wrap('    one two', 9, 6)).toBe('    one\n      two');
    expect(wrap('\u001b[1mone\u001b[22m two', 7)).toBe('\u001b[1mone\u001b[22m two');
  });
});

it('colours only on a terminal that wants them', () => {
  const dressed = (tty: boolean, env: NodeJS.ProcessEnv) => styleFor({ isTTY: tty }, env).bold('x') !== 'x';
  expect([
    dressed(true, {}),
    dressed(false, {}),
    dressed(true, { NO_COLOR: '1' }),
    dressed(true, { TERM: 'dumb' }),
  ]).toEqual([true, false, false, false]);
});

it('shows control characters, and the signs that turn the direction of writing, as codes', () => {
  expect(safe('a\u001b[2Jb\rc\u202ed\ne')).toBe('a\\u001b[2Jb\\u000dc\\u202ed\ne');
});

it('numbers for people', () => {
  expect([thousands(999), thousands(1234567), counted(1, 'bed'), counted(2, 'taxon', 'taxa')]).toEqual([
    '999',
    '1,234,567',
    '1 bed',
    '2 taxa',
  ]);
  expect([figure(0.3), figure(12.345), figure(0), figure(1e-9, 2)]).toEqual(['0.300', '12.3', '0', '1e-9']);
  expect([probability(1), probability(0), probability(0.5), probability(0.9967), probability(0.004)]).toEqual([
    '> 0.999',
    '< 0.001',
    '0.50',
    '0.997',
    '0.004',
  ]);
});

it('tables line up', () => {
  const table = textTable(
    [
      ['zone', 'D/L'],
      ['Z1', '0.2'],
      ['Z10', '10'],
    ],
    [false, true],
  );
  expect(table).toEqual(['  zone  D/L', '  Z1    0.2', '  Z10    10']);
});
