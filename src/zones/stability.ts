import type { Task } from '../model/index.js';
import { createRandom, type Random } from '../statistics/index.js';
import { type Assignment, assignmentOf, type ZonePriors, zoneAssigner } from './assignment.js';
import { fitMixture, type Mixture } from './mixture.js';
import { sharedOut } from './shared-out.js';
import { unbiasedSpread } from './zone-errors.js';
import { bestLabels } from './zoning.js';

/** Argument of {@link bootstrapZones}: plain data, so that it can go to a worker. */
export interface BootstrapZonesArgument {
  /** Bed means of log ratios, their standard errors and numbers of shells. */
  readonly values: readonly number[];
  readonly errors: readonly number[];
  readonly shells: readonly number[];
  /** Residuals of single shells about their beds, scaled to the pooled scatter; empty where only summaries are known. */
  readonly residuals: ArrayLike<number>;
  /** The fit in use. */
  readonly fit: { readonly means: readonly number[]; readonly weights: readonly number[]; readonly tau: number };
  /** Most probable zone of each bed in that fit. */
  readonly labels: readonly number[];
  readonly seed: number;
  /** Repeats `first` … `first + repeats − 1`: each draws from a stream of its own, whoever runs it. */
  readonly first: number;
  readonly repeats: number;
}

/** What one bootstrap gives. */
export interface BootstrapZones {
  /** Jaccard similarity of each zone with the most similar zone found again; null where none of its beds was drawn. */
  readonly jaccard: readonly (number | null)[];
  /** The zones found from the drawn beds with the means they have: how much zones vary with the beds that were sampled. */
  readonly priors: ZonePriors;
}

/**
 * Draws beds with replacement, and for each drawn bed its shells anew: as many residuals, with replacement, from those of
 * all shells about their beds, since a bed's own four or five shells would make too small an error. Finds the same number
 * of zones again and compares them, over the beds drawn, with the zones in use (Hennig 2007,
 * doi:10.1016/j.csda.2006.11.025). A task for the host: pure, from plain data to plain data.
 */
export function bootstrapZones(argument: BootstrapZonesArgument): BootstrapZones[] {
  const random = createRandom(argument.seed);
  return Array.from({ length: argument.repeats }, (_, at) => repeat(argument, random.fork(argument.first + at)));
}

function repeat({ values, errors, shells, residuals, fit, labels }: BootstrapZonesArgument, random: Random) {
  const drawn = values.map(() => random.integer(values.length));
  const quick = { near: fit, tolerance: 1e-5, iterations: 300 };
  const means = drawn.map((bed) => values[bed] + meanError(errors[bed], shells[bed], residuals, random));
  const drawnErrors = drawn.map((bed) => errors[bed]);
  const again = fitMixture(means, drawnErrors, fit.means.length, quick);
  const found = bestLabels(again, drawn.length);
  // a bed drawn twice may fall into two zones: its first draw speaks for it
  const seen = new Uint8Array(values.length);
  const first: number[] = [];
  drawn.forEach((bed, at) => {
    if (seen[bed] === 0) first.push(at);
    seen[bed] = 1;
  });
  const k = fit.means.length;
  const both = new Uint32Array(k * k);
  const inZone = new Uint32Array(k);
  const inOther = new Uint32Array(k);
  for (const at of first) {
    const zone = labels[drawn[at]];
    const other = found[at];
    both[zone * k + other]++;
    inZone[zone]++;
    inOther[other]++;
  }
  const jaccard = fit.means.map((_, zone) => {
    if (inZone[zone] === 0) return null;
    const similarities = fit.means.map((_, other) => {
      const shared = both[zone * k + other];
      return shared / (inZone[zone] + inOther[other] - shared);
    });
    return Math.max(...similarities);
  });
  // the beds' means hold their shells' errors already: drawing shells anew as well would count those errors twice
  const asMeasured = drawn.map((bed) => values[bed]);
  return { jaccard, priors: priorsOf(fitMixture(asMeasured, drawnErrors, fit.means.length, quick)) };
}

