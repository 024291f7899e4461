import {
  existsSync,
  lstatSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  symlinkSync,
  unlinkSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Findings } from '../../src/model/index.js';
import { inspectFolder } from '../../src/output/folder/inspect.js';
import { placesOf } from '../../src/output/folder/places.js';
import { recoverFolder } from '../../src/output/folder/recover.js';
import { holdFolder, type Step } from '../../src/output/folder/replace-folder.js';
import { readResults } from '../../src/output/read-results.js';
import { writeResults } from '../../src/output/write-results.js';
import { FINDINGS } from './fixture.js';

let home: string;
let out: string;
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'bedorder-'));
  out = join(home, 'results');
});
afterEach(() => rmSync(home, { recursive: true, force: true }));

/** Findings that can be told apart by their seed. */
const findings = (seed: number): Findings => ({ ...FINDINGS, options: { ...FINDINGS.options, seed } });
const drawings = { report: '<p></p>', figures: [{ name: 'ranks', svg: '<svg/>' }] };
const build = (seed: number) => async (folder: string) => void (await writeResults(findings(seed), drawings, folder));

async function write(seed: number, reached?: (step: Step) => void): Promise<void> {
  const hold = holdFolder(placesOf(out));
  try {
    await hold.replace(build(seed), reached);
  } finally {
    hold.release();
  }
}

const seedIn = (folder: string) => readResults(folder).options.seed;
const beside = () => readdirSync(home).sort();

describe('writing results', () => {
  it('makes the folder, and replaces it whole', async () => {
    await write(1);
    expect(inspectFolder(out).kind).toBe('ours');
    await write(2);
    expect(seedIn(out)).toBe(2);
    expect(beside()).toEqual(['results']);
  });

  it('makes the folders on the way, and takes them back when nothing came of it', async () => {
    out = join(home, 'a/b/results');
    const hold = holdFolder(placesOf(out));
    expect(existsSync(join(home, 'a/b'))).toBe(true);
    hold.release();
    expect(beside()).toEqual([]);
    await write(1);
    expect(inspectFolder(out).kind).toBe('ours');
  });

  it('takes an empty folder, and one in which a file browser left its mark', async () => {
    mkdirSync(out);
    await write(1);
    writeFileSync(join(out, '.DS_Store'), 'x');
    await write(2);
    expect(seedIn(out)).toBe(2);
    expect(beside()).toEqual(['results']);
  });

  it('keeps the old results when the building fails, and leaves nothing beside them', async () => {
    await write(1);
    const hold = holdFolder(placesOf(out));
    const failing = hold.replace(async (folder) => {
      writeFileSync(join(folder, 'beds.csv'), 'half');
      throw Object.assign(new Error('no space left'), { code: 'ENOSPC' });
    });
    await expect(failing).rejects.toThrow(/The disk is full/);
    hold.release();
    expect(seedIn(out)).toBe(1);
    expect(beside()).toEqual(['results']);
  });
});

