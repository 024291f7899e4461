import type { DateLimit, DatePairRow, DateRelation, DateVerdict } from '../../model/index.js';
import type { FieldsOf } from '../shape.js';
import * as c from './columns.js';

const DATE_RELATIONS: Readonly<Record<DateRelation, string>> = {
  older: 'the first bed is known to be older',
  'as old': 'the dates are of one bed, or of beds stated to be as old',
  'one zone': 'both beds stand in one zone',
};

const DATE_VERDICTS: Readonly<Record<DateVerdict, string>> = {
  agrees: 'the dates show the same order, or are no further apart than their errors',
  contradicts: 'the dates show the opposite order, at alpha over all pairs together',
  differs: 'two dates of one zone are further apart than their errors, but reach into no other zone',
  "can't tell": 'the errors or limits leave it open',
};

const DATE_LIMITS: Readonly<Record<DateLimit, string>> = {
  equal: 'the date is the age',
  older: 'the bed is older than the date',
  younger: 'the bed is younger than the date',
};

const age = (which: string) =>
  ({ type: 'number', unit: 'ka', minimum: 0, description: `date of the ${which} bed` }) as const;
const error = (which: string) =>
  ({
    type: 'number',
    unit: 'ka',
    minimum: 0,
    description: `one standard deviation of the date of the ${which} bed`,
  }) as const;
const limit = (which: string) =>
  ({ type: 'choice', values: DATE_LIMITS, description: `how the date bounds the ${which} bed` }) as const;

/** Columns of dates.csv. */
export const dates = {
  older: c.text('bed that should be the older, as section/bed'),
  younger: c.text('the other bed'),
  relation: { type: 'choice', values: DATE_RELATIONS, description: 'what is known of the two beds' },
  p_relation: c.share('probability of that relation in the results; 1 for a certain field relation'),
  older_age_ka: age('first'),
  older_error_ka: error('first'),
  older_limit: limit('first'),
  older_method: c.textOrNone('method of that date'),
  younger_age_ka: age('second'),
  younger_error_ka: error('second'),
  younger_limit: limit('second'),
  younger_method: c.textOrNone('method of that date'),
  z: c.plainOrNone('first date less second, in standard errors; empty where limits leave nothing to compare'),
  p_contradiction: c.share('chance of dates so far the wrong way round although the relation holds'),
  p_adjusted: c.share('the same for all pairs together and with the doubt of the order, to be held against alpha'),
  verdict: { type: 'choice', values: DATE_VERDICTS, description: 'what the dates say of the relation' },
} satisfies FieldsOf<DatePairRow>;
