import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readNumber, whyNoNumber } from '../../src/input/read-number.js';
import { analysesOf, errorsOf } from './survey-of.js';

const HEAD = 'section;bed;taxon;shell;D/L Asx;[Asx]\n';

describe('readNumber', () => {
  it('agrees with Number() on every plain number', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 999_999_999 }),
        fc.nat({ max: 9 }),
        fc.boolean(),
        (whole, decimals, comma) => {
          const text = (whole / 10 ** decimals).toFixed(decimals);
          const written = comma ? text.replace('.', ',') : text;
          expect(readNumber(written, comma ? 'comma' : 'point')).toBe(Number(text));
        },
      ),
    );
  });

  it('agrees with Number() on numbers with 1 to 20 digits and exponents', () => {
    const digits = fc.stringMatching(/^[1-9][0-9]{0,19}$/);
    fc.assert(
      fc.property(digits, digits, fc.option(fc.integer({ min: -30, max: 30 })), (whole, part, exponent) => {
        const text = `${whole}.${part}${exponent === null ? '' : `e${exponent}`}`;
        expect(readNumber(text, 'point')).toBe(Number(text));
      }),
    );
  });

  it('gives a finite number or NaN for any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), fc.constantFrom('point' as const, 'comma' as const), (text, sign) => {
        const value = readNumber(text, sign);
        expect(Number.isNaN(value) || Number.isFinite(value)).toBe(true);
        expect(whyNoNumber(text, sign)).toMatch(/^(is|has|holds|starts) /);
      }),
    );
  });

  it.each(['0x1F', '1_000', '1 e3', '', ' ', '.', ',', '-', '+', 'e5', '1e', '--1', '1.2.3', '00.5', '-01', '٣'])(
    'refuses %j',
    (text) => {
      expect(readNumber(text, 'point')).toBeNaN();
    },
  );

  it.each([
    ['.5', 0.5],
    ['5.', 5],
    ['+0.5', 0.5],
    ['-0.5', -0.5],
    ['1e-3', 0.001],
    ['0', 0],
    ['0.0', 0],
  ])('reads %s', (text, value) => {
    expect(readNumber(text, 'point')).toBe(value);
  });
});

describe('what is said of a cell that is no number', () => {
  it.each([
    ['Jan-43', /date or a time/],
    ['43-Jan', /date or a time/],
    ['43. Mrz', /date or a time/],
    ['0:43', /date or a time/],
    ['00:43:00', /date or a time/],
    ['2043-01-01', /date or a time/],
    ['1/43', /date or a time/],
    ['12.03.2020', /date or a time/],
    ['10-12', /range/],
    ['0.4 – 0.5', /range/],
    ['0.4 to 0.5', /range/],
    ['0.43 ± 0.02', /two numbers/],
    ['0.43 (0.02)', /two numbers/],
    ['0.43+/-0.02', /two numbers/],
    ['#VALUE!', /spreadsheet left/],
    ['#DIV/0!', /spreadsheet left/],
    ['Err:502', /spreadsheet left/],
    ['n.d.', /Leave the cell empty/],
    ['-', /Leave the cell empty/],
    ['NaN', /Leave the cell empty/],
    ['-Infinity', /infinite/],
    ['<0.05', /limit/],
    ['12 %', /percentage/],
    ['1.234,5', /thousands/],
    ['1,234.5', /thousands/],
    ["1'234.5", /thousands/],
    ['1 234.5', /thousands/],
    ['039.000', /starts with a zero/],
    ['0.4.3', /more than one decimal sign/],
    ['1e999', /too large/],
    ['0,43', /decimal comma/],
    ['half', /no number/],
  ])('%s', (text, word) => {
    expect(whyNoNumber(text, 'point')).toMatch(word);
  });
});

describe('the decimal sign is settled once a file', () => {
  it('a comma', async () => {
    const analyses = await analysesOf(`${HEAD}A;1;P;a;0,43;1,234\nA;1;P;b;0,5;12\n`);
    expect(analyses.map((a) => [a.ratios.Asx, a.concentrations.Asx])).toEqual([
      [0.43, 1.234],
      [0.5, 12],
    ]);
  });

  it('both are refused, each rarer cell with its place and an example of the other', async () => {
    const errors = await errorsOf({
      shells: `${HEAD}A;1;P;a;0,43;12\nA;1;P;b;0.5;12\nA;1;P;c;0,44;1.5\nA;1;P;d;0,44;\n`,
    });
    const mixed = errors.filter((p) => /other cells/.test(p.message));
    expect(mixed.map((p) => [p.line, p.column])).toEqual([
      [3, 'D/L Asx'],
      [4, '[Asx]'],
    ]);
    expect(mixed[0].message).toMatch(
      /"0\.5" has a decimal point, but 3 other cells have a decimal comma \(such as "0,43" on line 2\)/,
    );
  });

  it('commas that may part thousands are not guessed at', async () => {
    const errors = await errorsOf({ shells: 'section;bed;taxon;shell;D/L Asx;[Asx]\nA;1;P;a;1;1,234\n' });
    expect(errors).toHaveLength(1);
    expect(errors[0].message).toMatch(/may be a decimal comma or a comma between thousands/);
  });

  it('a table with commas equals the same table with points', async () => {
    const ratio = fc.integer({ min: 1, max: 999 }).map((n) => (n / 1000).toFixed(3));
    await fc.assert(
      fc.asyncProperty(fc.array(fc.tuple(ratio, ratio), { minLength: 1, maxLength: 20 }), async (rows) => {
        const table = (sign: string, delimiter: string) =>
          ['section,bed,taxon,shell,D/L Asx,D/L Glx'.replaceAll(',', delimiter)]
            .concat(
              rows.map(([a, g], i) =>
                ['A', '1', 'P', `s${i}`, a.replace('.', sign), g.replace('.', sign)].join(delimiter),
              ),
            )
            .join('\n');
        const expected = await analysesOf(table('.', ','));
        expect(await analysesOf(table('.', ';'))).toEqual(expected);
        expect(await analysesOf(table('.', '\t'))).toEqual(expected);
        expect(await analysesOf(table(',', ';'))).toEqual(expected);
        expect(await analysesOf(table(',', '\t'))).toEqual(expected);
      }),
      { numRuns: 50 },
    );
  });
});
