import { describe, expect, it } from 'vitest';
import { nearTaxa } from '../../src/input/check-names.js';
import { errorsOf, surveyOf, warningsOf } from './survey-of.js';

describe('places', () => {
  it('two for one bed: within the shells, and shells against beds', async () => {
    const shells = 'section,bed,taxon,shell,level,A/I\nA,1,P,a,1,0.5\nA,1,P,b,1.0,0.5\nA,1,P,c,2,0.5\n';
    expect(await errorsOf({ shells })).toMatchObject([{ file: 'shells.csv', line: 4, column: 'level' }]);
    const against = await errorsOf({
      shells: 'section,bed,taxon,shell,level,A/I\nA,1,P,a,1,0.5\n',
      beds: 'section,bed,Level\nA,1,3\n',
    });
    expect(against).toMatchObject([{ file: 'beds.csv', line: 2, column: 'Level' }]);
    expect(against[0].message).toMatch(/level 1 \(shells\.csv, line 2\) and level 3/);
  });

  it('of two kinds in a row, in a bed, in a section', async () => {
    const both = 'section,bed,taxon,shell,level,height_m,A/I\n';
    expect(await errorsOf({ shells: `${both}A,1,P,a,1,2.5,0.5\n` })).toMatchObject([{ line: 2, column: 'height_m' }]);
    expect(await errorsOf({ shells: `${both}A,1,P,a,1,,0.5\nA,1,P,b,,1,0.5\n` })).toMatchObject([
      { line: 3, column: 'height_m' },
    ]);
    const section = await errorsOf({ shells: `${both}A,1,P,a,1,,0.5\nA,2,P,a,,1,0.5\nB,1,P,a,,1,0.4\n` });
    expect(section).toMatchObject([{ line: 3, column: 'height_m' }]);
    expect(section[0].message).toMatch(/two kinds: level \(bed 1, shells\.csv, line 2\) and height_m \(bed 2\)/);
  });

  it('a depth below 0 would turn the section round', async () => {
    const errors = await errorsOf({ shells: 'section,bed,taxon,shell,depth_m,A/I\nA,1,P,a,-1,0.5\n' });
    expect(errors).toMatchObject([{ line: 2, column: 'depth_m' }]);
  });

  it('a bed without one, among others, is warned of; a lone bed is not', async () => {
    const shells = 'section,bed,taxon,shell,level,A/I\nA,1,P,a,1,0.5\nA,2,P,a,,0.4\nB,1,P,a,,0.4\n';
    expect(await warningsOf({ shells }, /no place in its section/)).toMatchObject([{ line: 3 }]);
  });

  it('a relation to another bed of the section is as good as one, a relation to another section is not', async () => {
    const shells = 'section,bed,taxon,shell,A/I\nA,1,P,a,0.5\nA,2,P,a,0.4\nA,3,P,a,0.4\nB,1,P,a,0.4\n';
    const relations = 'lower,upper,basis\nA/1,A/2,staircase\nA/3,B/1,marker\n';
    expect(await warningsOf({ shells, relations }, /no place in its section/)).toMatchObject([{ line: 4 }]);
    expect(await warningsOf({ shells, relations }, /superposition is not known/)).toHaveLength(0);
  });

  it('none at all is told once', async () => {
    const shells = 'section,bed,taxon,shell,A/I\nA,1,P,a,0.5\nA,2,P,a,0.4\nB,1,P,a,0.4\nB,2,P,a,0.4\n';
    expect(await warningsOf({ shells }, /superposition is not known/)).toHaveLength(1);
    expect(await warningsOf({ shells }, /no place in its section/)).toHaveLength(0);
  });

  it('one for two beds is warned of', async () => {
    const shells = 'section,bed,taxon,shell,level,A/I\nA,1,P,a,1,0.5\nA,2,P,a,1,0.4\n';
    expect(await warningsOf({ shells }, /neither is above the other/)).toHaveLength(1);
  });
});

describe('the beds table', () => {
  const shells = 'section,bed,taxon,shell,A/I\nA,1,P,a,0.5\n';

  it('keeps every numeric column under its header and its name, and lists the others', async () => {
    const beds =
      'Section;Bed;Level;Elevation (m);CMAT (°C);distance;remark\nA;1;1;12,5;11,25;3,5;fine sand\nA;2;2;;;4;\n';
    const survey = await surveyOf({ shells, beds });
    expect(survey.beds[0]).toMatchObject({ elevation_m: 12.5, cmat_c: 11.25, place: { kind: 'level', value: 1 } });
    expect(survey.beds[0].columns).toEqual({
      'Elevation (m)': 12.5,
      elevation_m: 12.5,
      'CMAT (°C)': 11.25,
      cmat_c: 11.25,
      Level: 1,
      distance: 3.5,
    });
    expect(survey.beds[1].columns).toEqual({ Level: 2, distance: 4 });
    expect(await warningsOf({ shells, beds }, /not known/)).toMatchObject([{ file: 'beds.csv', line: 1 }]);
  });

  it('refuses degrees out of range, and a bed with two values', async () => {
    const errors = await errorsOf({
      shells,
      beds: 'section,bed,latitude,longitude,burial_m\nA,1,91,181,-1\nA,2,50,5,1\nA,2,51,5,1\n',
    });
    expect(errors.map((p) => [p.line, p.column])).toEqual([
      [2, 'latitude'],
      [2, 'longitude'],
      [2, 'burial_m'],
      [4, 'latitude'],
    ]);
  });

  it('warns of a bed that comes twice alike', async () => {
    expect(
      await warningsOf({ shells, beds: 'section,bed,cmat_c\nA,1,9\nA,1,9\n' }, /also stands on line 2/),
    ).toHaveLength(1);
  });
});

