import type { RowPlace } from './survey.js';

/**
 * How a date bounds the age of its bed: `equal` is the age itself, `older` says that the bed is older than age_ka,
 * `younger` that it is younger.
 */
export type DateLimit = 'equal' | 'older' | 'younger';

/** One independent date, as the dates table gives it. */
export interface DateRecord extends RowPlace {
  readonly section: string;
  readonly bed: string;
  /** Thousand years before present. */
  readonly age_ka: number;
  /** One standard deviation, thousand years. */
  readonly error_ka: number;
  readonly limit: DateLimit;
  readonly method: string | null;
}

/** What is known of the beds of two dates: the first is older, they are one bed (or stated to be as old), or one zone. */
export type DateRelation = 'older' | 'as old' | 'one zone';

/**
 * Of `older`: `agrees` where the dates alone put the older bed first, at alpha; `contradicts` where they put it last, at
 * alpha over all pairs together. Of `as old` and `one zone`: `agrees` where the dates are no further apart than alpha
 * allows; `contradicts` where they are, over all pairs together, and, of one zone, reach into the dates of another zone;
 * `differs` where two dates of one zone are too far apart but reach into no other. Otherwise `can't tell`.
 */
export type DateVerdict = 'agrees' | 'contradicts' | 'differs' | "can't tell";

/** Two dates whose beds have a known order (dates.csv). */
export interface DatePairRow {
  /** `section/bed` of the bed that the order puts first (older), and of the other one. */
  readonly older: string;
  readonly younger: string;
  readonly relation: DateRelation;
  /** Probability of the relation in the order; 1 for a certain field relation. */
  readonly p_relation: number;
  readonly older_age_ka: number;
  readonly older_error_ka: number;
  readonly older_limit: DateLimit;
  readonly older_method: string | null;
  readonly younger_age_ka: number;
  readonly younger_error_ka: number;
  readonly younger_limit: DateLimit;
  readonly younger_method: string | null;
  /**
   * Difference of the two dates, older minus younger, in standard errors; null where limits make it meaningless.
   * For `one zone` and `as old`, the date that is the higher stands as the younger, so it is at most 0.
   */
  readonly z: number | null;
  /**
   * Chance of dates this far the wrong way round although the relation holds; where the relation is one of the less sure
   * ones, no less than the chance that the relation is wrong. 1 where the limits leave nothing to compare.
   */
  readonly p_contradiction: number;
  /** The same, adjusted for the number of pairs (Holm) and for the doubt of the order: to be held against alpha. */
  readonly p_adjusted: number;
  readonly verdict: DateVerdict;
}

/** A date that the fewest dates to doubt may hold. */
export interface DateDoubt {
  /** `section/bed`. */
  readonly bed: string;
  readonly age_ka: number;
  readonly error_ka: number;
  readonly limit: DateLimit;
  readonly method: string | null;
  /** Line in the dates table. */
  readonly line: number;
  /** Number of contradictions it takes part in. */
  readonly contradictions: number;
  /** It stands in every smallest set; otherwise in at least one. */
  readonly in_every: boolean;
}

/** Kendall's tau-b between the order of one clock and the dates of its beds. */
export interface DateTau {
  readonly clock: string;
  /** Number of dates of limit `equal`. */
  readonly dates: number;
  readonly tau_b: number;
  /** 95 % interval; null under 5 dates. */
  readonly low: number | null;
  readonly high: number | null;
}

/** What the dates say of the order, and the order of the dates. Ratios are never turned into ages. */
export interface DatesJudgement {
  readonly pairs: readonly DatePairRow[];
  /** Smallest number of dates that, left out, leaves no contradiction. */
  readonly fewest: number;
  readonly doubts: readonly DateDoubt[];
  readonly taus: readonly DateTau[];
  /** Findings and cautions in sentences, most important first. */
  readonly remarks: readonly string[];
}