function meanError(error: number, shells: number, residuals: ArrayLike<number>, random: Random): number {
  if (residuals.length < 10) return error * random.normal();
  let sum = 0;
  for (let shell = 0; shell < shells; shell++) sum += residuals[random.integer(residuals.length)];
  return sum / shells;
}

function priorsOf(fit: Mixture): ZonePriors {
  const { means, weights } = fit;
  const beds = fit.responsibilities.length / fit.k;
  // drawing beds more than once shrinks their spread about the zones by (n − K)/n again
  const tau = unbiasedSpread(fit, beds) * Math.sqrt(beds / Math.max(1, beds - fit.k));
  return { means, weights, tau, se: means.map(() => 0) };
}

/** Tasks at least, so that they can be shared out, and most repeats a task. */
const TASKS = 4;
const REPEATS_A_TASK = 50;

/** Beds drawn in a task that is worth a thread: a twentieth of a second. */
const HEAVY = 5000;

/**
 * The tasks of a bootstrap of zones, for the host to map; their results, joined, go to {@link stabilityOf} and
 * {@link sameZone}.
 * @param argument the common part
 * @param repeats in all. Default 200
 */
export function stabilityTasks(argument: Omit<BootstrapZonesArgument, 'first' | 'repeats'>, repeats = 200): Task[] {
  const size = Math.max(1, Math.min(REPEATS_A_TASK, Math.ceil(repeats / TASKS)));
  return sharedOut(repeats, size).map((part) => {
    const heavy = size * argument.values.length > HEAVY;
    return { name: 'bootstrapZones', argument: { ...argument, ...part }, heavy };
  });
}

/**
 * Stability of each zone: its mean Jaccard similarity over the bootstraps, 0 to 1. Under 0.6 a zone should not be believed;
 * from 0.75 up it is a stable pattern, from 0.85 highly so (Hennig 2007).
 * @example
 * stabilityOf([{ jaccard: [1, 0.5], priors: { means: [], weights: [], tau: 0, se: [] } }, { jaccard: [0.8, null], priors: { means: [], weights: [], tau: 0, se: [] } }]) // => [0.9, 0.5]
 */
export function stabilityOf(bootstraps: readonly BootstrapZones[]): (number | null)[] {
  return (bootstraps[0]?.jaccard ?? []).map((_, zone) => {
    const known = bootstraps.flatMap(({ jaccard }) => (jaccard[zone] === null ? [] : [jaccard[zone]!]));
    return known.length === 0 ? null : known.reduce((sum, value) => sum + value, 0) / known.length;
  });
}

/**
 * Probability that two beds share a zone: the posterior chance Σ_j P(a in j) P(b in j) with each bed's own mean and error,
 * averaged over the zones that the bootstraps found again, so that the doubt about the zones themselves counts.
 * @returns n × n, row by row; 1 on the diagonal
 */
export function sameZone(
  values: readonly number[],
  errors: readonly number[],
  bootstraps: readonly BootstrapZones[],
): Float64Array {
  const n = values.length;
  // the chances of a bed over all bootstraps side by side: then one long sum a pair is all there is to do
  const width = bootstraps.reduce((sum, { priors }) => sum + priors.means.length, 0);
  const chances = new Float64Array(n * width);
  let from = 0;
  for (const { priors } of bootstraps) {
    const assign = zoneAssigner(priors);
    for (let bed = 0; bed < n; bed++) chances.set(assign(values[bed], errors[bed]).probabilities, bed * width + from);
    from += priors.means.length;
  }
  const same = new Float64Array(n * n);
  for (let a = 0; a < n; a++) {
    const own = chances.subarray(a * width, (a + 1) * width);
    for (let b = 0; b < a; b++) {
      const shared = sumOfProducts(own, chances.subarray(b * width, (b + 1) * width)) / bootstraps.length;
      // many small shares may add up to a hair above 1
      same[a * n + b] = same[b * n + a] = Math.min(1, shared);
    }
    same[a * n + a] = 1;
  }
  return same;
}

