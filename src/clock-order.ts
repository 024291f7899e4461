import { testingDf } from './beds/index.js';
import type { Pass } from './clock-run.js';
import type { ClockBed, Host } from './model/index.js';
import {
  beginPosterior,
  keptRelations,
  type OrderPosterior,
  type Ranking,
  type RelationGraph,
  rankBeds,
  relationGraph,
} from './order/index.js';
import { type Random, studentTCdf } from './statistics/index.js';

/** The order of one clock's beds, and how it was sampled. Beds are those with a mean. */
export interface ClockOrder {
  readonly beds: readonly ClockBed[];
  readonly graph: RelationGraph;
  readonly posterior: OrderPosterior;
  readonly ranking: Ranking;
  readonly kept: number;
  readonly leftOut: number;
}

/**
 * Design 7.6 on the last pass of a clock. Sampling begins at once where other threads can do it; what is returned gives the
 * order, null where no bed has a mean, and is called once.
 */
export function beginOrder(pass: Pass, alpha: number, random: Random, host: Host): () => Promise<ClockOrder | null> {
  const { data, zoning, relations, checks } = pass;
  const beds = data.beds.filter((bed) => bed.n > 0);
  if (beds.length === 0) return async () => null;
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
  const sampled = beginPosterior(
    {
      means: beds.map((bed) => bed.mean),
      se: beds.map((bed) => bed.se),
      section: beds.map((bed) => sectionNumber.get(bed.section)!),
      sections: sections.length,
      graph,
      tau,
      scatterDf: df,
    },
    {
      seed: random.integer(2 ** 31),
      map: host.map,
      begin: host.begin,
      onProgress: (fraction) => host.progress(`order of ${data.clock.name}`, fraction),
    },
  );
  const leftOut = relations.filter((relation, at) => relation.certainty === 'probable' || reversed[at]).length;
  return async () => {
    const posterior = await sampled();
    const ranking = rankBeds(posterior, graph.node);
    return { beds, graph, posterior, ranking, kept: relations.length - leftOut, leftOut };
  };
}
