import type { BedRecord, InputFile, Problem, Survey } from '../model/index.js';
import { type Alias, aliasesKey, readAliases } from './aliases-table.js';
import { type BedEntry, createBedRegister } from './bed-register.js';
import { type BedDetails, bedsKey, readBeds } from './beds-table.js';
import { checkCircles } from './check-circles.js';
import { checkBedKeys, checkPlaceNames, checkTaxonNames } from './check-names.js';
import { checkPlaces } from './check-places.js';
import { createProblemList, type ProblemList } from './problem-list.js';
import { type FileBytes, readTable, type TableKind } from './read-table.js';
import { readRelations, relationsKey } from './relations-table.js';
import { sha256 } from './sha256.js';
import { shellsKey } from './shells-columns.js';
import { readShells } from './shells-table.js';
import { readStandards, standardsKey } from './standards-table.js';
import type { Table } from './table.js';
import { warnOfAliases, warnOfSingleShells } from './warn-of-shells.js';

/** The files of a survey in memory. */
export interface SurveyBytes {
  /** Null when the file can't be read: the other tables are still checked. */
  readonly shells: FileBytes | null;
  readonly beds?: FileBytes;
  readonly relations?: FileBytes;
  readonly standards?: FileBytes;
  readonly aliases?: FileBytes;
  /** Sheet of the .xlsx files, by name or number from 1. */
  readonly sheet?: string;
}

/** A survey, or none when any problem is an error; and all problems by file and line. */
export interface SurveyResult {
  readonly survey: Survey | null;
  readonly problems: Problem[];
}

const WANTED = {
  shells: 'section, bed, taxon, shell and columns of ratios such as D/L Asx or A/I',
  beds: 'section, bed and what is known of each bed (level, elevation_m, latitude …)',
  relations: 'lower, upper (both section/bed), basis, kind, certainty',
  standards: 'lab, standard, amino_acid, dl',
  aliases: 'name, taxon',
} as const;
const KEYS = {
  shells: shellsKey,
  beds: bedsKey,
  relations: relationsKey,
  standards: standardsKey,
  aliases: aliasesKey,
};

type Role = keyof typeof WANTED;

/**
 * Reads a survey from bytes, without touching a disk: the whole input room but for the files themselves.
 *
 * @param files name and bytes of each table; only the shells are needed
 * @param problems problems already met, such as files that can't be read
 */
export async function surveyFromBytes(
  files: SurveyBytes,
  problems: ProblemList = createProblemList(),
): Promise<SurveyResult> {
  const inputs: InputFile[] = [];
  const open = async (role: Role): Promise<Table | null> => {
    const source = files[role];
    if (source === undefined || source === null) return null;
    const kind: TableKind = { isKnown: (h) => KEYS[role](h) !== null, wanted: WANTED[role], sheet: files.sheet };
    const table = await readTable(source, kind, problems);
    inputs.push({ role, file: source.file, sha256: await sha256(source.bytes), rows: table?.length ?? 0 });
    return table;
  };

  const beds = createBedRegister(problems);
  const shellsTable = await open('shells');
  const bedsTable = await open('beds');
  const relationsTable = await open('relations');
  const standardsTable = await open('standards');
  const aliasesTable = await open('aliases');

  const aliases = aliasesTable === null ? new Map<string, Alias>() : readAliases(aliasesTable, problems);
  const met = new Map<string, { rows: number; line: number }>();
  const taxonOf = (name: string, line: number): string => {
    const known = met.get(name);
    if (known === undefined) met.set(name, { rows: 1, line });
    else known.rows += 1;
    return aliases.get(name)?.taxon ?? name;
  };
  const analyses = shellsTable === null ? [] : readShells(shellsTable, beds, taxonOf, problems);
  const details = bedsTable === null ? new Map<string, Map<string, BedDetails>>() : readBeds(bedsTable, beds, problems);
  checkBedKeys(beds, problems);
  const names = new Set(beds.all().map((entry) => `${entry.section}/${entry.bed}`));
  // Without the beds every relation would name an unknown one: only what is wrong first is told.
  const relations = relationsTable === null || names.size === 0 ? [] : readRelations(relationsTable, names, problems);
  const standards = standardsTable === null ? [] : readStandards(standardsTable, problems);

  const shellsFile = files.shells?.file ?? '';
  checkPlaces(beds, relations, shellsFile, problems);
  checkCircles(relations, beds, problems);
  checkPlaceNames(beds, problems);
  if (shellsTable !== null) {
    checkTaxonNames(taxaAfter(met, aliases), shellsFile, problems);
    warnOfSingleShells(beds, shellsFile, problems);
    if (aliasesTable !== null) warnOfAliases(aliases, new Set(met.keys()), aliasesTable.file, problems);
    if (analyses.length === 0 && !problems.hasErrors()) {
      problems.error(
        'nothing to use',
        { file: shellsFile },
        'No row of the shells table has a D/L value. Fill in the ratios.',
      );
    }
  }

  const list = problems.list();
  if (problems.hasErrors()) return { survey: null, problems: list };
  const survey: Survey = {
    inputs,
    analyses,
    beds: beds.all().map((entry) => bedRecord(entry, details)),
    relations,
    standards,
    problems: list,
  };
  return { survey, problems: list };
}

function bedRecord(entry: BedEntry, details: ReadonlyMap<string, ReadonlyMap<string, BedDetails>>): BedRecord {
  const more = details.get(entry.section)?.get(entry.bed);
  return {
    section: entry.section,
    bed: entry.bed,
    place: entry.place,
    elevation_m: more?.numbers.elevation_m ?? null,
    latitude: more?.numbers.latitude ?? null,
    longitude: more?.numbers.longitude ?? null,
    coast_km: more?.numbers.coast_km ?? null,
    cmat_c: more?.numbers.cmat_c ?? null,
    burial_m: more?.numbers.burial_m ?? null,
    note: more?.note ?? null,
    columns: more?.columns ?? {},
  };
}

/** The taxa as they are after aliases, by first appearance. */
function taxaAfter(
  met: ReadonlyMap<string, { rows: number; line: number }>,
  aliases: ReadonlyMap<string, Alias>,
): { name: string; rows: number; line: number }[] {
  const taxa = new Map<string, { name: string; rows: number; line: number }>();
  for (const [written, { rows, line }] of met) {
    const name = aliases.get(written)?.taxon ?? written;
    const known = taxa.get(name);
    if (known === undefined) taxa.set(name, { name, rows, line });
    else known.rows += rows;
  }
  return [...taxa.values()];
}
