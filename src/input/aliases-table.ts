import { matchColumns, warnOfUnknownColumns } from './match-columns.js';
import type { ProblemList } from './problem-list.js';
import { createRowReader } from './row-reader.js';
import { squash } from './squash.js';
import type { Table } from './table.js';

const COLUMNS = ['name', 'taxon'] as const;

/** Key of a header of the aliases table. */
export function aliasesKey(header: string): string | null {
  const plain = squash(header);
  return plain === 'alias' ? 'name' : (COLUMNS as readonly string[]).includes(plain) ? plain : null;
}

/** One line of the aliases table, its taxon followed through further aliases. */
export interface Alias {
  readonly name: string;
  readonly taxon: string;
  readonly line: number;
}

/** Reads the aliases table: names as written in the shells table, and the taxon each stands for. */
export function readAliases(table: Table, problems: ProblemList): Map<string, Alias> {
  const match = matchColumns(table, aliasesKey, problems);
  const { at } = match;
  warnOfUnknownColumns(table, match.unknown, COLUMNS, () => null, problems);
  const missing = COLUMNS.filter((column) => at(column) < 0);
  for (const column of missing) {
    problems.error(
      `no ${column} column`,
      { file: table.file, line: table.headerLine },
      `The aliases table has no column "${column}". Wanted are name (as it stands in the shells table) and taxon (what it is to be called).`,
    );
  }
  const aliases = new Map<string, Alias>();
  if (missing.length > 0) return aliases;
  const reader = createRowReader(table, 'point', problems);
  reader.forEachRow((cells, row) => {
    const name = reader.neededName(cells, row, at('name'), 'name');
    const taxon = reader.neededName(cells, row, at('taxon'), 'taxon');
    if (name === '' || taxon === '' || name === taxon) return;
    const before = aliases.get(name);
    if (before !== undefined && before.taxon !== taxon) {
      problems.error(
        'alias twice',
        reader.place(row, at('name')),
        `"${name}" is joined to "${before.taxon}" on line ${before.line} and to "${taxon}" here. Keep one.`,
      );
      return;
    }
    if (before === undefined) aliases.set(name, { name, taxon, line: table.line(row) });
  });
  return follow(aliases, table, problems);
}

/** Follows aliases of aliases to the last name; a circle of them is an error. */
function follow(aliases: ReadonlyMap<string, Alias>, table: Table, problems: ProblemList): Map<string, Alias> {
  const ends = new Map<string, string | null>();
  const followed = new Map<string, Alias>();
  for (const alias of aliases.values()) {
    const path: string[] = [];
    const onPath = new Set<string>();
    let name = alias.name;
    let end: string | null | undefined;
    for (;;) {
      end = ends.get(name);
      if (end !== undefined) break;
      const next = aliases.get(name);
      if (next === undefined) {
        end = name;
        break;
      }
      if (onPath.has(name)) {
        problems.error(
          'alias circle',
          { file: table.file, line: alias.line },
          `The aliases run in a circle: ${[...path.slice(path.indexOf(name)), name].join(' > ')}. Leave one of them out.`,
        );
        end = null;
        break;
      }
      path.push(name);
      onPath.add(name);
      name = next.taxon;
    }
    for (const step of path) ends.set(step, end);
    if (end !== null) followed.set(alias.name, { ...alias, taxon: end });
  }
  return followed;
}
