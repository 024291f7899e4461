import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';
import { chiSquaredUpperTail } from './chi-squared.js';

/** Options of the line with errors in both. */
export interface YorkOptions {
  /** Correlation of the two errors of a point, between −1 and 1; one number for all or one a point. Default 0. */
  readonly correlation?: number | Numbers;
  /** Slope that is known beforehand: only the intercept is then fitted. */
  readonly slope?: number;
}

/** A line with errors in both, and its fit. */
export interface YorkLine {
  readonly slope: number;
  /** 0 when the slope was given. */
  readonly slopeSe: number;
  readonly intercept: number;
  readonly interceptSe: number;
  /** Covariance of slope and intercept. */
  readonly covariance: number;
  /** Weighted sum of squared residuals; near df when the weights tell the whole error. */
  readonly chiSquared: number;
  readonly df: number;
  /** Chance of a chi-squared so large if the weights tell the whole error; 1 when df is 0. */
  readonly p: number;
}

const MOST_STEPS = 10_000;

/**
 * Best straight line through points with errors in both directions (York, Evensen, López Martínez and De Basabe Delgado
 * 2004, 10.1119/1.1632486). Standard errors are those that follow from the weights alone.
 *
 * @param x at least 2 values, or 1 with a given slope
 * @param wx weights of x, 1 / sd²; Infinity for no error
 * @param wy weights of y, 1 / sd²; Infinity for no error, but not for both of a point
 * @throws RangeError when lists differ in length, values are too few or not finite, weights are not above 0, all x are
 * equal, or the slope does not settle
 * @example
 * ```ts
 * const line = yorkLine([1, 2, 3], [2, 4, 6], [1, 1, 1], [1, 1, 1]);
 * line.slope; // => 2
 * line.chiSquared; // => 0
 * ```
 */
export function yorkLine(x: Numbers, y: Numbers, wx: Numbers, wy: Numbers, options: YorkOptions = {}): YorkLine {
  const points = readPoints(x, y, wx, wy, options);
  const given = options.slope;
  if (given !== undefined) requireThat(Number.isFinite(given), 'yorkLine', 'a finite slope', given);
  const slope = given ?? settle(points);
  const { weights, xMean, yMean, adjusted } = step(points, slope);
  const intercept = yMean - slope * xMean;
  const mass = sum(weights, (w) => w);
  const centre = sum(adjusted, (value, i) => weights[i] * value) / mass;
  const slopeVariance = given === undefined ? 1 / sum(adjusted, (value, i) => weights[i] * (value - centre) ** 2) : 0;
  const chiSquared = sum(weights, (w, i) => w * (points[i].y - slope * points[i].x - intercept) ** 2);
  const df = points.length - (given === undefined ? 2 : 1);
  return {
    slope,
    slopeSe: Math.sqrt(slopeVariance),
    intercept,
    interceptSe: Math.sqrt(1 / mass + centre ** 2 * slopeVariance),
    // 0 − x, so that a given slope has 0 and not −0
    covariance: 0 - centre * slopeVariance,
    chiSquared,
    df,
    p: df > 0 ? chiSquaredUpperTail(chiSquared, df) : 1,
  };
}

interface Point {
  readonly x: number;
  readonly y: number;
  readonly varianceX: number;
  readonly varianceY: number;
  readonly covariance: number;
}

function readPoints(x: Numbers, y: Numbers, wx: Numbers, wy: Numbers, options: YorkOptions): Point[] {
  const n = x.length;
  requireNumbers('yorkLine', 'x', x, options.slope === undefined ? 2 : 1);
  requireNumbers('yorkLine', 'y', y, n);
  const correlation = options.correlation ?? 0;
  const lists = [y, wx, wy, ...(typeof correlation === 'number' ? [] : [correlation])];
  for (const list of lists) requireThat(list.length === n, 'yorkLine', `lists of ${n} values each`, list.length);
  return Array.from(x, (xi, i) => {
    requireThat(wx[i] > 0 && wy[i] > 0, 'yorkLine', 'weights above 0', wx[i], wy[i]);
    const some = wx[i] < Infinity || wy[i] < Infinity;
    requireThat(some, 'yorkLine', 'an error in x or y of every point', wx[i], wy[i]);
    const r = typeof correlation === 'number' ? correlation : correlation[i];
    requireThat(r > -1 && r < 1, 'yorkLine', 'correlations between -1 and 1', r);
    const varianceX = 1 / wx[i];
    const varianceY = 1 / wy[i];
    return { x: xi, y: y[i], varianceX, varianceY, covariance: r * Math.sqrt(varianceX * varianceY) };
  });
}

/** The slope that York's step leaves unchanged, from the plain least-squares slope on. */
function settle(points: readonly Point[]): number {
  const xMean = sum(points, ({ x }) => x) / points.length;
  const yMean = sum(points, ({ y }) => y) / points.length;
  const spread = sum(points, ({ x }) => (x - xMean) ** 2);
  requireThat(spread > 0, 'yorkLine', 'x values that differ', 'one x for all points');
  let slope = sum(points, ({ x, y }) => (x - xMean) * (y - yMean)) / spread;
  for (let i = 0; i < MOST_STEPS; i++) {
    const { next } = step(points, slope);
    const settled = Math.abs(next - slope) <= 1e-14 * Math.abs(next) || next === slope;
    slope = next;
    if (settled) return slope;
  }
  throw new RangeError(`yorkLine found no slope that settles in ${MOST_STEPS} steps: the points do not make a line`);
}

function step(points: readonly Point[], slope: number) {
  const weights = points.map(
    ({ varianceX, varianceY, covariance }) => 1 / (varianceY + slope * slope * varianceX - 2 * slope * covariance),
  );
  const mass = sum(weights, (w) => w);
  const xMean = sum(points, ({ x }, i) => weights[i] * x) / mass;
  const yMean = sum(points, ({ y }, i) => weights[i] * y) / mass;
  const beta = points.map(({ x, y, varianceX, varianceY, covariance }, i) => {
    const u = x - xMean;
    const v = y - yMean;
    return weights[i] * (u * varianceY + slope * v * varianceX - (slope * u + v) * covariance);
  });
  const next =
    sum(points, ({ y }, i) => weights[i] * beta[i] * (y - yMean)) /
    sum(points, ({ x }, i) => weights[i] * beta[i] * (x - xMean));
  return { weights, xMean, yMean, adjusted: beta.map((b) => xMean + b), next };
}

function sum<T>(values: readonly T[], of: (value: T, i: number) => number): number {
  return values.reduce((total, value, i) => total + of(value, i), 0);
}
