import type { Random } from '../../src/statistics/index.js';
import { utf8 } from '../input/survey-of.js';
import { BYTE_CHANGES } from './mutate-bytes.js';
import { inventedRelations } from './mutate-relations.js';
import { inventedSettings, soundSettings } from './mutate-settings.js';
import { TABLE_CHANGES } from './mutate-table.js';
import { PARTS, type Part, type Start, type SurveyFiles } from './survey-files.js';

/** A survey made from a start by changes, and what was changed. */
export interface Mutant {
  readonly files: SurveyFiles;
  readonly changes: readonly string[];
}

/** One to four changes of a start. The same random stream gives the same mutant. */
export function mutate(start: Start, random: Random): Mutant {
  let files: SurveyFiles = start.files;
  const changes: string[] = [start.name];
  const count = 1 + random.integer(4);
  const gentle = random.integer(3) > 0;
  for (let k = 0; k < count; k++) {
    const { part, change, bytes } = gentle ? gentleChange(files, random) : oneChange(files, random);
    files = { ...files, [part]: bytes };
    changes.push(`${part}: ${change}`);
  }
  return { files, changes };
}

// what a reader lets through, so that the rooms behind it see unusual surveys
const GENTLE = [
  'numbers drawn together',
  'cells emptied',
  'a column taken out',
  'rows taken out',
  'few rows left',
  'rows in another order',
  'a cell moved to another row',
  'every row a name of its own',
  'one name for another everywhere',
  'an edge name in a cell',
  'a column scaled a little',
  'ratios rounded',
] as const;

function gentleChange(files: SurveyFiles, random: Random): { part: Part; change: string; bytes: Uint8Array } {
  const kind = random.integer(8);
  if (kind === 0) return { part: 'settings', change: 'unusual wishes', bytes: utf8(soundSettings(random)) };
  if (kind === 1) {
    const shells = Buffer.from(files.shells).toString('latin1');
    return { part: 'relations', change: 'invented', bytes: utf8(inventedRelations(shells, random)) };
  }
  const part = random.integer(5) || !files.beds ? 'shells' : 'beds';
  const change = GENTLE[random.integer(GENTLE.length)];
  return { part, change, bytes: written(TABLE_CHANGES[change](cellsOf(files[part]!), random)) };
}

function oneChange(files: SurveyFiles, random: Random): { part: Part; change: string; bytes: Uint8Array } {
  const kind = random.integer(12);
  if (kind === 0) return { part: 'settings', change: 'invented', bytes: utf8(inventedSettings(random)) };
  if (kind <= 2) return { part: 'settings', change: 'unusual wishes', bytes: utf8(soundSettings(random)) };
  if (kind === 3) {
    const shells = Buffer.from(files.shells).toString('latin1');
    return { part: 'relations', change: 'invented', bytes: utf8(inventedRelations(shells, random)) };
  }
  const parts = PARTS.filter((part) => files[part] !== undefined);
  // most of what can go wrong starts from the shells
  const part = random.integer(2) ? 'shells' : parts[random.integer(parts.length)];
  const bytes = files[part]!;
  if (kind <= 5 || part === 'settings') {
    const [change, made] = pick(Object.entries(BYTE_CHANGES), random);
    return { part, change, bytes: made(bytes, random) };
  }
  const [change, made] = pick(Object.entries(TABLE_CHANGES), random);
  return { part, change, bytes: written(made(cellsOf(bytes), random)) };
}

// latin1 keeps every byte, whatever the encoding of the file
function cellsOf(bytes: Uint8Array): string[][] {
  const text = Buffer.from(bytes).toString('latin1');
  const delimiter = (text.split('\n', 1)[0] ?? '').includes(';') ? ';' : ',';
  return text
    .replace(/\n$/, '')
    .split('\n')
    .map((line) => line.split(delimiter));
}

function written(cells: readonly (readonly string[])[]): Uint8Array {
  const delimiter = cells.some((line) => line.some((cell) => /^\d+,\d+$/.test(cell))) ? ';' : ',';
  const text = `${cells.map((line) => line.join(delimiter)).join('\n')}\n`;
  // what the changes put in is beyond latin1; what came from the file is not
  const wide = /[^\0-\u00ff]/.test(text);
  return new Uint8Array(Buffer.from(text, wide ? 'utf8' : 'latin1'));
}

function pick<T>(list: readonly T[], random: Random): T {
  return list[random.integer(list.length)];
}
