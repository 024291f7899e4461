import { describe, expect, it } from 'vitest';
import { analysesOf, errorsOf, surveyOf, warningsOf } from './survey-of.js';

describe('the wide form', () => {
  it('reads names, ratios, concentrations and the serine ratio', async () => {
    const [row] = await analysesOf(
      'Section,BED,Taxon,Shell,Preparation,Injection,Lab_ID,Lab,Method,Fraction,Level,D/L Asx,Glu D/L,A/I,[Ser],L-Ser/L-Asp\n' +
        ' Cape  Sorrel , 1 ,Patellina,a,p1,i2,L-7,North,HPLC,faa,1,0.5,0.3,0.4,12,0.7\n',
    );
    expect(row).toEqual({
      file: 'shells.csv',
      line: 2,
      section: 'Cape Sorrel',
      bed: '1',
      taxon: 'Patellina',
      fraction: 'FAA',
      shell: 'a',
      preparation: 'p1',
      injection: 'i2',
      lab_id: 'L-7',
      lab: 'North',
      method: 'HPLC',
      ratios: { Asx: 0.5, Glx: 0.3, Ile: 0.4 },
      concentrations: { Ser: 12 },
      serine_ratio: 0.7,
      summary: null,
    });
  });

  it('gives the places and beds in order of appearance, beds of the beds table last', async () => {
    const { beds } = await surveyOf({
      shells: 'section,bed,taxon,shell,depth (m),A/I\nB,lower,P,1,2.5,0.4\nB,lower,P,2,,0.4\nA,x,P,1,,0.2\n',
      beds: 'section,bed,depth_m,elevation_m\nB,upper,1,\nA,x,,12.5\n',
    });
    expect(beds.map((b) => [b.section, b.bed, b.place, b.elevation_m])).toEqual([
      ['B', 'lower', { kind: 'depth_m', value: 2.5 }, null],
      ['A', 'x', null, 12.5],
      ['B', 'upper', { kind: 'depth_m', value: 1 }, null],
    ]);
  });

  it('believes A/I up to 1.5 and the others up to 1.2', async () => {
    expect(await analysesOf('section,bed,taxon,shell,A/I,D/L Asx\nA,1,P,a,1.5,1.2\n')).toHaveLength(1);
    expect(await errorsOf({ shells: 'section,bed,taxon,shell,A/I\nA,1,P,a,1.51\n' })).toHaveLength(1);
  });

  it('warns of a row without any ratio, and does not use it', async () => {
    const shells = 'section,bed,taxon,shell,A/I\nA,1,P,a,0.4\nA,1,P,b,\n';
    expect(await analysesOf(shells)).toHaveLength(1);
    expect(await warningsOf({ shells }, /no D\/L value/)).toMatchObject([{ line: 3 }]);
  });

  it('refuses a fraction it does not know', async () => {
    const errors = await errorsOf({ shells: 'section,bed,taxon,shell,fraction,A/I\nA,1,P,a,bound,0.4\n' });
    expect(errors).toMatchObject([{ line: 2, column: 'fraction' }]);
  });
});

describe('the long form', () => {
  it('joins the rows of one analysis, and keeps replicates apart', async () => {
    const analyses = await analysesOf(
      'section,bed,taxon,shell,amino_acid,dl\n' +
        'A,1,P,a,Asp,0.5\nA,1,P,a,aspartic acid,0.52\nA,1,P,a,A/I,0.4\nA,1,P,b,Glu,0.3\nA,1,P,a,Glu,0.31\n',
    );
    expect(analyses.map((a) => [a.shell, a.line, a.ratios])).toEqual([
      ['a', 2, { Asx: 0.5, Ile: 0.4, Glx: 0.31 }],
      ['a', 3, { Asx: 0.52 }],
      ['b', 5, { Glx: 0.3 }],
    ]);
  });

  it('takes summaries with their sd and n, apart where n differs', async () => {
    const analyses = await analysesOf(
      'section,bed,taxon,amino_acid,dl,dl_sd,n\nA,1,P,Asx,0.5,0.02,6\nA,1,P,Glx,0.3,0.01,6\nA,1,P,Ile,0.2,0.03,4\n',
    );
    expect(analyses.map((a) => [a.ratios, a.summary])).toEqual([
      [
        { Asx: 0.5, Glx: 0.3 },
        { n: 6, sd: { Asx: 0.02, Glx: 0.01 } },
      ],
      [{ Ile: 0.2 }, { n: 4, sd: { Ile: 0.03 } }],
    ]);
  });

  it('refuses an amino acid it does not know, and a limit by amino acid', async () => {
    const shells = 'section,bed,taxon,shell,amino_acid,dl\nA,1,P,a,Xyz,0.5\nA,1,P,a,Asx,1.3\nA,1,P,a,Ile,1.3\n';
    expect((await errorsOf({ shells })).map((p) => [p.line, p.column])).toEqual([
      [2, 'amino_acid'],
      [3, 'dl'],
    ]);
  });

  it('refuses both forms at once, and half of the long one', async () => {
    expect(
      (await errorsOf({ shells: 'section,bed,taxon,shell,amino_acid,dl,A/I\nA,1,P,a,Asx,0.5,0.4\n' }))[0].message,
    ).toMatch(/one form/);
    expect((await errorsOf({ shells: 'section,bed,taxon,shell,dl\nA,1,P,a,0.5\n' }))[0].message).toMatch(
      /"amino_acid"/,
    );
  });
});

