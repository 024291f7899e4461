import type { PlanKind, PlanRow } from '../../model/index.js';
import type { FieldsOf } from '../shape.js';
import * as c from './columns.js';

const PLAN_KINDS: Readonly<Record<PlanKind, string>> = {
  'check bed': 'new shells from a bed that is reversed or of mixed age',
  'separate zones': 'more shells to part two neighbouring zones',
  'strengthen bed': 'more shells from the bed that gains the order most',
  'separate beds': 'more shells to resolve two neighbours in the order',
  'date beds': 'beds to date so that the most others are bracketed',
};

/** Columns of plan.csv. */
export const plan = {
  clock: c.textOrNone('clock; empty where the line rests on all main clocks together'),
  kind: { type: 'choice', values: PLAN_KINDS, description: 'what is asked for' },
  rank: {
    type: 'integer',
    minimum: 1,
    description: 'place among the lines of one clock and kind; 1 is the most worth',
  },
  beds: c.list(c.text('bed, as section/bed'), 'where to collect, or what to date'),
  shells: c.list(c.count('more shells'), 'how many more shells from each of these beds'),
  total: {
    type: 'integer',
    minimum: 0,
    nullable: true,
    description: 'more shells in all; empty where none are promised to do',
  },
  gap: c.logRatioOrNone('measured difference, older less younger'),
  gap_error: c.logRatioOrNone('standard error of that difference from the shells'),
  power: c.shareOrNone('chance that a survey with these shells settles it, if the gap is as measured'),
  chance: c.shareOrNone('chance that these shells settle it from here, with the error of the gap counted'),
  pairs_gained: {
    type: 'number',
    minimum: 0,
    nullable: true,
    description: 'expected number of pairs of beds newly resolved',
  },
  beds_bracketed: {
    type: 'integer',
    minimum: 0,
    nullable: true,
    description: 'other beds between an older and a younger date',
  },
  proven_best: {
    type: 'boolean',
    nullable: true,
    description: 'whether no other choice of as many beds brackets more',
  },
  settles: c.text('what it would settle'),
} satisfies FieldsOf<PlanRow>;
