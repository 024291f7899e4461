import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { analyse, DEFAULT_OPTIONS, type Findings, type RunOptions, runTask, surveyFromBytes } from '../../src/index.js';
import { TABLES } from '../../src/output/tables/index.js';
import { tableText } from '../house/written.js';
import { holdAgainstGolden } from './compare.js';

/* Every table of every example, and what results.json holds beyond them; `npm run golden` writes them anew. */

const EXAMPLES: Readonly<Record<string, Partial<RunOptions>>> = {
  coast: {},
  summaries: {},
  spreadsheet: {},
  'warming-coast': { gradient: 'cmat_c' },
};

const examples = fileURLToPath(new URL('../../examples/', import.meta.url));
const golden = (name: string, file: string) => fileURLToPath(new URL(`results/${name}/${file}`, import.meta.url));

async function findingsOf(name: string): Promise<Findings> {
  const file = (part: string) => {
    const path = join(examples, name, `${part}.csv`);
    return existsSync(path) ? { file: `${part}.csv`, bytes: new Uint8Array(readFileSync(path)) } : undefined;
  };
  const { survey } = await surveyFromBytes({
    shells: file('shells')!,
    beds: file('beds'),
    relations: file('relations'),
    aliases: file('aliases'),
  });
  const host = {
    map: async (tasks: readonly Parameters<typeof runTask>[0][]) => tasks.map(runTask),
    progress: () => {},
  };
  return analyse(survey!, { ...DEFAULT_OPTIONS, ...EXAMPLES[name] }, host);
}

/** Parts of results.json that stand in no table, numbers to 6 digits; the inputs by their hashes. */
function beyondTables(findings: Findings): string {
  const tables = new Set<string>([...TABLES.map(({ name }) => name), 'version', 'shell_ratios']);
  const rest = Object.fromEntries(Object.entries(findings).filter(([key]) => !tables.has(key)));
  const rounded = (_: string, value: unknown) => (typeof value === 'number' ? Number(value.toPrecision(6)) : value);
  return `${JSON.stringify(rest, rounded, 1)}\n`;
}

describe.each(Object.keys(EXAMPLES))('%s', (name) => {
  it('gives the tables it gave', async () => {
    const findings = await findingsOf(name);
    const faults: string[] = [];
    const hold = (file: string, text: string) => {
      try {
        holdAgainstGolden(golden(name, file), text);
      } catch (error) {
        faults.push((error as Error).message);
      }
    };
    for (const table of TABLES) hold(`${table.name}.csv`, tableText(table, findings));
    hold('beyond-tables.json', beyondTables(findings));
    expect(faults.join('\n\n')).toBe('');
  });

  it('has a golden file for each, and none that nothing gives', () => {
    const files = readdirSync(golden(name, '')).filter((file) => !file.includes('-changed'));
    expect(files.sort()).toEqual([...TABLES.map((table) => `${table.name}.csv`), 'beyond-tables.json'].sort());
  });
});