describe('published summaries', () => {
  const HEAD = 'section,bed,taxon,shell,A/I,A/I sd,n\n';

  it('stand beside shells', async () => {
    const analyses = await analysesOf(`${HEAD}A,1,P,,0.4,0.02,6\nA,2,P,a,0.3,,\n`);
    expect(analyses.map((a) => a.summary)).toEqual([{ n: 6, sd: { Ile: 0.02 } }, null]);
  });

  it('a mean alone counts as one shell, and says so', async () => {
    const shells = `${HEAD}A,1,P,,0.4,,\n`;
    expect((await analysesOf(shells))[0].summary).toEqual({ n: 1, sd: {} });
    expect(await warningsOf({ shells }, /counts as one shell/)).toMatchObject([{ line: 2 }]);
  });

  it('n without sd is a mean of n shells', async () => {
    expect((await analysesOf(`${HEAD}A,1,P,,0.4,,5\n`))[0].summary).toEqual({ n: 5, sd: {} });
  });

  it.each([
    ['n is a whole number', 'A,1,P,,0.4,0.02,2.5', 'n'],
    ['n is at least 1', 'A,1,P,,0.4,,0', 'n'],
    ['one shell has no sd', 'A,1,P,,0.4,0.02,1', 'n'],
    ['an sd is not below 0', 'A,1,P,,0.4,-0.02,4', 'A/I sd'],
    ['an sd needs its ratio', 'A,1,P,,,0.02,4', 'A/I sd'],
  ])('%s', async (_what, row, column) => {
    expect(await errorsOf({ shells: `${HEAD}${row}\n` })).toMatchObject([{ line: 2, column }]);
  });

  it('n and sd of a named shell are not used, with a warning', async () => {
    const shells = `${HEAD}A,1,P,a,0.4,0.02,3\n`;
    expect((await analysesOf(shells))[0].summary).toBeNull();
    expect(await warningsOf({ shells }, /not used/)).toHaveLength(1);
  });

  it('an sd column without its ratio is refused', async () => {
    const errors = await errorsOf({ shells: 'section,bed,taxon,A/I,D/L Asx sd,n\nA,1,P,0.4,0.02,3\n' });
    expect(errors).toMatchObject([{ line: 1, column: 'D/L Asx sd' }]);
  });
});

describe('repeats', () => {
  it('a row that is the same in every cell', async () => {
    const shells = 'section,bed,taxon,shell,A/I\nA,1,P,a,0.4\nA,1,P,b,0.41\nA,1,P,a,0.4\n';
    expect(await warningsOf({ shells }, /same as line 2/)).toMatchObject([{ line: 4 }]);
  });

  it('a laboratory number on another shell or twice on one analysis, not on injections and fractions of one shell', async () => {
    const HEAD = 'section,bed,taxon,shell,injection,fraction,lab id,A/I\n';
    const twice = (rows: string) => warningsOf({ shells: HEAD + rows }, /laboratory number/);
    expect(await twice('A,1,P,a,1,THAA,L1,0.4\nA,1,P,b,1,THAA,L1,0.41\n')).toMatchObject([
      { line: 3, column: 'lab id' },
    ]);
    expect(await twice('A,1,P,a,1,THAA,L1,0.4\nA,1,P,a,1,THAA,L1,0.41\n')).toHaveLength(1);
    expect(await twice('A,1,P,a,1,THAA,L1,0.4\nA,1,P,a,2,THAA,L1,0.41\nA,1,P,a,1,FAA,L1,0.5\n')).toHaveLength(0);
  });

  it('beds of one shell', async () => {
    const shells =
      'section,bed,taxon,shell,A/I,n\nA,1,P,a,0.4,\nA,1,P,a,0.41,\nA,2,P,a,0.3,\nA,2,P,b,0.3,\nA,3,P,,0.2,4\n';
    const found = await warningsOf({ shells }, /one shell/);
    expect(found.map((p) => p.message.slice(0, 40))).toEqual(['Bed A/1 has one shell of P: nothing show']);
  });
});
