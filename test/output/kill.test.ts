import { spawn } from 'node:child_process';
import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { inspectFolder } from '../../src/output/folder/inspect.js';
import { placesOf } from '../../src/output/folder/places.js';
import { recoverFolder } from '../../src/output/folder/recover.js';
import { readResults } from '../../src/output/read-results.js';
import { cases } from '../house/effort.js';

const home = mkdtempSync(join(tmpdir(), 'bedorder-'));
const writer = join(home, 'writer.mjs');
const out = join(home, 'place', 'results');

beforeAll(async () => {
  const entry = fileURLToPath(new URL('kill-writer.ts', import.meta.url));
  await build({
    entryPoints: [entry],
    bundle: true,
    platform: 'node',
    format: 'esm',
    outfile: writer,
    logLevel: 'error',
  });
});
afterAll(() => rmSync(home, { recursive: true, force: true }));

/** Starts a process that replaces the results again and again; resolves when it has done so once. */
function startWriter() {
  const child = spawn(process.execPath, [writer, out], { stdio: ['ignore', 'pipe', 'inherit'] });
  const ready = new Promise<void>((resolve, reject) => {
    child.stdout.once('data', () => resolve());
    child.once('close', () => reject(new Error('the writer ended before it had written')));
  });
  const ended = new Promise<void>((resolve) => child.once('close', () => resolve()));
  return { child, ready, ended };
}

it('a kill at any moment leaves results that are whole, old or new', async () => {
  for (let kill = 0; kill < cases(12, 50); kill++) {
    const { child, ready, ended } = startWriter();
    await ready;
    await new Promise((resolve) => setTimeout(resolve, Math.random() * 40));
    child.kill('SIGKILL');
    await ended;
    recoverFolder(placesOf(out));
    expect(inspectFolder(out)).toMatchObject({ kind: 'ours' });
    expect(readResults(out).options.seed).toBeGreaterThan(0);
    expect(readdirSync(join(home, 'place')).filter((name) => !name.endsWith('-lock'))).toEqual(['results']);
  }
});
