import type { AminoAcid, Analysis, ByAminoAcid, PublishedSummary, Shell } from '../model/index.js';
import { AMINO_ACIDS } from '../model/index.js';

/** Shells and published summaries of a survey, in order of first appearance. */
export interface Averages {
  readonly shells: readonly Shell[];
  readonly summaries: readonly PublishedSummary[];
}

/**
 * Averages injections to preparations and preparations to shells: arithmetic means of D/L (design 7.1).
 * A shell is known by section, bed, taxon, fraction and shell together. Rows that name neither preparation nor injection
 * are preparations of their own; rows of one preparation are its injections. Summary rows become one entry an amino acid.
 * @param analyses rows of the shells table
 * @example
 * averageAnalyses([]).shells.length // => 0
 */
export function averageAnalyses(analyses: readonly Analysis[]): Averages {
  // one list of shells a bed, taxon and fraction; rows of one mostly stand together in the table
  const lots = new Map<string, Map<string, number>>();
  let lot = new Map<string, number>();
  let before: Analysis | null = null;
  // a list is made only for a shell that comes more than once, which in a large survey few do
  const groups: (Analysis | Analysis[])[] = [];
  const summaries: PublishedSummary[] = [];
  for (const row of analyses) {
    if (row.summary !== null) {
      summaries.push(...summariesOf(row));
      continue;
    }
    if (before === null || !ofOneLot(before, row)) lot = lotOf(lots, row);
    before = row;
    const at = lot.get(row.shell);
    if (at === undefined) {
      lot.set(row.shell, groups.length);
      groups.push(row);
      continue;
    }
    const known = groups[at];
    if (Array.isArray(known)) known.push(row);
    else groups[at] = [known, row];
  }
  const shells = groups.map((rows) => (Array.isArray(rows) ? averageShell(rows) : shellOfOneRow(rows)));
  return { shells, summaries };
}

const ofOneLot = (a: Analysis, b: Analysis): boolean =>
  a.bed === b.bed && a.section === b.section && a.taxon === b.taxon && a.fraction === b.fraction;

/** Shells of one bed, taxon and fraction; the separator can't stand in a table cell, so no two lots share a key. */
function lotOf(lots: Map<string, Map<string, number>>, { section, bed, taxon, fraction }: Analysis) {
  const key = `${section}\u0001${bed}\u0001${taxon}\u0001${fraction}`;
  let lot = lots.get(key);
  if (lot === undefined) {
    lot = new Map();
    lots.set(key, lot);
  }
  return lot;
}

function summariesOf(row: Analysis): PublishedSummary[] {
  const summary = row.summary!;
  return AMINO_ACIDS.filter((code) => row.ratios[code] !== undefined).map((code) => ({
    section: row.section,
    bed: row.bed,
    taxon: row.taxon,
    fraction: row.fraction,
    amino_acid: code,
    mean: row.ratios[code]!,
    sd: summary.sd[code] ?? null,
    n: summary.n,
    labs: row.lab === null ? [] : [row.lab],
    methods: row.method === null ? [] : [row.method],
    file: row.file,
    line: row.line,
  }));
}

const NONE: readonly string[] = [];
const NO_REPLICATES: Shell['replicates'] = [];

/** Shells analysed once are most of a large survey, and there is nothing to average in them. */
function shellOfOneRow(row: Analysis): Shell {
  return {
    section: row.section,
    bed: row.bed,
    taxon: row.taxon,
    fraction: row.fraction,
    shell: row.shell,
    lab_ids: row.lab_id ? [row.lab_id] : NONE,
    labs: row.lab ? [row.lab] : NONE,
    methods: row.method ? [row.method] : NONE,
    preparations: 1,
    ratios: row.ratios,
    replicates: NO_REPLICATES,
    concentrations: row.concentrations,
    serine_ratio: row.serine_ratio ?? serineOfConcentrations(row.ratios, row.concentrations),
    file: row.file,
    line: row.line,
  };
}

function averageShell(rows: readonly Analysis[]): Shell {
  const first = rows[0];
  const preparations = groupPreparations(rows);
  const replicates = preparations.map((injections) => meanOf(injections.map((row) => row.ratios)));
  const ratios = meanOf(replicates);
  const concentrations = meanOf(preparations.map((injections) => meanOf(injections.map((row) => row.concentrations))));
  return {
    section: first.section,
    bed: first.bed,
    taxon: first.taxon,
    fraction: first.fraction,
    shell: first.shell,
    lab_ids: distinct(rows.map((row) => row.lab_id)),
    labs: distinct(rows.map((row) => row.lab)),
    methods: distinct(rows.map((row) => row.method)),
    preparations: preparations.length,
    ratios,
    replicates,
    concentrations,
    serine_ratio: serineRatio(rows, ratios, concentrations),
    file: first.file,
    line: first.line,
  };
}

/**
 * Rows of one shell by preparation. In the long form the amino acids of one unnamed preparation come on rows of their
 * own, so an unnamed preparation takes rows until an amino acid comes a second time.
 */
function groupPreparations(rows: readonly Analysis[]): Analysis[][] {
  const groups = new Map<string, Analysis[]>();
  const seen = new Map<AminoAcid, number>();
  for (const row of rows) {
    let key: string;
    if (row.preparation !== null) key = `named ${row.preparation}`;
    else if (row.injection !== null) key = 'injections of one preparation';
    else {
      const codes = AMINO_ACIDS.filter((code) => row.ratios[code] !== undefined);
      const occurrence = Math.max(0, ...codes.map((code) => seen.get(code) ?? 0));
      for (const code of codes) seen.set(code, occurrence + 1);
      key = `unnamed ${occurrence}`;
    }
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [row]);
    else group.push(row);
  }
  return [...groups.values()];
}

function meanOf(rows: readonly ByAminoAcid[]): ByAminoAcid {
  if (rows.length === 1) return rows[0];
  const means: Partial<Record<AminoAcid, number>> = {};
  for (const code of AMINO_ACIDS) {
    let sum = 0;
    let count = 0;
    for (const row of rows) {
      const value = row[code];
      if (value !== undefined) {
        sum += value;
        count++;
      }
    }
    if (count > 0) means[code] = sum / count;
  }
  return means;
}

function distinct(values: readonly (string | null)[]): string[] {
  return [...new Set(values.filter((value): value is string => value !== null && value !== ''))];
}

/**
 * L-Ser/L-Asp: as the table gives it, else from the concentrations of D and L together, of which 1/(1 + D/L) is L.
 * Where a D/L is missing the ratio of the totals stands in; the two factors nearly cancel.
 */
function serineRatio(rows: readonly Analysis[], ratios: ByAminoAcid, concentrations: ByAminoAcid): number | null {
  const given = rows.map((row) => row.serine_ratio).filter((value): value is number => value !== null);
  if (given.length > 0) return given.reduce((sum, value) => sum + value, 0) / given.length;
  return serineOfConcentrations(ratios, concentrations);
}

function serineOfConcentrations(ratios: ByAminoAcid, concentrations: ByAminoAcid): number | null {
  const { Ser: serine, Asx: aspartic } = concentrations;
  if (serine === undefined || aspartic === undefined || !(aspartic > 0)) return null;
  const both = ratios.Ser !== undefined && ratios.Asx !== undefined;
  return (serine / aspartic) * (both ? (1 + ratios.Asx!) / (1 + ratios.Ser!) : 1);
}
