import type { ConversionFinding, Remark } from '../model/index.js';
import { caution, counted, finding, shown } from './remark-words.js';

/**
 * What is said of converting taxa to the reference (design 7.12).
 * @param asked the reference taxon; null where none was asked for
 */
export function conversionRemarks(conversions: readonly ConversionFinding[], asked: string | null): Remark[] {
  if (asked !== null && conversions.length === 0) {
    return [caution(`No taxon beside ${asked} was analysed, so there is nothing to convert to it.`)];
  }
  return conversions.map((one) => {
    if (one.verdict === 'refused') {
      return caution(
        `${one.taxon} (${one.fraction}) was not converted to ${one.reference}: ${one.reason}. It keeps its own clock and order.`,
      );
    }
    const slope = one.slope_fixed
      ? `slope fixed at 1, since ${counted(one.paired_beds.length, 'pair')} ${one.paired_beds.length === 1 ? 'is' : 'are'} under 5`
      : `slope ${shown(one.slope!)} ± ${shown(one.slope_se!, 2)}`;
    const extra =
      one.extra_scatter! > 0 ? ` The pairs scatter by ${shown(one.extra_scatter!, 2)} beyond their errors.` : '';
    return finding(
      `${one.clock}: ${counted(one.converted_beds, 'bed')} of ${one.taxon} put on the scale of ${one.reference} through ${counted(one.paired_beds.length, 'bed')} that hold both (${slope}); the error of the conversion is in every figure of these beds.${extra}${one.reason === '' ? '' : ` ${one.reason}`}`,
    );
  });
}