describe('names nearly alike', () => {
  it('three spellings of one genus are named in one warning, with the lines that join them', async () => {
    const rows = ['Patellina', 'Patellina', 'Patelina', 'Pattelina', 'Macoma'].map(
      (taxon, i) => `A,1,${taxon},s${i},0.5\n`,
    );
    const found = await warningsOf({ shells: `section,bed,taxon,shell,A/I\n${rows.join('')}` }, /nearly the same/);
    expect(found).toHaveLength(1);
    expect(found[0].message).toContain('"Patellina" (2 rows), "Patelina" (1 row) and "Pattelina" (1 row)');
    expect(found[0].message).toContain('Patelina,Patellina | Pattelina,Patellina');
    expect(found[0].line).toBe(4);
  });

  it.each([
    ['Macoma balthica', 'Macoma baltica'],
    ['macoma', 'Macoma'],
    ['Mya  arenaria', 'Mya arenaria'],
    ['Mya arenaria', 'Mya arenarea'],
    ['Glycymeris', 'Glycimeris'],
    ['Glycymeris', 'Glycmyeris'],
    ['Tapes-decussatus', 'Tapes decussatus'],
  ])('%s and %s', (a, b) => expect(nearTaxa(a, b)).toBe(true));

  it.each([
    ['Mya arenaria', 'Mya truncata'],
    ['Mya', 'Mia'],
    ['Astarte sp. A', 'Astarte sp. B'],
    ['Taxon 1', 'Taxon 2'],
    ['Patella vulgata', 'Patella depressa'],
    ['Arctica', 'Astarte'],
    ['Tellina', 'Tellinella'],
    ['Cerastoderma edule', 'Cerastoderma glaucum'],
    ['Macoma', 'Macoma balthica'],
  ])('not %s and %s', (a, b) => expect(nearTaxa(a, b)).toBe(false));

  it('sections and beds that differ in case or spaces', async () => {
    const shells =
      'section,bed,taxon,shell,level,A/I\nCape Sorrel,1a,P,a,1,0.5\ncape sorrel,1a,P,a,1,0.5\nB,1a,P,a,1,0.5\nB,1 A,P,b,2,0.5\n';
    expect(await warningsOf({ shells }, /section names "Cape Sorrel" and "cape sorrel"/)).toMatchObject([{ line: 3 }]);
    expect(await warningsOf({ shells }, /bed names "B\/1a" and "B\/1 A"/)).toMatchObject([{ line: 5 }]);
  });

  it('two beds that would be called the same are refused', async () => {
    const errors = await errorsOf({ shells: 'section,bed,taxon,shell,A/I\na/b,c,P,a,0.5\na,b/c,P,a,0.5\n' });
    expect(errors).toMatchObject([{ line: 3 }]);
    expect(errors[0].message).toContain('both be called a/b/c');
  });
});

describe('aliases and standards', () => {
  const shells = 'section,bed,taxon,shell,A/I\nA,1,Patelina,a,0.5\nA,1,Pattelina,b,0.5\nA,1,Patellina,c,0.5\n';

  it('join taxa, also through each other, and silence the warning', async () => {
    const texts = { shells, aliases: 'name,taxon\nPatelina,Pattelina\nPattelina,Patellina\n' };
    expect(new Set((await surveyOf(texts)).analyses.map((a) => a.taxon))).toEqual(new Set(['Patellina']));
    expect(await warningsOf(texts, /nearly the same/)).toHaveLength(0);
  });

  it('refuse a circle and two taxa for one name; warn of names not met', async () => {
    expect(await errorsOf({ shells, aliases: 'name,taxon\nX,Y\nY,X\n' })).toHaveLength(1);
    expect(await errorsOf({ shells, aliases: 'name,taxon\nX,Y\nX,Z\n' })).toMatchObject([{ line: 3, column: 'name' }]);
    const unused = await warningsOf(
      { shells, aliases: 'name,taxon\nPatellena,Patellina\n' },
      /No row of the shells table/,
    );
    expect(unused[0].message).toMatch(/did you mean "Patel/);
  });

  it('standards are read, and held to the limits of ratios', async () => {
    const survey = await surveyOf({ shells, standards: 'Lab;Standard;Amino acid;D/L\nNorth;S1;Asp;0,42\n' });
    expect(survey.standards).toEqual([
      { file: 'standards.csv', line: 2, lab: 'North', standard: 'S1', amino_acid: 'Asx', dl: 0.42 },
    ]);
    const errors = await errorsOf({ shells, standards: 'lab,standard,amino_acid,dl\nNorth,S1,Asp,4\nNorth,,Qqq,\n' });
    expect(errors.map((p) => [p.line, p.column])).toEqual([
      [2, 'dl'],
      [3, 'standard'],
      [3, 'amino_acid'],
      [3, 'dl'],
    ]);
  });
});
