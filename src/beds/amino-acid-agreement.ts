import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { fUpperTail } from '../statistics/index.js';

/** Correlation of true bed values above which two amino acids are said to see the same thing. */
export const AGREES = 0.6;

/** Share of an amino acid's variance between beds above which what it has of its own counts. */
const OWN_SHARE = 0.2;

/** What the beds' values of several amino acids are made of. */
export interface BedVariances {
  /** Covariance of true bed values, errors of the means taken out. */
  readonly covariance: readonly (readonly number[])[];
  /** Mean squares and products between beds. */
  readonly raw: readonly (readonly number[])[];
  /** Covariance of shells within beds. */
  readonly within: readonly (readonly number[])[];
  /** Degrees of freedom between and within beds, and shells a bed. */
  readonly betweenDf: number;
  readonly withinDf: number;
  readonly shells: number;
}

/** What amino acids share, and what each has of its own between beds. */
export interface Agreement {
  /** Variance between beds that an amino acid shares with no other: temperature, diagenesis or chance, not age. 0 or more. */
  readonly own: readonly number[];
  /** Set where amino acids that vary between beds don't agree: the one that resolves best. */
  readonly alone: number | null;
}

/**
 * How far amino acids agree on the beds. Age moves all of them together, so only what they share between beds can be age:
 * one common factor is fitted to the covariances between amino acids (principal axes with communalities, Harman and Jones
 * 1966, doi:10.1007/BF02289468), and what is left of each variance is its own. Amino acids that don't vary between beds (F
 * test, p above 0.01) take no part; own variance under a fifth of the whole (amino acids slow down at different ages, which bends
 * their curves against each other) or own variation under twice the beds' errors is taken as none, so that where all agree
 * the index stays Fisher's. With two amino acids shared and own variance can't be parted. Where no two correlate above 0.6,
 * a mean would mix unlike things, and the one that resolves best stands alone.
 */
export function aminoAcidAgreement(variances: BedVariances): Agreement {
  const { covariance, raw, within, betweenDf, withinDf, shells } = variances;
  const none = { own: covariance.map(() => 0), alone: null };
  if (!(betweenDf >= 3 && withinDf >= 2 && shells > 0)) return none;
  const varied = covariance.flatMap((row, i) =>
    row[i] > 0 && within[i][i] > 0 && fUpperTail(raw[i][i] / within[i][i], betweenDf, withinDf) < 0.01 ? [i] : [],
  );
  if (varied.length < 2) return none;
  const correlation = (i: number, j: number): number =>
    covariance[i][j] / Math.sqrt(covariance[i][i] * covariance[j][j]);
  const best = varied.reduce((most, i) =>
    covariance[i][i] / within[i][i] > covariance[most][most] / within[most][most] ? i : most,
  );
  if (!varied.some((i, at) => varied.slice(at + 1).some((j) => correlation(i, j) > AGREES)))
    return { ...none, alone: best };
  if (varied.length < 3) return none;
  const shared = sharedVariance(varied.map((i) => varied.map((j) => covariance[i][j])));
  const own = covariance.map(() => 0);
  varied.forEach((i, at) => {
    const rest = covariance[i][i] - shared[at];
    if (rest > OWN_SHARE * covariance[i][i] && rest > (4 * within[i][i]) / shells) own[i] = rest;
  });
  return { own, alone: null };
}

/** Variance of each amino acid that one common factor explains. */
function sharedVariance(covariance: readonly (readonly number[])[]): number[] {
  const size = covariance.length;
  const scale = covariance.map((row, i) => Math.sqrt(row[i]));
  const correlations = covariance.map((row, i) => row.map((value, j) => value / (scale[i] * scale[j])));
  // start from the largest correlation of each with any other
  let shares = correlations.map((row, i) =>
    Math.min(1, Math.max(...row.map((value, j) => (i === j ? 0 : Math.abs(value))))),
  );
  for (let step = 0; step < 500; step++) {
    const reduced = new Matrix(correlations.map((row, i) => row.map((value, j) => (i === j ? shares[i] : value))));
    const { eigenvectorMatrix, realEigenvalues } = new EigenvalueDecomposition(reduced, { assumeSymmetric: true });
    const root = Math.max(0, realEigenvalues[size - 1]);
    const next = shares.map((_, i) => Math.min(1, root * eigenvectorMatrix.get(i, size - 1) ** 2));
    const moved = Math.max(...next.map((value, i) => Math.abs(value - shares[i])));
    shares = next;
    if (!(moved > 1e-8)) break;
  }
  return shares.map((share, i) => share * scale[i] ** 2);
}
