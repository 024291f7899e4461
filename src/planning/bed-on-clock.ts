import type { BedRow, Findings } from '../model/index.js';

/** One bed of one clock, or a deposit of several that are stated to be as old, as planning sees it. */
export interface BedOnClock {
  /** `section/bed`; of a deposit, the bed with the fewest shells, where more of them tell most. */
  readonly key: string;
  /** `section/bed` of all its beds. */
  readonly members: readonly string[];
  /** Share of the shells in each section. */
  readonly sections: ReadonlyMap<string, number>;
  /** Shells behind the mean. */
  readonly shells: number;
  readonly mean: number;
  /** Variance of the mean that more shells lessen, s²/n, and the rest (conversion, laboratory offset). */
  readonly shellVariance: number;
  readonly otherVariance: number;
  readonly row: BedRow;
}

/** One main clock as planning sees it. */
export interface ClockInView {
  readonly clock: string;
  /** s: standard deviation between shells of one bed. */
  readonly scatter: number;
  /** tau: standard deviation between the beds of one zone; null where no zones are in use. */
  readonly spread: number | null;
  /** 2 tau² between beds of two sections, or twice the tau² given; 0 within a section, whose beds share one temperature history. */
  readonly spreadVariance: (a: BedOnClock, b: BedOnClock, spread2?: number) => number;
  /** Degrees of freedom of the scatter: shells kept minus beds. */
  readonly df: number;
  /** Beds with a mean. */
  readonly beds: readonly BedOnClock[];
}

/** Name of a bed in tables. */
export const bedKey = (row: { readonly section: string; readonly bed: string }): string => `${row.section}/${row.bed}`;

/** The main clocks of a run, with their beds that have a mean. */
export function clocksInView(findings: Findings): ClockInView[] {
  return findings.clocks
    .filter((row) => row.main)
    .map(({ clock, scatter, spread }) => {
      const beds = findings.beds.flatMap((row): BedOnClock[] => {
        if (row.clock !== clock || row.log_mean === null || row.log_se === null || !(row.shells > 0)) return [];
        const shellVariance = (scatter * scatter) / row.shells;
        const otherVariance = Math.max(0, row.log_se * row.log_se - shellVariance);
        // se and scatter are written to 6 digits: a remainder of that size is rounding
        return [
          {
            key: bedKey(row),
            members: [bedKey(row)],
            sections: new Map([[row.section, 1]]),
            shells: row.shells,
            mean: row.log_mean,
            shellVariance,
            otherVariance: otherVariance < 1e-4 * shellVariance ? 0 : otherVariance,
            row,
          },
        ];
      });
      const shells = beds.reduce((sum, bed) => sum + bed.shells, 0);
      const shift = (spread ?? 0) ** 2;
      return {
        clock,
        scatter,
        spread,
        spreadVariance: (a: BedOnClock, b: BedOnClock, spread2: number = shift) =>
          spread2 * squaresApart(a.sections, b.sections),
        df: Math.max(1, shells - beds.length),
        beds,
      };
    });
}

/** Variance of the difference of two means of section shifts, each of variance 1. */
function squaresApart(a: ReadonlyMap<string, number>, b: ReadonlyMap<string, number>): number {
  let sum = 0;
  for (const [section, share] of a) sum += (share - (b.get(section) ?? 0)) ** 2;
  for (const [section, share] of b) if (!a.has(section)) sum += share ** 2;
  return sum;
}
