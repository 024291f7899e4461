import type { DateLimit } from '../model/index.js';
import { normalCdf } from '../statistics/index.js';

/** A date as a comparison needs it; ages and errors (1 sigma) in thousand years. */
export interface DatedAge {
  readonly age_ka: number;
  readonly error_ka: number;
  readonly limit: DateLimit;
}

/** What two dates say of which is the older. */
export interface DateComparison {
  /** First minus second in standard errors; null where the limits leave nothing to compare. */
  readonly z: number | null;
  /** Chance of a first date so much below the second, or more, if the first is truly as old or older; 1 if not comparable. */
  readonly pFirstOlder: number;
  /** Chance of a first date so much above the second, or more, if the first is truly as old or younger; 1 if not comparable. */
  readonly pFirstYounger: number;
}

/**
 * Holds two dates against each other with their errors taken as normal. A limit bounds one side only: a bed that is
 * older than 100 ka contradicts a date of 80 ka for a bed known to be older than it, but no date of 300 ka.
 *
 * @example
 * ```ts
 * const first = { age_ka: 80, error_ka: 4, limit: 'equal' } as const;
 * const second = { age_ka: 125, error_ka: 6, limit: 'equal' } as const;
 * compareDates(first, second).z; // => -6.24038
 * compareDates({ ...first, limit: 'older' }, { ...second, limit: 'older' }).z; // => null
 * ```
 */
export function compareDates(first: DatedAge, second: DatedAge): DateComparison {
  const error = Math.hypot(first.error_ka, second.error_ka);
  const difference = first.age_ka - second.age_ka;
  const z = difference === 0 ? 0 : difference / error;
  // the first can be shown too young where its age has an upper bound, and the second's a lower one; and the other way
  const canContradict = first.limit !== 'older' && second.limit !== 'younger';
  const canAgree = first.limit !== 'younger' && second.limit !== 'older';
  return {
    z: canContradict || canAgree ? z : null,
    pFirstOlder: canContradict ? normalCdf(z) : 1,
    pFirstYounger: canAgree ? normalCdf(-z) : 1,
  };
}
