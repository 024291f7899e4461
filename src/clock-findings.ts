import { aminoAcidFindings } from './amino-acid-findings.js';
import { type ClockSet, testingDf } from './beds/index.js';
import type { ClockOrder, Pass, RunContext, SlopeOfPass } from './clock-run.js';
import { correlationTable, gradientRemarks } from './coast/index.js';
import type {
  BedMark,
  BedSite,
  ClockRow,
  ConflictRow,
  Evidence,
  Findings,
  GradientFinding,
  Remark,
  SectionRow,
  Shell,
  ShellMark,
} from './model/index.js';
import { heightOf } from './order/index.js';
import { orderFindings } from './order-findings.js';
import { MOST_PASSES, type Settled } from './passes.js';
import { relationFindings } from './relation-findings.js';
import { screenBeds } from './screening/index.js';
import { adjustedRandIndex, type Random } from './statistics/index.js';
import { checkSections, listConflicts } from './superposition/index.js';
import type { ZoneSupport } from './zone-support.js';
import {
  adjacentZonesRows,
  bedRows,
  isNearEquilibrium,
  type ShellNotes,
  shellRows,
  type Zoning,
  zoneCountRows,
  zoneRows,
} from './zones/index.js';

/** Tables and lists of the findings that are made clock by clock. */
type ByClock =
  | 'zones'
  | 'zone_counts'
  | 'adjacent_zones'
  | 'beds'
  | 'shells'
  | 'order'
  | 'pairs'
  | 'relations'
  | 'sections'
  | 'correlation'
  | 'evidence'
  | 'conflicts'
  | 'diagnostics'
  | 'gradients'
  | 'votes'
  | 'shares'
  | 'remarks';

/** All rows of one clock. */
export interface ClockResult extends Pick<Findings, ByClock> {
  readonly clock: ClockRow;
}

/** What the rows of one taxon and fraction are made from. */
export interface ClockFindingsInput {
  readonly context: RunContext;
  readonly set: ClockSet;
  readonly settled: Settled;
  /** Null where no bed has a mean. */
  readonly order: Promise<ClockOrder | null>;
  readonly singles: readonly Pass[];
  readonly sites: readonly BedSite[];
  readonly sections: readonly string[];
  /** null where no bed has a mean. */
  readonly support: ZoneSupport | null;
  readonly random: Random;
}

const EMPTY = {
  zones: [],
  zone_counts: [],
  adjacent_zones: [],
  beds: [],
  shells: [],
  order: [],
  pairs: [],
  relations: [],
  sections: [],
  correlation: [],
  evidence: [],
  conflicts: [],
  diagnostics: [],
  gradients: [],
  votes: [],
  shares: [],
  remarks: [],
};

/** Rows of the main clock of one taxon and fraction, then one clock row an amino acid. */
export async function clockFindings(input: ClockFindingsInput): Promise<ClockResult[]> {
  const { settled, singles } = input;
  const main = await mainResult(input);
  return [
    main,
    ...singles.map((pass) => ({
      ...EMPTY,
      clock: clockRow(pass, randWithMain(pass, settled.last)),
      zones: pass.zoning === null ? [] : zoneRows(pass.data, pass.zoning),
      zone_counts: pass.zoning === null ? [] : zoneCountRows(pass.data, pass.zoning),
    })),
  ];
}

