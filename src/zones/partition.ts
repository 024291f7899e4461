/**
 * The exact partition of values on a line into k groups with the least weighted sum of squares about the group means:
 * dynamic programming over the sorted values (Fisher 1958, doi:10.1080/01621459.1958.10501479; Wang and Song 2011,
 * doi:10.32614/RJ-2011-015), each row filled by divide and conquer, O(k n log n).
 * @param values numbers, any order
 * @param weights one positive weight a value
 * @param k number of groups, 1 to the number of values
 * @returns for each value its group, 0 for the smallest values
 * @throws RangeError when k is no whole number from 1 to the number of values
 * @example
 * partition([1, 5, 1.1, 5.2, 9], [1, 1, 1, 1, 1], 3) // => [0, 1, 0, 1, 2]
 */
export function partition(values: readonly number[], weights: readonly number[], k: number): number[] {
  const n = values.length;
  if (!(Number.isInteger(k) && k >= 1 && k <= n)) {
    throw new RangeError(`partition wants a whole number of groups from 1 to ${n}, got ${k}`);
  }
  const { order, cuts } = fillTable(values, weights, k);
  const labels = new Array<number>(n);
  let last = n - 1;
  for (let group = k - 1; group >= 0; group--) {
    const first = group === 0 ? 0 : cuts[group][last];
    for (let at = first; at <= last; at++) labels[order[at]] = group;
    last = first - 1;
  }
  return labels;
}

/**
 * The least weighted sums of squares within 1 … k groups, all from one table.
 * @param values numbers, any order
 * @param weights one positive weight a value
 * @param k most groups, 1 to the number of values
 * @returns k numbers, never growing
 * @throws RangeError when k is no whole number from 1 to the number of values
 * @example
 * partitionCosts([0, 2, 10, 12], [1, 1, 1, 1], 2) // => [104, 4]
 */
export function partitionCosts(values: readonly number[], weights: readonly number[], k: number): number[] {
  const n = values.length;
  if (!(Number.isInteger(k) && k >= 1 && k <= n)) {
    throw new RangeError(`partitionCosts wants a whole number of groups from 1 to ${n}, got ${k}`);
  }
  return fillTable(values, weights, k).costs;
}

/** The table of best last cuts, a row a number of groups, over the values in order. */
function fillTable(values: readonly number[], weights: readonly number[], k: number) {
  const n = values.length;
  const order = values.map((_, index) => index).sort((a, b) => values[a] - values[b] || a - b);
  const sums = runningSums(order, values, weights);
  let previous = Float64Array.from({ length: n }, (_, last) => costOf(sums, 0, last));
  const cuts: Int32Array[] = [new Int32Array(n)];
  const costs = [previous[n - 1]];
  for (let group = 1; group < k; group++) {
    const current = new Float64Array(n).fill(Number.POSITIVE_INFINITY);
    const cut = new Int32Array(n);
    fillRow(previous, current, cut, sums, group, group, n - 1, group, n - 1);
    cuts.push(cut);
    costs.push(current[n - 1]);
    previous = current;
  }
  return { order, cuts, costs };
}

/** Sums over the sorted values before each place: of weights, of weighted values and of their squares, about the mean of all. */
interface RunningSums {
  readonly sumW: Float64Array;
  readonly sumX: Float64Array;
  readonly sumXX: Float64Array;
}

function runningSums(order: readonly number[], values: readonly number[], weights: readonly number[]): RunningSums {
  const n = order.length;
  const centre = values.reduce((sum, value) => sum + value, 0) / n;
  const sumW = new Float64Array(n + 1);
  const sumX = new Float64Array(n + 1);
  const sumXX = new Float64Array(n + 1);
  order.forEach((index, at) => {
    const x = values[index] - centre;
    sumW[at + 1] = sumW[at] + weights[index];
    sumX[at + 1] = sumX[at] + weights[index] * x;
    sumXX[at + 1] = sumXX[at] + weights[index] * x * x;
  });
  return { sumW, sumX, sumXX };
}

/** Weighted sum of squares of the sorted values from `first` to `last` about their mean. */
function costOf({ sumW, sumX, sumXX }: RunningSums, first: number, last: number): number {
  const x = sumX[last + 1] - sumX[first];
  return Math.max(0, sumXX[last + 1] - sumXX[first] - (x * x) / (sumW[last + 1] - sumW[first]));
}

/** Best start of the last group for every end in low..high; the best start never moves left as the end moves right. */
function fillRow(
  previous: Float64Array,
  current: Float64Array,
  cut: Int32Array,
  sums: RunningSums,
  group: number,
  low: number,
  high: number,
  startLow: number,
  startHigh: number,
): void {
  if (low > high) return;
  const middle = (low + high) >> 1;
  const { sumW, sumX, sumXX } = sums;
  // costOf for one end and every start: what hangs on the end is taken out of the loop
  const [endW, endX, endXX] = [sumW[middle + 1], sumX[middle + 1], sumXX[middle + 1]];
  const last = Math.min(middle, startHigh);
  let least = Number.POSITIVE_INFINITY;
  let best = 0;
  for (let start = Math.max(group, startLow); start <= last; start++) {
    const x = endX - sumX[start];
    const candidate = previous[start - 1] + Math.max(0, endXX - sumXX[start] - (x * x) / (endW - sumW[start]));
    if (candidate < least) {
      least = candidate;
      best = start;
    }
  }
  current[middle] = least;
  cut[middle] = best;
  fillRow(previous, current, cut, sums, group, low, middle - 1, startLow, best);
  fillRow(previous, current, cut, sums, group, middle + 1, high, best, startHigh);
}
