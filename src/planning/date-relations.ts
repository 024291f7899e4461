import type { DateRecord, DateRelation, Findings } from '../model/index.js';
import { bedKey, clocksInView } from './bed-on-clock.js';
import { includes } from './bit-set.js';
import { type KnownOrder, knownOrder } from './known-order.js';

/** Two dates whose beds have a known relation; for `older` the first one's bed is the older. */
export interface RelatedDates {
  /** Indices into the list of dates. */
  readonly first: number;
  readonly second: number;
  readonly relation: DateRelation;
  readonly p: number;
  /**
   * The relation is one of the surest: the wrong ones among them are expected to be no more than the share of alpha that
   * the doubt of the order is given.
   */
  readonly sure: boolean;
}

/**
 * Every pair of dates whose order is known: of one bed or of beds stated to be as old; of beds of which one is known to
 * be older; and of beds that stand in one zone.
 *
 * The order itself may be wrong here and there, and would then be contradicted by good dates. So the relations are taken
 * from the surest on until the chances of being wrong add up to `doubt` for the order, and likewise over beds for their
 * zones. Beyond that, a measured order is kept as less sure, and a zone is not used.
 *
 * @param doubt expected number of wrong orders among the sure ones, at most, and of wrong zones among the sure beds
 */
export function relatedDates(
  findings: Findings,
  dates: readonly DateRecord[],
  { alpha, doubt }: { readonly alpha: number; readonly doubt: { readonly order: number; readonly zones: number } },
): { readonly related: RelatedDates[]; readonly known: KnownOrder } {
  const known = knownOrder(findings, alpha);
  const zoneOf = sureZones(findings, new Set(dates.map(bedKey)), doubt.zones);
  const related: RelatedDates[] = [];
  const bed = dates.map((date) => known.indexOf.get(bedKey(date)));
  for (let i = 0; i < dates.length; i++) {
    for (let j = i + 1; j < dates.length; j++) {
      const [a, b] = [bed[i], bed[j]];
      if (bedKey(dates[i]) === bedKey(dates[j]) || (a !== undefined && b !== undefined && known.asOld(a, b))) {
        related.push({ first: i, second: j, relation: 'as old', p: 1, sure: true });
        continue;
      }
      if (a === undefined || b === undefined) continue;
      const [first, second] = includes(known.younger[a], b)
        ? [i, j]
        : includes(known.younger[b], a)
          ? [j, i]
          : [-1, -1];
      if (first !== -1) {
        const p = Math.max(1 - alpha, known.olderThan(bed[first]!, bed[second]!));
        related.push({ first, second, relation: 'older', p, sure: p === 1 });
        continue;
      }
      const [one, two] = [zoneOf.get(bedKey(dates[i])), zoneOf.get(bedKey(dates[j]))];
      const p = one && two && one.zone === two.zone ? one.p * two.p : 0;
      if (p > 0) related.push({ first: i, second: j, relation: 'one zone', p, sure: true });
    }
  }
  return { related: withSureOrder(related, doubt.order), known };
}

/** The beds whose zones are surest, until the chances of being wrong add up to `doubt`. */
function sureZones(findings: Findings, dated: ReadonlySet<string>, doubt: number) {
  const rows = clocksInView(findings)
    .filter(({ clock }) => findings.clocks.some((row) => row.clock === clock && row.verdict === 'zones'))
    .flatMap(({ clock, beds }) =>
      beds
        .filter(({ key, row }) => dated.has(key) && row.zone !== null && row.zone_probability !== null)
        .map(({ key, row }) => ({ key, zone: `${clock}\n${row.zone}`, p: row.zone_probability ?? 0 })),
    )
    .sort((a, b) => b.p - a.p);
  const sure = new Map<string, { zone: string; p: number }>();
  let left = doubt;
  for (const { key, zone, p } of rows) {
    left -= 1 - p;
    if (left < 0) break;
    if (!sure.has(key)) sure.set(key, { zone, p });
  }
  return sure;
}

/** Marks the surest measured orders as sure, until the chances of being wrong add up to `doubt`. */
function withSureOrder(related: readonly RelatedDates[], doubt: number): RelatedDates[] {
  const measured = related.filter((pair) => pair.relation === 'older' && !pair.sure).sort((a, b) => b.p - a.p);
  const sure = new Set<RelatedDates>();
  let left = doubt;
  for (const pair of measured) {
    left -= 1 - pair.p;
    if (left < 0) break;
    sure.add(pair);
  }
  return related.map((pair) => (sure.has(pair) ? { ...pair, sure: true } : pair));
}
