import type { OwnBedResiduals } from './own-bed-residuals.js';
import type { ShellConflicts } from './shell-conflicts.js';

/**
 * Which shells have a conflict with a bed that their own bed's other shells are not reversed against. Where the means
 * of two beds are reversed (one-sided at 5 %), conflicts between their shells are a matter of the beds, not of the
 * shells that happen to lie furthest out.
 */
export function conflictsOfItsOwn(
  { conflicts, sorted }: ShellConflicts,
  shells: readonly { readonly bed: number; readonly x: number }[],
  { s, means, residual, others: counts }: OwnBedResiduals,
): boolean[] {
  const alone = new Array<boolean>(shells.length).fill(false);
  const others = (shell: number) => {
    const own = residual[shell];
    return Number.isNaN(own) ? null : { mean: shells[shell].x - own, variance: (s * s) / counts[shell] };
  };
  const reversed = (lower: { mean: number; variance: number } | null, upper: typeof lower) =>
    lower !== null && upper !== null && upper.mean - lower.mean > 1.645 * Math.sqrt(lower.variance + upper.variance);
  for (const { lower, bed, from } of conflicts) {
    const upperMean = Number.isFinite(means[bed]) ? { mean: means[bed], variance: (s * s) / sorted[bed].length } : null;
    const lowerBed = shells[lower].bed;
    const lowerMean = Number.isFinite(means[lowerBed])
      ? { mean: means[lowerBed], variance: (s * s) / sorted[lowerBed].length }
      : null;
    if (!reversed(others(lower), upperMean)) alone[lower] = true;
    for (const upper of sorted[bed].slice(from)) if (!reversed(lowerMean, others(upper))) alone[upper] = true;
  }
  return alone;
}
