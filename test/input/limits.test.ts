import { describe, expect, it } from 'vitest';
import { LIMITS } from '../../src/input/index.js';
import { errorsOf, readTexts, warningsOf } from './survey-of.js';

const HEAD = 'section,bed,taxon,shell,A/I\n';

describe('limits are stated and kept', () => {
  it('columns', async () => {
    const extra = (count: number) => Array.from({ length: count }, (_, i) => `c${i}`).join(',');
    const table = (count: number) => ({
      shells: `section,bed,taxon,shell,A/I,${extra(count)}\nA,1,P,a,0.4${','.repeat(count)}\n`,
    });
    expect(await errorsOf(table(LIMITS.columns - 5))).toEqual([]);
    expect((await errorsOf(table(LIMITS.columns - 4)))[0].message).toMatch(/1001 columns; at most 1000/);
  });

  it('errors: reading stops after 10,000, and says where', async () => {
    const rows = Array.from({ length: 20_000 }, (_, i) => `A,1,P,s${i},x\n`).join('');
    const errors = await errorsOf({ shells: HEAD + rows });
    const stopped = errors.filter((p) => /Reading stopped here/.test(p.message));
    expect(stopped).toMatchObject([{ line: 10_003 }]);
    expect(errors.length).toBeLessThan(25);
  });

  it('beds', async () => {
    const rows = Array.from({ length: LIMITS.beds + 1 }, (_, i) => `S${i},1,P,a,0.4\n`);
    expect((await readTexts({ shells: HEAD + rows.slice(1).join('') })).survey?.beds).toHaveLength(LIMITS.beds);
    const errors = await errorsOf({ shells: HEAD + rows.join('') });
    expect(errors[0].message).toMatch(/more than 200000 beds/);
  });

  it('numeric columns of the beds table', async () => {
    const names = Array.from({ length: 101 }, (_, i) => `c${i}`);
    const beds = `section,bed,${names.join(',')}\nA,1,${names.map(() => '1').join(',')}\n`;
    const { survey } = await readTexts({ shells: `${HEAD}A,1,P,a,0.4\n`, beds });
    expect(Object.keys(survey!.beds[0].columns)).toHaveLength(LIMITS.gradientColumns);
    expect((await warningsOf({ shells: `${HEAD}A,1,P,a,0.4\n`, beds }, /not known/))[0].message).toMatch(/"c100"/);
  });
});
