import type { BedRow, ShellRow } from '../../model/index.js';
import { BED_MARKS, CONFIDENCES, SHELL_MARKS, SHELL_READINGS, SHELL_STATUSES } from '../choices.js';
import type { FieldsOf } from '../shape.js';
import * as c from './columns.js';

/** Columns of beds.csv. */
export const beds = {
  clock: c.clock,
  section: c.section,
  bed: c.bed,
  place: c.plainOrNone('level, height or depth of the bed as written in the input'),
  taxon: c.taxon,
  shells: c.count('shells behind the mean'),
  set_aside: c.count('shells set aside'),
  dl_mean: c.ratioOrNone('arithmetic mean of the shells kept, as measured: no gradient is taken out'),
  dl_sd: c.ratioOrNone('standard deviation between the shells kept'),
  dl_se: c.ratioOrNone('standard error of the mean'),
  log_mean: c.logRatioOrNone('mean log ratio, with any gradient that is used taken out'),
  log_se: c.logRatioOrNone('standard error of the mean log ratio, from the pooled scatter'),
  zone: c.zoneOrNone,
  zone_probability: c.shareOrNone('probability of that zone'),
  second_zone: { type: 'text', nullable: true, description: 'zone that is second best' },
  second_probability: c.shareOrNone('probability of the second zone'),
  straddles: c.yes('whether the best zone has a probability below 0.9'),
  marks: c.list({ type: 'choice', values: BED_MARKS, description: 'mark' } as const, 'marks on the bed'),
  reading: c.text('what the tool reads from the bed'),
} satisfies FieldsOf<BedRow>;

/** Columns of shells.csv. */
export const shells = {
  clock: c.clock,
  section: c.section,
  bed: c.bed,
  taxon: c.taxon,
  shell: c.text('specimen'),
  lab_id: c.list(c.text('laboratory number'), 'laboratory numbers of its analyses'),
  preparations: c.count('preparations averaged'),
  dl: c.ratio('ratio of the shell; of an index, exp of the log ratio'),
  log_ratio: c.logRatio('log ratio of the shell, as measured: no gradient is taken out'),
  residual: c.logRatioOrNone('log ratio less the mean of the other kept shells of its bed'),
  status: { type: 'choice', values: SHELL_STATUSES, description: 'whether the shell counts in the means' },
  zone: c.zoneOrNone,
  zone_probability: c.shareOrNone('probability of that zone for this shell alone'),
  marks: c.list({ type: 'choice', values: SHELL_MARKS, description: 'mark' } as const, 'marks of the screening rules'),
  reading: { type: 'choice', values: SHELL_READINGS, description: 'what most likely happened to the shell' },
  confidence: { type: 'choice', values: CONFIDENCES, nullable: true, description: 'how sure the reading is' },
} satisfies FieldsOf<ShellRow>;
