import type { Task } from '../model/index.js';
import { createRandom } from '../statistics/index.js';
import { partitionCosts } from './partition.js';
import { sharedOut } from './shared-out.js';

/** How much tighter the groups are than those of values spread evenly. */
export interface Gap {
  /** Mean of ln W over the references less ln W of the values; null where the groups leave no scatter at all. */
  readonly gap: number | null;
  /** Its standard error by simulation, the references' own number counted in. */
  readonly se: number | null;
}

/** Options of {@link gapStatistic}. */
export interface GapOptions {
  readonly seed: number;
  /** Most groups. Default 10, or one fewer than the number of distinct values. */
  readonly most?: number;
  /** Reference samples. Default 100. */
  readonly references?: number;
}

/**
 * The gap statistic of 1 … K groups of values on a line (Tibshirani, Walther and Hastie 2001,
 * doi:10.1111/1467-9868.00293): W is the weighted sum of squares within the groups of the exact partition, and each
 * reference spreads as many values evenly over the range seen, which holds the beds' errors already; every value keeps
 * its weight. It stands beside the choice of the design, and does not make it: it can't tell zones from the bunching that
 * errors alone give, and on many data sets it climbs too far.
 * @param values bed means of log ratios
 * @param weights one positive weight a value, such as 1/se²
 * @returns one entry a number of groups, from 1 upwards
 */
export function gapStatistic(values: readonly number[], weights: readonly number[], options: GapOptions): Gap[] {
  const tasks = gapTasks(values, weights, options);
  return gapFromReferences(
    values,
    weights,
    options,
    tasks.map(({ argument }) => gapReferences(argument as GapReferencesArgument)),
  );
}

/** Argument of {@link gapReferences}: plain data, so that it can go to a worker. */
export interface GapReferencesArgument {
  readonly low: number;
  readonly range: number;
  readonly weights: readonly number[];
  readonly most: number;
  readonly seed: number;
  /** References `first` … `first + references − 1`: each draws from a stream of its own, whoever makes it. */
  readonly first: number;
  readonly references: number;
}

/** Sums of squares within 1 … `most` groups of some reference samples. A task for the host. */
export function gapReferences({
  low,
  range,
  weights,
  most,
  seed,
  first,
  references,
}: GapReferencesArgument): number[][] {
  const random = createRandom(seed);
  return Array.from({ length: references }, (_, at) => {
    const own = random.fork(first + at);
    const even = weights.map(() => low + range * own.uniform());
    return costsOfEven(even, weights, most);
  });
}

/** Values up to which every cut between groups is tried. */
const MOST_CUTS = 1000;

/**
 * {@link partitionCosts} of values spread evenly. Of very many, neighbours are taken together, a thousand lots at most, and
 * cuts lie between lots: where values leave no gap, a cut that is off by half a lot costs next to nothing.
 */
function costsOfEven(values: readonly number[], weights: readonly number[], most: number): number[] {
  const size = Math.ceil(values.length / MOST_CUTS);
  if (size === 1) return partitionCosts(values, weights, most);
  const order = Uint32Array.from(values.keys()).sort((a, b) => values[a] - values[b] || a - b);
  const means: number[] = [];
  const lots: number[] = [];
  let within = 0;
  for (let start = 0; start < order.length; start += size) {
    const lot = lotOf(values, weights, order.subarray(start, start + size));
    means.push(lot.mean);
    lots.push(lot.weight);
    within += lot.squares;
  }
  return partitionCosts(means, lots, most).map((cost) => cost + within);
}

/** Weight, mean and weighted sum of squares about it of some of the values. */
function lotOf(values: readonly number[], weights: readonly number[], members: Uint32Array) {
  const origin = values[members[0]];
  let weight = 0;
  let sum = 0;
  let squares = 0;
  for (let i = 0; i < members.length; i++) {
    const own = weights[members[i]];
    const off = values[members[i]] - origin;
    weight += own;
    sum += own * off;
    squares += own * off * off;
  }
  return { weight, mean: origin + sum / weight, squares: Math.max(0, squares - (sum * sum) / weight) };
}