function sumOfProducts(a: Float64Array, b: Float64Array): number {
  // several sums side by side need not wait for each other
  let [first, second, third, fourth] = [0, 0, 0, 0];
  const whole = a.length - (a.length % 4);
  for (let i = 0; i < whole; i += 4) {
    first += a[i] * b[i];
    second += a[i + 1] * b[i + 1];
    third += a[i + 2] * b[i + 2];
    fourth += a[i + 3] * b[i + 3];
  }
  let sum = first + second + (third + fourth);
  for (let i = whole; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

/**
 * Gives the zone of a bed or shell, its probabilities averaged over the zones that the bootstraps found again. The zones of
 * the fit alone make probabilities too sure where zones come close; here the doubt about the zones counts.
 * @returns takes a log ratio and its standard error. Few errors come again and again, so what hangs on them is kept
 */
export function assignerOverDraws(bootstraps: readonly BootstrapZones[]): (x: number, error: number) => Assignment {
  const k = bootstraps[0].priors.means.length;
  const means = Float64Array.from(bootstraps.flatMap(({ priors }) => priors.means));
  const byError = new Map<number, { readonly halves: Float64Array; readonly constants: Float64Array }>();
  const partsFor = (error: number) => {
    const known = byError.get(error);
    if (known !== undefined) return known;
    const halves = new Float64Array(means.length);
    const constants = new Float64Array(means.length);
    bootstraps.forEach(({ priors: { weights, se, tau } }, draw) => {
      for (let j = 0; j < k; j++) {
        const variance = Math.max(tau ** 2 + error ** 2 + se[j] ** 2, 1e-18);
        halves[draw * k + j] = 0.5 / variance;
        constants[draw * k + j] = Math.log(Math.max(weights[j], 1e-300)) - 0.5 * Math.log(variance);
      }
    });
    const parts = { halves, constants };
    byError.set(error, parts);
    return parts;
  };
  const own = new Float64Array(k);
  return (x, error) => {
    const { halves, constants } = partsFor(error);
    const probabilities = new Array<number>(k).fill(0);
    for (let at = 0; at < means.length; at += k) {
      let largest = Number.NEGATIVE_INFINITY;
      for (let j = 0; j < k; j++) {
        const off = x - means[at + j];
        own[j] = constants[at + j] - halves[at + j] * off * off;
        if (own[j] > largest) largest = own[j];
      }
      let sum = 0;
      for (let j = 0; j < k; j++) {
        own[j] = Math.exp(own[j] - largest);
        sum += own[j];
      }
      for (let j = 0; j < k; j++) probabilities[j] += own[j] / (sum * bootstraps.length);
    }
    return assignmentOf(probabilities);
  };
}

/**
 * Standard errors of zone means for the interval dl_low to dl_high: where zones come close, beds change hands from one
 * drawn sample to the next, and means vary more than the beds of fixed zones would say. The square is the mean of both
 * squares, and never under that of fixed zones, since a bootstrap of few beds comes out small.
 * @param se errors of fixed zones
 */
export function zoneMeanErrors(se: readonly number[], bootstraps: readonly BootstrapZones[]): number[] {
  if (bootstraps.length < 2) return [...se];
  return se.map((error, zone) => {
    const means = bootstraps.map(({ priors }) => priors.means[zone]);
    const centre = means.reduce((sum, mean) => sum + mean, 0) / means.length;
    const variance = means.reduce((sum, mean) => sum + (mean - centre) ** 2, 0) / (means.length - 1);
    return Math.max(error, Math.sqrt((error ** 2 + variance) / 2));
  });
}
