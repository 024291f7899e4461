import { describe, expect, it } from 'vitest';
import { aminoAcidOf, measureOf } from '../../src/input/column-names.js';
import { shellsKey } from '../../src/input/shells-columns.js';
import { analysesOf, errorsOf, warningsOf } from './survey-of.js';

describe('headers as laboratories write them', () => {
  it.each([
    [
      'Asx',
      [
        'D/L Asx',
        'Asx D/L',
        'D/L Asp',
        'Asp D/L',
        'DL_Asp',
        'D/L Aspartic',
        'aspartic acid D/L',
        'D-Asp/L-Asp',
        'D/L-Asp',
        'd/l_ASX',
        'Asp (D/L)',
        'mean D/L Asp',
      ],
    ],
    ['Glx', ['D/L Glx', 'Glu D/L', 'D/L Glutamic acid', 'D-Glu/L-Glu']],
    ['Ser', ['D/L Ser', 'Serine D/L']],
    ['Ala', ['D/L Ala', 'D-Ala/L-Ala', 'alanine d/l']],
    ['Val', ['D/L Val', 'Valine D/L']],
    ['Phe', ['D/L Phe', 'Phenylalanine D/L']],
    ['Leu', ['D/L Leu', 'Leucine D/L']],
    ['Tyr', ['D/L Tyr']],
    ['Met', ['D/L Met', 'Methionine D/L']],
    [
      'Ile',
      [
        'A/I',
        'aIle/Ile',
        'alle/Ile',
        'D-Aile/L-Ile',
        'D/L Ile',
        'Ile D/L',
        'alloIle/Ile',
        'D-alloisoleucine/L-isoleucine',
        'a-Ile/Ile',
        'AI',
        'A/I ratio',
      ],
    ],
  ])('%s', (amino, headers) => {
    for (const header of headers) expect([header, measureOf(header)?.key]).toEqual([header, `ratio ${amino}`]);
  });

  it('standard deviations', () => {
    for (const header of [
      'D/L Asx sd',
      'sd D/L Asx',
      'Asp D/L SD',
      'Asx sd',
      'D/L Asp ±',
      'D/L Asx 1σ',
      'D/L Asx st. dev.',
    ]) {
      expect([header, measureOf(header)?.key]).toEqual([header, 'sd Asx']);
    }
    expect(measureOf('A/I sd')?.key).toBe('sd Ile');
    expect(measureOf('D/L Asx se')).toBeNull();
    expect(measureOf('D/L Asx 2σ')).toBeNull();
  });

  it('concentrations and the serine ratio', () => {
    expect(measureOf('[Asx]')).toEqual({ key: 'concentration Asx', unit: null });
    expect(measureOf('[Ser] (nmol/g)')).toEqual({ key: 'concentration Ser', unit: 'nmol/g' });
    expect(measureOf('Asp (pmol/mg)')).toEqual({ key: 'concentration Asx', unit: 'pmol/mg' });
    expect(measureOf('conc. Glu')?.key).toBe('concentration Glx');
    expect(measureOf('L-Ser/L-Asp')?.key).toBe('serine');
    expect(measureOf('[L-Ser]/[L-Asx]')?.key).toBe('serine');
    expect(measureOf('[Ser]/[Asp]')).toBeNull();
  });

  it('names that are no column of ours', () => {
    for (const header of ['constructor', '__proto__', 'toString', 'Asx', 'sample', '', 'DL']) {
      if (header !== 'DL') expect([header, shellsKey(header)]).toEqual([header, null]);
    }
    expect(aminoAcidOf('valueOf')).toBeNull();
    expect(aminoAcidOf('A/I')).toBe('Ile');
  });
});

describe('columns of a table', () => {
  it('two that mean the same are an error', async () => {
    const errors = await errorsOf({ shells: 'section,bed,taxon,shell,D/L Asx,Asp D/L\nA,1,P,a,0.4,0.5\n' });
    expect(errors).toMatchObject([{ line: 1, column: 'Asp D/L' }]);
    expect(errors[0].message).toMatch(/"D\/L Asx" \(number 5\) and "Asp D\/L" \(number 6\) mean the same/);
  });

  it('unknown ones are listed once, with what they may be', async () => {
    const shells = 'section,bed,taxon,shel,A/I,Asp,elevation_m,colour,\nA,1,P,a,0.4,0.5,3,red,x\n';
    const found = await warningsOf({ shells }, /not known/);
    expect(found).toHaveLength(1);
    expect(found[0].line).toBe(1);
    expect(found[0].message).toMatch(/"shel" \(did you mean shell\?\)/);
    expect(found[0].message).toMatch(/"Asp" \(may be a ratio or a concentration/);
    expect(found[0].message).toMatch(/"elevation_m" \(belongs in the beds table\)/);
    expect(found[0].message).toMatch(/"colour"/);
    expect(found[0].message).toMatch(/column 9 \(without a name\)|, "colour"\./);
  });

  it('a missing one is told with the column that may be meant', async () => {
    const [error] = await errorsOf({ shells: 'site,bed,taxon,shell,A/I\nA,1,P,a,0.4\n' });
    expect(error.message).toMatch(/no column "section".*"site"/);
    const [bare] = await errorsOf({ shells: 'section,bed,taxon,shell,Asp\nA,1,P,a,0.4\n' });
    expect(bare.message).toMatch(/call it "D\/L Asp"/);
  });

  it('concentrations in two units are refused', async () => {
    const shells = 'section,bed,taxon,shell,A/I,[Asx] nmol/g,[Ser] pmol/mg\nA,1,P,a,0.4,5,6\n';
    expect((await errorsOf({ shells }))[0].message).toMatch(/one unit/);
  });

  it('a title above the header is told, and lines keep their numbers', async () => {
    const shells = 'Results of the spring campaign\n\n"made, by hand"\nsection,bed,taxon,shell,A/I\nA,1,P,a,0.4\n';
    expect((await analysesOf(shells))[0].line).toBe(5);
    expect(await warningsOf({ shells }, /Lines 1 to 3 stand above the header/)).toHaveLength(1);
  });

  it('a table without a header is refused with advice', async () => {
    const [error] = await errorsOf({ shells: 'A,1,P,a,0.4\nA,1,P,b,0.41\n' });
    expect(error.message).toMatch(/No header was found/);
  });
});
