import type { AminoAcid, ByAminoAcid, Clock } from '../model/index.js';

/**
 * What a missing amino acid is expected to be, given the others of the same shell: means and covariance of the log
 * ratios over all shells of the clock, amino acids in the clock's order.
 */
export interface Imputation {
  readonly mean: readonly number[];
  readonly covariance: readonly (readonly number[])[];
}

/**
 * Log ratio of one shell or summary on a clock: x = Σ w ln(D/L), the weights summing to 1 (design 7.1 and 7.10).
 * Amino acids that were not measured are put at their expected value given the measured ones (the regression of a
 * normal distribution, Anderson 1957, doi:10.1080/01621459.1957.10501379), so that a gap does not shift the index.
 * @returns null when no amino acid of the clock was measured, or when some are missing and no imputation is given
 * @example
 * clockLogRatio({ Ile: 0.2 }, { name: 'Patella THAA Ile', taxon: 'Patella', fraction: 'THAA', amino_acids: ['Ile'], weights: [1], main: true }) // => -1.6094379
 */
export function clockLogRatio(ratios: ByAminoAcid, clock: Clock, imputation?: Imputation): number | null {
  const { amino_acids: codes, weights } = clock;
  if (codes.length === 1) {
    const ratio = ratios[codes[0]];
    return ratio === undefined ? null : weights[0] * Math.log(ratio);
  }
  const logs = codes.map((code: AminoAcid) => {
    const ratio = ratios[code];
    return ratio === undefined ? Number.NaN : Math.log(ratio);
  });
  const measured = logs.flatMap((value, index) => (Number.isNaN(value) ? [] : [index]));
  if (measured.length === 0) return null;
  if (measured.length < logs.length) {
    if (imputation === undefined) return null;
    fillMissing(logs, measured, imputation);
  }
  return logs.reduce((sum, value, index) => sum + weights[index] * value, 0);
}

function fillMissing(logs: number[], measured: readonly number[], { mean, covariance }: Imputation): void {
  const deviations = measured.map((index) => logs[index] - mean[index]);
  const coefficients = solve(
    measured.map((row) => measured.map((column) => covariance[row][column])),
    deviations,
  );
  for (let index = 0; index < logs.length; index++) {
    if (!Number.isNaN(logs[index])) continue;
    logs[index] =
      mean[index] + measured.reduce((sum, column, at) => sum + covariance[index][column] * coefficients[at], 0);
  }
}

/** Solves a small symmetric system by Gaussian elimination with partial pivoting; a zero pivot gives 0 there. */
export function solve(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const size = right.length;
  const rows = matrix.map((row, index) => [...row, right[index]]);
  for (let column = 0; column < size; column++) {
    let pivot = column;
    for (let row = column + 1; row < size; row++) {
      if (Math.abs(rows[row][column]) > Math.abs(rows[pivot][column])) pivot = row;
    }
    [rows[column], rows[pivot]] = [rows[pivot], rows[column]];
    if (Math.abs(rows[column][column]) < 1e-14) continue;
    for (let row = column + 1; row < size; row++) {
      const factor = rows[row][column] / rows[column][column];
      for (let at = column; at <= size; at++) rows[row][at] -= factor * rows[column][at];
    }
  }
  const solution = new Array<number>(size).fill(0);
  for (let row = size - 1; row >= 0; row--) {
    if (Math.abs(rows[row][row]) < 1e-14) continue;
    let sum = rows[row][size];
    for (let at = row + 1; at < size; at++) sum -= rows[row][at] * solution[at];
    solution[row] = sum / rows[row][row];
  }
  return solution;
}
