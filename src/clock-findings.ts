import { aminoAcidFindings } from './amino-acid-findings.js';
import { bedEvidence, bedMarks } from './bed-findings.js';
import type { ClockSet } from './beds/index.js';
import type { ClockOrder } from './clock-order.js';
import type { Pass, RunContext } from './clock-run.js';
import { correlationTable } from './coast/index.js';
import type { BedSite, ClockRow, Evidence, Findings, Remark } from './model/index.js';
import { orderFindings } from './order-findings.js';
import { MOST_PASSES, type Settled } from './passes.js';
import { relationFindings } from './relation-findings.js';
import { sectionRows } from './section-findings.js';
import { conflictRows, notesOnShell, shellEvidence } from './shell-findings.js';
import { gradientFinding, slopeRemarks } from './slope-findings.js';
import { adjustedRandIndex, type Random } from './statistics/index.js';
import type { SupportUnderWay } from './zone-support.js';
import { adjacentZonesRows, bedRows, shellRows, zoneCountRows, zoneRows } from './zones/index.js';

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
  /** Under way on other threads, where there are any; null where no bed has a mean. */
  readonly order: () => Promise<ClockOrder | null>;
  readonly singles: readonly Pass[];
  readonly sites: readonly BedSite[];
  readonly sections: readonly string[];
  /** null where no bed has a mean. */
  readonly support: SupportUnderWay | null;
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
  const { context, set, settled, singles, sites, sections, random } = input;
  const assign = input.support?.assign;
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
    assign,
  });
  // tables list beds as the sites do: sections in coast order, the lowest bed first
  const position = new Map([...siteOf.keys()].map((key, at) => [key, at]));
  const beds = [...unsorted].sort(
    (a, b) => position.get(`${a.section}/${a.bed}`)! - position.get(`${b.section}/${b.bed}`)!,
  );
  const aminoAcids = aminoAcidFindings(context, set, last, singles, random.fork(1));
  const relations = relationFindings({ settled, shells, beds, sites: siteOf });
  const zoneOf = new Map(beds.map((bed) => [`${bed.section}/${bed.bed}`, bed.zone]));
  const slope = last.gradient === null ? null : gradientFinding(last, last.gradient, options.gradient!);
  const ahead = {
    ...EMPTY,
    clock: clockRow(last, 1),
    adjacent_zones: zoning === null ? [] : adjacentZonesRows(data, zoning),
    beds,
    shells: shellRows(data, zoning, shells, (at) => notesOnShell(settled, at), assign),
    evidence: [
      ...shellEvidence(settled, shells),
      ...bedEvidence(settled, marks, siteOf, options),
      ...relations.evidence,
    ],
    conflicts: conflictRows(settled, shells),
    relations: relations.rows,
    sections: sectionRows(settled, siteOf, options.alpha, options.simulations, random),
    votes: aminoAcids.votes,
    shares: aminoAcids.shares,
    remarks: [
      ...aminoAcids.remarks,
      ...(settled.settled ? [] : [unsettledPasses(data.clock.name)]),
      ...(options.gradient === null ? [] : slopeRemarks(last, slope, context, options.gradient)),
    ],
    gradients: slope === null ? [] : [slope],
  };
  // last, since other threads may still be at them
  const support = (await input.support?.whole()) ?? null;
  const order = await input.order();
  const zones = zoning === null ? [] : zoneRows(data, zoning, support);
  return {
    ...ahead,
    zones,
    zone_counts: zoning === null ? [] : zoneCountRows(data, zoning, support?.criteria),
    correlation: correlationTable(zones, beds, sections),
    evidence: [...ahead.evidence, ...(support === null ? [] : [clockEvidence(data.clock.name, support.sentence)])],
    ...(order === null ? {} : orderFindings(order, { data, zoneOf, zoning, support, alpha: options.alpha })),
  };
}

const clockEvidence = (clock: string, sentence: string): Evidence => ({
  clock,
  about: 'clock',
  name: clock,
  sentences: [sentence],
});

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

function unsettledPasses(clock: string): Remark {
  const text = `After ${MOST_PASSES} passes some shells still change between set aside and kept; the last pass is shown, and they deserve a look.`;
  return { clock, level: 'caution', text };
}
