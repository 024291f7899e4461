import type { ClockData } from '../model/index.js';
import type { Mixture } from './mixture.js';
import { bestLabels } from './zoning.js';

/** How much the shells of one bed scatter about its mean: sum of squares and degrees of freedom. */
export interface BedScatter {
  readonly squares: number;
  readonly df: number;
}

/** Scatter of the kept shells of some beds of a clock. Beds of published means alone have no degrees of freedom. */
export function bedScatters(data: ClockData, beds: readonly number[]): BedScatter[] {
  return beds.map((bed) => {
    const kept = data.beds[bed].shells.map((at) => data.shells[at]).filter((shell) => !shell.setAside);
    if (kept.length < 2) return { squares: 0, df: 0 };
    const mean = kept.reduce((sum, { x }) => sum + x, 0) / kept.length;
    return { squares: kept.reduce((sum, { x }) => sum + (x - mean) ** 2, 0), df: kept.length - 1 };
  });
}

/** Degrees of freedom that the scatter of all beds is given beside a zone's own. */
const SHARED_DF = 4;

/**
 * Scatter of the shells of each zone in units of the scatter pooled over all beds, on which the beds' errors rest. An equal
 * scatter of D/L is a wider one of log ratios in a young zone, whose beds then lie further apart than their errors say.
 * @returns 1 for every zone where no bed has two shells
 */
export function zoneScales(fit: Mixture, scatters: readonly BedScatter[]): number[] {
  const labels = bestLabels(fit, scatters.length);
  const all = total(scatters);
  const pooled = all.squares / all.df;
  if (!(pooled > 0)) return fit.means.map(() => 1);
  return fit.means.map((_, zone) => {
    const { squares, df } = total(scatters.filter((_, bed) => labels[bed] === zone));
    return Math.sqrt((squares / pooled + SHARED_DF) / (df + SHARED_DF));
  });
}

function total(scatters: readonly BedScatter[]): BedScatter {
  return scatters.reduce((sum, { squares, df }) => ({ squares: sum.squares + squares, df: sum.df + df }), {
    squares: 0,
    df: 0,
  });
}
