import type { AminoAcid, Clock, Fraction, PublishedSummary, RunOptions, Shell } from '../model/index.js';
import { AMINO_ACIDS } from '../model/index.js';
import { countRatios } from '../screening/index.js';
import { bedKey } from './clock-data.js';
import { type FisherIndex, fisherIndex } from './fisher-index.js';

/** Share of a taxon's shells on which an amino acid must be measured to join the index by default. */
export const SHARE_FOR_INDEX = 0.8;

/** The clocks of one taxon and fraction. */
export interface ClockSet {
  readonly main: Clock;
  /** Set when the main clock is an index. */
  readonly index: FisherIndex | null;
  /** One a measured amino acid; the main clock itself is not repeated. */
  readonly singles: readonly Clock[];
}

/**
 * The clocks of every taxon and fraction, in order of first appearance (design 6 and 7.10). The main clock is the index of
 * all amino acids measured on at least 80 % of the shells, or the single one there is, or what the options name; every
 * amino acid also makes a clock of its own.
 */
export function chooseClocks(
  shells: readonly Shell[],
  summaries: readonly PublishedSummary[],
  options: Pick<RunOptions, 'taxon' | 'fraction' | 'amino_acid'>,
): ClockSet[] {
  const groups = new Map<
    string,
    { taxon: string; fraction: Fraction; shells: Shell[]; summaries: PublishedSummary[] }
  >();
  const groupOf = ({ taxon, fraction }: { readonly taxon: string; readonly fraction: Fraction }) => {
    const key = `${taxon}\u0001${fraction}`;
    const group = groups.get(key) ?? { taxon, fraction, shells: [], summaries: [] };
    groups.set(key, group);
    return group;
  };
  for (const shell of shells) groupOf(shell).shells.push(shell);
  for (const summary of summaries) groupOf(summary).summaries.push(summary);
  return [...groups.values()].flatMap(({ taxon, fraction, shells: own, summaries: published }) => {
    if (options.taxon !== null && options.taxon !== taxon) return [];
    if (options.fraction !== null && options.fraction !== fraction) return [];
    return clocksOf(taxon, fraction, own, published, options.amino_acid) ?? [];
  });
}

function clocksOf(
  taxon: string,
  fraction: Fraction,
  shells: readonly Shell[],
  summaries: readonly PublishedSummary[],
  wanted: RunOptions['amino_acid'],
): ClockSet | null {
  const counts = countMeasured(shells, summaries);
  const measured = AMINO_ACIDS.filter((code) => counts.get(code)! > 0);
  if (measured.length === 0) return null;
  const single = (code: AminoAcid, main: boolean): Clock => ({
    name: `${taxon} ${fraction} ${code}`,
    taxon,
    fraction,
    amino_acids: [code],
    weights: [1],
    main,
  });
  const asked = chooseAminoAcids(measured, counts, counts.get('all')!, wanted);
  if (asked.length === 0) return null;
  const chosen = anyBedHasAll(asked, shells, summaries) ? asked : [mostMeasured(asked, counts)];
  if (chosen.length === 1) {
    const singles = measured.filter((code) => code !== chosen[0]).map((code) => single(code, false));
    return { main: single(chosen[0], true), index: null, singles };
  }
  const beds = new Map<string, number>();
  const rows: number[][] = [];
  const labels: number[] = [];
  for (const shell of shells) {
    const key = bedKey(shell.section, shell.bed);
    if (!beds.has(key)) beds.set(key, beds.size);
    rows.push(chosen.map((code) => Math.log(shell.ratios[code] ?? Number.NaN)));
    labels.push(beds.get(key)!);
  }
  const index = fisherIndex(rows, labels, chosen);
  const main: Clock = {
    name: `${taxon} ${fraction} index`,
    taxon,
    fraction,
    amino_acids: chosen,
    weights: index.shares.map((share) => share.weight),
    main: true,
  };
  return { main, index, singles: measured.map((code) => single(code, false)) };
}

/** Shells (published ones too) on which each amino acid was measured, and their number in all. */
function countMeasured(shells: readonly Shell[], summaries: readonly PublishedSummary[]) {
  const counts = new Map<AminoAcid | 'all', number>(countRatios(shells));
  const publishedBeds = new Map<string, number>();
  for (const summary of summaries) {
    counts.set(summary.amino_acid, counts.get(summary.amino_acid)! + summary.n);
    const key = bedKey(summary.section, summary.bed);
    publishedBeds.set(key, Math.max(publishedBeds.get(key) ?? 0, summary.n));
  }
  counts.set('all', shells.length + [...publishedBeds.values()].reduce((sum, n) => sum + n, 0));
  return counts;
}

function chooseAminoAcids(
  measured: readonly AminoAcid[],
  counts: ReadonlyMap<AminoAcid | 'all', number>,
  all: number,
  wanted: RunOptions['amino_acid'],
): readonly AminoAcid[] {
  if (wanted === 'all') return measured;
  if (wanted !== null) return wanted.filter((code) => measured.includes(code));
  const enough = measured.filter((code) => counts.get(code)! >= SHARE_FOR_INDEX * all);
  if (enough.length > 0) return enough;
  return [mostMeasured(measured, counts)];
}

function mostMeasured(codes: readonly AminoAcid[], counts: ReadonlyMap<AminoAcid | 'all', number>): AminoAcid {
  return codes.reduce((most, code) => (counts.get(code)! > counts.get(most)! ? code : most));
}

/** Whether all of these were measured on one shell, or published together of one bed: an index needs them so. */
function anyBedHasAll(
  codes: readonly AminoAcid[],
  shells: readonly Shell[],
  summaries: readonly PublishedSummary[],
): boolean {
  if (shells.some(({ ratios }) => codes.every((code) => ratios[code] !== undefined))) return true;
  const published = new Map<string, Set<AminoAcid>>();
  for (const { section, bed, amino_acid } of summaries) {
    const key = bedKey(section, bed);
    published.set(key, (published.get(key) ?? new Set()).add(amino_acid));
  }
  return [...published.values()].some((own) => codes.every((code) => own.has(code)));
}
