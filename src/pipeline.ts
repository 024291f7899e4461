import { averageAnalyses, bedKey, type ClockSet, chooseClocks } from './beds/index.js';
import { type ClockResult, clockFindings } from './clock-findings.js';
import { beginOrder } from './clock-order.js';
import { type RunContext, runPass, staircaseOf } from './clock-run.js';
import {
  conversionRemarks,
  correctAnalyses,
  type LaboratoryOffset,
  laboratoryOffsets,
  laboratoryRemarks,
  sectionOrder,
  staircaseRemarks,
  temperatureRemarks,
} from './coast/index.js';
import { type CombinedOutcome, combineClocks, combinedRows, type SettledClock } from './combined-run.js';
import type {
  BedRecord,
  BedSite,
  Findings,
  Host,
  PublishedSummary,
  Remark,
  RunOptions,
  Shell,
  Survey,
} from './model/index.js';
import { heightOf, sectionRelations } from './order/index.js';
import { type Settled, settlePasses } from './passes.js';
import { planOfRun } from './planning/index.js';
import { remarks } from './remarks.js';
import { screenShells } from './screening/index.js';
import { settleZones } from './settle-zones.js';
import { createRandom, type Random } from './statistics/index.js';
import { VERSION } from './version.js';
import { beginSupport } from './zone-support.js';

/**
 * The whole way of the data: average, screen, choose clocks; for each clock find zones, check relations and read odd shells
 * until nothing changes, then order the beds; put down all that was found, and what to collect or date next (design 7).
 * @param survey what was read, with warnings only
 * @param options every option has a value; see DEFAULT_OPTIONS
 * @param host maps tasks and hears of progress; results do not depend on it
 * @throws Error when no clock can be made (no shell of the taxon, fraction or amino acid asked for)
 */
export async function analyse(survey: Survey, options: RunOptions, host: Host): Promise<Findings> {
  // nothing here holds the analyses from then on: of a million shells they would fill a quarter of a gigabyte
  return analyseShells(averaged(survey, options), options, host);
}

/** What is left of a survey once its analyses are averaged. */
interface AveragedSurvey extends Pick<Survey, 'beds' | 'relations' | 'inputs' | 'problems'> {
  readonly offsets: readonly LaboratoryOffset[];
  readonly shells: readonly Shell[];
  readonly summaries: readonly PublishedSummary[];
  readonly sets: readonly ClockSet[];
  /** What is to be said of the laboratories. */
  readonly laboratories: readonly Remark[];
}

function averaged({ analyses, standards, ...kept }: Survey, options: RunOptions): AveragedSurvey {
  const offsets = laboratoryOffsets(standards, analyses);
  const { shells, summaries } = averageAnalyses(correctAnalyses(analyses, offsets));
  const sets = chooseClocks(shells, summaries, options);
  const asked = sets.map(({ main }) => ({ clock: main.name, taxon: main.taxon, fraction: main.fraction }));
  return { ...kept, offsets, shells, summaries, sets, laboratories: laboratoryRemarks(analyses, offsets, asked) };
}

