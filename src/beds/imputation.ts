import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Imputation } from './log-ratios.js';

/** No amino acid is known better than to 1 %: keeps what is expected of a gap from resting on differences below that. */
const FINEST_VARIANCE = 0.01 ** 2;

/**
 * What a gap may be filled with, from the shells on which every amino acid was measured.
 *
 * @param mean mean log ratio of each amino acid
 * @param covariance covariance of the log ratios, as estimated: it need not be one that can be
 * @param shells number of shells on which every amino acid was measured
 * @param beds number of beds in which those lie
 * @returns undefined where those are too few to say how the amino acids go together: shells and published means with a
 *   gap then have no value on the index
 */
export function imputationFrom(
  mean: readonly number[],
  covariance: readonly (readonly number[])[],
  shells: number,
  beds: number,
): Imputation | undefined {
  const size = mean.length;
  if (beds < 2 || shells < 2 * size + 1) return undefined;
  const matrix = new Matrix(covariance.map((row) => [...row]));
  const { eigenvectorMatrix: vectors, realEigenvalues } = new EigenvalueDecomposition(matrix, {
    assumeSymmetric: true,
  });
  // differences of estimated covariances can leave directions of negative variance, in which a filled gap would run away
  const values = Matrix.diag(realEigenvalues.map((value) => Math.max(0, value) + FINEST_VARIANCE));
  return { mean, covariance: vectors.mmul(values).mmul(vectors.transpose()).to2DArray() };
}
