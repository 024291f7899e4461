import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { AminoAcid } from '../model/index.js';
import { aminoAcidAgreement } from './amino-acid-agreement.js';
import { imputationFrom } from './imputation.js';
import type { Imputation } from './log-ratios.js';

/** One amino acid's part in the index. */
export interface IndexShare {
  readonly amino_acid: AminoAcid;
  /** Weight of its log ratio; the weights of an index sum to 1. */
  readonly weight: number;
  /** Variance between beds (errors of the means taken out) over variance between shells of one bed. */
  readonly resolution: number;
}

/** The index of several amino acids. */
export interface FisherIndex {
  readonly shares: readonly IndexShare[];
  /** How gaps are filled; undefined where too few shells have every amino acid. */
  readonly imputation: Imputation | undefined;
  /** `fisher`, or what stood in where beds or shells are too few to estimate covariances. */
  readonly basis: 'fisher' | 'separate resolutions' | 'equal weights';
  /** Pooled covariance of log ratios within beds, regularised; amino acids in order. */
  readonly within: readonly (readonly number[])[];
  /** Covariance of true bed values: errors of the bed means taken out, no variance below 0. */
  readonly between: readonly (readonly number[])[];
  /** Variance between beds that each amino acid shares with no other; 0 where all agree. */
  readonly own: readonly number[];
  /** Shells a bed that the covariances rest on, beds of few shells counted for more. */
  readonly shellsABed: number;
}

/**
 * The index of several amino acids: the direction of greatest between-bed against pooled within-bed variance of the log
 * ratios (Fisher 1936, doi:10.1111/j.1469-1809.1936.tb02137.x; Rao 1948), scaled so that the weights sum to 1 and the
 * index stays a log ratio that grows with age.
 *
 * The within-bed covariance is shrunk towards its diagonal (in the spirit of Friedman 1989,
 * doi:10.1080/01621459.1989.10478752) by (p + 1)/(df + p + 1). Every ratio grows with age, so a negative weight could only
 * cancel shared error and would turn a contaminated amino acid's fall into a rise: such an amino acid gets weight 0 and
 * the rest are solved again. Shells more than 4 robust standard deviations from their bed's median take no part, so that
 * reworked shells do not bend the direction. Variance between beds that an amino acid shares with no other is no age, and
 * counts as error: see {@link aminoAcidAgreement}.
 *
 * @param rows log ratios, one row a shell, NaN where not measured
 * @param beds bed label of each row
 * @param codes the amino acids, one a column
 */
export function fisherIndex(
  rows: readonly (readonly number[])[],
  beds: readonly number[],
  codes: readonly AminoAcid[],
): FisherIndex {
  const size = codes.length;
  const used = trimmedRows(rows, beds, size);
  const groups = groupRows(used, rows, beds);
  const { within, df } = withinCovariance(groups, size);
  const bedMeans = groups.map((group) => columnMeans(group, size));
  const counts = groups.map((group) => group.length);
  const between = betweenCovariance(bedMeans, counts, within, size);
  const total = within.map((row, i) => row.map((value, j) => value + between.covariance[i][j]));
  const complete = counts.reduce((sum, count) => sum + count, 0);
  const imputation = imputationFrom(between.mean, total, complete, groups.length);
  const resolution = within.map((row, i) => (row[i] > 1e-15 ? Math.max(0, between.covariance[i][i]) / row[i] : 0));
  const basis = df < 2 * size || groups.length < 4 ? (df < size ? 'equal weights' : 'separate resolutions') : 'fisher';
  const shrinkage = (size + 1) / (df + size + 1);
  const shrunk = within.map((row, i) => row.map((value, j) => (i === j ? value : value * (1 - shrinkage))));
  const { own, alone } = aminoAcidAgreement({
    covariance: between.covariance,
    raw: between.raw,
    within,
    betweenDf: groups.length - 1,
    withinDf: df,
    shells: between.effective,
  });
  const weights =
    alone === null
      ? weigh(basis, withOwn(shrunk, own, between.effective), between.raw, resolution, size)
      : codes.map((_, i) => (i === alone ? 1 : 0));
  return {
    shares: codes.map((amino_acid, i) => ({ amino_acid, weight: weights[i], resolution: resolution[i] })),
    imputation,
    basis,
    within: shrunk,
    between: between.covariance,
    own,
    shellsABed: between.effective,
  };
}

