import type { Alias } from './aliases-table.js';
import type { BedRegister } from './bed-register.js';
import { nearestName } from './edit-distance.js';
import type { ProblemList } from './problem-list.js';

/** Warns of beds with one shell of a taxon: their scatter is not known from themselves. */
export function warnOfSingleShells(beds: BedRegister, file: string, problems: ProblemList): void {
  for (const entry of beds.all()) {
    for (const [taxon, { count, line }] of entry.shells) {
      if (count !== 1) continue;
      problems.warning(
        'one shell',
        { file, line },
        `Bed ${entry.section}/${entry.bed} has one shell of ${taxon}: nothing shows whether it is reworked. Analyse more shells of this bed where you can.`,
      );
    }
  }
}

/** Warns of aliases whose name no row of the shells table bears. */
export function warnOfAliases(
  aliases: ReadonlyMap<string, Alias>,
  names: ReadonlySet<string>,
  file: string,
  problems: ProblemList,
): void {
  for (const alias of aliases.values()) {
    if (names.has(alias.name)) continue;
    const near = nearestName(alias.name, names);
    problems.warning(
      'alias unused',
      { file, line: alias.line, column: 'name' },
      `No row of the shells table has the taxon "${alias.name}"${near === null ? '' : `; did you mean "${near}"?`}`,
    );
  }
}
