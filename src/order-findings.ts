import type { ClockOrder } from './clock-order.js';
import type { ClockBed, ClockData, Findings, OrderDiagnostics } from './model/index.js';
import { MOST_BEDS_IN_PAIRS, orderRows, pairRows } from './order/index.js';
import type { ZoneSupport } from './zone-support.js';
import { sameZone, type Zoning } from './zones/index.js';

/** What the rows of the order are made from, beside the order. */
export interface OrderFindingsInput {
  readonly data: ClockData;
  /** Zone of each bed by key `section/bed`. */
  readonly zoneOf: ReadonlyMap<string, string | null>;
  readonly zoning: Zoning | null;
  readonly support: ZoneSupport | null;
  readonly alpha: number;
}

/** Rows of order.csv and pairs.csv of one clock, and how well the order was sampled. */
export function orderFindings(
  order: ClockOrder,
  { data, zoneOf, zoning, support, alpha }: OrderFindingsInput,
): Pick<Findings, 'order' | 'pairs' | 'diagnostics'> {
  const { beds, graph, posterior, ranking } = order;
  const clock = data.clock.name;
  const zones = beds.map((bed) => zoneOf.get(bed.key) ?? null);
  return {
    order: orderRows(clock, beds, zones, graph.node, posterior, ranking, alpha),
    pairs: pairRows(clock, beds, posterior, ranking, sameZoneOf(beds, zoning, support)),
    diagnostics: [diagnosticsOf(clock, order)],
  };
}

/** Probability that two beds share a zone, the doubt about the zones counted in where they were bootstrapped. */
function sameZoneOf(beds: readonly ClockBed[], zoning: Zoning | null, support: ZoneSupport | null) {
  if (zoning === null || support === null || beds.length > MOST_BEDS_IN_PAIRS) return () => null;
  if (support.bootstraps.length === 0) return () => 1;
  const same = sameZone(
    beds.map((bed) => bed.mean),
    beds.map((bed) => bed.se),
    support.bootstraps,
  );
  return (a: number, b: number): number => same[a * beds.length + b];
}

function diagnosticsOf(clock: string, order: ClockOrder): OrderDiagnostics {
  const { posterior } = order;
  return {
    clock,
    chains: posterior.chains,
    draws: posterior.draws,
    ess_min: posterior.essMin,
    rhat_max: posterior.rhatMax,
    converged: posterior.converged,
    relations_kept: order.kept,
    relations_left_out: order.leftOut,
  };
}
