import { normalCdf, normalQuantile, studentTQuantile } from '../statistics/index.js';

/** Two bed means and what stands behind them. All variances and differences in log ratios. */
export interface PairDesign {
  /** True difference of the two beds; its sign is of no account. */
  readonly gap: number;
  /** Standard deviation between the shells of one bed. */
  readonly scatter: number;
  /** Number of shells of either bed. */
  readonly shells: readonly [number, number];
  /** Variance of the difference that more shells don't lessen but repeated surveys would draw anew. Default 0. */
  readonly fixedVariance?: number;
  /** Variance that the judge of the pair adds for spread between beds, 2 tau²; the gap holds it already. Default 0. */
  readonly spreadVariance?: number;
  /** Degrees of freedom of the pooled scatter; `own` takes those of the two beds alone. Default Infinity (scatter known). */
  readonly df?: number | 'own';
}

/** When a pair counts as resolved. */
export interface ResolvingRule {
  /** Level. Default 0.05. */
  readonly alpha?: number;
  /** 1 where the pair is resolved when either bed is older at 1 − alpha; 2 for a two-sided test at alpha. Default 1. */
  readonly sides?: 1 | 2;
}

/**
 * Chance that a survey with these shells resolves the pair the right way round: that the difference of the two means
 * exceeds its limit times its standard error, the standard error being worked out from the pooled scatter that the
 * survey itself finds. The limit is that of Student's t at the degrees of freedom of the scatter (for the part of the
 * standard error that is spread between beds, of the normal), as the order of the beds has it. With no spread and
 * `df: 'own'` this is the power of the two-sample t test, by the noncentral t; the integral over the scatter is taken by
 * Simpson's rule.
 *
 * Source: Cohen 1988, Statistical power analysis for the behavioral sciences, 2nd ed., chapter 2; noncentral t as an
 * integral over the scatter: Johnson, Kotz and Balakrishnan 1995, Continuous univariate distributions 2, chapter 31.
 *
 * @throws RangeError when the scatter is not above 0, a bed has under 1 shell, or alpha is not between 0 and 1
 * @example
 * ```ts
 * // R: power.t.test(n = 20, delta = 1, sd = 1)
 * resolvingPower({ gap: 1, scatter: 1, shells: [20, 20], df: 'own' }, { sides: 2 }); // => 0.8689528
 * ```
 */
export function resolvingPower(design: PairDesign, rule: ResolvingRule = {}): number {
  return powerOf(atFoundScatter(design, rule));
}

/** Chance that a scatter is found so small that {@link powerReaches} sets it aside: e to the power of minus this. */
const SET_ASIDE = 7;

/**
 * Whether {@link resolvingPower} is `wanted` or more. Most designs that fall short are told at once: the smaller the scatter
 * a survey finds, the more it resolves, so its power is at most what it has at a scatter that is very rarely undercut, and
 * that rare chance beside it.
 *
 * Source: tail of χ², P(χ²/df ≤ 1 − 2√(x/df)) ≤ e⁻ˣ, Laurent and Massart 2000, Annals of Statistics 28, 1302–1338,
 * 10.1214/aos/1015957395, lemma 1.
 */
export function powerReaches(design: PairDesign, wanted: number, rule: ResolvingRule = {}): boolean {
  const found = atFoundScatter(design, rule);
  const rarelyBelow = Math.sqrt(Math.max(0, 1 - 2 * Math.sqrt(SET_ASIDE / found.df)));
  if (found.df >= 1 && found.chance(rarelyBelow) + Math.exp(-SET_ASIDE) < wanted) return false;
  return powerOf(found) >= wanted;
}

/** A pair, and the scatter that a survey finds. */
interface FoundScatter {
  /** Degrees of freedom of the scatter; under 1 nothing is resolved. */
  readonly df: number;
  /** Chance to resolve the pair where the scatter is found to be `share` of the true one. */
  readonly chance: (share: number) => number;
}

function powerOf({ df, chance }: FoundScatter): number {
  if (!(df >= 1)) return 0;
  return df > 1e4 ? chance(1) : meanOverScatter(chance, df);
}

