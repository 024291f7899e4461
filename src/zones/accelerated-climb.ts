import { emptyMoments, expectation, type MixtureData, type MixtureState, maximisation } from './em-step.js';

/** Where a climb ended. */
export interface Summit {
  readonly state: MixtureState;
  readonly logLikelihood: number;
  /** Share of zone j in bed b at `b * k + j`. */
  readonly responsibilities: Float64Array;
}

/**
 * Climbs the likelihood by pairs of EM steps and the squared extrapolation from them (Varadhan and Roland 2008, scheme S3,
 * doi:10.1111/j.1467-9469.2007.00585.x), which plain EM needs where zones lie close or are too many. An extrapolation that
 * leaves the range of the parameters, or that lies lower than the steps it came from, is not taken; so the likelihood
 * never falls.
 * @param tolerance stop when a plain step gains less than this
 * @param steps most EM steps
 */
export function acceleratedClimb(data: MixtureData, start: MixtureState, tolerance: number, steps: number): Summit {
  const k = start.means.length;
  const moments = emptyMoments(data, k);
  const responsibilities = new Float64Array(data.values.length * k);
  let state = start;
  for (let step = 0; step < steps; step += 3) {
    const low = expectation(data, state, moments);
    const first = maximisation(data, state, moments);
    const middle = expectation(data, first, moments);
    if (!(middle - low >= tolerance) && step > 0) {
      state = first;
      break;
    }
    const second = maximisation(data, first, moments);
    const leap = extrapolate(state, first, second);
    state = second;
    if (leap !== null && expectation(data, leap, moments) >= middle) state = maximisation(data, leap, moments);
  }
  const logLikelihood = expectation(data, state, moments, responsibilities);
  return { state, logLikelihood, responsibilities };
}

/** The parameters that the last two steps point to, or null where they leave their range. The spread counts as tau. */
function extrapolate(from: MixtureState, first: MixtureState, second: MixtureState): MixtureState | null {
  const k = from.means.length;
  const taus = [from, first, second].map(({ tau2 }) => Math.sqrt(tau2));
  let steps = (taus[1] - taus[0]) ** 2;
  let bends = (taus[2] - 2 * taus[1] + taus[0]) ** 2;
  for (const part of ['means', 'weights'] as const) {
    const [a, b, c] = [from[part], first[part], second[part]];
    for (let j = 0; j < k; j++) {
      steps += (b[j] - a[j]) ** 2;
      bends += (c[j] - 2 * b[j] + a[j]) ** 2;
    }
  }
  if (!(bends > 0) || !(steps > bends)) return null;
  const length = Math.sqrt(steps / bends);
  const leap = (a: number, b: number, c: number) => a + 2 * length * (b - a) + length ** 2 * (c - 2 * b + a);
  const tau = leap(taus[0], taus[1], taus[2]);
  if (!(tau >= 0)) return null;
  const means = new Float64Array(k);
  const weights = new Float64Array(k);
  let sum = 0;
  for (let j = 0; j < k; j++) {
    means[j] = leap(from.means[j], first.means[j], second.means[j]);
    weights[j] = leap(from.weights[j], first.weights[j], second.weights[j]);
    if (!(weights[j] > 0 && weights[j] < 1)) return null;
    sum += weights[j];
  }
  for (let j = 0; j < k; j++) weights[j] /= sum;
  return { means, weights, tau2: tau * tau };
}
