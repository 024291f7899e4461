import { Matrix, pseudoInverse } from 'ml-matrix';
import { studentTQuantile } from '../statistics/index.js';
import { type BedsOnGradient, takeOut } from './slope-profile.js';

/** What the beds of one section share beyond zone and slope, and what that does to the slope's error. */
export interface SectionWidening {
  /** Standard deviation of what all beds of one section share, log ratios. */
  readonly sharedSd: number;
  /** Factor by which the interval of the slope is wider than without it and without counting the zones' own fit; at least 1. */
  readonly factor: number;
}

/**
 * How much wider the interval of a slope must be because the beds of one section share one temperature history. The profile
 * takes every bed for a witness of its own; where sections differ by something of their own, sections are the witnesses. With the
 * zones as found, x = μ_zone + β g + u_section + e is a linear model; the variances of u and of the spread in e are
 * estimated by equating two quadratic forms of the residuals (all squares, and products within sections) with their
 * expectations, which also puts right that a spread fitted together with zones comes out too small (Searle, Casella and
 * McCulloch 1992, Variance Components, chapter 5, from memory). Degrees of freedom are Satterthwaite's.
 * @param labels zone of each bed
 * @param tau spread that the profile rests on
 * @param slope as fitted
 * @param sections number of the section of each bed
 */
export function sectionWidening(
  beds: BedsOnGradient,
  labels: readonly number[],
  tau: number,
  slope: number,
  sections: readonly number[],
): SectionWidening {
  const n = labels.length;
  const zones = [...new Set(labels)];
  const parameters = zones.length + 1;
  const count = new Set(sections).size;
  if (!(n > parameters)) return { sharedSd: 0, factor: 1 };
  const known = Matrix.columnVector(beds.errors.map((se) => se * se));
  const weights = beds.errors.map((se) => 1 / Math.max(se * se + tau * tau, 1e-12));
  const design = new Matrix(
    labels.map((zone, at) => [beds.gradient[at], ...zones.map((one) => (one === zone ? 1 : 0))]),
  );
  const weighted = new Matrix(labels.map((_, at) => design.getRow(at).map((value) => value * weights[at])));
  // rows: what each parameter takes of each bed
  const takes = pseudoInverse(design.transpose().mmul(weighted)).mmul(weighted.transpose());
  const maker = Matrix.eye(n).sub(design.mmul(takes));
  const residuals = maker.mmul(Matrix.columnVector(takeOut(beds, slope))).to1DArray();
  const same = (i: number, j: number): boolean => sections[i] === sections[j];
  const shared = new Matrix(n, n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) shared.set(i, j, same(i, j) ? 1 : 0);
  const ofErrors = maker.mmul(Matrix.diag(known.to1DArray())).mmul(maker.transpose());
  const ofSpread = maker.mmul(maker.transpose());
  const ofShared = maker.mmul(shared).mmul(maker.transpose());
  const within = (matrix: Matrix): number => {
    let sum = 0;
    for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) if (i !== j && same(i, j)) sum += matrix.get(i, j);
    return sum;
  };
  let products = 0;
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) if (i !== j && same(i, j)) products += residuals[i] * residuals[j];
  const squares = residuals.reduce((sum, r) => sum + r * r, 0) - ofErrors.trace();
  const crossed = products - within(ofErrors);
  const [a, b, c, d] = [ofSpread.trace(), ofShared.trace(), within(ofSpread), within(ofShared)];
  // with two sections nothing tells a section's own from the slope
  let sharedVariance = count > 2 ? (a * crossed - c * squares) / (a * d - b * c) : 0;
  if (!(sharedVariance > 0)) sharedVariance = 0;
  let spread = (squares - b * sharedVariance) / a;
  if (!(spread > 0)) spread = 0;
  const take = takes.getRow(0);
  const sums = new Map<number, number>();
  take.forEach((value, at) => {
    sums.set(sections[at], (sums.get(sections[at]) ?? 0) + value);
  });
  const ofSections = sharedVariance * [...sums.values()].reduce((sum, value) => sum + value * value, 0);
  const ofBeds = take.reduce((sum, value, at) => sum + value * value * (beds.errors[at] ** 2 + spread), 0);
  const assumed = take.reduce((sum, value, at) => sum + value * value * (beds.errors[at] ** 2 + tau * tau), 0);
  const share = ofSections / (ofSections + ofBeds);
  const free = Math.max(2, n - parameters);
  const df = 1 / (share ** 2 / Math.max(1, count - 2) + (1 - share) ** 2 / free);
  const factor =
    (Math.sqrt((ofSections + ofBeds) / assumed) * studentTQuantile(0.975, df)) / studentTQuantile(0.975, free);
  return { sharedSd: Math.sqrt(sharedVariance), factor: Number.isFinite(factor) ? Math.max(1, factor) : 1 };
}