describe('a folder that is not ours', () => {
  const refuses = async (message: RegExp) => {
    await expect(write(2)).rejects.toThrow(message);
    expect(beside()).not.toContain('.results.bedorder-lock');
  };

  it('is refused, with what is in it, and not touched', async () => {
    mkdirSync(out);
    writeFileSync(join(out, 'thesis.doc'), 'years of work');
    await refuses(/left as it is.*thesis\.doc.*--out/s);
    expect(readFileSync(join(out, 'thesis.doc'), 'utf8')).toBe('years of work');
  });

  it('is ours with one more file in it', async () => {
    await write(1);
    mkdirSync(join(out, 'notes'));
    await refuses(/notes\//);
    writeFileSync(join(out, 'notes/mine.txt'), 'x');
    await refuses(/notes\/mine\.txt/);
    expect(seedIn(out)).toBe(1);
  });

  it('is ours with a table that was worked on', async () => {
    await write(1);
    writeFileSync(join(out, 'beds.csv'), `${readFileSync(join(out, 'beds.csv'), 'utf8')}my own row\n`);
    await refuses(/changed after bedorder wrote them:\s+beds\.csv/);
    expect(readFileSync(join(out, 'beds.csv'), 'utf8')).toContain('my own row');
  });

  it('is ours with a table that was taken away, or a link in place of a folder', async () => {
    await write(1);
    renameSync(join(out, 'figures'), join(home, 'figures'));
    symlinkSync(join(home, 'figures'), join(out, 'figures'));
    await refuses(/figures/);
    expect(readdirSync(join(home, 'figures'))).toEqual(['ranks.svg']);
  });

  it('is one with a data package of another kind', async () => {
    mkdirSync(out);
    writeFileSync(join(out, 'datapackage.json'), '{"name":"rainfall","resources":[]}');
    await refuses(/datapackage\.json/);
  });

  it('is one that became so while the run was going on', async () => {
    await write(1);
    const hold = holdFolder(placesOf(out));
    const late = hold.replace(build(2), (step) => {
      if (step === 'built') writeFileSync(join(out, 'late.txt'), 'x');
    });
    await expect(late).rejects.toThrow(/late\.txt/);
    hold.release();
    expect(readFileSync(join(out, 'late.txt'), 'utf8')).toBe('x');
    expect(seedIn(out)).toBe(1);
    expect(beside()).toEqual(['results']);
  });
});

describe('paths', () => {
  it.each([
    ['a file', () => writeFileSync(out, 'x'), /is a file/],
    ['a link that leads nowhere', () => symlinkSync(join(home, 'gone'), out), /symbolic link that leads nowhere/],
    ['a link to a file', () => symlinkSync(fileURLToPath(import.meta.url), out), /is a file/],
  ])('%s is refused', (_, make, message) => {
    make();
    expect(() => placesOf(out)).toThrow(message);
  });

  it.each(['/', '.', '..', '', ' '])('%j is refused', (given) => {
    expect(() => placesOf(given)).toThrow(/--out/);
  });

  it('a link to a folder stays, and what it leads to is replaced', async () => {
    mkdirSync(join(home, 'real'));
    symlinkSync(join(home, 'real'), out);
    await write(1);
    await write(2);
    expect(lstatSync(out).isSymbolicLink()).toBe(true);
    expect(seedIn(join(home, 'real'))).toBe(2);
    expect(beside()).toEqual(['real', 'results']);
  });

  it('a part that is a file is told of', async () => {
    writeFileSync(join(home, 'f'), 'x');
    out = join(home, 'f/results');
    await expect(write(1)).rejects.toThrow(/f\/results/);
  });
});

describe('two runs at once', () => {
  it('the second is refused, and the first goes on', async () => {
    const first = holdFolder(placesOf(out));
    expect(() => holdFolder(placesOf(out))).toThrow(/Another run is writing.*process \d+.*remove .*lock/s);
    await first.replace(build(1));
    first.release();
    await write(2);
    expect(seedIn(out)).toBe(2);
  });

  it('a lock of a run that is gone is taken over', async () => {
    // the largest process number that Linux can give is below this
    writeFileSync(join(home, '.results.bedorder-lock'), `99999999 ${hostname()}\n`);
    await write(1);
    expect(beside()).toEqual(['results']);
  });

  it('a lock that says nothing is taken over once it is old', async () => {
    const lock = join(home, '.results.bedorder-lock');
    writeFileSync(lock, '');
    await expect(write(1)).rejects.toThrow(/Another run/);
    utimesSync(lock, 1, 1);
    await write(1);
    expect(beside()).toEqual(['results']);
  });

  it('a lock of another machine is left alone', async () => {
    writeFileSync(join(home, '.results.bedorder-lock'), '1 another-machine\n');
    await expect(write(1)).rejects.toThrow(/on another-machine/);
    expect(beside()).toEqual(['.results.bedorder-lock']);
  });

  it('reading waits for no lock, and leaves the work of a living run alone', async () => {
    await write(1);
    const hold = holdFolder(placesOf(out));
    await hold.replace(build(2), (step) => {
      if (step === 'built') {
        expect(seedIn(out)).toBe(1);
        expect(existsSync(join(home, '.results.bedorder-new'))).toBe(true);
      }
    });
    hold.release();
    expect(seedIn(out)).toBe(2);
  });
});

describe('after a kill', () => {
  /** Stops at a step as a kill does: nothing is cleaned up, and the lock names a process that is gone. */
  async function killedAt(step: Step, seed: number, half?: (folder: string) => void): Promise<void> {
    const places = placesOf(out);
    const hold = holdFolder(places);
    await hold
      .replace(build(seed), (reached) => {
        if (reached !== step) return;
        half?.(places.fresh);
        throw new Error('killed');
      })
      .catch(() => {});
    // its lock names a process that is gone
    rmSync(places.lock);
    symlinkSync(`99999999 ${hostname()}`, places.lock);
  }

  const half = (folder: string) => writeFileSync(join(folder, 'beds.csv'), 'half of a table');

  it.each<[Step, number, ((folder: string) => void)?]>([
    ['building', 1, half],
    ['built', 1],
    ['old aside', 2],
    ['new in place', 2],
    ['old removed', 2],
  ])('at "%s" the next look finds results %d whole', async (step, seed, spoil) => {
    await write(1);
    await killedAt(step, 2, spoil);
    expect(seedIn(out)).toBe(seed);
    expect(inspectFolder(out).kind).toBe('ours');
    expect(beside().filter((name) => !name.endsWith('-lock'))).toEqual(['results']);
    await write(3);
    expect(seedIn(out)).toBe(3);
    expect(beside()).toEqual(['results']);
  });

  it('between the moves, with new results that are not whole, the old ones are put back', async () => {
    await write(1);
    await killedAt('old aside', 2, (folder) => unlinkSync(join(folder, 'datapackage.json')));
    recoverFolder(placesOf(out));
    expect(seedIn(out)).toBe(1);
  });

  it('with the old results half removed, the new ones stay', async () => {
    await write(1);
    await killedAt('new in place', 2);
    unlinkSync(join(home, '.results.bedorder-old', 'datapackage.json'));
    unlinkSync(join(home, '.results.bedorder-old', 'beds.csv'));
    expect(seedIn(out)).toBe(2);
    await write(3);
    expect(beside()).toEqual(['results']);
  });

  it('in a first run, nothing is left but what the next run makes', async () => {
    await killedAt('building', 1, half);
    expect(() => readResults(out)).toThrow(/holds no results/);
    await write(2);
    expect(beside()).toEqual(['results']);
  });

  it('a folder that somebody made in between is not taken for ours, and the old results wait', async () => {
    await write(1);
    await killedAt('old aside', 2);
    mkdirSync(out);
    writeFileSync(join(out, 'mine.txt'), 'x');
    await expect(write(3)).rejects.toThrow(/earlier results wait/);
    expect(readFileSync(join(out, 'mine.txt'), 'utf8')).toBe('x');
    rmSync(out, { recursive: true });
    expect([1, 2]).toContain(seedIn(out));
  });

  it('foreign files in the places beside are not removed', async () => {
    await write(1);
    await killedAt('built', 2);
    writeFileSync(join(home, '.results.bedorder-new', 'mine.txt'), 'x');
    await expect(write(3)).rejects.toThrow(/did not write/);
    expect(readFileSync(join(home, '.results.bedorder-new', 'mine.txt'), 'utf8')).toBe('x');
    expect(seedIn(out)).toBe(1);
  });
});
