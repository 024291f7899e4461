import type { BedSite, GradientFinding, Remark } from '../model/index.js';
import { rateIncreasePerDegree } from '../statistics/index.js';
import { caution, counted, finding, shown, someOf } from './remark-words.js';

/** Range of mean annual temperature, in degrees Celsius, above which a slope is called for. */
export const RANGE_OF_CMAT = 1;

/** Range of latitude, in degrees, above which a slope is called for. */
export const RANGE_OF_LATITUDE = 2;

/**
 * The caution for a survey that spans a range of temperature, or of latitude, and asks for no slope (design 7.11): by
 * Arrhenius' law with 29.4 kcal/mol (Mitterer 1975) the rate rises by about 18 to 22 % for each degree, so beds of one age
 * come to look like different zones.
 * @param sites beds with a ratio
 * @param asked the gradient's column; null where none was asked for
 */
export function temperatureRemarks(sites: readonly BedSite[], asked: string | null): Remark[] {
  if (asked !== null) return [];
  const cmat = rangeOf(sites.map((site) => site.cmat_c));
  if (cmat !== null && cmat.high - cmat.low > RANGE_OF_CMAT) {
    const rate = rateIncreasePerDegree((cmat.low + cmat.high) / 2);
    const range = cmat.high - cmat.low;
    return [
      caution(
        `Mean annual temperature differs by ${shown(range)} °C over the beds (${shown(cmat.low)} to ${shown(cmat.high)}). Racemization runs about ${Math.round(100 * (rate - 1))} % faster for each degree (29.4 kcal/mol, Mitterer 1975), so beds of one age may differ by a factor of up to ${shown(rate ** range, 2)} in ratio from temperature alone. Ask for --gradient cmat_c to take a slope out.`,
      ),
    ];
  }
  const latitude = rangeOf(sites.map((site) => site.latitude));
  if (latitude !== null && latitude.high - latitude.low > RANGE_OF_LATITUDE) {
    const range = latitude.high - latitude.low;
    return [
      caution(
        `The beds span ${shown(range)}° of latitude, over which temperature seldom stays the same, and racemization runs about 18 to 22 % faster for each degree Celsius (29.4 kcal/mol, Mitterer 1975). Ask for --gradient latitude, or give cmat_c in the beds table and ask for --gradient cmat_c.`,
      ),
    ];
  }
  return [];
}

function rangeOf(values: readonly (number | null)[]): { low: number; high: number } | null {
  const known = values.filter((value): value is number => value !== null);
  if (known.length < 2) return null;
  return { low: Math.min(...known), high: Math.max(...known) };
}

/**
 * What is said of the slope of one clock: the slope with its interval, whether it was taken out, and the BIC with and without;
 * which beds have no value; that no slope could be fitted.
 * @param fit null where the column does not vary over the clock's beds, or too few have a value
 * @param without `section/bed` of beds with a ratio but no value in the column
 */
export function gradientRemarks(
  clock: string,
  column: string,
  fit: GradientFinding | null,
  without: readonly string[],
): Remark[] {
  const remarks: Remark[] = [];
  if (fit === null) {
    remarks.push(
      caution(
        `No slope along ${column} was fitted, since fewer than 4 beds have a value or all have the same. Ratios stand as measured.`,
        clock,
      ),
    );
  } else {
    const slope = `${shown(fit.slope)} per unit of ${column} (95 % ${shown(fit.slope_low)} to ${shown(fit.slope_high)}) in log ratio`;
    const bics = `BIC ${shown(fit.bic_with, 4)} with the slope, ${shown(fit.bic_without, 4)} without`;
    remarks.push(
      fit.used
        ? finding(
            `Ratios change by ${slope}, ${bics}. The slope is taken out: zones, order and relations hold at ${column} ${shown(fit.centre, 4)}.`,
            clock,
          )
        : caution(
            `The ratios support no slope along ${column}; the best is ${slope}, ${bics}. None is taken out.${
              fit.bic_with < fit.bic_without
                ? ' The BIC counts every bed as a witness; sections differ by something of their own, and with that in the interval it holds 0.'
                : ''
            }`,
            clock,
          ),
    );
  }
  if (without.length > 0 && fit?.used) {
    remarks.push(
      caution(
        `${counted(without.length, 'bed has', 'beds have')} no ${column} (${someOf(without)}) and ${without.length === 1 ? 'stands' : 'stand'} uncorrected, as if at the mean of the others. Fill in the beds table.`,
        clock,
      ),
    );
  }
  return remarks;
}