async function mainResult(input: ClockFindingsInput): Promise<ClockResult> {
  const { context, set, settled, support, singles, sites, sections, random } = input;
  const { last } = settled;
  const { data, zoning } = last;
  const { options, shells, summaries } = context;
  const siteOf = new Map(sites.map((site) => [`${site.section}/${site.bed}`, site]));
  const ages = new Map(data.beds.map((bed, at) => [bed.key, settled.ages[at]]));
  const marks = bedMarks(settled, siteOf, context, zoning);
  const unsorted = bedRows({
    data,
    zoning,
    shells,
    summaries,
    notes: (bed) => ({
      place: siteOf.get(bed.key)?.place ?? null,
      marks: marks.get(bed.key) ?? [],
      reading: ages.get(bed.key)?.reading ?? '',
    }),
    assign: support?.assign,
  });
  // tables list beds as the sites do: sections in coast order, the lowest bed first
  const position = new Map([...siteOf.keys()].map((key, at) => [key, at]));
  const beds = [...unsorted].sort(
    (a, b) => position.get(`${a.section}/${a.bed}`)! - position.get(`${b.section}/${b.bed}`)!,
  );
  const zones = zoning === null ? [] : zoneRows(data, zoning, support);
  const aminoAcids = aminoAcidFindings(context, set, last, singles, random.fork(1));
  const relations = relationFindings({ settled, shells, beds, sites: siteOf });
  const zoneOf = new Map(beds.map((bed) => [`${bed.section}/${bed.bed}`, bed.zone]));
  const slope = last.gradient === null ? null : gradientFinding(last, last.gradient, options.gradient!);
  const rows = {
    ...EMPTY,
    clock: clockRow(last, 1),
    zones,
    zone_counts: zoning === null ? [] : zoneCountRows(data, zoning, support?.criteria),
    adjacent_zones: zoning === null ? [] : adjacentZonesRows(data, zoning),
    beds,
    shells: shellRows(data, zoning, shells, (at) => notesOnShell(settled, at), support?.assign),
    evidence: [
      ...shellEvidence(settled, shells),
      ...bedEvidence(settled, marks, siteOf, options),
      ...relations.evidence,
      ...(support === null
        ? []
        : [{ clock: data.clock.name, about: 'clock' as const, name: data.clock.name, sentences: [support.sentence] }]),
    ],
    conflicts: conflictRows(settled, shells),
    relations: relations.rows,
    sections: sectionRows(settled, siteOf, options.alpha, options.simulations, random),
    correlation: correlationTable(zones, beds, sections),
    votes: aminoAcids.votes,
    shares: aminoAcids.shares,
    remarks: [
      ...aminoAcids.remarks,
      ...(settled.settled ? [] : [unsettledPasses(data.clock.name)]),
      ...(options.gradient === null ? [] : slopeRemarks(last, slope, context, options.gradient)),
    ],
    gradients: slope === null ? [] : [slope],
  };
  // last, since the order may still be on its way on other threads
  const order = await input.order;
  return order === null
    ? rows
    : { ...rows, ...orderFindings(order, { data, zoneOf, zoning, support, alpha: options.alpha }) };
}

const NO_MARKS: readonly ShellMark[] = [];

function notesOnShell({ readings, marks }: Settled, at: number): ShellNotes {
  const { status, reading, confidence } = readings.shells[at];
  const own = marks[at];
  return { status, reading, confidence, marks: own.length === 0 ? NO_MARKS : own.map(({ mark }) => mark) };
}

function clockRow({ data, zoning, gradient }: Pass, rand: number | null): ClockRow {
  const { clock } = data;
  return {
    clock: clock.name,
    taxon: clock.taxon,
    fraction: clock.fraction,
    amino_acids: clock.amino_acids,
    main: clock.main,
    shells: data.beds.reduce((sum, bed) => sum + bed.n, 0),
    beds: data.beds.filter((bed) => bed.n > 0).length,
    scatter: data.scatter.s,
    spread: zoning?.spread ?? null,
    zones: zoning?.fit.k ?? 0,
    verdict: zoning?.verdict ?? 'too few beds',
    slope: gradient?.slope ?? null,
    slope_low: gradient?.low ?? null,
    slope_high: gradient?.high ?? null,
    rand_with_main: rand,
  };
}

/** Adjusted Rand index of the zonings of two clocks over the beds both have; null with fewer than two. */
function randWithMain(pass: Pass, main: Pass): number | null {
  const labels = (from: Pass): Map<string, number> =>
    new Map(from.zoning?.beds.map((bed, at) => [from.data.beds[bed].key, from.zoning!.labels[at]]) ?? []);
  const [own, other] = [labels(pass), labels(main)];
  const shared = [...own.keys()].filter((key) => other.has(key));
  if (shared.length < 2) return null;
  return adjustedRandIndex(
    shared.map((key) => own.get(key)!),
    shared.map((key) => other.get(key)!),
  );
}

function bedMarks(
  { last: { data }, left }: Settled,
  sites: ReadonlyMap<string, BedSite>,
  { options, relations }: RunContext,
  zoning: Zoning | null,
): Map<string, BedMark[]> {
  const { beds } = data;
  const related = new Set(
    relations
      .filter(({ lower, upper }) => sites.get(lower)?.section === sites.get(upper)?.section)
      .flatMap(({ lower, upper }) => [lower, upper]),
  );
  const marks = new Map<string, BedMark[]>(beds.map((bed) => [bed.key, []]));
  const toScreen = beds.map((bed) => ({ burial_m: sites.get(bed.key)?.burial_m ?? null, shells: bed.n }));
  for (const { bed, mark } of screenBeds(toScreen, options.screening)) marks.get(beds[bed].key)!.push(mark);
  const inSection = new Map<string, number>();
  for (const bed of beds) inSection.set(bed.section, (inSection.get(bed.section) ?? 0) + 1);
  for (const bed of beds) {
    const own = marks.get(bed.key)!;
    const placed = sites.get(bed.key)?.place != null || related.has(bed.key);
    if (!placed && inSection.get(bed.section)! > 1) own.push('no place in section');
    if (data.scatter.assumed) own.push('assumed scatter');
    if (left.mixed.has(bed.key)) own.push('mixed age');
    if (zoning !== null && bed.n > 0 && isNearEquilibrium(data.clock, bed.mean)) own.push('near equilibrium');
  }
  return marks;
}

