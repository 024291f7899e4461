import { cpSync, existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { inspectFolder } from '../../src/output/folder/inspect.js';
import { bedorder } from './program.js';

let home: string;
let results: string;
let beds: readonly { readonly key: string; readonly rank: number }[];

/** The program run in the test's own folder. */
const run = (...args: readonly string[]) => bedorder(args, { cwd: home });

beforeAll(async () => {
  home = mkdtempSync(join(tmpdir(), 'bedorder-plan-'));
  const demo = await run('demo', 'demo', '--quiet');
  expect(demo.status, demo.stderr).toBe(0);
  const found = readdirSync(join(home, 'demo'), { recursive: true, encoding: 'utf8' }).find((name) =>
    name.endsWith('results.json'),
  )!;
  results = join('demo', found.replace(/[/\\]?results\.json$/, ''));
  const { order } = JSON.parse(readFileSync(join(home, results, 'results.json'), 'utf8'));
  const clock = order[0].clock;
  beds = order
    .filter((row: { clock: string }) => row.clock === clock)
    .map((row: { section: string; bed: string; rank: number }) => ({
      key: `${row.section}/${row.bed}`,
      rank: row.rank,
    }));
});

afterAll(() => rmSync(home, { recursive: true, force: true }));

/** A dates table of the oldest and the youngest bed. */
function datesOfEnds(oldest: string, youngest: string): string {
  const [first, last] = [beds[0].key, beds[beds.length - 1].key].map((key) => key.split('/'));
  return `section,bed,age_ka,error_ka,limit,method\n${first.join(',')},${oldest},U-series\n${last.join(',')},${youngest},luminescence\n`;
}

describe('bedorder plan', () => {
  it('prints what to do next within 80 columns, and writes the whole of it beside the folder', async () => {
    const { status, stdout, stderr } = await run('plan', results);
    expect(status, stderr).toBe(0);
    expect(stdout).toMatch(/Beds to date so that the most others are bracketed/);
    expect(stdout).toMatch(/A pair of beds counts as resolved when/);
    for (const line of stdout.split('\n')) expect(line.length).toBeLessThanOrEqual(80);
    const [header, ...lines] = readFileSync(join(home, `${results}-plan.csv`), 'utf8')
      .trim()
      .split('\n');
    expect(header).toBe(
      'clock,kind,rank,beds,shells,total,gap,gap_error,power,chance,pairs_gained,beds_bracketed,proven_best,settles',
    );
    expect(lines.filter((line) => line.includes('date beds'))).toHaveLength(3);
    expect(inspectFolder(join(home, results)).kind).toBe('ours');
  });

  it('gives the same bytes again, keeps the budget, and takes results.json too', async () => {
    const before = readFileSync(join(home, `${results}-plan.csv`), 'utf8');
    expect((await run('plan', join(results, 'results.json'))).status).toBe(0);
    expect(readFileSync(join(home, `${results}-plan.csv`), 'utf8')).toBe(before);
    const { stdout } = await run('plan', results, '--dates', '1', '--json', '--out', 'one.csv');
    expect(JSON.parse(stdout).rows.filter((row: { kind: string }) => row.kind === 'date beds')).toHaveLength(1);
    expect(existsSync(join(home, 'one.csv'))).toBe(true);
  });

  it('refuses to write into the results or over what is not its own, and a budget that is none', async () => {
    const inside = await run('plan', results, '--out', join(results, 'plan2.csv'));
    expect([inside.status, inside.stderr]).toEqual([2, expect.stringMatching(/lies in the results folder/)]);
    writeFileSync(join(home, 'mine.csv'), 'my own work\n');
    const over = await run('plan', results, '--out', 'mine.csv');
    expect([over.status, over.stderr]).toEqual([2, expect.stringMatching(/no earlier table of this kind/)]);
    expect(readFileSync(join(home, 'mine.csv'), 'utf8')).toBe('my own work\n');
    const budget = await run('plan', results, '--dates', 'many');
    expect([budget.status, budget.stderr]).toEqual([2, expect.stringMatching(/a whole number from 0 to 20/)]);
    const nowhere = await run('plan', results, '--out', 'no/such/plan.csv');
    expect([nowhere.status, nowhere.stderr]).toEqual([2, expect.stringMatching(/is not there/)]);
  });

  it('refuses results of another major version, as dates does', async () => {
    cpSync(join(home, results), join(home, 'old'), { recursive: true });
    const file = join(home, 'old/results.json');
    writeFileSync(file, readFileSync(file, 'utf8').replace(/"version":\s*"\d+\./, '"version": "99.'));
    writeFileSync(join(home, 'some.csv'), datesOfEnds('200,10,equal', '80,4,equal'));
    for (const args of [
      ['plan', 'old'],
      ['dates', 'old', 'some.csv'],
    ]) {
      const { status, stderr } = await run(...args);
      expect([status, stderr]).toEqual([2, expect.stringMatching(/written by bedorder 99\..*Run the survey again/)]);
    }
  });
});

describe('bedorder dates', () => {
  it('says that good dates agree, and writes every pair', async () => {
    writeFileSync(join(home, 'good.csv'), datesOfEnds('300,15,equal', '80,4,equal'));
    const { status, stdout, stderr } = await run('dates', results, 'good.csv');
    expect(status, stderr).toBe(0);
    expect(stdout).toMatch(/1 agrees, 0 can't tell, and none\s+contradicts/);
    expect(stdout).toMatch(/ratios are never turned into ages/);
    for (const line of stdout.split('\n')) expect(line.length).toBeLessThanOrEqual(80);
    const lines = readFileSync(join(home, `${results}-dates.csv`), 'utf8')
      .trim()
      .split('\n');
    expect(lines[0]).toMatch(/^older,younger,relation,p_relation,older_age_ka/);
    expect(lines[1]).toMatch(/,agrees$/);
  });

  it('says that exchanged dates contradict, and which to doubt', async () => {
    writeFileSync(join(home, 'exchanged.csv'), datesOfEnds('80,4,equal', '300,15,equal'));
    const { stdout } = await run('dates', results, 'exchanged.csv', '--json', '--out', 'pairs.csv');
    expect(JSON.parse(stdout)).toMatchObject({ fewest: 1, pairs: [{ verdict: 'contradicts' }] });
    writeFileSync(join(home, 'limits.csv'), datesOfEnds('80,4,younger', '300,15,older'));
    expect((await run('dates', results, 'limits.csv')).stdout).toMatch(/contradicts/);
  });

  it('lists every problem of a dates table with its place, and writes nothing', async () => {
    writeFileSync(join(home, 'bad.csv'), datesOfEnds('eighty,4,equal', '300,0,perhaps'));
    const { status, stdout, stderr } = await run('dates', results, 'bad.csv', '--out', 'bad-pairs.csv');
    expect([status, stdout]).toEqual([2, '']);
    for (const sign of ['bad.csv:2: error: age_ka', 'bad.csv:3: error: error_ka', 'bad.csv:3: error: limit']) {
      expect(stderr).toContain(sign);
    }
    expect(existsSync(join(home, 'bad-pairs.csv'))).toBe(false);
  });

  it('never writes over the dates it was given', async () => {
    writeFileSync(join(home, 'given.csv'), datesOfEnds('300,15,equal', '80,4,equal'));
    const { status, stderr } = await run('dates', results, 'given.csv', '--out', 'given.csv');
    expect([status, stderr]).toEqual([2, expect.stringMatching(/is the input, and is not written over/)]);
  });
});
