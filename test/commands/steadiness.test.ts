import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { placesOf } from '../../src/output/folder/places.js';
import { recoverFolder } from '../../src/output/folder/recover.js';
import { readResults } from '../../src/output/read-results.js';
import { cases } from '../house/effort.js';
import { bedorder, builtOnce } from './program.js';

/** Kills of each of two runs side by side: 50 in the long tests. */
const KILLS = cases(5, 25);

/* Whole runs of the program that are killed, starved of disk, or sent to places where they must not write. */

let home: string;
let cli: string;
const survey = ['shells.csv', '--simulations', '9', '--quiet'];
// a run of two beds goes the same ways as any other, in less time
const SHELLS = `section,bed,taxon,shell,level,D/L Ile
${['low', 'high']
  .flatMap((bed, b) => [1, 2].map((shell) => `Cove,${bed},Mya,${shell},${b + 1},${0.4 - 0.2 * b + 0.01 * shell}\n`))
  .join('')}`;
const run = (more: readonly string[]) => bedorder(['run', ...survey, ...more], { cwd: home });

beforeAll(async () => {
  home = mkdtempSync(join(tmpdir(), 'bedorder-'));
  writeFileSync(join(home, 'shells.csv'), SHELLS);
  cli = join(await builtOnce(), 'cli.js');
});
afterAll(() => rmSync(home, { recursive: true, force: true }));

function digest(folder: string): string {
  const hash = createHash('sha256');
  for (const name of readdirSync(folder, { recursive: true, encoding: 'utf8' }).sort()) {
    if (name.includes('.')) hash.update(`${name}\n`).update(readFileSync(join(folder, name)));
  }
  return hash.digest('hex');
}

/** Files beside the results that a run may leave when it is killed; the next run takes them away. */
const leftovers = () => readdirSync(home).filter((name) => name.startsWith('.'));

// two lanes of kills, each in a folder of its own
it.concurrent.each(['lane-1', 'lane-2'])(
  'a run killed at any moment leaves results that are found whole, old or new: %s',
  async (out) => {
    const told = await bedorder(['run', ...survey, '--out', out, '--seed', '2'], { cwd: home });
    expect(told.status, told.stderr).toBe(0);
    const second = digest(join(home, out));
    const start = performance.now();
    await run(['--out', out, '--seed', '1']);
    let length = performance.now() - start;
    const first = digest(join(home, out));
    expect(second).not.toBe(first);
    let killed = 0;
    for (let kill = 0; killed < KILLS && kill < 5 * KILLS; kill++) {
      const args = [cli, 'run', ...survey, '--out', out, '--seed', String(1 + (kill % 2))];
      const child = spawn(process.execPath, args, { cwd: home, stdio: 'ignore' });
      const ended = new Promise<NodeJS.Signals | null>((resolve) =>
        child.once('close', (_, signal) => resolve(signal)),
      );
      // most of them in the second half of a run, which is when it writes
      await new Promise((resolve) => setTimeout(resolve, length * (0.3 + 0.75 * Math.random())));
      child.kill('SIGKILL');
      // how long a run takes changes with what runs beside it
      if ((await ended) === 'SIGKILL') killed++;
      else length *= 0.9;
      // what any command does first that reads results
      recoverFolder(placesOf(join(home, out)));
      expect(readResults(join(home, out)).options.seed).toBeGreaterThan(0);
      expect([first, second]).toContain(digest(join(home, out)));
    }
    expect(killed).toBe(KILLS);
    await run(['--out', out, '--seed', '1']);
    expect(digest(join(home, out))).toBe(first);
    expect(leftovers().filter((name) => name.includes(out))).toEqual([]);
  },
  // 54 whole runs: some minutes where other tests keep both cores busy
  400_000,
);

describe('places where nothing can be written', () => {
  // stands for a full disk: the system lets no file grow beyond 16 kB
  it.runIf(process.platform === 'linux')(
    'no room for the files: a message, status 1, the old results whole',
    async () => {
      await run(['--out', 'roomy', '--seed', '3']);
      const before = digest(join(home, 'roomy'));
      const command = `ulimit -f 16; exec "${process.execPath}" "${cli}" run ${survey.join(' ')} --out roomy`;
      const child = spawn('bash', ['-c', command], { cwd: home, stdio: ['ignore', 'ignore', 'pipe'] });
      let stderr = '';
      child.stderr.on('data', (piece) => {
        stderr += piece;
      });
      const status = await new Promise((resolve) => child.once('close', resolve));
      expect(stderr).toMatch(/could not write to roomy.*Check the disk|disk is full/);
      expect(stderr).not.toMatch(/fault of its own/);
      expect(status).toBe(1);
      expect(digest(join(home, 'roomy'))).toBe(before);
      expect(leftovers()).toEqual([]);
    },
  );

  // /sys takes no folder of anyone's, root included
  it.runIf(existsSync('/sys/kernel'))('a folder that may not be written', async () => {
    const { status, stderr } = await run(['--out', '/sys/bedorder-results']);
    expect(stderr).toMatch(/no permission to write \/sys\/bedorder-results.*--out/);
    expect(status).toBe(2);
  });

  it('a path through a file', async () => {
    const { status, stderr } = await run(['--out', 'shells.csv/results']);
    expect(stderr).toMatch(/is a file, not a folder/);
    expect(status).toBe(2);
  });

  it('a name that no system takes', async () => {
    const { status, stderr } = await run(['--out', 'x'.repeat(5_000)]);
    expect(stderr).toMatch(/too long for this system/);
    expect(status).toBe(2);
  });
});

describe('what is not ours', () => {
  it('a table that went away is named, and nothing is written', async () => {
    const { status, stderr } = await run(['--beds', 'gone.csv', '--out', 'nothing']);
    expect(stderr).toMatch(/gone\.csv/);
    expect(status).toBe(2);
    expect(existsSync(join(home, 'nothing'))).toBe(false);
  });

  it('a link to results stays a link, and what it leads to is replaced', async () => {
    mkdirSync(join(home, 'disk'));
    symlinkSync(join(home, 'disk'), join(home, 'link'));
    expect((await run(['--out', 'link'])).status).toBe(0);
    expect((await run(['--out', 'link', '--seed', '4'])).status).toBe(0);
    expect(readdirSync(join(home, 'disk'))).toContain('beds.csv');
    expect(leftovers()).toEqual([]);
  });

  it('a link to a folder of yours is refused, and the folder left as it was', async () => {
    mkdirSync(join(home, 'photos'));
    writeFileSync(join(home, 'photos/cliff.jpg'), 'x');
    symlinkSync(join(home, 'photos'), join(home, 'album'));
    const { status, stderr } = await run(['--out', 'album']);
    expect(stderr).toMatch(/cliff\.jpg/);
    expect(status).toBe(2);
    expect(readdirSync(join(home, 'photos'))).toEqual(['cliff.jpg']);
  });
});

describe('results that can not be read', () => {
  it.each([
    ['a path through a file', 'shells.csv/results'],
    ['a name that no system takes', 'x'.repeat(5_000)],
    ['an empty folder', 'empty'],
    ['a file of another kind', 'shells.csv'],
  ])('%s', async (_, path) => {
    mkdirSync(join(home, 'empty'), { recursive: true });
    for (const args of [
      ['explain', path, 'A/1'],
      ['plan', path],
      ['dates', path, 'shells.csv'],
    ]) {
      const { status, stderr } = await bedorder(args, { cwd: home });
      expect(status, stderr).toBe(2);
      expect(stderr).not.toMatch(/fault of its own/);
      expect(stderr.length).toBeGreaterThan(20);
    }
  });
});
