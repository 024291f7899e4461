/** A zone of the clock a shell may belong to. */
export interface ZoneToMatch {
  /** For example `Z3`. */
  readonly name: string;
  /** Mean log ratio. */
  readonly mean: number;
  /** Standard deviation of true bed values about it (spread tau, and the error of the mean where known). */
  readonly sd: number;
  /** Share of the beds. */
  readonly weight: number;
}

/** The zone a shell's ratio fits. */
export interface ZoneMatch {
  readonly zone: ZoneToMatch;
  /** Posterior probability among all zones. */
  readonly probability: number;
  /** Distance from the zone's mean in standard deviations of a shell. */
  readonly distance: number;
}

/** Beyond this many standard deviations from every zone a shell fits none. */
const FARTHEST = 3;

/**
 * The zone that a single shell's log ratio fits best, or null where it lies more than 3 standard deviations from the
 * nearest: it then comes from a deposit that the survey does not know.
 *
 * @param x Log ratio of the shell, gradient taken out where one is used.
 * @param scatter Scatter s of single shells.
 * @example
 * const zones = [{ name: 'Z1', mean: -2, sd: 0, weight: 0.5 }, { name: 'Z2', mean: -1.7, sd: 0, weight: 0.5 }];
 * matchZone(-1.72, 0.06, zones)?.zone.name // => 'Z2'
 */
export function matchZone(x: number, scatter: number, zones: readonly ZoneToMatch[]): ZoneMatch | null {
  if (!Number.isFinite(x) || !(scatter > 0) || zones.length === 0) return null;
  const fits = zones.map((zone) => {
    const sd = Math.hypot(scatter, zone.sd);
    const distance = (x - zone.mean) / sd;
    return { zone, distance, log: Math.log(zone.weight) - Math.log(sd) - 0.5 * distance * distance };
  });
  const best = fits.reduce((most, fit) => (fit.log > most.log ? fit : most));
  if (!(Math.abs(best.distance) <= FARTHEST)) return null;
  const total = fits.reduce((sum, fit) => sum + Math.exp(fit.log - best.log), 0);
  return { zone: best.zone, probability: 1 / total, distance: best.distance };
}
