import type { DateDoubt, DatePairRow, DateRecord, DatesJudgement, DateVerdict, Findings } from '../model/index.js';
import { holm } from '../statistics/index.js';
import { assumedScatter } from './assumed-scatter.js';
import { bedKey } from './bed-on-clock.js';
import { includes } from './bit-set.js';
import { compareDates } from './compare-dates.js';
import { type RelatedDates, relatedDates } from './date-relations.js';
import { dateRemarks } from './date-remarks.js';
import { datesAgainstOrder } from './date-tau.js';
import { type FewestToDoubt, fewestToDoubt } from './fewest-to-doubt.js';
import type { KnownOrder } from './known-order.js';

/** Options of {@link judgeDates}. */
export interface JudgeDatesOptions {
  /** Level. Default: that of the run. */
  readonly alpha?: number;
}

/** One claim that a date is as old as another or older, with the chance of the dates if it holds. */
interface Claim {
  readonly pair: number;
  readonly olderDate: number;
  readonly youngerDate: number;
  readonly p: number;
}

/**
 * Holds independent dates against the order of a run. Every pair of dates whose beds have a known order gives a claim;
 * its p is the chance of dates at least so far the wrong way round, errors and limits counted. Good dates of a right order
 * contradict it anywhere in at most alpha of surveys: a quarter of alpha goes to the claims together (Holm), a quarter to
 * the doubt of the order and half to that of the zones ({@link relatedDates}); a claim from a less sure order is no surer
 * than that order.
 *
 * Two dates of one zone are held together too, since a date moved to a neighbouring zone contradicts no order by itself.
 * A zone may span some time, so they only count as a contradiction where they also reach into the dates of another zone.
 *
 * Among the contradictions, the fewest dates to doubt are found exactly ({@link fewestToDoubt}). Nothing here turns a
 * ratio into an age.
 *
 * Sources: Holm 1979, Scandinavian Journal of Statistics 6, 65–70; intersection–union test: Berger 1982, Technometrics
 * 24, 295–300, 10.1080/00401706.1982.10487790.
 *
 * @param findings of a run, as results.json holds them
 * @param dates independent dates; those of beds that the run does not know are named in the remarks
 * @throws RangeError when alpha is not between 0 and 1
 */
export function judgeDates(
  findings: Findings,
  dates: readonly DateRecord[],
  options: JudgeDatesOptions = {},
): DatesJudgement {
  const alpha = options.alpha ?? findings.options.alpha;
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`judgeDates: alpha must lie between 0 and 1, got ${alpha}`);
  const { related, known } = relatedDates(findings, dates, {
    alpha,
    doubt: { order: alpha / 4, zones: alpha / 2 },
  });
  const claims = related.flatMap((pair, index) => claimsOf(pair, index, dates));
  const adjusted = holm(claims.map((claim) => claim.p)).map((p) => Math.min(1, 4 * p));
  const worst = related.map((_, pair) => {
    const own = claims.flatMap((claim, at) => (claim.pair === pair ? [at] : []));
    return own.reduce((least, at) => (claims[at].p < claims[least].p ? at : least), own[0]);
  });

  const rows: DatePairRow[] = [];
  const conflicts: [number, number][] = [];
  related.forEach((pair, index) => {
    const claim = claims[worst[index]];
    const comparison = compareDates(dates[claim.olderDate], dates[claim.youngerDate]);
    const refuted = adjusted[worst[index]] <= alpha;
    let verdict: DateVerdict = "can't tell";
    if (refuted) {
      const counts = pair.relation !== 'one zone' || reachesOut(claim, dates, known, alpha);
      verdict = counts ? 'contradicts' : 'differs';
      if (counts) conflicts.push([claim.olderDate, claim.youngerDate]);
    } else if (pair.relation === 'older') {
      if (comparison.pFirstYounger <= alpha) verdict = 'agrees';
    } else if (comparison.z !== null && comparison.pFirstOlder < 1 && 2 * comparison.pFirstOlder > alpha) {
      verdict = 'agrees';
    }
    rows.push(rowOf(pair, claim, dates, comparison.z, adjusted[worst[index]], verdict));
  });

  const fewest = fewestToDoubt(dates.length, conflicts);
  const doubts = doubtsOf(fewest, conflicts, dates);
  const pairs = rows.sort((a, b) => rankOf(a.verdict) - rankOf(b.verdict) || a.p_adjusted - b.p_adjusted);
  const taus = datesAgainstOrder(findings, dates);
  const remarks = dateRemarks({
    dates,
    known,
    pairs,
    fewest: fewest.fewest,
    doubts,
    taus,
    alpha,
    assumed: assumedScatter(findings).map(({ clock }) => clock),
  });
  return { pairs, fewest: fewest.fewest, doubts, taus, remarks };
}

