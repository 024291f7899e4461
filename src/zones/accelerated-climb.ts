import { expectation, type MixtureData, type MixtureState, maximisation } from './em-step.js';

/** Where a climb ended. */
export interface Summit {
  readonly state: MixtureState;
  readonly logLikelihood: number;
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
export function acceleratedClimb(
  data: MixtureData,
  start: MixtureState,
  responsibilities: Float64Array,
  tolerance: number,
  steps: number,
): Summit {
  let state = start;
  let before = Number.NEGATIVE_INFINITY;
  for (let step = 0; step < steps; step += 3) {
    const low = expectation(data, state, responsibilities);
    const first = maximisation(data, state, responsibilities);
    const middle = expectation(data, first, responsibilities);
    if (!(middle - low >= tolerance) && step > 0) {
      return { state: first, logLikelihood: middle, responsibilities };
    }
    const second = maximisation(data, first, responsibilities);
    const leap = extrapolate(state, first, second);
    if (leap === null) {
      state = second;
      continue;
    }
    const far = expectation(data, leap, responsibilities);
    state = far >= middle ? maximisation(data, leap, responsibilities) : second;
    before = middle;
  }
  const logLikelihood = expectation(data, state, responsibilities);
  return { state, logLikelihood: Math.max(logLikelihood, before), responsibilities };
}

/** The parameters that the last two steps point to, or null where they leave their range. The spread counts as tau. */
function extrapolate(from: MixtureState, first: MixtureState, second: MixtureState): MixtureState | null {
  const k = from.means.length;
  const [a, b, c] = [from, first, second].map(({ means, weights, tau2 }) => [...means, ...weights, Math.sqrt(tau2)]);
  let steps = 0;
  let bends = 0;
  for (let at = 0; at < a.length; at++) {
    steps += (b[at] - a[at]) ** 2;
    bends += (c[at] - 2 * b[at] + a[at]) ** 2;
  }
  if (!(bends > 0) || !(steps > bends)) return null;
  const length = Math.sqrt(steps / bends);
  const leap = a.map((value, at) => {
    const step = b[at] - value;
    return value + 2 * length * step + length ** 2 * (c[at] - 2 * b[at] + value);
  });
  const weights = leap.slice(k, 2 * k);
  const tau = leap[2 * k];
  if (!weights.every((weight) => weight > 0 && weight < 1) || !(tau >= 0)) return null;
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return {
    means: Float64Array.from(leap.slice(0, k)),
    weights: Float64Array.from(weights, (weight) => weight / sum),
    tau2: tau * tau,
  };
}