/** References a task: a quarter of them, so that they can be shared out. */
const TASKS = 4;

/** Values drawn in a task that is worth a thread: a twentieth of a second. */
const HEAVY = 5000;

/** The tasks of a gap statistic, for the host to map; their results go to {@link gapFromReferences}. */
export function gapTasks(values: readonly number[], weights: readonly number[], options: GapOptions): Task[] {
  const { seed, references = 100 } = options;
  if (new Set(values).size < 2) return [];
  const low = Math.min(...values);
  const common = { low, range: Math.max(...values) - low, weights, most: mostGroups(values, options), seed };
  const size = Math.ceil(references / TASKS);
  return sharedOut(references, size).map(({ first, repeats }) => {
    const argument: GapReferencesArgument = { ...common, first, references: repeats };
    return { name: 'gapReferences', argument, heavy: size * values.length > HEAVY };
  });
}

/** {@link gapStatistic} with the references that its tasks gave. */
export function gapFromReferences(
  values: readonly number[],
  weights: readonly number[],
  options: GapOptions,
  references: readonly (readonly (readonly number[])[])[],
): Gap[] {
  if (references.length === 0) return [{ gap: null, se: null }];
  return gapOf(partitionCosts(values, weights, mostGroups(values, options)), references.flat());
}

const mostGroups = (values: readonly number[], { most = 10 }: GapOptions): number =>
  Math.max(1, Math.min(most, new Set(values).size - 1));

/**
 * Gap and standard error from sums of squares within groups, of any grouping in any number of dimensions.
 * @param within sum of squares of the data for 1 … K groups
 * @param references the same of each reference sample
 * @example
 * gapOf([4], [[8], [8]])[0].gap // => 0.69314718
 */
export function gapOf(within: readonly number[], references: readonly (readonly number[])[]): Gap[] {
  const size = references.length;
  return within.map((sum, at) => {
    const logs = references.map((reference) => Math.log(reference[at]));
    const mean = logs.reduce((total, value) => total + value, 0) / size;
    const variance = logs.reduce((total, value) => total + (value - mean) ** 2, 0) / size;
    const gap = mean - Math.log(sum);
    return Number.isFinite(gap) ? { gap, se: Math.sqrt(variance * (1 + 1 / size)) } : { gap: null, se: null };
  });
}

/**
 * The number of groups the gap statistic asks for. `largest`: the smallest K whose gap lies within one standard error of the
 * largest gap (Dudoit and Fridlyand 2002, doi:10.1186/gb-2002-3-7-research0036). `first`: the smallest K with
 * gap(K) ≥ gap(K + 1) − se(K + 1), the rule of Tibshirani, Walther and Hastie. On a line, groups with even steps between
 * them make the gap dip before it peaks, and the first rule stops at the dip; so `largest` is the default here.
 * @param gaps from 1 group upwards
 * @returns null when no gap is known
 * @example
 * groupsByGap([{ gap: 0.1, se: 0.05 }, { gap: 0.0, se: 0.05 }, { gap: 0.8, se: 0.05 }]) // => 3
 */
export function groupsByGap(gaps: readonly Gap[], rule: 'largest' | 'first' = 'largest'): number | null {
  const known = gaps.flatMap(({ gap, se }, at) => (gap === null || se === null ? [] : [{ k: at + 1, gap, se }]));
  if (known.length === 0) return null;
  if (rule === 'first') {
    const stop = known.find(({ gap }, at) => at + 1 === known.length || gap >= known[at + 1].gap - known[at + 1].se);
    return stop!.k;
  }
  const top = known.reduce((best, entry) => (entry.gap > best.gap ? entry : best));
  return known.find(({ gap }) => gap >= top.gap - top.se)!.k;
}
