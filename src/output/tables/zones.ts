import type { AdjacentZonesRow, ClockRow, ZoneCountRow, ZoneRow } from '../../model/index.js';
import { ADJACENT_VERDICTS, CLOCK_VERDICTS } from '../choices.js';
import type { FieldsOf } from '../shape.js';
import * as c from './columns.js';

/** Columns of clocks.csv. */
export const clocks = {
  clock: c.clock,
  taxon: c.taxon,
  fraction: c.fraction,
  amino_acids: c.list(c.aminoAcid, 'amino acids of the clock; several make an index'),
  main: c.yes('whether the tables of beds, shells and order speak of this clock'),
  shells: c.count('shells measured on this clock'),
  beds: c.count('beds with a mean on this clock'),
  scatter: c.logRatio('pooled standard deviation between the shells of one bed'),
  spread: c.logRatioOrNone('standard deviation between the beds of one zone beyond their errors'),
  zones: c.count('zones in use; 1 where none are supported'),
  verdict: { type: 'choice', values: CLOCK_VERDICTS, description: 'what the data support' },
  slope: c.plainOrNone('slope of the log ratio along the gradient, per unit of its column'),
  slope_low: c.plainOrNone('lower end of the 95 % interval of the slope'),
  slope_high: c.plainOrNone('upper end of the 95 % interval of the slope'),
  rand_with_main: c.plainOrNone('adjusted Rand index with the zones of the main clock, over the beds they share'),
} satisfies FieldsOf<ClockRow>;

/** Columns of zones.csv. */
export const zones = {
  clock: c.clock,
  zone: c.zone,
  beds: c.count('beds of the zone'),
  shells: c.count('shells behind those beds'),
  dl_mean: c.ratio('mean of the zone, from its mean log ratio, with any gradient that is used taken out'),
  dl_low: c.ratio('lower end of the 95 % interval of the zone mean'),
  dl_high: c.ratio('upper end of the 95 % interval of the zone mean'),
  shell_low: c.ratio('zone mean less 1 standard deviation of its shells'),
  shell_high: c.ratio('zone mean plus 1 standard deviation of its shells'),
  stability: c.shareOrNone('mean Jaccard similarity over bootstraps; 1 is a zone that always comes back'),
} satisfies FieldsOf<ZoneRow>;

/** Columns of zone_counts.csv. */
export const zone_counts = {
  clock: c.clock,
  model: c.text('number of zones, or `continuum`'),
  log_likelihood: c.plain('log likelihood of the bed means'),
  bic: c.plain('Bayesian information criterion; the lowest is best supported'),
  gap: c.plainOrNone('gap statistic'),
  gap_se: c.plainOrNone('standard error of the gap statistic'),
  silhouette: c.plainOrNone('mean silhouette width'),
  chosen: c.yes('whether this model is in use'),
} satisfies FieldsOf<ZoneCountRow>;

/** Columns of adjacent_zones.csv. */
export const adjacent_zones = {
  clock: c.clock,
  older: c.text('older zone of the two'),
  younger: c.text('younger zone of the two'),
  difference: c.logRatio('mean of the older less mean of the younger zone'),
  p_difference: c.shareOrNone('p-value of that difference, with beds as the units that repeat'),
  mann_whitney_u: c.plainOrNone('Mann-Whitney U of the shells of the older zone'),
  p_mann_whitney: c.shareOrNone('two-sided p-value of U'),
  overlap: c.share('overlap coefficient of the two distributions of shells'),
  overlap_low: c.shareOrNone('lower end of its 95 % interval'),
  overlap_high: c.shareOrNone('upper end of its 95 % interval'),
  one_sigma_overlap: c.yes('whether the ranges of 1 standard deviation of shells overlap'),
  verdict: { type: 'choice', values: ADJACENT_VERDICTS, description: 'whether the two zones are really distinct' },
} satisfies FieldsOf<AdjacentZonesRow>;
