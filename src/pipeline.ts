import { averageAnalyses, bedKey, type ClockSet, chooseClocks } from './beds/index.js';
import { type ClockResult, clockFindings } from './clock-findings.js';
import { orderClock, type RunContext, runPass } from './clock-run.js';
import { sectionOrder } from './coast/index.js';
import type { BedRecord, BedSite, Findings, Host, RunOptions, Survey } from './model/index.js';
import { heightOf } from './order/index.js';
import { settlePasses } from './passes.js';
import { remarks } from './remarks.js';
import { screenShells } from './screening/index.js';
import { createRandom } from './statistics/index.js';
import { VERSION } from './version.js';

/**
 * The whole way of the data: average, screen, choose clocks; for each clock find zones, check relations and read odd shells
 * until nothing changes, then order the beds; and put down all that was found (design 7).
 * @param survey what was read, with warnings only
 * @param options every option has a value; see DEFAULT_OPTIONS
 * @param host maps tasks and hears of progress; results do not depend on it
 * @throws Error when no clock can be made (no shell of the taxon, fraction or amino acid asked for)
 */
export async function analyse(survey: Survey, options: RunOptions, host: Host): Promise<Findings> {
  const { shells, summaries } = averageAnalyses(survey.analyses);
  const screening = screenShells(shells, options.screening);
  const sets = chooseClocks(shells, summaries, options);
  if (sets.length === 0) throw new Error('no shell has a ratio of the taxon, fraction and amino acid asked for');
  const sections = sectionOrder(survey.beds);
  const sites = bedSites(survey.beds, sections, options.gradient);
  const context: RunContext = {
    shells,
    summaries,
    placed: new Map(
      survey.beds.map((bed) => {
        const key = bedKey(bed.section, bed.bed);
        return [key, { key, section: bed.section, place: bed.place }];
      }),
    ),
    relations: survey.relations,
    gradient:
      options.gradient === null
        ? null
        : new Map(
            sites.flatMap((site) => (site.gradient === null ? [] : [[bedKey(site.section, site.bed), site.gradient]])),
          ),
    options,
  };
  const random = createRandom(options.seed);
  const results: ClockResult[] = [];
  for (const [at, set] of sets.entries()) results.push(...(await runClocks(set, at)));
  const findings = {
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
    shell_ratios: shells.map(({ section, bed, taxon, fraction, shell, ratios }) => ({
      section,
      bed,
      taxon,
      fraction,
      shell,
      ratios,
    })),
    evidence: results.flatMap((result) => result.evidence),
    conflicts: results.flatMap((result) => result.conflicts),
    diagnostics: results.flatMap((result) => result.diagnostics),
    gradients: results.flatMap((result) => result.gradients),
    votes: results.flatMap((result) => result.votes),
    shares: results.flatMap((result) => result.shares),
    remarks: results.flatMap((result) => result.remarks),
  };
  return { ...findings, remarks: remarks(findings) };

  /** The main clock of a taxon and fraction in full, then each amino acid zoned by itself. */
  async function runClocks(set: ClockSet, at: number): Promise<ClockResult[]> {
    const own = random.fork(at);
    const name = set.main.name;
    host.progress(`zones of ${name}`, 0);
    const settled = settlePasses({ context, set, screening, random: own.fork(1) });
    host.progress(`order of ${name}`, 0);
    const order = orderClock(settled.last, options.alpha, own.fork(2), (fraction) =>
      host.progress(`order of ${name}`, fraction),
    );
    const singles = set.singles.map((clock, k) => {
      host.progress(`each amino acid of ${name}`, k / set.singles.length);
      return runPass(context, clock, set, settled.left, own.fork(100 + k));
    });
    return clockFindings({ context, set, settled, order, singles, sites, sections, host, random: own.fork(3) });
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