/** Within-bed covariance with each amino acid's own variance between beds, on the scale of one shell. */
function withOwn(within: readonly (readonly number[])[], own: readonly number[], shells: number): number[][] {
  return within.map((row, i) => row.map((value, j) => (i === j ? value + shells * own[i] : value)));
}

/**
 * Resolution along an index: variance between beds over that of a shell within its bed.
 * @param index of {@link fisherIndex}
 * @param without position of an amino acid to leave out, the others weighed anew. Default none
 * @returns 0 or more; 0 where nothing is left
 */
export function indexResolution(index: FisherIndex, without?: number): number {
  const kept = index.shares.flatMap((_, at) => (at === without ? [] : [at]));
  if (kept.length === 0) return 0;
  const sub = (matrix: readonly (readonly number[])[]): number[][] => kept.map((i) => kept.map((j) => matrix[i][j]));
  const [within, between] = [sub(index.within), sub(index.between)];
  const own = kept.map((at) => index.shares[at].resolution);
  const weights =
    without === undefined
      ? kept.map((at) => index.shares[at].weight)
      : weigh(index.basis, sub(withOwn(index.within, index.own, index.shellsABed)), between, own, kept.length);
  const form = (matrix: number[][]): number =>
    weights.reduce((sum, w, i) => sum + weights.reduce((row, v, j) => row + w * v * matrix[i][j], 0), 0);
  const error = form(within);
  return error > 0 ? Math.max(0, form(between)) / error : 0;
}

function weigh(
  basis: FisherIndex['basis'],
  within: readonly (readonly number[])[],
  between: readonly (readonly number[])[],
  resolution: readonly number[],
  size: number,
): number[] {
  if (basis === 'equal weights') return new Array<number>(size).fill(1 / size);
  if (basis === 'separate resolutions') {
    // signal of one amino acid per unit of its own error variance: sd between beds / variance within
    const raw = resolution.map((value, i) => Math.sqrt(value / Math.max(within[i][i], 1e-12)));
    const sum = raw.reduce((total, value) => total + value, 0);
    return sum > 0 ? raw.map((value) => value / sum) : new Array<number>(size).fill(1 / size);
  }
  let active = within.map((_, i) => i);
  for (;;) {
    const direction = leadingDirection(active, within, between);
    const worst = direction.reduce((least, value, at) => (value < direction[least] ? at : least), 0);
    if (direction[worst] >= 0 || active.length === 1) {
      const weights = new Array<number>(size).fill(0);
      const sum = direction.reduce((total, value) => total + value, 0);
      active.forEach((index, at) => {
        weights[index] = direction[at] / sum;
      });
      return weights;
    }
    active = active.filter((_, at) => at !== worst);
  }
}

/** Leading eigenvector of W⁻¹B, by the symmetric form L⁻¹ B L⁻ᵀ with W = L Lᵀ, signed so that its sum is positive. */
function leadingDirection(
  active: readonly number[],
  within: readonly (readonly number[])[],
  between: readonly (readonly number[])[],
): number[] {
  const w = new Matrix(active.map((i) => active.map((j) => within[i][j])));
  const b = new Matrix(active.map((i) => active.map((j) => between[i][j])));
  const whitening = inverseSquareRoot(w);
  const decomposition = new EigenvalueDecomposition(whitening.mmul(b).mmul(whitening), { assumeSymmetric: true });
  const leading = decomposition.eigenvectorMatrix.getColumn(active.length - 1);
  const direction = whitening.mmul(Matrix.columnVector(leading)).to1DArray();
  const sum = direction.reduce((total, value) => total + value, 0);
  return sum < 0 ? direction.map((value) => -value) : direction;
}

/** Symmetric inverse square root of a covariance matrix, eigenvalues floored so that equal ratios do no harm. */
export function inverseSquareRoot(matrix: Matrix): Matrix {
  const { eigenvectorMatrix: vectors, realEigenvalues: values } = new EigenvalueDecomposition(matrix, {
    assumeSymmetric: true,
  });
  const floor = Math.max(1e-12, 1e-8 * Math.max(...values));
  const scaled = Matrix.diag(values.map((value) => 1 / Math.sqrt(Math.max(value, floor))));
  return vectors.mmul(scaled).mmul(vectors.transpose());
}

