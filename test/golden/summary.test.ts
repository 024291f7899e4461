import { cpSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, it } from 'vitest';
import { bedorder, ROOT } from '../commands/program.js';
import { holdAgainstGolden } from './compare.js';

/** What the terminal shows of each example; `npm run golden` writes it anew, to be read as a diff. */
const EXAMPLES: Readonly<Record<string, readonly string[]>> = {
  coast: ['--beds', 'beds.csv', '--relations', 'relations.csv'],
  summaries: [],
  spreadsheet: ['--aliases', 'aliases.csv'],
  'warming-coast': ['--beds', 'beds.csv', '--gradient', 'cmat_c'],
};

it.each(Object.entries(EXAMPLES))('the summary of %s', async (name, options) => {
  const golden = fileURLToPath(new URL(`summary-${name}.txt`, import.meta.url));
  const home = mkdtempSync(join(tmpdir(), 'bedorder-'));
  try {
    // the name of the results is always the same, so that lines break at the same places
    cpSync(join(ROOT, 'examples', name), home, { recursive: true });
    const args = ['run', 'shells.csv', ...options, '--out', 'bedorder-results'];
    const { status, stdout, stderr } = await bedorder(args, { cwd: home });
    expect(status, stderr).toBe(0);
    const shown = `${stderr}\n${stdout}`;
    for (const line of stdout.split('\n')) expect(line.length, line).toBeLessThanOrEqual(80);
    holdAgainstGolden(golden, shown);
  } finally {
    rmSync(home, { recursive: true, force: true });
  }
});