async function analyseShells(survey: AveragedSurvey, options: RunOptions, host: Host): Promise<Findings> {
  const { offsets, shells, summaries, sets } = survey;
  const screening = screenShells(shells, options.screening);
  if (sets.length === 0) throw new Error('no shell has a ratio of the taxon, fraction and amino acid asked for');
  const sections = sectionOrder(survey.beds);
  const sites = bedSites(survey.beds, sections, options.gradient);
  const placed = survey.beds.map(({ section, bed, place }) => ({ key: bedKey(section, bed), section, place }));
  const context: RunContext = {
    shells,
    summaries,
    placed: new Map(placed.map((bed) => [bed.key, bed])),
    relations: survey.relations,
    stacking: sectionRelations(placed),
    elevations: new Map(
      sites.flatMap((site) => (site.elevation_m === null ? [] : [[bedKey(site.section, site.bed), site.elevation_m]])),
    ),
    offsets,
    gradient:
      options.gradient === null
        ? null
        : new Map(
            sites.flatMap((site) => (site.gradient === null ? [] : [[bedKey(site.section, site.bed), site.gradient]])),
          ),
    options,
  };
  const random = createRandom(options.seed);
  const runs: SettledClock[] = [];
  for (const [at, set] of sets.entries()) runs.push({ set, settled: await settleClock(set, random.fork(at)) });
  const combined = combineAll(runs);
  const results: ClockResult[] = [];
  for (const [at, { run }] of combined.entries()) {
    if (run === null) continue;
    const rows = await rowsOfClocks(run, random.fork(2000 + at));
    results.push(...rows.map((result) => combinedRows(result, run, options.reference_taxon!)));
  }
  for (const [at, run] of runs.entries()) results.push(...(await rowsOfClocks(run, random.fork(at))));
  const findings: Findings = {
    program: 'bedorder' as const,
    version: VERSION,
    options,
    inputs: survey.inputs,
    clocks: results.map((result) => result.clock),
    zones: results.flatMap((result) => result.zones),
    zone_counts: results.flatMap((result) => result.zone_counts),
    adjacent_zones: results.flatMap((result) => result.adjacent_zones),
    beds: results.flatMap((result) => result.beds),
    shells: results.flatMap((result) => result.shells),
    order: results.flatMap((result) => result.order),
    pairs: results.flatMap((result) => result.pairs),
    relations: results.flatMap((result) => result.relations),
    sections: results.flatMap((result) => result.sections),
    correlation: results.flatMap((result) => result.correlation),
    problems: survey.problems,
    sites,
    section_order: sections,
    shell_ratios: shells,
    evidence: results.flatMap((result) => result.evidence),
    conflicts: results.flatMap((result) => result.conflicts),
    diagnostics: results.flatMap((result) => result.diagnostics),
    gradients: results.flatMap((result) => result.gradients),
    conversions: combined.flatMap((outcome) => outcome.findings),
    votes: results.flatMap((result) => result.votes),
    shares: results.flatMap((result) => result.shares),
    remarks: [...surveyRemarks(), ...results.flatMap((result) => result.remarks)],
    plan: [],
    plan_criterion: '',
    plan_notes: [],
  };
  host.progress('planning', 1);
  return { ...findings, remarks: remarks(findings), ...planOfRun(findings) };

  /** Passes over the main clock of one taxon and fraction. */
  function settleClock(set: ClockSet, own: Random): Promise<Settled> {
    host.progress(`zones of ${set.main.name}`, 0);
    return settlePasses({ context, set, screening, random: own.fork(1), host });
  }

  /** All taxa on the scale of the reference taxon, where one is asked for. */
  function combineAll(clocks: readonly SettledClock[]): CombinedOutcome[] {
    if (options.reference_taxon === null) return [];
    return combineClocks(context, clocks, options.reference_taxon, random.fork(1000));
  }

  /** The order and all rows of a main clock, then each amino acid zoned by itself. */
  async function rowsOfClocks({ set, settled }: SettledClock, own: Random): Promise<ClockResult[]> {
    const name = set.main.name;
    const zones = await settleZones(context, settled, own.fork(5), host);
    const { last, left } = zones.settled;
    // first, so that other threads have what takes longest while this one does the rest
    const order = beginOrder(last, options.alpha, own.fork(2), host);
    const support = await beginSupport(context, zones, own.fork(5), host);
    const singles = set.singles.map((clock, k) => {
      host.progress(`each amino acid of ${name}`, k / set.singles.length);
      return runPass(context, clock, set, left, own.fork(100 + k));
    });
    return clockFindings({
      context,
      set,
      settled: zones.settled,
      support,
      order,
      singles,
      sites,
      sections,
      random: own.fork(3),
    });
  }

  /** What is to be said of the coast, the laboratories and the taxa, beside what each clock says of itself. */
  function surveyRemarks(): Remark[] {
    const measured = new Set(runs.flatMap(({ settled }) => settled.last.data.beds.map((bed) => bed.key)));
    return [
      ...temperatureRemarks(
        sites.filter((site) => measured.has(bedKey(site.section, site.bed))),
        options.gradient,
      ),
      ...conversionRemarks(
        combined.flatMap((outcome) => outcome.findings),
        options.reference_taxon,
      ),
      ...survey.laboratories,
      ...runs.flatMap(({ set, settled }) =>
        staircaseRemarks(set.main.name, staircaseOf(context, settled.last.data), context.elevations.size),
      ),
    ];
  }
}

/** Every bed of the survey, sections in coast order, the lowest bed of each first; beds without a place last. */
function bedSites(beds: readonly BedRecord[], sections: readonly string[], gradient: string | null): BedSite[] {
  const position = new Map(sections.map((section, at) => [section, at]));
  const height = (bed: BedRecord): number => (bed.place === null ? Number.POSITIVE_INFINITY : heightOf(bed.place));
  return beds
    .map((bed, at) => ({ bed, at }))
    .sort((a, b) => {
      const bySection = position.get(a.bed.section)! - position.get(b.bed.section)!;
      if (bySection !== 0) return bySection;
      const [low, high] = [height(a.bed), height(b.bed)];
      return low === high ? a.at - b.at : low - high;
    })
    .map(({ bed: { columns, ...site } }) => ({
      ...site,
      gradient: gradient === null ? null : (columns[gradient] ?? null),
    }));
}
