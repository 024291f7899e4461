import { createHash } from 'node:crypto';
import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { analyse, DEFAULT_OPTIONS, type Host, runTask, type Survey, surveyFromBytes } from '../../src/index.js';
import { resultsText } from '../house/written.js';
import { bedorder, ROOT } from './program.js';

/* The same input, options and seed give the same bytes, whatever the machine says of time, place, language and cores. */

const file = (name: string) => ({
  file: name,
  bytes: new Uint8Array(readFileSync(join(ROOT, 'examples/coast', name))),
});

describe('whoever does the tasks, and in whatever order', () => {
  let survey: Survey;
  const results = async (map: Host['map']) => {
    const findings = await analyse(survey, { ...DEFAULT_OPTIONS, simulations: 39 }, { map, progress: () => {} });
    return resultsText(findings);
  };
  let tasksSeen = 0;
  let inPlace: string;

  beforeAll(async () => {
    const read = await surveyFromBytes({
      shells: file('shells.csv'),
      beds: file('beds.csv'),
      relations: file('relations.csv'),
    });
    survey = read.survey!;
    inPlace = await results(async (tasks) => {
      tasksSeen += tasks.length;
      return tasks.map(runTask);
    });
  });

  it('the last task first', async () => {
    expect(tasksSeen).toBeGreaterThan(1);
    const reversed = await results(async (tasks) => [...tasks].reverse().map(runTask).reverse());
    expect(reversed).toBe(inPlace);
  });

  it('on copies of the tasks, and with results copied back, as between threads', async () => {
    const copied = await results(async (tasks) => tasks.map((task) => structuredClone(runTask(structuredClone(task)))));
    expect(copied).toBe(inPlace);
  });

  it('each task done twice, as nothing is kept between them', async () => {
    const twice = await results(async (tasks) => tasks.map((task) => [runTask(task), runTask(task)][1]));
    expect(twice).toBe(inPlace);
  });
});

describe('whatever the machine', () => {
  let home: string;
  beforeAll(() => {
    home = mkdtempSync(join(tmpdir(), 'bedorder-'));
    cpSync(join(ROOT, 'examples/warming-coast'), home, { recursive: true });
  });
  afterAll(() => rmSync(home, { recursive: true, force: true }));

  function digest(folder: string): string {
    const hash = createHash('sha256');
    for (const name of readdirSync(folder, { recursive: true, encoding: 'utf8' }).sort()) {
      if (name.includes('.')) hash.update(`${name}\n`).update(readFileSync(join(folder, name)));
    }
    return hash.digest('hex');
  }

  it('time zone, language and number of workers', async () => {
    const environments = [
      { TZ: 'UTC', LANG: 'C', LC_ALL: 'C', BEDORDER_WORKERS: '1' },
      { TZ: 'Pacific/Chatham', LANG: 'ar_EG.UTF-8', LC_ALL: 'ar_EG.UTF-8', BEDORDER_WORKERS: '5' },
      { TZ: '', LANG: '', LC_ALL: '', BEDORDER_WORKERS: 'many', NODE_OPTIONS: '--max-old-space-size=300' },
    ];
    const digests: string[] = [];
    for (const [at, env] of environments.entries()) {
      const args = ['run', 'shells.csv', '--beds', 'beds.csv', '--gradient', 'cmat_c', '--out', `out-${at}`, '--quiet'];
      args.push('--simulations', '39');
      expect(await bedorder(args, { cwd: home, env })).toMatchObject({ status: 0, stderr: '' });
      digests.push(digest(join(home, `out-${at}`)));
    }
    expect(new Set(digests).size).toBe(1);
  });
});
