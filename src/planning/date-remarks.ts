import type { DateDoubt, DatePairRow, DateRecord, DateTau } from '../model/index.js';
import { bedKey } from './bed-on-clock.js';
import type { KnownOrder } from './known-order.js';

/** What {@link dateRemarks} puts into words. */
export interface DateFacts {
  readonly dates: readonly DateRecord[];
  readonly known: KnownOrder;
  readonly pairs: readonly DatePairRow[];
  readonly fewest: number;
  readonly doubts: readonly DateDoubt[];
  readonly taus: readonly DateTau[];
  readonly alpha: number;
  /** Main clocks whose scatter was assumed, so that their order rests on it. */
  readonly assumed: readonly string[];
}

/** The dates against the order in sentences, most important first. */
export function dateRemarks({ dates, known, pairs, fewest, doubts, taus, alpha, assumed }: DateFacts): string[] {
  const count = (verdict: DatePairRow['verdict']) => pairs.filter((row) => row.verdict === verdict).length;
  const remarks: string[] = [];
  const strangers = [...new Set(dates.map(bedKey).filter((key) => !known.indexOf.has(key)))];
  if (pairs.length === 0) {
    remarks.push(
      'No two of the dates belong to beds whose order is known, so they say nothing for or against the order.',
    );
  } else {
    const told = `Of ${pairs.length} ${pairs.length === 1 ? 'pair' : 'pairs'} of dates whose order is known, ${count('agrees')} ${count('agrees') === 1 ? 'agrees' : 'agree'}, ${count("can't tell")} can't tell`;
    const against = count('contradicts');
    remarks.push(
      against === 0
        ? `${told}, and none contradicts.`
        : `${told}, and ${against} ${against === 1 ? 'contradicts' : 'contradict'}. Good dates of a right order would contradict anywhere in at most ${percent(alpha)} of surveys.`,
    );
  }
  if (fewest > 0) remarks.push(doubtsInWords(fewest, doubts));
  for (const row of pairs.filter(({ verdict }) => verdict === 'differs')) {
    remarks.push(
      `The dates of ${row.older} (${row.older_age_ka} ka) and ${row.younger} (${row.younger_age_ka} ka) differ by more than their errors, though both beds stand in one zone. A zone may span some time, so this contradicts no order.`,
    );
  }
  for (const { clock, dates: used, tau_b, low, high } of taus) {
    const interval =
      low === null || high === null
        ? '; under 5 dates it has no interval'
        : `, 95 % interval ${low.toFixed(2)} to ${high.toFixed(2)}`;
    remarks.push(`${clock}: Kendall's tau-b between order and ${used} dates is ${tau_b.toFixed(2)}${interval}.`);
  }
  if (assumed.length > 0) {
    remarks.push(
      `The order on ${assumed.join(', ')} rests on a scatter between shells that was assumed, not measured.`,
    );
  }
  if (strangers.length > 0) {
    remarks.push(`Not in these results, so not used: ${strangers.join(', ')}.`);
  }
  return remarks;
}

function doubtsInWords(fewest: number, doubts: readonly DateDoubt[]): string {
  const named = doubts.filter((doubt) => doubt.in_every).map(labelled);
  const others = doubts.filter((doubt) => !doubt.in_every).map(labelled);
  const start =
    fewest === 1
      ? 'Leaving out one date would remove every contradiction: '
      : `At least ${fewest} dates must be left out to remove every contradiction: `;
  if (others.length === 0) return `${start}${named.join('; ')}. No other choice of so few does.`;
  const either = `${fewest - named.length} of ${others.join('; ')}`;
  const rest = named.length === 0 ? either : `${named.join('; ')}, and ${either}`;
  return `${start}${rest}. Several choices do equally well, so the dates alone don't say which.`;
}

function labelled({ bed, age_ka, error_ka, limit, method, contradictions }: DateDoubt): string {
  const bound = limit === 'equal' ? '' : `${limit} than `;
  const by = method === null ? '' : `, ${method}`;
  return `${bed} (${bound}${age_ka} ± ${error_ka} ka${by}; in ${contradictions} ${contradictions === 1 ? 'contradiction' : 'contradictions'})`;
}

function percent(share: number): string {
  return `${Number((100 * share).toPrecision(3))} %`;
}
