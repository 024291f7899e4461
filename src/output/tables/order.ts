import type { CorrelationRow, OrderRow, PairRow } from '../../model/index.js';
import type { FieldsOf } from '../shape.js';
import * as c from './columns.js';

/** Columns of order.csv. */
export const order = {
  clock: c.clock,
  rank: { type: 'integer', minimum: 1, description: 'place in the order; 1 is the oldest' },
  section: c.section,
  bed: c.bed,
  zone: c.zoneOrNone,
  rank_low: { type: 'number', minimum: 1, description: 'oldest rank within the 95 % interval' },
  rank_high: { type: 'number', minimum: 1, description: 'youngest rank within the 95 % interval' },
  p_older_than_next: c.shareOrNone('probability of being older than the bed of the next rank'),
  resolved: { type: 'boolean', nullable: true, description: 'whether that probability reaches 1 - alpha' },
} satisfies FieldsOf<OrderRow>;

/** Columns of pairs.csv. */
export const pairs = {
  clock: c.clock,
  bed_a: c.text('bed, as section/bed'),
  bed_b: c.text('bed, as section/bed'),
  p_a_older: c.share('probability that bed_a is older than bed_b'),
  p_same_zone: c.shareOrNone('probability that both belong to one zone'),
} satisfies FieldsOf<PairRow>;

/** In CSV `sections` is spread out to one column a section. */
export const correlation = {
  clock: c.clock,
  zone: c.zone,
  sections: {
    type: 'map',
    items: c.list(c.bed, 'beds of the zone in this section'),
    description: 'beds of the zone in each section, sections in coast order',
  },
} satisfies FieldsOf<CorrelationRow>;
