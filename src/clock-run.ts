import { bedKey, type ClockSet, clockData, testingDf } from './beds/index.js';
import type { Clock, ClockBed, ClockData, PublishedSummary, RelationRecord, RunOptions, Shell } from './model/index.js';
import type { PlacedBed } from './order/index.js';
import {
  keptRelations,
  type OrderPosterior,
  type Ranking,
  type RelationGraph,
  rankBeds,
  relationGraph,
  samplePosterior,
  sectionRelations,
} from './order/index.js';
import { type Random, studentTCdf } from './statistics/index.js';
import { checkRelations, type RelationCheck } from './superposition/relation-checks.js';
import { findZones, type Zoning } from './zones/index.js';

/** What is the same for every clock of a run. */
export interface RunContext {
  readonly shells: readonly Shell[];
  readonly summaries: readonly PublishedSummary[];
  /** Beds of the survey by key `section/bed`, with their places. */
  readonly placed: ReadonlyMap<string, PlacedBed>;
  /** Relations of the table, and those derived from elevations. */
  readonly relations: readonly RelationRecord[];
  readonly options: RunOptions;
}

/** One pass over one clock: means, zones and relation checks with the present shells set aside. */
export interface Pass {
  readonly data: ClockData;
  readonly zoning: Zoning | null;
  readonly relations: readonly RelationRecord[];
  readonly checks: readonly RelationCheck[];
}

/** One pass of design 7.1 to 7.7 over one clock. */
export function runPass(
  context: RunContext,
  clock: Clock,
  set: ClockSet,
  setAside: ReadonlySet<number>,
  random: Random,
  gradient?: { readonly slope: number; readonly values: ReadonlyMap<string, number> },
): Pass {
  const { shells, summaries, options } = context;
  const imputation = clock.amino_acids.length > 1 ? set.index?.imputation : undefined;
  const data = clockData({ clock, shells, summaries, setAside, imputation, gradient });
  const zoning = findZones(data, {
    alpha: options.alpha,
    zones: clock.main ? options.zones : null,
    random: random.fork(1),
    extraParameters: gradient === undefined ? 0 : 1,
    simulations: options.simulations,
  });
  const relations = relationsOf(context, data);
  const checks = checkRelations(relations, data.beds, {
    alpha: options.alpha,
    df: testingDf(data.scatter),
    spread: zoning?.spread ?? 0,
  });
  return { data, zoning, relations, checks };
}

/** Superposition among the clock's beds that have a mean, then the relations of the table; a pair stands once. */
function relationsOf({ placed, relations }: RunContext, data: ClockData): RelationRecord[] {
  const measured = data.beds.filter((bed) => bed.n > 0).flatMap((bed) => placed.get(bed.key) ?? []);
  const stated = new Set(relations.map((relation) => `${relation.lower}\u0001${relation.upper}`));
  const derived = sectionRelations(measured).filter(({ lower, upper }) => !stated.has(`${lower}\u0001${upper}`));
  return [...derived, ...relations];
}

/** The order of one clock's beds, and how it was sampled. Beds are those with a mean. */
export interface ClockOrder {
  readonly beds: readonly ClockBed[];
  readonly graph: RelationGraph;
  readonly posterior: OrderPosterior;
  readonly ranking: Ranking;
  readonly kept: number;
  readonly leftOut: number;
}

/** Design 7.6 on the last pass of a clock. */
export function orderClock(
  pass: Pass,
  alpha: number,
  random: Random,
  onProgress?: (fraction: number) => void,
): ClockOrder | null {
  const { data, zoning, relations, checks } = pass;
  const beds = data.beds.filter((bed) => bed.n > 0);
  if (beds.length === 0) return null;
  const byKey = new Map(beds.map((bed) => [bed.key, bed]));
  const df = testingDf(data.scatter);
  const tau = zoning?.spread ?? 0;
  const contradicts = (lower: string, upper: string): boolean => {
    const [below, above] = [byKey.get(lower), byKey.get(upper)];
    if (below === undefined || above === undefined) return false;
    const between = below.section === above.section ? 0 : 2 * tau ** 2;
    return studentTCdf((below.mean - above.mean) / Math.sqrt(below.se ** 2 + above.se ** 2 + between), df) <= alpha;
  };
  const reversed = checks.map((check) => check.verdict === 'reversed');
  const kept = keptRelations(relations, reversed, contradicts);
  const graph = relationGraph(
    beds.map((bed) => bed.key),
    kept,
  );
  const sections = [...new Set(beds.map((bed) => bed.section))];
  const sectionNumber = new Map(sections.map((section, at) => [section, at]));
  const posterior = samplePosterior(
    {
      means: beds.map((bed) => bed.mean),
      se: beds.map((bed) => bed.se),
      section: beds.map((bed) => sectionNumber.get(bed.section)!),
      sections: sections.length,
      graph,
      tau,
      scatterDf: df,
    },
    { random, onProgress },
  );
  const leftOut = relations.filter((relation, at) => relation.certainty === 'probable' || reversed[at]).length;
  return {
    beds,
    graph,
    posterior,
    ranking: rankBeds(posterior, graph.node),
    kept: relations.length - leftOut,
    leftOut,
  };
}

export { bedKey };
