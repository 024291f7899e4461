import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { readSurvey } from '../../src/input/index.js';

const read = (name: string, sheet?: string) =>
  readSurvey({ shells: fileURLToPath(new URL(`./files/${name}`, import.meta.url)), sheet });
const errorsIn = async (name: string) => (await read(name)).problems.filter((p) => p.severity === 'error');

/** What every form of the survey must give. */
const ROWS = [
  ['Möwenkap', '1', 'a', 'L-1', { Asx: 0.431, Ile: 0.352 }, { Asx: 120.5 }],
  ['Möwenkap', '1', 'b', 'L-2', { Asx: 0.442, Ile: 0.361 }, { Asx: 98 }],
  ['Möwenkap', '2', 'a', 'L-3', { Asx: 0.312 }, { Asx: 101.25 }],
  ['Möwenkap', '2', 'b', 'L-4', { Asx: 0.305, Ile: 0.233 }, { Asx: 87 }],
  ['Sandige Bucht', 'x', '1', 'L-5', { Asx: 0.5, Ile: 0.41 }, { Asx: 110 }],
  ['Sandige Bucht', 'x', '2', 'L-6', { Asx: 0.1234, Ile: 0.4 }, { Asx: 150 }],
];

describe('files made by LibreOffice', () => {
  it.each([
    ['survey.xlsx', [2, 3, 4, 5, 6, 7]],
    ['survey-semicolon.csv', [2, 3, 4, 5, 6, 7]],
    ['survey-utf16.tsv', [2, 3, 4, 5, 6, 7]],
    ['survey-windows1252.csv', [2, 3, 4, 5, 6, 7]],
    ['survey-quoted-decimals.csv', [2, 3, 4, 5, 6, 7]],
    ['titled.xlsx', [4, 5, 7, 8, 9, 10]],
    ['titled-semicolon.csv', [4, 5, 7, 8, 9, 10]],
  ])('%s', async (name, lines) => {
    const { survey, problems } = await read(name);
    expect(problems.filter((p) => p.severity === 'error')).toEqual([]);
    const { analyses, beds } = survey!;
    expect(analyses.map((a) => [a.section, a.bed, a.shell, a.lab_id, a.ratios, a.concentrations])).toEqual(ROWS);
    expect(analyses.map((a) => a.line)).toEqual(lines);
    expect(beds.map((b) => b.place?.value)).toEqual([1, 2, 1]);
    const titles = problems.filter((p) => /above the header/.test(p.message));
    expect(titles.map((p) => p.line)).toEqual(name.startsWith('titled') ? [1] : []);
  });

  it('merged cells are refused, each gap with its cell', async () => {
    const errors = await errorsIn('merged.xlsx');
    expect(errors.map((p) => [p.line, p.column])).toEqual([2, 3, 4, 5].map((line) => [line, 'Section']));
    expect(errors[0].message).toMatch(/A2:A5 are merged/);
    expect(errors[1].message).toMatch(/Cell A3 is empty/);
  });

  it('a ratio that became a time, and a formula that failed, are refused with their cells', async () => {
    const sheet = await errorsIn('times.xlsx');
    expect(sheet.map((p) => [p.line, p.column])).toEqual([
      [3, 'D/L Asx'],
      [5, 'D/L Asx'],
    ]);
    expect(sheet[0].message).toMatch(/Cell G3 is a date or a time/);
    expect(sheet[1].message).toMatch(/"#DIV\/0!" \(cell G5\)/);
    const text = await errorsIn('times-semicolon.csv');
    expect(text.map((p) => [p.line, p.column])).toEqual([
      [3, 'D/L Asx'],
      [5, 'D/L Asx'],
    ]);
    expect(text[0].message).toMatch(/"0:43" is a date or a time/);
  });

  it('sheets are chosen by name or number; a wrong one is told with those there are', async () => {
    expect((await read('survey.xlsx', 'Shells')).survey).not.toBeNull();
    expect((await read('survey.xlsx', 'shells')).survey).not.toBeNull();
    expect((await read('survey.xlsx', '1')).survey).not.toBeNull();
    expect((await read('survey.xlsx', '2')).problems[0].message).toMatch(/No header was found/);
    expect((await read('survey.xlsx', 'Beds')).problems[0].message).toMatch(
      /no sheet "Beds".*"Shells", "Notes".*--sheet/,
    );
    expect((await read('survey.xlsx', '3')).problems[0].message).toMatch(/no sheet "3"/);
  });

  it('an OpenDocument sheet is refused with advice', async () => {
    expect((await errorsIn('survey.fods'))[0].message).toMatch(/XML/);
  });
});
