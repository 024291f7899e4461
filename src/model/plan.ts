/** What a line of the plan asks for. */
export type PlanKind = 'check bed' | 'separate zones' | 'strengthen bed' | 'separate beds' | 'date beds';

/** One line of the plan (plan.csv): what to collect or date, how sure the answer would be, and what it would settle. */
export interface PlanRow {
  /** null where the line rests on all main clocks together (`date beds`). */
  readonly clock: string | null;
  readonly kind: PlanKind;
  /** 1 is the most worth its cost, among the lines of one clock and kind; the three sizes of one bed share a rank. */
  readonly rank: number;
  /** `section/bed`: where to collect, or what to date. */
  readonly beds: readonly string[];
  /** How many more shells from each of `beds`; empty where none are asked for, or none are promised to help. */
  readonly shells: readonly number[];
  /** More shells in all; null where no number is promised to settle it, and for dates. */
  readonly total: number | null;
  /** Measured difference of the two log ratios, older minus younger, and its standard error from the shells. */
  readonly gap: number | null;
  readonly gap_error: number | null;
  /** Chance that a survey with these numbers of shells settles it, if the gap is truly as measured. */
  readonly power: number | null;
  /** Chance that these shells settle it from here, with the error of the gap itself counted. */
  readonly chance: number | null;
  /** Expected number of pairs of beds newly resolved in the whole order of the clock. */
  readonly pairs_gained: number | null;
  /** Number of other beds with a dated bed known to be older and one known to be younger. */
  readonly beds_bracketed: number | null;
  /** Whether that number is proven to be the most that so many dates can bracket. */
  readonly proven_best: boolean | null;
  /** The line in words. */
  readonly settles: string;
}

/** What to collect or date next. */
export interface Plan {
  /** By kind, then clock, then rank. */
  readonly rows: readonly PlanRow[];
  /** When a pair counts as resolved, and with what power the numbers of shells are worked out. */
  readonly criterion: string;
  /** What the reader must know to use the plan, most important first. */
  readonly notes: readonly string[];
}
