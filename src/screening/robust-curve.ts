import { robustSd } from '../statistics/index.js';
import { leastSquares } from './least-squares.js';

/** A smooth curve through points of which some are wild. */
export interface RobustCurve {
  readonly at: (u: number) => number;
  /** Robust standard deviation of the points about the curve. */
  readonly sd: number;
  /** Degrees of freedom that a median absolute deviation of so many points is worth. */
  readonly df: number;
}

/** A median absolute deviation knows as much of the spread as a standard deviation of 37 % of the normal sample. */
const EFFICIENCY_OF_MAD = 0.37;

/**
 * Fits a polynomial by Tukey's bisquare, started from the medians of groups of neighbouring points so that wild points do
 * not lead it astray: a straight line under 20 points, a parabola under 60, a cubic from there, because pairs of amino acids bend
 * over a long range of ages. Beyond the inner 96 % of the points it runs on straight.
 *
 * Sources: Beaton and Tukey 1974, Technometrics 16, 147–185, 10.1080/00401706.1974.10489171; Rousseeuw and Croux 1993
 * (efficiency of the MAD), 10.1080/01621459.1993.10476408.
 *
 * @param u Abscissae, at least 4.
 * @param v Ordinates.
 */
export function robustCurve(u: readonly number[], v: readonly number[]): RobustCurve {
  const sorted = u.map((_, index) => index).sort((a, b) => u[a] - u[b]);
  const [low, high] = [u[sorted[Math.floor(0.02 * (u.length - 1))]], u[sorted[Math.ceil(0.98 * (u.length - 1))]]];
  const half = (high - low) / 2;
  const degree = half > 0 ? (u.length < 20 ? 1 : u.length < 60 ? 2 : 3) : 0;
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
  for (let turn = 0; turn < 30; turn++) {
    const residuals = rows.map((row, i) => v[i] - value(row));
    sd = robustSd(residuals) * Math.sqrt(u.length / Math.max(1, u.length - degree - 1));
    if (!(sd > 0)) break;
    const weights = residuals.map((residual) => Math.max(0, 1 - (residual / (4.685 * sd)) ** 2) ** 2);
    const next = leastSquares(rows, v, weights);
    const change = Math.max(...next.map((c, k) => Math.abs(c - coefficients[k])));
    coefficients = next;
    if (change < 1e-9) break;
  }
  const final = coefficients;
  return {
    at: (where) => terms(where).reduce((sum, term, k) => sum + term * final[k], 0),
    sd,
    df: Math.max(1, EFFICIENCY_OF_MAD * (u.length - degree - 1)),
  };
}

/** Least squares through the medians of about a dozen groups of neighbours. */
function startingCurve(
  u: readonly number[],
  v: readonly number[],
  sorted: readonly number[],
  terms: (u: number) => number[],
  degree: number,
): number[] {
  const groups = Math.max(degree + 1, Math.min(12, Math.floor(u.length / 5)));
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
