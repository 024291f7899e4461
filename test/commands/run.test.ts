import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { cpSync, existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { bedorder, builtOnce, type Outcome, ROOT } from './program.js';

let home: string;
let first: Outcome;
const survey = ['shells.csv', '--beds', 'beds.csv', '--relations', 'relations.csv', '--simulations', '19'];
const run = (more: readonly string[] = [], env: NodeJS.ProcessEnv = {}) =>
  bedorder(['run', ...survey, ...more], { cwd: home, env });

/** A run of one section of three beds, or upside down, where the claim is not about what is found. */
const small = (more: readonly string[] = [], shells = 'small.csv') =>
  bedorder(['run', shells, '--simulations', '9', ...more], { cwd: home });
const smallShells = (ratios: readonly number[]) =>
  `section,bed,taxon,shell,level,D/L Ile\n${ratios
    .flatMap((ratio, b) => [0, 1, 2].map((k) => `Cove,${'ABC'[b]},Mya,${k},${b},${(ratio + k * 0.01).toFixed(2)}\n`))
    .join('')}`;

/** Every file of a folder with its hash. */
function bytesOf(folder: string): Record<string, string> {
  const names = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((name) => name.includes('.'));
  return Object.fromEntries(
    names.sort().map((name) => [
      name,
      createHash('sha256')
        .update(readFileSync(join(folder, name)))
        .digest('hex'),
    ]),
  );
}

beforeAll(async () => {
  home = mkdtempSync(join(tmpdir(), 'bedorder-'));
  cpSync(join(ROOT, 'examples/coast'), home, { recursive: true });
  writeFileSync(join(home, 'small.csv'), smallShells([0.6, 0.4, 0.2]));
  writeFileSync(join(home, 'small-beds.csv'), 'section,bed,burial_m\nCove,A,2\nCove,B,2\nCove,C,2\n');
  writeFileSync(join(home, 'upside-down.csv'), smallShells([0.2, 0.4, 0.6]));
  first = await run(['--out', 'first']);
});
afterAll(() => rmSync(home, { recursive: true, force: true }));

describe('run', () => {
  it('ends with 0, and tells what it found in 80 columns without colour', () => {
    expect(first).toMatchObject({ status: 0 });
    expect(first.stdout).toMatch(/Read 2\d\d shells/);
    expect(first.stdout).toMatch(/Order, oldest to youngest/);
    expect(first.stdout).toMatch(/Superposition/);
    expect(first.stdout).toMatch(/bedorder explain first/);
    expect(`${first.stdout}${first.stderr}`).not.toContain('\u001b');
    for (const line of first.stdout.split('\n')) expect(line.length, line).toBeLessThanOrEqual(80);
  });

  it('writes the files of the design, and nothing beside them', () => {
    const names = Object.keys(bytesOf(join(home, 'first'))).filter((name) => !name.startsWith('figures'));
    expect(names.join(' ')).toBe(
      'adjacent_zones.csv beds.csv clocks.csv correlation.csv datapackage.json deposits.geojson order.csv pairs.csv ' +
        'plan.csv problems.csv relations.csv report.html results.json sections.csv shells.csv zone_counts.csv zones.csv',
    );
    expect(readdirSync(home).filter((name) => name.startsWith('.'))).toEqual([]);
  });

  it('gives the same bytes whatever the time zone, the language, the folder and the number of workers', async () => {
    const env = { TZ: 'Asia/Kathmandu', LANG: 'tr_TR.UTF-8', LC_ALL: 'tr_TR.UTF-8', BEDORDER_WORKERS: '3' };
    const second = await run(['--out', 'deep/er/second'], env);
    expect(second.status).toBe(0);
    expect(bytesOf(join(home, 'deep/er/second'))).toEqual(bytesOf(join(home, 'first')));
  });

  it('puts nothing of the machine or the moment into a file', () => {
    for (const name of Object.keys(bytesOf(join(home, 'first')))) {
      const text = readFileSync(join(home, 'first', name), 'utf8');
      for (const word of [home, ROOT, process.execPath]) expect(text, name).not.toContain(word);
      if (hostname().length > 5) expect(text, name).not.toContain(hostname());
      expect(text, name).not.toContain(new Date().toISOString().slice(0, 10));
    }
  });

  it('has no number that is none in any table', () => {
    for (const name of Object.keys(bytesOf(join(home, 'first'))).filter((one) => one.endsWith('.csv'))) {
      expect(readFileSync(join(home, 'first', name), 'utf8'), name).not.toMatch(/\b(?:NaN|Infinity|undefined|null)\b/);
    }
  });

  it('--quiet says nothing, --json says it to programs', async () => {
    expect(await small(['--out', 'quiet', '--quiet'])).toMatchObject({ status: 0, stdout: '', stderr: '' });
    const { stdout } = await small(['--out', 'quiet', '--json']);
    const facts = JSON.parse(stdout);
    expect(facts).toMatchObject({ program: 'bedorder', written: 'quiet' });
    expect(facts.clocks[0].clock.beds).toBe(3);
  });

  it('--strict ends with 3 when a reversed relation is left, and 0 when none is', async () => {
    expect((await small(['--out', 'strict', '--strict', '--quiet'], 'upside-down.csv')).status).toBe(3);
    expect((await small(['--out', 'strict', '--strict', '--quiet'])).status).toBe(0);
  });

  it('takes settings from a file, and the command line before it', async () => {
    mkdirSync(join(home, 'conf'), { recursive: true });
    writeFileSync(
      join(home, 'conf/s.yaml'),
      'beds: ../small-beds.csv\nout: made\nzones: 3\nseed: 7\nscreening:\n  serine_ratio: 0.9\n',
    );
    const { status } = await bedorder(
      ['run', 'small.csv', '--settings', 'conf/s.yaml', '--seed', '9', '--simulations', '9', '--quiet'],
      { cwd: home },
    );
    expect(status).toBe(0);
    const { options, inputs } = JSON.parse(readFileSync(join(home, 'conf/made/results.json'), 'utf8'));
    expect(options).toMatchObject({ zones: 3, seed: 9, screening: { serine_ratio: 0.9, burial_m: 1 } });
    expect(inputs.map(({ role }: { role: string }) => role)).toEqual(['shells', 'beds', 'settings']);
  });
});

describe('the world around a run', () => {
  it('a reader that goes away is no fault', async () => {
    const dist = await builtOnce();
    const child = spawn('sh', ['-c', `"${process.execPath}" "${dist}/cli.js" run --help | true; exit 0`], {
      cwd: home,
    });
    let stderr = '';
    child.stderr.on('data', (text) => {
      stderr += text;
    });
    await new Promise((resolve) => child.once('close', resolve));
    expect(stderr).toBe('');
  });

  it.each(['SIGINT', 'SIGTERM'] as const)('%s leaves the old results whole and nothing beside them', async (signal) => {
    const dist = await builtOnce();
    const old = ['--out', 'old', '--quiet'];
    // of the other signal it is still there, whole
    if (!existsSync(join(home, 'old'))) await small(old);
    const before = bytesOf(join(home, 'old'));
    // at the start, in the middle, and about where it writes
    for (const wait of [150, 300, 450]) {
      const args = [join(dist, 'cli.js'), 'run', 'small.csv', '--simulations', '9', ...old, '--seed', '2'];
      const child = spawn(process.execPath, args, { cwd: home });
      const ended = new Promise<[number | null, NodeJS.Signals | null]>((resolve) =>
        child.once('close', (status, killed) => resolve([status, killed])),
      );
      await new Promise((resolve) => setTimeout(resolve, wait));
      child.kill(signal);
      const [status, killed] = await ended;
      expect(readdirSync(home).filter((name) => name.startsWith('.'))).toEqual([]);
      if (status === 0) {
        // it was faster: the new results are whole
        await small(old);
        continue;
      }
      expect(killed === signal || status === 128 + (signal === 'SIGINT' ? 2 : 15)).toBe(true);
      expect(bytesOf(join(home, 'old'))).toEqual(before);
    }
  });

  it('two runs at once: one is done, the other done or told to wait, and the results are whole', async () => {
    const [a, b] = await Promise.all([small(['--out', 'both']), small(['--out', 'both'])]);
    await small(['--out', 'alone', '--quiet']);
    const statuses = [a.status, b.status].sort();
    expect(statuses[0]).toBe(0);
    if (statuses[1] !== 0) expect(`${a.stderr}${b.stderr}`).toMatch(/Another run is writing to both/);
    expect(bytesOf(join(home, 'both'))).toEqual(bytesOf(join(home, 'alone')));
    expect(readdirSync(home).filter((name) => name.startsWith('.'))).toEqual([]);
  });

  it('a folder of yours is not touched', async () => {
    mkdirSync(join(home, 'mine'));
    writeFileSync(join(home, 'mine/thesis.doc'), 'x');
    const { status, stderr } = await small(['--out', 'mine']);
    expect(status).toBe(2);
    expect(stderr).toMatch(/thesis\.doc/);
    expect(readdirSync(join(home, 'mine'))).toEqual(['thesis.doc']);
  });
});

describe('demo and explain', () => {
  it('demo writes the example, runs it, and does so again; files of yours are refused', async () => {
    const quick = { cwd: home, env: {} };
    expect((await bedorder(['demo', 'show', '--quiet'], quick)).status).toBe(0);
    expect((await bedorder(['demo', 'show', '--quiet'], quick)).status).toBe(0);
    expect(existsSync(join(home, 'show/bedorder-results/report.html'))).toBe(true);
    writeFileSync(join(home, 'show/beds.csv'), 'mine');
    const { status, stderr } = await bedorder(['demo', 'show'], quick);
    expect(status).toBe(2);
    expect(stderr).toMatch(/beds\.csv/);
    expect(readFileSync(join(home, 'show/beds.csv'), 'utf8')).toBe('mine');
  });

  it('explain tells of a bed, and of a wrong name what may be meant', async () => {
    const { order } = JSON.parse(readFileSync(join(home, 'first/results.json'), 'utf8'));
    const name = `${order[0].section}/${order[0].bed}`;
    const told = await bedorder(['explain', 'first', name.toUpperCase()], { cwd: home });
    expect(told).toMatchObject({ status: 0, stderr: '' });
    expect(told.stdout).toContain(`Rank ${order[0].rank} of ${order.length}`);
    const wrong = await bedorder(['explain', 'first', `${name.slice(0, 2)}${name.slice(3)}`], { cwd: home });
    expect(wrong.status).toBe(2);
    expect(wrong.stderr).toContain(`Did you mean ${name}`);
  });
});
