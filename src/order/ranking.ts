import type { OrderPosterior } from './posterior.js';

/** The order of the beds as the draws give it. */
export interface Ranking {
  /** Beds from the oldest to the youngest. */
  readonly sequence: readonly number[];
  /** Rank of each bed in that sequence; beds tied by `same` share the smallest. */
  readonly rank: readonly number[];
  readonly rankMean: readonly number[];
  /** Ends of the 95 % interval of each bed's rank. */
  readonly rankLow: readonly number[];
  readonly rankHigh: readonly number[];
}

/**
 * Orders the beds by their mean rank over the draws, and gives each the interval that holds 95 % of its ranks.
 * @param tied deposit of each bed: beds of one deposit share a rank
 */
export function rankBeds(posterior: OrderPosterior, tied: readonly number[]): Ranking {
  const { beds, draws, ranks } = posterior;
  const rankMean: number[] = [];
  const rankLow: number[] = [];
  const rankHigh: number[] = [];
  const lowest = new Float64Array(Math.floor(0.025 * draws) + 1);
  const highest = new Float64Array(lowest.length);
  for (let bed = 0; bed < beds; bed++) {
    const own = ranks.subarray(bed * draws, (bed + 1) * draws);
    lowest.fill(Number.POSITIVE_INFINITY);
    highest.fill(Number.POSITIVE_INFINITY);
    let sum = 0;
    for (let draw = 0; draw < draws; draw++) {
      const rank = own[draw];
      sum += rank;
      takeIn(lowest, rank);
      takeIn(highest, -rank);
    }
    rankMean.push(sum / draws);
    rankLow.push(lowest[lowest.length - 1]);
    rankHigh.push(-highest[highest.length - 1]);
  }
  const sequence = rankMean
    .map((_, bed) => bed)
    .sort((a, b) => rankMean[a] - rankMean[b] || tied[a] - tied[b] || a - b);
  const rank = new Array<number>(beds);
  sequence.forEach((bed, at) => {
    const before = at > 0 ? sequence[at - 1] : -1;
    rank[bed] = before >= 0 && tied[before] === tied[bed] ? rank[before] : at + 1;
  });
  return { sequence, rank, rankMean, rankLow, rankHigh };
}

/** Keeps the smallest of all values in order, which is far less work than sorting them: most are larger than the last. */
function takeIn(smallest: Float64Array, value: number): void {
  let to = smallest.length - 1;
  if (!(value < smallest[to])) return;
  while (to > 0 && smallest[to - 1] > value) {
    smallest[to] = smallest[to - 1];
    to--;
  }
  smallest[to] = value;
}

/** Probability that bed a is older than bed b: the share of draws in which its rank is smaller. */
export function probabilityOlder({ draws, ranks }: OrderPosterior, a: number, b: number): number {
  let count = 0;
  for (let draw = 0; draw < draws; draw++) if (ranks[a * draws + draw] < ranks[b * draws + draw]) count++;
  return count / draws;
}