function atFoundScatter(design: PairDesign, rule: ResolvingRule): FoundScatter {
  const { gap, scatter, shells, fixedVariance = 0, spreadVariance = 0 } = design;
  const alpha = rule.alpha ?? 0.05;
  if (!(scatter > 0)) throw new RangeError(`resolvingPower: scatter must be above 0, got ${scatter}`);
  if (!(shells[0] >= 1 && shells[1] >= 1)) {
    throw new RangeError(`resolvingPower: either bed needs a shell, got ${shells.join(' and ')}`);
  }
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`resolvingPower: alpha must lie between 0 and 1, got ${alpha}`);
  const df = design.df === 'own' ? shells[0] + shells[1] - 2 : (design.df ?? Number.POSITIVE_INFINITY);
  if (!(df >= 1)) return { df, chance: () => 0 };
  const p = 1 - alpha / (rule.sides ?? 1);
  const limit = resolvingLimit(p, df);
  const fromSpread = normalQuantile(p) ** 2 * spreadVariance;
  const sampling = scatter * scatter * (1 / shells[0] + 1 / shells[1]);
  const noise = Math.sqrt(sampling + fixedVariance);
  const chance = (share: number) =>
    normalCdf(
      (Math.abs(gap) - Math.sqrt(limit ** 2 * (sampling * share * share + fixedVariance) + fromSpread)) / noise,
    );
  return { df, chance };
}

/** Limits found before. The same few degrees of freedom come up for pair after pair, and a quantile is slow to find. */
const limits = new Map<string, number>();

/** Standard errors by which two means must differ to be resolved at probability p: of Student's t, or the normal. */
export function resolvingLimit(p: number, df: number): number {
  if (df >= 1e4) return normalQuantile(p);
  const key = `${p} ${df}`;
  let limit = limits.get(key);
  if (limit === undefined) {
    limit = studentTQuantile(p, df);
    if (limits.size >= 1000) limits.clear();
    limits.set(key, limit);
  }
  return limit;
}

/** Mean of a function of w, where w is a standard deviation found on df degrees of freedom over the true one. */
function meanOverScatter(value: (share: number) => number, df: number): number {
  const reach = 8 / Math.sqrt(2 * df);
  const low = Math.max(0, 1 - reach);
  // the density narrows as df grows, and the function hardly bends over it
  const steps = df > 100 ? 60 : 240;
  const step = (1 + reach - low) / steps;
  let sum = 0;
  let weights = 0;
  for (let i = 0; i <= steps; i++) {
    const w = low + i * step;
    // chi density up to a constant, 1 at w = 1, so that no gamma function is needed
    const density =
      w === 0 ? (df === 1 ? Math.exp(0.5) : 0) : Math.exp((df - 1) * Math.log(w) - (df * (w * w - 1)) / 2);
    const weight = density * (i === 0 || i === steps ? 1 : i % 2 === 1 ? 4 : 2);
    sum += weight * value(w);
    weights += weight;
  }
  return sum / weights;
}

/** Present numbers for {@link chanceFromHere}. */
export interface PresentPair {
  /** Measured difference. */
  readonly gap: number;
  /** Variance of that difference now, and with the new shells, from the shells alone. */
  readonly variance: number;
  readonly varianceAfter: number;
  /** Variance that the judge of the pair adds for spread between beds. Default 0. */
  readonly spreadVariance?: number;
  /** Standard errors from the shells by which a resolved pair differs ({@link resolvingLimit}). Default: of the normal. */
  readonly limit?: number;
}

/**
 * Chance that new shells resolve a pair, either way round, starting from the gap measured now and counting that this
 * gap is itself uncertain. Under a flat prior the measured gap moves from one survey to the larger one by a normal step
 * of variance `variance − varianceAfter`; the chance is that it then stands beyond the limit.
 *
 * Source: the assurance of a trial, O'Hagan, Stevens and Campbell 2005, Pharmaceutical Statistics 4, 187–201,
 * 10.1002/pst.175.
 *
 * @param alpha Resolved when either bed is older at 1 − alpha. Default 0.05.
 * @example
 * ```ts
 * chanceFromHere({ gap: 0, variance: 2, varianceAfter: 1 }); // => 0.1
 * ```
 */
export function chanceFromHere(pair: PresentPair, alpha = 0.05): number {
  const { gap, variance, varianceAfter, spreadVariance = 0 } = pair;
  const z = normalQuantile(1 - alpha);
  const limit = Math.sqrt((pair.limit ?? z) ** 2 * varianceAfter + z * z * spreadVariance);
  const step = Math.sqrt(Math.max(0, variance - varianceAfter));
  if (step === 0) return Math.abs(gap) >= limit ? 1 : 0;
  return normalCdf((gap - limit) / step) + normalCdf((-gap - limit) / step);
}
