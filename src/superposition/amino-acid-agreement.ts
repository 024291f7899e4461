import { inverse as inverseOf, Matrix } from 'ml-matrix';
import { type RobustCurve, robustCurve } from '../screening/index.js';
import { chiSquaredCdf, chiSquaredQuantile, fUpperTail, median, robustSd } from '../statistics/index.js';

/** Whether the amino acids of one shell tell the same extent of racemization. */
export interface Agreement {
  /** Probability of so large a disagreement in a sound shell. */
  readonly p: number;
  /**
   * How far each amino acid is off what the shell's own extent asks for, in robust standard deviations; positive is too
   * high. NaN for an amino acid that took no part.
   */
  readonly deviations: readonly number[];
}

/** Complete shells beyond the number of amino acids that are needed to know how sound shells vary. */
const FEWEST_SPARE_SHELLS = 10;
/** Share of the shells on which an amino acid must be measured to take part. */
const SHARE_MEASURED = 0.8;
/** Share of shells that the covariance is taken from. */
const CORE = 0.975;

/**
 * Tests for every shell whether its amino acids agree: whether their log ratios fit one extent of racemization. What
 * belongs together is learned from the clock's own beds, as a robust curve of each amino acid's bed median against x;
 * how sound shells vary about the curves is the trimmed covariance of all complete shells, so errors that amino acids
 * share are not taken for independent. The Mahalanobis distance from the curve, on one dimension fewer than amino
 * acids (the extent itself is free), follows an F distribution in sound shells. A shell of another zone lies on the
 * curve, far along; an altered or contaminated shell lies off it.
 *
 * @param logs Log ratios, one row a shell, one column an amino acid; NaN where not measured.
 * @param x The clock's log ratio of each shell.
 * @param bed Bed of each shell.
 * @param weights Weight of each amino acid in x.
 * @returns One entry a shell. An amino acid measured on fewer than 80 % of the shells takes no part. Null where one
 * that does is missing, where there is only one, or where fewer than 10 shells beyond the number of amino acids are
 * complete.
 */
export function aminoAcidAgreement(
  logs: readonly (readonly number[])[],
  x: readonly number[],
  bed: readonly number[],
  weights: readonly number[],
): (Agreement | null)[] {
  if (weights.length < 2) return logs.map(() => null);
  const known = logs.filter((_, i) => Number.isFinite(x[i]));
  const columns = weights.flatMap((_, a) =>
    known.filter((row) => Number.isFinite(row[a])).length >= SHARE_MEASURED * known.length ? [a] : [],
  );
  const answers = agreementOfComplete(
    logs.map((row) => columns.map((a) => row[a])),
    x,
    bed,
    columns.map((a) => weights[a]),
  );
  return answers.map((answer) => {
    if (answer === null) return null;
    const deviations = weights.map((_, a) =>
      columns.includes(a) ? answer.deviations[columns.indexOf(a)] : Number.NaN,
    );
    return { p: answer.p, deviations };
  });
}

function agreementOfComplete(
  logs: readonly (readonly number[])[],
  x: readonly number[],
  bed: readonly number[],
  weights: readonly number[],
): (Agreement | null)[] {
  const size = weights.length;
  const complete = logs.map((row) => row.length === size && row.every(Number.isFinite));
  const rows = logs.map((_, i) => i).filter((i) => complete[i] && Number.isFinite(x[i]));
  if (size < 2 || rows.length < size + FEWEST_SPARE_SHELLS) return logs.map(() => null);
  const curves = curvesOf(logs, x, bed, rows, size);
  const raw = rows.map((i) => curves.map((curve, a) => logs[i][a] - curve(x[i])));
  const centre = curves.map((_, a) => median(raw.map((row) => row[a])));
  const errors = raw.map((row) => row.map((value, a) => value - centre[a]));
  // The weighted sum of the errors is about 0, so one amino acid says nothing new: leave out the heaviest.
  const heaviest = weights.reduce((best, weight, a) => (Math.abs(weight) > Math.abs(weights[best]) ? a : best), 0);
  const used = weights.map((_, a) => a).filter((a) => a !== heaviest);
  const { inverse, kept } = trimmedCovariance(errors.map((row) => used.map((a) => row[a])));
  const sds = curves.map((_, a) => robustSd(errors.map((row) => row[a])));
  const answers = logs.map((): Agreement | null => null);
  rows.forEach((i, at) => {
    const distance = quadratic(
      used.map((a) => errors[at][a]),
      inverse,
    );
    const free = kept - used.length;
    const p = fUpperTail((distance * free) / (used.length * (kept + 1)), used.length, free);
    answers[i] = { p, deviations: errors[at].map((value, a) => (sds[a] > 0 ? value / sds[a] : 0)) };
  });
  return answers;
}

/** Each amino acid against x over bed medians; a step of one for one where the beds span too little to tell. */
function curvesOf(
  logs: readonly (readonly number[])[],
  x: readonly number[],
  bed: readonly number[],
  rows: readonly number[],
  size: number,
): ((x: number) => number)[] {
  const members = new Map<number, number[]>();
  for (const i of rows) members.set(bed[i], [...(members.get(bed[i]) ?? []), i]);
  const groups = [...members.values()];
  const xs = groups.map((group) => median(group.map((i) => x[i])));
  const within = median(
    groups.flatMap((group, g) => (group.length > 1 ? group.map((i) => Math.abs(x[i] - xs[g])) : [0])),
  );
  const spans = groups.length >= 6 && Math.max(...xs) - Math.min(...xs) > 6 * within;
  const middle = median(xs);
  return Array.from({ length: size }, (_, a) => {
    const values = groups.map((group) => median(group.map((i) => logs[i][a])));
    if (!spans) {
      const level = median(values.map((value, g) => value - xs[g]));
      return (at: number) => level + at;
    }
    const curve: RobustCurve = robustCurve(
      xs.map((value) => value - middle),
      values,
    );
    return (at: number) => curve.at(at - middle);
  });
}

/** Covariance about 0 of the central 97.5 % of the rows, made good for the trimming, and inverted. */
function trimmedCovariance(rows: readonly (readonly number[])[]): { inverse: number[][]; kept: number } {
  const size = rows[0].length;
  const limit = chiSquaredQuantile(CORE, size);
  const shrinkage = CORE / chiSquaredCdf(limit, size + 2);
  let inverse = invert(
    Array.from({ length: size }, (_, a) => {
      const sd = Math.max(1e-6, robustSd(rows.map((row) => row[a])));
      return Array.from({ length: size }, (__, b) => (a === b ? sd * sd : 0));
    }),
  );
  let kept = 0;
  for (let turn = 0; turn < 30; turn++) {
    const core = rows.filter((row) => quadratic(row, inverse) <= limit);
    if (core.length <= 2 * size) break;
    const covariance = Array.from({ length: size }, (_, a) =>
      Array.from({ length: size }, (__, b) => {
        const value = core.reduce((sum, row) => sum + row[a] * row[b], 0) / core.length;
        return shrinkage * value + (a === b ? 1e-12 : 0);
      }),
    );
    inverse = invert(covariance);
    if (core.length === kept) break;
    kept = core.length;
  }
  return { inverse, kept: Math.max(kept, size + 1) };
}

function quadratic(row: readonly number[], matrix: readonly (readonly number[])[]): number {
  return row.reduce((sum, a, i) => sum + a * row.reduce((inner, b, j) => inner + b * matrix[i][j], 0), 0);
}

const invert = (matrix: number[][]): number[][] => inverseOf(new Matrix(matrix)).to2DArray();
