import { type BedMark, DEFAULT_OPTIONS, type ScreeningLimits } from '../model/index.js';
import { shown } from './rule.js';

/** What the bed rules look at. */
export interface BedToScreen {
  /** Thickness of the cover above the sampled shells, metres; null where not given. */
  readonly burial_m: number | null;
  /** Shells behind the bed's mean. */
  readonly shells: number;
}

/** A mark on a bed, with the numbers behind it. */
export interface BedScreeningMark {
  /** Index of the bed in the list that was screened. */
  readonly bed: number;
  readonly mark: BedMark;
  readonly evidence: string;
}

/**
 * Marks beds that lie so shallow that surface heat may have hastened racemization (`shallow burial`, settings key
 * `screening.burial_m`, default 1 m), beds of few shells (`provisional`, `screening.shells_a_bed`, default 5) and of
 * one shell (`one shell`). Both limits are common practice. A mark on a bed sets nothing aside. A bed without any
 * shell gets no mark for its number.
 *
 * @example
 * screenBeds([{ burial_m: 0.4, shells: 6 }]).map((mark) => mark.mark) // => ['shallow burial']
 */
export function screenBeds(
  beds: readonly BedToScreen[],
  limits: ScreeningLimits = DEFAULT_OPTIONS.screening,
): BedScreeningMark[] {
  return beds.flatMap(({ burial_m, shells }, bed) => {
    const marks: BedScreeningMark[] = [];
    if (burial_m !== null && burial_m < limits.burial_m) {
      const evidence = `the shells lay under ${shown(burial_m)} m, less than ${shown(limits.burial_m)} m: heat of the surface may have raised the ratios`;
      marks.push({ bed, mark: 'shallow burial', evidence });
    }
    if (shells === 1) marks.push({ bed, mark: 'one shell', evidence: 'the mean rests on one shell' });
    if (shells >= 1 && shells < limits.shells_a_bed) {
      const evidence = `the mean rests on ${shells} ${shells === 1 ? 'shell' : 'shells'}, fewer than ${shown(limits.shells_a_bed)}`;
      marks.push({ bed, mark: 'provisional', evidence });
    }
    return marks;
  });
}