const rankOf = (verdict: DateVerdict): number => ['contradicts', 'differs', "can't tell", 'agrees'].indexOf(verdict);

/** One claim for a known order, two for dates that should be equal. */
function claimsOf(pair: RelatedDates, index: number, dates: readonly DateRecord[]): Claim[] {
  const claim = (olderDate: number, youngerDate: number): Claim => {
    const { pFirstOlder } = compareDates(dates[olderDate], dates[youngerDate]);
    return { pair: index, olderDate, youngerDate, p: pair.sure ? pFirstOlder : Math.max(pFirstOlder, 1 - pair.p) };
  };
  const first = claim(pair.first, pair.second);
  return pair.relation === 'older' ? [first] : [first, claim(pair.second, pair.first)];
}

/**
 * Whether two dates of one zone reach into another zone: a date of a bed known to be older is not clearly above the
 * higher of the two, or one of a bed known to be younger is not clearly below the lower.
 */
function reachesOut(claim: Claim, dates: readonly DateRecord[], known: KnownOrder, alpha: number): boolean {
  const low = dates[claim.olderDate];
  const high = dates[claim.youngerDate];
  const lowBed = known.indexOf.get(bedKey(low))!;
  const highBed = known.indexOf.get(bedKey(high))!;
  return dates.some((other) => {
    const bed = known.indexOf.get(bedKey(other));
    if (bed === undefined || other.limit !== 'equal') return false;
    return (
      (includes(known.older[highBed], bed) && compareDates(other, high).pFirstYounger > alpha) ||
      (includes(known.younger[lowBed], bed) && compareDates(low, other).pFirstYounger > alpha)
    );
  });
}

function rowOf(
  pair: RelatedDates,
  claim: Claim,
  dates: readonly DateRecord[],
  z: number | null,
  adjusted: number,
  verdict: DateVerdict,
): DatePairRow {
  const older = dates[claim.olderDate];
  const younger = dates[claim.youngerDate];
  return {
    older: bedKey(older),
    younger: bedKey(younger),
    relation: pair.relation,
    p_relation: pair.p,
    older_age_ka: older.age_ka,
    older_error_ka: older.error_ka,
    older_limit: older.limit,
    older_method: older.method,
    younger_age_ka: younger.age_ka,
    younger_error_ka: younger.error_ka,
    younger_limit: younger.limit,
    younger_method: younger.method,
    z,
    p_contradiction: claim.p,
    p_adjusted: adjusted,
    verdict,
  };
}

function doubtsOf(
  { inSome, inEvery }: FewestToDoubt,
  conflicts: readonly (readonly [number, number])[],
  dates: readonly DateRecord[],
): DateDoubt[] {
  const doubts = inSome.map((index): DateDoubt => {
    const { age_ka, error_ka, limit, method, line } = dates[index];
    const contradictions = conflicts.filter((ends) => ends.includes(index)).length;
    return {
      bed: bedKey(dates[index]),
      age_ka,
      error_ka,
      limit,
      method,
      line,
      contradictions,
      in_every: inEvery.includes(index),
    };
  });
  return doubts.sort((a, b) => Number(b.in_every) - Number(a.in_every) || b.contradictions - a.contradictions);
}
