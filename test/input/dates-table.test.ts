import { describe, expect, it } from 'vitest';
import { datesFromBytes } from '../../src/input/index.js';
import { utf8 } from './survey-of.js';

const read = (text: string) => datesFromBytes({ file: 'dates.csv', bytes: utf8(text) });

describe('the dates table', () => {
  it('is read, a limit of equal by default', async () => {
    const { dates, input, problems } = await read(
      'Section;Bed;Age (ka);error_ka;limit;method\nA;1;125,5;4,5;;U-Th\nA;2;80;2;Older;\n',
    );
    expect(problems).toEqual([]);
    expect(dates).toEqual([
      {
        file: 'dates.csv',
        line: 2,
        section: 'A',
        bed: '1',
        age_ka: 125.5,
        error_ka: 4.5,
        limit: 'equal',
        method: 'U-Th',
      },
      { file: 'dates.csv', line: 3, section: 'A', bed: '2', age_ka: 80, error_ka: 2, limit: 'older', method: null },
    ]);
    expect(input).toMatchObject({ role: 'dates', rows: 2 });
  });

  it('refuses what is wrong, each with its place', async () => {
    const { dates, problems } = await read(
      'section,bed,age_ka,error_ka,limit\nA,,125,4,\nA,1,-5,4,\nA,1,125,0,\nA,1,,4,\nA,1,120-130,4,\nA,1,125,4,about\n',
    );
    expect(dates).toBeNull();
    expect(problems.map((p) => [p.line, p.column])).toEqual([
      [2, 'bed'],
      [3, 'age_ka'],
      [4, 'error_ka'],
      [5, 'age_ka'],
      [6, 'age_ka'],
      [7, 'limit'],
    ]);
  });

  it('tells a missing column, and the one that may be meant', async () => {
    const { dates, problems } = await read('section,bed,age,error_ka\nA,1,125,4\n');
    expect(dates).toBeNull();
    expect(problems.map((p) => p.severity)).toEqual(['warning', 'error']);
    expect(problems[0].message).toMatch(/"age" \(wanted is age_ka/);
  });
});
