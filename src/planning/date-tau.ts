import type { DateRecord, DateTau, Findings } from '../model/index.js';
import { kendallTauB } from '../statistics/index.js';
import { bedKey } from './bed-on-clock.js';

/**
 * Kendall's tau-b between the order of each main clock (oldest last) and the ages of its dated beds: 1 where every pair
 * stands the same way round, −1 where none does. Limits are left out, as they have no place of their own. Beds of one
 * rank, and equal ages, are ties. The interval is that of tau over beds like these, from 5 dates on; what the dates say
 * pair by pair, with their errors, stands in the pairs.
 *
 * @returns one row a clock with at least 2 different ages on 2 ranks
 */
export function datesAgainstOrder(findings: Findings, dates: readonly DateRecord[]): DateTau[] {
  const clocks = [...new Set(findings.order.map((row) => row.clock))];
  return clocks.flatMap((clock): DateTau[] => {
    const rank = new Map(findings.order.filter((row) => row.clock === clock).map((row) => [bedKey(row), row.rank]));
    const used = dates.filter((date) => date.limit === 'equal' && rank.has(bedKey(date)));
    if (used.length < 2) return [];
    const { tau, low, high } = kendallTauB(
      used.map((date) => -rank.get(bedKey(date))!),
      used.map((date) => date.age_ka),
    );
    if (Number.isNaN(tau)) return [];
    const enough = used.length >= 5 && Number.isFinite(low) && Number.isFinite(high);
    return [{ clock, dates: used.length, tau_b: tau, low: enough ? low : null, high: enough ? high : null }];
  });
}
