import type { AminoAcid, Fraction } from './amino-acid.js';

/** What a zoning is done on: one amino acid of one taxon and fraction, or the index of several. */
export interface Clock {
  /** For example `Patellina THAA Ile` or `Patellina THAA index`; the key of all tables. */
  readonly name: string;
  readonly taxon: string;
  readonly fraction: Fraction;
  /** One amino acid, or those of the index. */
  readonly amino_acids: readonly AminoAcid[];
  /** Weight of each amino acid's log ratio in x, same order as amino_acids; they sum to 1. */
  readonly weights: readonly number[];
  readonly main: boolean;
}

/** One shell on one clock. */
export interface ClockShell {
  /** Index into the list of shells of the run. */
  readonly shell: number;
  /** Index into ClockData.beds. */
  readonly bed: number;
  /** Log ratio (weighted mean of log ratios for an index), before any gradient correction. */
  readonly x: number;
  /** Left out of the means? */
  readonly setAside: boolean;
}

/** One bed on one clock. */
export interface ClockBed {
  /** `section/bed`. */
  readonly key: string;
  readonly section: string;
  readonly bed: string;
  /** Indices into ClockData.shells, set-aside ones included. */
  readonly shells: readonly number[];
  /** Number of shells behind the mean (published ones included, set-aside ones not). 0: no mean. */
  readonly n: number;
  /** Mean log ratio, gradient taken out where one is used; NaN when n is 0. */
  readonly mean: number;
  /** Standard error of the mean from the pooled scatter: s / sqrt(n). */
  readonly se: number;
  /** Value of the gradient column minus its mean over beds; 0 without a gradient. */
  readonly gradient: number;
}

/** Pooled between-shell standard deviation of x within beds. */
export interface Scatter {
  readonly s: number;
  readonly df: number;
  /** True when df was under 4 and s = 0.07 was assumed, or shells agree better than can be and s = 0.005 was. */
  readonly assumed: boolean;
}

/** Shells and beds of one clock, ready for zones, order and checks. */
export interface ClockData {
  readonly clock: Clock;
  readonly shells: readonly ClockShell[];
  readonly beds: readonly ClockBed[];
  readonly scatter: Scatter;
  /** Slope taken out of the bed means along the gradient; 0 without one. Shells' x still hold it. */
  readonly slope: number;
}
