import { describe, expect, it } from 'vitest';
import { errorsOf, readTexts, surveyOf, warningsOf } from './survey-of.js';

/** Two sections of three beds, lowest first, and a bed without a place. */
const SHELLS = `section,bed,taxon,shell,level,A/I
A,1,P,a,1,0.5
A,2,P,a,2,0.4
A,3,P,a,3,0.3
B,1,P,a,1,0.5
B,2,P,a,2,0.4
B,3,P,a,3,0.3
C/x,y,P,a,,0.3
`;
const relations = (rows: string) => ({ shells: SHELLS, relations: `lower,upper,basis,kind,certainty\n${rows}` });

describe('the relations table', () => {
  it('reads every basis, kind and certainty, with defaults', async () => {
    const survey = await surveyOf(
      relations(
        'A/1,B/2,Cross cutting,,\nA/1,B/3,inset,older,probable\nA/2,B/2,,same,certain\nA/1,C/x/y,staircase,,\nB/1,C/x/y,inclusion,,\nA/3,B/3,marker,same,\n',
      ),
    );
    expect(survey.relations.map((r) => [r.lower, r.upper, r.basis, r.kind, r.certainty, r.row?.line])).toEqual([
      ['A/1', 'B/2', 'cross-cutting', 'older', 'certain', 2],
      ['A/1', 'B/3', 'inset', 'older', 'probable', 3],
      ['A/2', 'B/2', 'marker', 'same', 'certain', 4],
      ['A/1', 'C/x/y', 'staircase', 'older', 'certain', 5],
      ['B/1', 'C/x/y', 'inclusion', 'older', 'certain', 6],
      ['A/3', 'B/3', 'marker', 'same', 'certain', 7],
    ]);
  });

  it('needs lower and upper only', async () => {
    const survey = await surveyOf({ shells: SHELLS, relations: 'lower;upper\nA / 1;B / 2\n' });
    expect(survey.relations).toMatchObject([
      { lower: 'A/1', upper: 'B/2', basis: 'superposition', kind: 'older', certainty: 'certain' },
    ]);
  });

  it('refuses beds that no table has, with the one that may be meant', async () => {
    const errors = await errorsOf(relations('A/1,B/9,,,\na/1,B/2,,,\nA1,B/2,,,\nA/1,Nowhere,,,\n'));
    expect(errors.map((p) => [p.line, p.column])).toEqual([
      [2, 'upper'],
      [3, 'lower'],
      [4, 'lower'],
      [5, 'upper'],
    ]);
    expect(errors[1].message).toMatch(/Did you mean "A\/1"\?/);
    expect(errors[3].message).toMatch(/section\/bed/);
  });

  it('refuses words it does not know, and a bed against itself', async () => {
    const errors = await errorsOf(relations('A/1,B/2,guess,elder,perhaps\nA/1,A/1,,,\n'));
    expect(errors.map((p) => [p.line, p.column])).toEqual([
      [2, 'kind'],
      [2, 'basis'],
      [2, 'certainty'],
      [3, null],
    ]);
  });

  it('warns of a relation that comes twice', async () => {
    expect(await warningsOf(relations('A/1,B/2,,,\nA/1,B/2,inset,,\n'), /also stands on line 2/)).toMatchObject([
      { line: 3 },
    ]);
  });
});

describe('circles', () => {
  const circle = async (rows: string) => {
    const errors = await errorsOf(relations(rows));
    return errors.map((p) => [p.line, /: ([^:]+?)\. It rests/.exec(p.message)?.[1]]);
  };

  it('against superposition, printed whole', async () => {
    expect(await circle('A/3,A/1,,,\n')).toEqual([[2, 'A/3 > A/1 > A/2 > A/3']]);
  });

  it('across sections', async () => {
    expect(await circle('A/3,B/1,,,\nB/3,A/1,,,\n')).toEqual([[3, 'A/3 > B/1 > B/2 > B/3 > A/1 > A/2 > A/3']]);
  });

  it('through beds that are as old', async () => {
    expect(await circle('A/3,B/1,,same,\nB/3,A/2,,same,\n')).toEqual([[3, 'A/2 > A/3 = B/1 > B/2 > B/3 = A/2']]);
  });

  it('of beds of one section said to be as old', async () => {
    expect(await circle('A/1,A/3,,same,\n')).toEqual([[2, 'A/1 > A/2 > A/3 = A/1']]);
  });

  it('one a knot, two where there are two', async () => {
    expect(await circle('A/3,A/1,,,\nA/2,A/1,,,\nB/2,B/1,,,\n')).toHaveLength(2);
  });

  it('none where a relation is only probable, or all agree', async () => {
    expect(await circle('A/3,A/1,,,probable\nA/1,B/3,,,\nA/2,B/2,,same,\n')).toEqual([]);
    expect(await circle('A/1,A/3,,same,probable\n')).toEqual([]);
  });

  it('depth turns the section round', async () => {
    const shells = 'section,bed,taxon,shell,depth_m,A/I\nA,1,P,a,3,0.5\nA,2,P,a,1,0.4\n';
    expect(await errorsOf({ shells, relations: 'lower,upper\nA/1,A/2\n' })).toEqual([]);
    expect(await errorsOf({ shells, relations: 'lower,upper\nA/2,A/1\n' })).toHaveLength(1);
  });

  it('beds at one place are ordered against the others, not with each other', async () => {
    const shells =
      'section,bed,taxon,shell,level,A/I\nA,1a,P,a,1,0.5\nA,1b,P,a,1,0.5\nA,2a,P,a,2,0.4\nA,2b,P,a,2,0.4\n';
    expect(await errorsOf({ shells, relations: 'lower,upper\nA/1a,A/1b\n' })).toEqual([]);
    const [error] = await errorsOf({ shells, relations: 'lower,upper\nA/2b,A/1a\n' });
    expect(error.message).toContain('A/2b > A/1a > A/2b');
  });

  it('a chain of 50,000 beds is no trouble', async () => {
    const shells = ['section,bed,taxon,shell,level,A/I'];
    for (let i = 0; i < 50_000; i += 1) shells.push(`A,${i},P,a,${i},0.5`, `A,${i},P,b,${i},0.5`);
    const { problems } = await readTexts({ shells: shells.join('\n'), relations: 'lower,upper\nA/49999,A/0\n' });
    expect(problems.filter((p) => p.severity === 'error')).toHaveLength(1);
  });
});