function sectionRows(
  { last }: Settled,
  sites: ReadonlyMap<string, BedSite>,
  alpha: number,
  simulations: number,
  random: Random,
): SectionRow[] {
  const { data, relations } = last;
  const sections = new Map<string, { rank: number; mean: number; se: number }[]>();
  for (const bed of data.beds) {
    const place = sites.get(bed.key)?.place;
    const list = sections.get(bed.section) ?? [];
    sections.set(bed.section, list);
    if (bed.n > 0 && place != null) list.push({ rank: heightOf(place), mean: bed.mean, se: bed.se });
  }
  const lowerIn = new Map<string, number>();
  for (const { lower } of relations) {
    const section = sites.get(lower)?.section;
    if (section !== undefined) lowerIn.set(section, (lowerIn.get(section) ?? 0) + 1);
  }
  const checks = checkSections(
    [...sections].map(([section, beds]) => ({ section, beds })),
    random,
    { alpha, df: testingDf(data.scatter), simulations },
  );
  return checks.map(({ section, beds, statistic, p_order, verdict }) => ({
    clock: data.clock.name,
    section,
    beds,
    relations: lowerIn.get(section) ?? 0,
    statistic,
    p_order,
    verdict,
  }));
}

function unsettledPasses(clock: string): Remark {
  const text = `After ${MOST_PASSES} passes some shells still change between set aside and kept; the last pass is shown, and they deserve a look.`;
  return { clock, level: 'caution', text };
}

function slopeRemarks(
  { data }: Pass,
  slope: GradientFinding | null,
  { gradient }: RunContext,
  column: string,
): Remark[] {
  const without = data.beds.filter((bed) => bed.n > 0 && !gradient?.has(bed.key)).map((bed) => bed.key);
  return gradientRemarks(data.clock.name, column, slope, without);
}

function gradientFinding({ data }: Pass, fit: SlopeOfPass, column: string): GradientFinding {
  return {
    clock: data.clock.name,
    column,
    centre: fit.centre,
    slope: fit.slope,
    slope_low: fit.low,
    slope_high: fit.high,
    bic_with: fit.bicWith,
    bic_without: fit.bicWithout,
    used: fit.used,
  };
}

function bedEvidence(
  { last: { data }, ages }: Settled,
  marks: ReadonlyMap<string, readonly BedMark[]>,
  sites: ReadonlyMap<string, BedSite>,
  options: RunContext['options'],
): Evidence[] {
  const screened = screenBeds(
    data.beds.map((bed) => ({ burial_m: sites.get(bed.key)?.burial_m ?? null, shells: bed.n })),
    options.screening,
  );
  return data.beds.flatMap((bed, at) => {
    const sentences = [
      ...ages[at].sentences,
      ...screened.filter((mark) => mark.bed === at).map((mark) => sentence(mark.evidence)),
    ];
    if (marks.get(bed.key)?.includes('near equilibrium')) {
      sentences.push('Its ratio is near equilibrium, where older and younger beds come to look alike.');
    }
    return sentences.length === 0 ? [] : [{ clock: data.clock.name, about: 'bed' as const, name: bed.key, sentences }];
  });
}

const sentence = (text: string): string =>
  `${text.charAt(0).toUpperCase()}${text.slice(1)}${text.endsWith('.') ? '' : '.'}`;

const shellName = ({ section, bed, shell }: Shell): string => `${section}/${bed}/${shell}`;

function shellEvidence({ last: { data }, readings }: Settled, shells: readonly Shell[]): Evidence[] {
  return data.shells.flatMap(({ shell }, at) => {
    const { sentences } = readings.shells[at];
    if (sentences.length === 0) return [];
    return [{ clock: data.clock.name, about: 'shell' as const, name: shellName(shells[shell]), sentences }];
  });
}

function conflictRows({ last: { data }, readings }: Settled, shells: readonly Shell[]): ConflictRow[] {
  const placed = data.shells.map(({ bed, x }) => ({ bed, x: x - data.slope * data.beds[bed].gradient }));
  return listConflicts(readings.conflicts, placed).map(({ lower, upper, shortfall }) => ({
    clock: data.clock.name,
    lower: shellName(shells[data.shells[lower].shell]),
    upper: shellName(shells[data.shells[upper].shell]),
    shortfall,
  }));
}
