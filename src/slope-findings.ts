import type { Pass, RunContext, SlopeOfPass } from './clock-run.js';
import { gradientRemarks } from './coast/index.js';
import type { GradientFinding, Remark } from './model/index.js';

/** What is to be said of the slope along the gradient. */
export function slopeRemarks(
  { data }: Pass,
  slope: GradientFinding | null,
  { gradient }: RunContext,
  column: string,
): Remark[] {
  const without = data.beds.filter((bed) => bed.n > 0 && !gradient?.has(bed.key)).map((bed) => bed.key);
  return gradientRemarks(data.clock.name, column, slope, without);
}

/** The slope of one clock as a finding. */
export function gradientFinding({ data }: Pass, fit: SlopeOfPass, column: string): GradientFinding {
  return {
    clock: data.clock.name,
    column,
    centre: fit.centre,
    slope: fit.slope,
    slope_low: fit.low,
    slope_high: fit.high,
    bic_with: fit.bicWith,
    bic_without: fit.bicWithout,
    used: fit.used,
  };
}
