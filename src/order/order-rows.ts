import type { ClockBed, OrderRow, PairRow } from '../model/index.js';
import type { OrderPosterior } from './posterior.js';
import { probabilityOlder, type Ranking } from './ranking.js';

/** Rows of order.csv for one clock, the oldest bed first. */
export function orderRows(
  clock: string,
  beds: readonly ClockBed[],
  zones: readonly (string | null)[],
  tied: readonly number[],
  posterior: OrderPosterior,
  ranking: Ranking,
  alpha: number,
): OrderRow[] {
  return ranking.sequence.map((bed, at) => {
    const next = ranking.sequence[at + 1];
    const same = next !== undefined && tied[next] === tied[bed];
    const p = next === undefined || same ? null : probabilityOlder(posterior, bed, next);
    return {
      clock,
      rank: ranking.rank[bed],
      section: beds[bed].section,
      bed: beds[bed].bed,
      zone: zones[bed],
      rank_low: ranking.rankLow[bed],
      rank_high: ranking.rankHigh[bed],
      p_older_than_next: p,
      resolved: p === null ? null : p >= 1 - alpha,
    };
  });
}

/** Beds above which pairs are not written: their number grows with the square. */
export const MOST_BEDS_IN_PAIRS = 400;

/** Comparisons of draws that are worth their time for pairs; beyond it every k-th draw is used. */
const MOST_COMPARISONS = 6e7;

/**
 * Rows of pairs.csv for one clock: for each pair of beds, older ranks first, the probability that the first is the older.
 * @returns nothing for more than 400 beds
 */
export function pairRows(
  clock: string,
  beds: readonly ClockBed[],
  posterior: OrderPosterior,
  ranking: Ranking,
  sameZone: (a: number, b: number) => number | null,
): PairRow[] {
  const n = beds.length;
  if (n > MOST_BEDS_IN_PAIRS) return [];
  const { draws, ranks } = posterior;
  const pairs = (n * (n - 1)) / 2;
  const step = Math.max(1, Math.ceil((pairs * draws) / MOST_COMPARISONS));
  const used = Math.ceil(draws / step);
  const rows: PairRow[] = [];
  for (let i = 0; i < n; i++) {
    const a = ranking.sequence[i];
    for (let j = i + 1; j < n; j++) {
      const b = ranking.sequence[j];
      let count = 0;
      for (let draw = 0; draw < draws; draw += step) {
        if (ranks[a * draws + draw] < ranks[b * draws + draw]) count++;
      }
      rows.push({
        clock,
        bed_a: beds[a].key,
        bed_b: beds[b].key,
        p_a_older: count / used,
        p_same_zone: sameZone(a, b),
      });
    }
  }
  return rows;
}
