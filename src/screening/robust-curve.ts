import { robustSd } from '../statistics/index.js';
import { leastSquares } from './least-squares.js';

/** A smooth curve through points of which some are wild. */
export interface RobustCurve {
  readonly at: (u: number) => number;
  /** Robust standard deviation of the points about the curve. */
  readonly sd: number;
  /** The same among the neighbours of a place where that is larger, else `sd`: scatter narrows towards equilibrium. */
  readonly sdAt: (u: number) => number;
  /** Degrees of freedom that a median absolute deviation of so many points is worth. */
  readonly df: number;
}

/** A median absolute deviation knows as much of the spread as a standard deviation of 37 % of the normal sample. */
const EFFICIENCY_OF_MAD = 0.37;

/**
 * Fits a polynomial by Tukey's bisquare, started from the medians of groups of neighbouring points so that wild points
 * do not lead it astray: a straight line under 30 points, a parabola under 120, a cubic from there, because pairs of
 * amino acids bend over a long range of ages. Beyond the inner 90 % of the points it runs on straight.
 *
 * Sources: Beaton and Tukey 1974, Technometrics 16, 147–185, 10.1080/00401706.1974.10489171; Rousseeuw and Croux 1993
 * (efficiency of the MAD), 10.1080/01621459.1993.10476408.
 *
 * @param u Abscissae, at least 4.
 * @param v Ordinates.
 */
export function robustCurve(u: readonly number[], v: readonly number[]): RobustCurve {
  const sorted = u.map((_, index) => index).sort((a, b) => u[a] - u[b]);
  const [low, high] = [u[sorted[Math.floor(0.05 * (u.length - 1))]], u[sorted[Math.ceil(0.95 * (u.length - 1))]]];
  const half = (high - low) / 2;
  const degree = half > 0 ? (u.length < 30 ? 1 : u.length < 120 ? 2 : 3) : 0;
  const terms = (value: number): number[] => {
    const scaled = half > 0 ? (value - low - half) / half : 0;
    const inside = Math.min(1, Math.max(-1, scaled));
    // straight on beyond the ends: value at the end plus slope there
    return Array.from({ length: degree + 1 }, (_, power) =>
      power === 0 ? 1 : inside ** power + power * inside ** (power - 1) * (scaled - inside),
    );
  };
  const rows = u.map(terms);
  let coefficients = startingCurve(u, v, sorted, terms, degree);
  const value = (row: readonly number[]) => row.reduce((sum, term, k) => sum + term * coefficients[k], 0);
  let sd = 0;
  for (let turn = 0; turn < 20; turn++) {
    const residuals = rows.map((row, i) => v[i] - value(row));
    sd = robustSd(residuals) * Math.sqrt(u.length / Math.max(1, u.length - degree - 1));
    if (!(sd > 0)) break;
    const weights = residuals.map((residual) => Math.max(0, 1 - (residual / (4.685 * sd)) ** 2) ** 2);
    const next = leastSquares(rows, v, weights);
    const change = Math.max(...next.map((c, k) => Math.abs(c - coefficients[k])));
    coefficients = next;
    if (change < 1e-4 * sd) break;
  }
  const final = coefficients;
  const at = (where: number) => terms(where).reduce((sum, term, k) => sum + term * final[k], 0);
  return {
    at,
    sd,
    sdAt: localSd(
      sorted.map((i) => u[i]),
      sorted.map((i) => v[i] - at(u[i])),
      sd,
    ),
    df: Math.max(1, EFFICIENCY_OF_MAD * (u.length - degree - 1)),
  };
}

/** Least squares through the medians of up to eight groups of neighbours. */
function startingCurve(
  u: readonly number[],
  v: readonly number[],
  sorted: readonly number[],
  terms: (u: number) => number[],
  degree: number,
): number[] {
  const groups = Math.max(degree + 1, Math.min(8, Math.floor(u.length / 8)));
  const rows: number[][] = [];
  const middle: number[] = [];
  for (let g = 0; g < groups; g++) {
    const members = sorted.slice(Math.floor((g * u.length) / groups), Math.floor(((g + 1) * u.length) / groups));
    if (members.length === 0) continue;
    const medianOf = (values: number[]) => values.sort((a, b) => a - b)[values.length >> 1];
    rows.push(terms(medianOf(members.map((i) => u[i]))));
    middle.push(medianOf(members.map((i) => v[i])));
  }
  return leastSquares(
    rows,
    middle,
    rows.map(() => 1),
  );
}

/** Neighbours from which the scatter at a place is taken. */
const NEIGHBOURS = 40;

/** Robust standard deviation in runs of 40 neighbours, at least the overall one; a place takes that of its run. */
function localSd(u: readonly number[], residuals: readonly number[], overall: number): (u: number) => number {
  const runs = Math.max(1, Math.floor(u.length / NEIGHBOURS));
  if (runs === 1) return () => overall;
  const ends: number[] = [];
  const sds: number[] = [];
  for (let run = 0; run < runs; run++) {
    const [from, to] = [Math.floor((run * u.length) / runs), Math.floor(((run + 1) * u.length) / runs)];
    ends.push(u[to - 1]);
    sds.push(Math.max(overall, robustSd(residuals.slice(from, to))));
  }
  // The wider of a run and its neighbours, so that the step from one to the next marks nobody.
  const wide = sds.map((sd, run) => Math.max(sd, sds[run - 1] ?? sd, sds[run + 1] ?? sd));
  return (where) => {
    let [low, high] = [0, runs - 1];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (ends[middle] < where) low = middle + 1;
      else high = middle;
    }
    return wide[low];
  };
}
