import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { bedorder } from '../commands/program.js';
import { cases } from '../house/effort.js';
import { PARTS } from './survey-files.js';
import { mutantOf, PATIENCE } from './try-many.js';

/* The same mutants through the built program: exit status, messages and what is left on the disk. */

const home = mkdtempSync(join(tmpdir(), 'bedorder-'));
afterAll(() => rmSync(home, { recursive: true, force: true }));

const first = Number(process.env.FUZZ_FIRST ?? 1);
// 6: one of each start
const count = Math.min(100, Number(process.env.FUZZ_COUNT ?? cases(4, 12)));

it.each(Array.from({ length: count }, (_, k) => first + 7 * k))(
  'mutant %i ends with 0 or with 2 and a message',
  async (number) => {
    const { files, changes } = mutantOf(number);
    const folder = mkdtempSync(join(home, 'try-'));
    const args = ['run', 'shells.csv', '--simulations', '9', '--out', 'results'];
    for (const part of PARTS) {
      if (files[part] === undefined) continue;
      const name = part === 'settings' ? 'settings.yaml' : `${part}.csv`;
      writeFileSync(join(folder, name), files[part]);
      if (part !== 'shells' && part !== 'dates') args.push(`--${part}`, name);
    }
    const start = performance.now();
    // a program that takes more memory than the limit ends with a fault
    const { status, stderr } = await bedorder(args, {
      cwd: folder,
      env: { NODE_OPTIONS: '--max-old-space-size=1400' },
    });
    const told = `${changes.join(' | ')}\n${stderr}`;
    // start and a busy machine come on top
    expect(performance.now() - start, told).toBeLessThan(3 * PATIENCE);
    expect(files.settings ? [0, 2, 3] : [0, 2], told).toContain(status);
    expect(stderr).not.toMatch(/^\s+at .*:\d+:\d+/m);
    const results = join(folder, 'results');
    if (status === 2) {
      expect(stderr.trim().length, told).toBeGreaterThan(20);
      expect(existsSync(results), told).toBe(false);
      return;
    }
    for (const name of readdirSync(results).filter((one) => one.endsWith('.csv'))) {
      expect(readFileSync(join(results, name), 'utf8'), `${name} ${told}`).not.toMatch(
        /\b(?:NaN|Infinity|undefined)\b/,
      );
    }
    if (files.dates) {
      const dates = await bedorder(['dates', 'results', 'dates.csv'], { cwd: folder });
      expect([0, 2], `${told}\n${dates.stderr}`).toContain(dates.status);
    }
  },
);