/** Rows whose every amino acid lies within 4 robust standard deviations of its bed's median. */
function trimmedRows(rows: readonly (readonly number[])[], beds: readonly number[], size: number): number[] {
  const members = new Map<number, number[]>();
  beds.forEach((bed, row) => {
    const group = members.get(bed);
    if (group === undefined) members.set(bed, [row]);
    else group.push(row);
  });
  const deviations = rows.map(() => new Array<number>(size).fill(0));
  for (const group of members.values()) {
    for (let column = 0; column < size; column++) {
      const median = medianOf(group.map((row) => rows[row][column]).filter((value) => !Number.isNaN(value)));
      for (const row of group) deviations[row][column] = Math.abs(rows[row][column] - median);
    }
  }
  const inRepeats = rows.flatMap((_, row) => ((members.get(beds[row])?.length ?? 0) >= 3 ? [row] : []));
  const limits = Array.from({ length: size }, (_, column) => {
    const values = inRepeats.map((row) => deviations[row][column]).filter((value) => !Number.isNaN(value));
    return values.length < 10 ? Number.POSITIVE_INFINITY : 4 * 1.4826 * 1.15 * medianOf(values);
  });
  return rows.flatMap((_, row) =>
    deviations[row].every((value, column) => Number.isNaN(value) || !(limits[column] > 0) || value <= limits[column])
      ? [row]
      : [],
  );
}

function medianOf(values: readonly number[]): number {
  if (values.length === 0) return Number.NaN;
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/** Complete rows by bed: covariances are taken from shells on which every amino acid was measured. */
function groupRows(
  used: readonly number[],
  rows: readonly (readonly number[])[],
  beds: readonly number[],
): (readonly number[])[][] {
  const groups = new Map<number, (readonly number[])[]>();
  for (const row of used) {
    if (rows[row].some(Number.isNaN)) continue;
    const group = groups.get(beds[row]);
    if (group === undefined) groups.set(beds[row], [rows[row]]);
    else group.push(rows[row]);
  }
  return [...groups.values()];
}

function columnMeans(rows: readonly (readonly number[])[], size: number): number[] {
  return Array.from({ length: size }, (_, column) => rows.reduce((sum, row) => sum + row[column], 0) / rows.length);
}

function withinCovariance(groups: readonly (readonly (readonly number[])[])[], size: number) {
  const within = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  let df = 0;
  for (const group of groups) {
    const mean = columnMeans(group, size);
    for (const row of group) addOuter(within, row, mean, 1);
    df += group.length - 1;
  }
  for (const row of within) for (let j = 0; j < size; j++) row[j] = df > 0 ? row[j] / df : 0;
  return { within, df };
}

/** Mean square between beds (`raw`, weighted by shells) and the covariance of true bed values (`covariance`). */
function betweenCovariance(
  means: readonly (readonly number[])[],
  counts: readonly number[],
  within: readonly (readonly number[])[],
  size: number,
) {
  const n = counts.reduce((sum, count) => sum + count, 0);
  const mean = Array.from({ length: size }, (_, column) =>
    n > 0 ? means.reduce((sum, row, bed) => sum + counts[bed] * row[column], 0) / n : 0,
  );
  const raw = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  means.forEach((row, bed) => {
    addOuter(raw, row, mean, counts[bed]);
  });
  const df = Math.max(1, means.length - 1);
  const effective = n > 0 ? (n - counts.reduce((sum, count) => sum + count ** 2, 0) / n) / df : 1;
  for (const row of raw) for (let j = 0; j < size; j++) row[j] /= df;
  const covariance = raw.map((row, i) =>
    row.map((value, j) => (effective > 0 ? (value - within[i][j]) / effective : 0)),
  );
  for (let i = 0; i < size; i++) covariance[i][i] = Math.max(0, covariance[i][i]);
  return { raw, covariance, mean, effective };
}

function addOuter(target: number[][], row: readonly number[], mean: readonly number[], weight: number): void {
  for (let i = 0; i < mean.length; i++) {
    for (let j = 0; j < mean.length; j++) target[i][j] += weight * (row[i] - mean[i]) * (row[j] - mean[j]);
  }
}
