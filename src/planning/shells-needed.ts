import { normalQuantile } from '../statistics/index.js';
import { type PairDesign, powerReaches, type ResolvingRule, resolvingPower } from './power.js';

/** What {@link shellsNeeded} may assume and spend. */
export interface ShellsNeededOptions extends ResolvingRule {
  /** Chance of resolving the pair that is asked for. Default 0.8. */
  readonly power?: number;
  /** Most shells a bed may have in the end; beyond it no number is promised. Default 50. */
  readonly most?: number;
  /** Spread between beds that the larger survey would add, by the more shells. Default: the design's, whatever their number. */
  readonly spreadVarianceAfter?: (more: readonly [number, number]) => number;
}

/** How many more shells either bed needs. */
export interface ShellsNeeded {
  /** More shells for the first and the second bed. */
  readonly more: readonly [number, number];
  /** Chance reached with them. */
  readonly power: number;
}

/**
 * The formula of the trade for two beds of n shells each, n = 2 (z_α + z_β)² s² / δ²: the first guess, with the
 * scatter taken as known.
 *
 * Source: Cohen 1988, Statistical power analysis for the behavioral sciences, 2nd ed., chapter 2.
 *
 * @param gap difference δ of the two log ratios
 * @param scatter standard deviation s between shells of one bed
 * @returns shells in each bed, not rounded
 * @example
 * ```ts
 * shellsInEach(0.1, 0.07, { sides: 2 }); // => 7.691902
 * ```
 */
export function shellsInEach(gap: number, scatter: number, options: ShellsNeededOptions = {}): number {
  const z = normalQuantile(1 - (options.alpha ?? 0.05) / (options.sides ?? 1)) + normalQuantile(options.power ?? 0.8);
  return (2 * z * z * scatter * scatter) / (gap * gap);
}

/**
 * The fewest more shells, over both beds together, that give a survey the asked chance of resolving the pair. Each goes
 * to the bed that then has fewer, which lessens the error of the difference the most. The first guess comes from
 * {@link shellsInEach}; the answer from {@link resolvingPower}. New shells also add to the degrees of freedom of the
 * pooled scatter.
 *
 * @param design the pair as it is now; `shells` are the present numbers
 * @returns null when no number up to `most` in a bed gives the chance: nothing is then to be promised
 * @throws RangeError when the power asked for is not between 0 and 1, and as {@link resolvingPower}
 * @example
 * ```ts
 * shellsNeeded({ gap: 0.1, scatter: 0.07, shells: [3, 5] })?.more; // => [4, 1]
 * ```
 */
export function shellsNeeded(design: PairDesign, options: ShellsNeededOptions = {}): ShellsNeeded | null {
  const wanted = options.power ?? 0.8;
  const most = options.most ?? 50;
  if (!(wanted > 0 && wanted < 1)) {
    throw new RangeError(`shellsNeeded: the power asked for must lie between 0 and 1, got ${wanted}`);
  }
  const { spreadVarianceAfter } = options;
  const designWith = (more: readonly [number, number], spreadVariance = design.spreadVariance): PairDesign => ({
    ...design,
    shells: [design.shells[0] + more[0], design.shells[1] + more[1]],
    df: typeof design.df === 'number' ? design.df + more[0] + more[1] : design.df,
    spreadVariance,
  });
  const powerWith = (total: number) => {
    const more = dealOut(design.shells, total);
    return { more, power: resolvingPower(designWith(more, spreadVarianceAfter?.(more)), options) };
  };
  const enough = (total: number) => {
    const more = dealOut(design.shells, total);
    // most that fall short do so without any spread, which takes longest to work out
    if (spreadVarianceAfter && !powerReaches(designWith(more, 0), wanted, options)) return false;
    return powerReaches(designWith(more, spreadVarianceAfter?.(more)), wanted, options);
  };
  const top = Math.max(0, most - design.shells[0]) + Math.max(0, most - design.shells[1]);
  if (enough(0)) return powerWith(0);
  if (spreadVarianceAfter) {
    // a spread that grows with the shells can make the power fall again, so every number is tried
    for (let total = 1; total <= top; total++) if (enough(total)) return powerWith(total);
    return null;
  }
  if (!enough(top)) return null;
  // the formula lands near the answer: halve the gap from there
  const guess = Math.ceil(2 * shellsInEach(design.gap, design.scatter, options)) - design.shells[0] - design.shells[1];
  let low = 0;
  let high = top;
  let next = Math.min(high - 1, Math.max(low + 1, guess));
  while (high - low > 1) {
    if (enough(next)) high = next;
    else low = next;
    next = Math.floor((low + high) / 2);
  }
  return powerWith(high);
}

/** `total` shells, one by one to the bed that has fewer. */
function dealOut(shells: readonly [number, number], total: number): [number, number] {
  const behind = Math.min(total, Math.abs(shells[0] - shells[1]));
  const rest = total - behind;
  const larger = Math.floor(rest / 2);
  const smaller = behind + rest - larger;
  return shells[0] <= shells[1] ? [smaller, larger] : [larger, smaller];
}
