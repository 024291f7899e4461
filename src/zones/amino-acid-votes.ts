import type { AminoAcid, AminoAcidVotes, ClockData } from '../model/index.js';
import { benjaminiHochberg, studentTCdf } from '../statistics/index.js';

/** One amino acid zoned by itself. */
export interface VotingClock {
  readonly aminoAcid: AminoAcid;
  readonly data: ClockData;
  /** Spread tau between beds of one zone on this clock; 0 where unknown. */
  readonly spread: number;
}

/** Options of {@link aminoAcidVotes}. */
export interface VoteOptions {
  /** Name of the main clock. */
  readonly clock: string;
  /** Most pairs given, the surest first. Default 20. */
  readonly most?: number;
  readonly alpha: number;
}

/** Votes weaker than this can't take part in a disagreement, whatever the number of pairs. */
const WEAKEST_T = 1.96;

/**
 * Pairs of beds whose amino acids disagree on which is the older, each amino acid with its vote (design 7.10).
 *
 * An amino acid votes for the bed with its higher mean log ratio; p is that of Student's t from the scatter of that amino
 * acid, with the spread of its zones added, two-sided. A pair disagrees when the best vote each way is significant: its p
 * is the larger of the two, each multiplied by the number of amino acids, and the pairs of a clock are judged together by
 * Benjamini and Hochberg (1995). So a pair shown is one where chance alone is a poor explanation.
 * @returns the surest disagreements first; votes in the order of the clocks, weak ones too, for the beds both measured
 */
export function aminoAcidVotes(clocks: readonly VotingClock[], options: VoteOptions): AminoAcidVotes[] {
  const { clock, alpha, most = 20 } = options;
  if (clocks.length < 2) return [];
  const keys = [...new Set(clocks.flatMap(({ data }) => data.beds.filter((bed) => bed.n > 0).map((bed) => bed.key)))];
  const means = clocks.map(({ data, spread }) => {
    const byKey = new Map(data.beds.map((bed) => [bed.key, bed]));
    return keys.map((key) => {
      const bed = byKey.get(key);
      return bed === undefined || bed.n === 0 ? null : { mean: bed.mean, variance: bed.se ** 2 + spread ** 2 };
    });
  });
  const tOf = (at: number, a: number, b: number): number => {
    const [first, second] = [means[at][a], means[at][b]];
    if (first === null || second === null) return Number.NaN;
    const se = Math.sqrt(first.variance + second.variance);
    return se > 0 ? (first.mean - second.mean) / se : Number.NaN;
  };
  const pOf = (at: number, t: number): number => 2 * studentTCdf(-Math.abs(t), Math.max(1, clocks[at].data.scatter.df));
  const candidates: { a: number; b: number; t: number[]; p: number }[] = [];
  let pairs = 0;
  for (let a = 0; a < keys.length; a++) {
    for (let b = a + 1; b < keys.length; b++) {
      const t = clocks.map((_, at) => tOf(at, a, b));
      const votes = t.flatMap((value, at) => (Number.isNaN(value) ? [] : [at]));
      if (votes.length < 2) continue;
      pairs++;
      const up = votes.reduce((best, at) => (t[at] > t[best] ? at : best));
      const down = votes.reduce((best, at) => (t[at] < t[best] ? at : best));
      if (!(t[up] > WEAKEST_T && t[down] < -WEAKEST_T)) continue;
      const p = Math.min(1, votes.length * Math.max(pOf(up, t[up]), pOf(down, t[down])));
      candidates.push({ a, b, t, p });
    }
  }
  // pairs that are no candidates have p near 1, and count in the number judged
  const adjusted = benjaminiHochberg([
    ...candidates.map(({ p }) => p),
    ...new Array<number>(pairs - candidates.length).fill(1),
  ]);
  return candidates
    .map((candidate, at) => ({ ...candidate, adjusted: adjusted[at] }))
    .filter((candidate) => candidate.adjusted <= alpha)
    .sort((first, second) => first.p - second.p || first.a - second.a || first.b - second.b)
    .slice(0, most)
    .map(({ a, b, t }) => ({
      clock,
      bed_a: keys[a],
      bed_b: keys[b],
      votes: clocks.flatMap(({ aminoAcid }, at) =>
        Number.isNaN(t[at]) ? [] : [{ amino_acid: aminoAcid, older: t[at] > 0 ? keys[a] : keys[b], p: pOf(at, t[at]) }],
      ),
    }));
}
