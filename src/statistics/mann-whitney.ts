import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';
import { normalCdf } from './normal.js';
import { midranks } from './ranks.js';
import { waysToDeal } from './ways-to-deal.js';

/** Up to this product of the two group sizes the exact distribution is worked out. */
const EXACT_UP_TO = 2500;

/** Outcome of the comparison of two samples by ranks. */
export interface MannWhitney {
  /** Number of pairs in which the value of the first group is the larger one; ties count one half. */
  readonly u: number;
  /** Two-sided p-value: twice the smaller tail, at most 1. */
  readonly p: number;
  /** Chance, were there no difference, of a U as small as this or smaller: small when the first group is lower. */
  readonly pLess: number;
  /** Chance, were there no difference, of a U as large as this or larger: small when the first group is higher. */
  readonly pGreater: number;
  /** False when the normal approximation was taken. */
  readonly exact: boolean;
}

/**
 * Mann–Whitney U (Wilcoxon rank sum) test of two groups.
 *
 * Exact, given the ties, when the product of the group sizes is at most 2500: all ways to deal out the midranks are
 * counted by the shift algorithm (Streitberg and Röhmel 1986, Statistical Software Newsletter 12, 10–17). Beyond that the normal
 * approximation with corrections for ties and continuity (Lehmann 1975, Nonparametrics).
 *
 * @throws RangeError when a group is empty or a value is not finite
 * @example
 * ```ts
 * mannWhitney([1, 2, 3], [4, 5, 6]); // => { u: 0, p: 0.1, pLess: 0.05, pGreater: 1, exact: true }
 * ```
 */
export function mannWhitney(a: Numbers, b: Numbers): MannWhitney {
  requireNumbers('mannWhitney', 'values in the first group', a);
  requireNumbers('mannWhitney', 'values in the second group', b);
  const exact = a.length * b.length <= EXACT_UP_TO;
  const { u, pLess, pGreater } = exact ? exactTest(a, b) : normalTest(a, b);
  return { u, p: Math.min(1, 2 * Math.min(pLess, pGreater)), pLess, pGreater, exact };
}

type Tails = Pick<MannWhitney, 'u' | 'pLess' | 'pGreater'>;

function exactTest(a: Numbers, b: Numbers): Tails {
  const pooled = new Float64Array(a.length + b.length);
  pooled.set(a);
  pooled.set(b, a.length);
  const ranks = midranks(pooled);
  let rankSum = 0;
  for (let i = 0; i < a.length; i++) rankSum += ranks[i];
  const u = rankSum - (a.length * (a.length + 1)) / 2;
  return { u, ...exactTails(ranks, a.length, b.length, u) };
}

/**
 * Smallest two-sided p-value that {@link mannWhitney} can reach with groups of these sizes and no ties: 2 over the number
 * of ways to deal the values out.
 *
 * @throws RangeError when a size is not a whole number above 0
 * @example
 * ```ts
 * smallestMannWhitneyP(3, 3); // => 0.1
 * ```
 */
export function smallestMannWhitneyP(n1: number, n2: number): number {
  const whole = Number.isInteger(n1) && Number.isInteger(n2) && n1 > 0 && n2 > 0;
  requireThat(whole, 'smallestMannWhitneyP', 'two whole sizes above 0', n1, n2);
  return Math.min(1, 2 / choices(n1 + n2, Math.min(n1, n2)));
}

function exactTails(ranks: readonly number[], n1: number, n2: number, u: number): { pLess: number; pGreater: number } {
  // Count deals of the smaller group; its U falls as the other's rises.
  const size = Math.min(n1, n2);
  const own = n1 <= n2;
  const doubled = ranks.map((rank) => 2 * rank).sort((x, y) => x - y);
  const unit = doubled.every((rank) => rank % 2 === 0) ? 2 : 1;
  const sorted = doubled.map((rank) => rank / unit);
  const lowest = sumOf(sorted.slice(0, size));
  const span = sumOf(sorted.slice(-size)) - lowest;
  const uOfSize = own ? u : n1 * n2 - u;
  const at = (2 * uOfSize + size * (size + 1)) / unit - lowest;
  // The nearer tail is counted, from its own end, and the farther one is what is left: few deals lie beyond a large U.
  const fromBelow = at <= span - at;
  const top = sorted[sorted.length - 1] + sorted[0];
  const ways = fromBelow
    ? waysToDeal(sorted, size, at)
    : waysToDeal(sorted.map((rank) => top - rank).reverse(), size, span - at);
  const all = choices(n1 + n2, size);
  const near = Math.min(1, sumOf(ways) / all);
  const far = Math.min(1, 1 - near + ways[ways.length - 1] / all);
  return fromBelow === own ? { pLess: near, pGreater: far } : { pLess: far, pGreater: near };
}

function sumOf(values: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i];
  return sum;
}

/** Number of ways to choose `size` of n, rounded where it is above 2⁵³. */
function choices(n: number, size: number): number {
  let ways = 1;
  for (let i = 1; i <= size; i++) ways = (ways * (n - size + i)) / i;
  return ways;
}

/** U and its normal tails by a merge of the two sorted groups, since large groups would take long to rank together. */
function normalTest(a: Numbers, b: Numbers): Tails {
  const first = Float64Array.from(a).sort();
  const second = Float64Array.from(b).sort();
  const n = first.length + second.length;
  let u = 0;
  let ties = 0;
  for (let i = 0, j = 0; i < first.length || j < second.length; ) {
    const value = j === second.length || first[i] <= second[j] ? first[i] : second[j];
    const [fromI, fromJ] = [i, j];
    while (i < first.length && first[i] === value) i++;
    while (j < second.length && second[j] === value) j++;
    const [ofFirst, ofSecond] = [i - fromI, j - fromJ];
    // each of these in the first group is above all of the second before them, and level with those beside them
    u += ofFirst * (fromJ + ofSecond / 2);
    ties += (ofFirst + ofSecond) ** 3 - (ofFirst + ofSecond);
  }
  const product = first.length * second.length;
  const sd = Math.sqrt((product / 12) * (n + 1 - ties / (n * (n - 1))));
  if (sd === 0) return { u, pLess: 1, pGreater: 1 };
  const fromMiddle = u - product / 2;
  return { u, pLess: normalCdf((fromMiddle + 0.5) / sd), pGreater: normalCdf(-(fromMiddle - 0.5) / sd) };
}
