import type { AdjacentZonesRow, ClockData, ZoneCountRow, ZoneRow } from '../model/index.js';
import { studentTQuantile } from '../statistics/index.js';
import { rankTest } from './adjacent-zones.js';
import { type Assignment, zoneAssigner } from './assignment.js';
import type { Zoning } from './zoning.js';

/** Name of a zone in tables: Z1 is the youngest. */
export const zoneName = (zone: number): string => `Z${zone + 1}`;

/** What a bootstrap adds to the rows of zones.csv. */
export interface ZoneRowSupport {
  readonly stability: readonly (number | null)[];
  /** Standard errors of the zone means. */
  readonly meanErrors: readonly number[];
  readonly assign: (x: number, error: number) => Assignment;
}

/** Rows of zones.csv for one clock, the youngest zone first. Without a bootstrap stability is null. */
export function zoneRows(data: ClockData, zoning: Zoning, support: ZoneRowSupport | null = null): ZoneRow[] {
  const { fit, priors, df } = zoning;
  const shellSd = Math.hypot(data.scatter.s, fit.tau);
  // beds of mixed age found no zone, but stand in the one they fit best
  const assign = support?.assign ?? zoneAssigner(priors);
  const zoneOfBed = data.beds.map((bed) => (bed.n > 0 ? assign(bed.mean, bed.se).zone : -1));
  return fit.means.map((mean, j) => {
    const members = data.beds.flatMap((_, bed) => (zoneOfBed[bed] === j ? [bed] : []));
    const half = studentTQuantile(0.975, Math.max(1, df[j])) * (support?.meanErrors[j] ?? priors.se[j]);
    return {
      clock: data.clock.name,
      zone: zoneName(j),
      beds: members.length,
      shells: members.reduce((sum, bed) => sum + data.beds[bed].n, 0),
      dl_mean: Math.exp(mean),
      dl_low: Math.exp(mean - half),
      dl_high: Math.exp(mean + half),
      shell_low: Math.exp(mean - shellSd),
      shell_high: Math.exp(mean + shellSd),
      stability: support?.stability[j] ?? null,
    };
  });
}

/** Gap statistic and silhouette of each number of zones, beside BIC. */
export interface CountCriteria {
  readonly gap: number | null;
  readonly gap_se: number | null;
  readonly silhouette: number | null;
}

/**
 * Rows of zone_counts.csv for one clock: every mixture, then the continuum.
 * `chosen` marks the one in use after everything: bootstraps where BIC was not clear, joining, a number asked for.
 */
export function zoneCountRows(
  data: ClockData,
  zoning: Zoning,
  criteria: ReadonlyMap<number, CountCriteria> = new Map(),
): ZoneCountRow[] {
  const { choice, fit: inUse, verdict, forced } = zoning;
  const none: CountCriteria = { gap: null, gap_se: null, silhouette: null };
  const byContinuum = !forced && verdict === 'continuum';
  const rows: ZoneCountRow[] = choice.mixtures.map((fit, at) => ({
    clock: data.clock.name,
    model: String(fit.k),
    log_likelihood: fit.logLikelihood,
    bic: choice.bics[at],
    ...(criteria.get(fit.k) ?? none),
    chosen: !byContinuum && fit.k === inUse.k,
  }));
  rows.push({
    clock: data.clock.name,
    model: 'continuum',
    log_likelihood: choice.continuum.logLikelihood,
    bic: choice.continuumBic,
    ...none,
    chosen: byContinuum,
  });
  return rows;
}

/** Rows of adjacent_zones.csv for one clock, the oldest pair first. */
export function adjacentZonesRows(data: ClockData, zoning: Zoning): AdjacentZonesRow[] {
  const shells = shellsOfZones(data, zoning);
  return zoning.neighbours
    .map((test, j) => {
      const ranks = rankTest(shells[j + 1], shells[j]);
      return {
        clock: data.clock.name,
        older: zoneName(j + 1),
        younger: zoneName(j),
        ...test,
        mann_whitney_u: ranks?.u ?? null,
        p_mann_whitney: ranks?.p ?? null,
      };
    })
    .reverse();
}

/** Log ratios, at no gradient, of the shells kept in the beds of each zone. */
function shellsOfZones({ beds, shells, slope }: ClockData, zoning: Zoning): number[][] {
  const ratios: number[][] = zoning.fit.means.map(() => []);
  zoning.beds.forEach((index, at) => {
    const bed = beds[index];
    for (const shell of bed.shells) {
      if (!shells[shell].setAside) ratios[zoning.labels[at]].push(shells[shell].x - slope * bed.gradient);
    }
  });
  return ratios;
}
