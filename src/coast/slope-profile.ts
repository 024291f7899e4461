import { fitContinuum, fitMixture, goldenSection, type Mixture } from '../zones/index.js';

/** Number of zones of a model, or the continuum. */
export type Model = number | 'continuum';

/** Bed means, their errors, and the value of the gradient's column less its mean, one a bed. */
export interface BedsOnGradient {
  readonly values: readonly number[];
  readonly errors: readonly number[];
  readonly gradient: readonly number[];
}

/** Bed means with a slope taken out. */
export function takeOut({ values, gradient }: BedsOnGradient, slope: number): number[] {
  return values.map((value, at) => value - slope * gradient[at]);
}

/**
 * Log-likelihood of one model over slopes, each fit starting from the one at the nearest slope tried before, which takes a
 * few iterations where a start from nothing takes hundreds. Beyond `reach` of any slope tried, it starts from nothing.
 */
export function slopeProfile(beds: BedsOnGradient, model: Model, reach: number): (slope: number) => number {
  if (model === 'continuum') {
    return (slope) => fitContinuum(takeOut(beds, slope), beds.errors, 1e-7).logLikelihood;
  }
  const tried: { readonly slope: number; readonly fit: Mixture }[] = [];
  return (slope) => {
    let nearest: (typeof tried)[number] | null = null;
    for (const one of tried) {
      if (nearest === null || Math.abs(one.slope - slope) < Math.abs(nearest.slope - slope)) nearest = one;
    }
    const near = nearest !== null && Math.abs(nearest.slope - slope) <= reach ? nearest.fit : undefined;
    const fit = fitMixture(takeOut(beds, slope), beds.errors, model, { tolerance: 1e-7, near });
    tried.push({ slope, fit });
    return fit.logLikelihood;
  };
}

/** Top of a function near a start: steps uphill to bracket it, then golden sections to `precision`. */
export function climb(f: (x: number) => number, start: number, step: number, precision: number): number {
  let [low, middle, high] = [start - step, start, start + step];
  let [fLow, fMiddle, fHigh] = [f(low), f(middle), f(high)];
  for (let turn = 0; turn < 40 && fLow > fMiddle; turn++) {
    [high, fHigh, middle, fMiddle] = [middle, fMiddle, low, fLow];
    low -= step;
    fLow = f(low);
  }
  for (let turn = 0; turn < 40 && fHigh > fMiddle; turn++) {
    [low, fLow, middle, fMiddle] = [middle, fMiddle, high, fHigh];
    high += step;
    fHigh = f(high);
  }
  return goldenSection(f, low, high, precision);
}

/** Where a profile has fallen to a level, going outwards from its top; the sign of `step` is the way. */
export function profileEnd(f: (x: number) => number, top: number, level: number, step: number): number {
  let inside = top;
  let outside = top + step;
  let stride = step;
  for (let turn = 0; turn < 60 && f(outside) > level; turn++) {
    inside = outside;
    stride *= 1.2;
    outside += stride;
  }
  for (let turn = 0; turn < 14; turn++) {
    const middle = (inside + outside) / 2;
    if (f(middle) > level) inside = middle;
    else outside = middle;
  }
  return (inside + outside) / 2;
}
