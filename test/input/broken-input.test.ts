import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readSurvey, surveyFromBytes } from '../../src/input/index.js';
import { errorsOf, utf8 } from './survey-of.js';

const HEAD = 'section,bed,taxon,shell,level,D/L Asx,D/L Asx sd,n\n';
const SOUND = 'Cape Sorrel,1,Patellina,a,1,0.43,,\n';

/** The kinds of broken input that the first issue names, each with the line and the column to be told. */
const KINDS: readonly (readonly [
  kind: string,
  shells: string,
  line: number | null,
  column: string | null,
  word: RegExp,
])[] = [
  ['empty', '', null, null, /empty/],
  ['blank lines only', '\n \n;;\n', null, null, /empty|header/i],
  ['header only', HEAD, 1, null, /no rows/],
  ['binary', '\u0000\u0001\u0002PNG\u0000', null, null, /no text file/],
  ['unclosed quote', `${HEAD}${SOUND}"Cape Sorrel,2,Patellina,a,2,0.3,,\nx,y\n`, 3, null, /never closed/],
  ['text after a closing quote', `${HEAD}${SOUND}"Cape" Sorrel,2,Patellina,a,2,0.3,,\n`, 3, null, /follows a closing/],
  ['a quote within a plain cell', `${HEAD}${SOUND}Cape 5" Sorrel,2,Patellina,a,2,0.3,,\n`, 3, null, /within a cell/],
  ['too few cells', `${HEAD}${SOUND}Cape Sorrel,2,Patellina\n`, 3, null, /3 cells where the header has 8/],
  ['too many cells', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,0,43,,\n`, 3, null, /9 cells where the header has 8/],
  ['text for a number', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,high,,\n`, 3, 'D/L Asx', /"high" is no number/],
  ['0', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,0,,\n`, 3, 'D/L Asx', /above 0/],
  ['negative', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,-0.4,,\n`, 3, 'D/L Asx', /above 0/],
  ['NaN', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,NaN,,\n`, 3, 'D/L Asx', /Leave the cell empty/],
  ['Infinity', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,Infinity,,\n`, 3, 'D/L Asx', /infinite/],
  ['beyond floating point', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,1e999,,\n`, 3, 'D/L Asx', /too large/],
  ['leading zeros', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,039.000,,\n`, 3, 'D/L Asx', /starts with a zero/],
  ['a range', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,10-12,0.4,,\n`, 3, 'level', /range/],
  [
    'a bed with two levels',
    `${HEAD}${SOUND}Cape Sorrel,1,Patellina,b,2,0.4,,\n`,
    3,
    'level',
    /level 1 \(line 2\) and level 2/,
  ],
  [
    'a summary row with sd but no n',
    `${HEAD}${SOUND}Cape Sorrel,2,Patellina,,2,0.4,0.02,\n`,
    3,
    'n',
    /number of shells/,
  ],
  ['no taxon', `${HEAD}${SOUND}Cape Sorrel,2,,a,2,0.4,,\n`, 3, 'taxon', /needs the taxon/],
  ['no taxon column', 'section,bed,D/L Asx\nA,1,0.4\n', 1, null, /no column "taxon"/],
  ['no ratio column', 'section,bed,taxon,shell\nA,1,P,a\n', 1, null, /no column of D\/L ratios/],
  ['above equilibrium', `${HEAD}${SOUND}Cape Sorrel,2,Patellina,a,2,1.21,,\n`, 3, 'D/L Asx', /at most 1\.2/],
];

describe('broken input is refused with its place', () => {
  it.each(KINDS)('%s', async (_kind, shells, line, column, word) => {
    const errors = await errorsOf({ shells });
    expect(errors).toHaveLength(1);
    expect(errors[0]).toMatchObject({ file: 'shells.csv', line, column, severity: 'error' });
    expect(errors[0].message).toMatch(word);
  });

  it('files that can not be read', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'bedorder-'));
    try {
      const missing = await readSurvey({ shells: join(folder, 'none.csv') });
      expect(missing.survey).toBeNull();
      expect(missing.problems).toMatchObject([{ file: 'none.csv', line: null, severity: 'error' }]);
      expect(missing.problems[0].message).toMatch(/no such file/);
      const directory = await readSurvey({ shells: folder });
      expect(directory.problems[0].message).toMatch(/folder/);
      const device = await readSurvey({ shells: '/dev/null' });
      expect(device.problems[0].message).toMatch(/no ordinary file/);
    } finally {
      await rm(folder, { recursive: true });
    }
  });

  it('one unreadable file does not hide the problems of the others', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'bedorder-'));
    try {
      const beds = join(folder, 'beds.csv');
      await writeFile(beds, 'section,bed,latitude\nA,1,95\n');
      const { problems } = await readSurvey({ shells: join(folder, 'none.csv'), beds });
      expect(problems.map((p) => [p.file, p.line])).toEqual([
        ['beds.csv', 2],
        ['none.csv', null],
      ]);
    } finally {
      await rm(folder, { recursive: true });
    }
  });

  it('well-known files that are no table are named', async () => {
    const refused = async (bytes: number[]) => {
      const file = { file: 'x', bytes: Uint8Array.from([...bytes, ...utf8(' and more of it')]) };
      return (await surveyFromBytes({ shells: file })).problems[0].message;
    };
    expect(await refused([0xd0, 0xcf, 0x11, 0xe0])).toMatch(/old Excel/);
    expect(await refused([0x25, 0x50, 0x44, 0x46])).toMatch(/PDF/);
    expect(await refused([0x1f, 0x8b])).toMatch(/compressed/);
    expect(await refused([0x50, 0x4b, 3, 4])).toMatch(/zip archive/);
    expect(await refused([...utf8('<html><table>')])).toMatch(/HTML/);
  });
});

describe('all problems are collected', () => {
  it('of one file, by line', async () => {
    const errors = await errorsOf({
      shells: `${HEAD}A,1,P,a,1,x,,\nA,,P,a,1,0.4,,\nA,2,P,,2,0.4,0.1,\nA,3,P,a,3,7,,\n`,
    });
    expect(errors.map((p) => [p.line, p.column])).toEqual([
      [2, 'D/L Asx'],
      [3, 'bed'],
      [4, 'n'],
      [5, 'D/L Asx'],
    ]);
  });

  it('of several files, and long lists of one kind are counted', async () => {
    const rows = Array.from({ length: 100 }, (_, i) => `A,1,P,s${i},1,bad,,\n`).join('');
    const errors = await errorsOf({ shells: HEAD + rows, beds: 'section,bed,level\nA,1,x\n' });
    expect(errors.filter((p) => p.file === 'beds.csv')).toHaveLength(1);
    const ofShells = errors.filter((p) => p.file === 'shells.csv');
    expect(ofShells).toHaveLength(21);
    expect(ofShells[20].message).toMatch(/^80 more problems/);
  });
});
