import type { Analysis, BedSite, ConversionFinding, GradientFinding, Remark } from '../model/index.js';
import { rateIncreasePerDegree } from '../statistics/index.js';
import { type LaboratoryOffset, rowsByLaboratory } from './laboratory-offsets.js';
import type { Staircase } from './staircase.js';

/** Range of mean annual temperature, in degrees Celsius, above which a slope is called for. */
export const RANGE_OF_CMAT = 1;

/** Range of latitude, in degrees, above which a slope is called for. */
export const RANGE_OF_LATITUDE = 2;

const caution = (text: string, clock: string | null = null): Remark => ({ clock, level: 'caution', text });
const finding = (text: string, clock: string | null = null): Remark => ({ clock, level: 'finding', text });
const shown = (value: number, digits = 3): string => String(Number(value.toPrecision(digits)));
const counted = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

/** The first few names of a list, and how many more there are. */
export function someOf(names: readonly string[], most = 4): string {
  const more = names.length > most ? ` and ${names.length - most} more` : '';
  return `${names.slice(0, most).join(', ')}${more}`;
}

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
    const bics = `BIC ${shown(fit.bic_with, 5)} with the slope, ${shown(fit.bic_without, 5)} without`;
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

/** What one clock's rows of the shells table rest on. */
export interface ClockSources {
  readonly clock: string;
  readonly taxon: string;
  readonly fraction: string;
}

/**
 * What is said of laboratories and methods (design 7.12): the offsets taken out, and cautions where a clock, or one bed,
 * mixes laboratories without an offset, or methods. Published offsets between instruments are 5 to 21 %, as large as a step
 * between zones (common practice).
 * @param clocks the main clocks
 */
export function laboratoryRemarks(
  analyses: readonly Analysis[],
  offsets: readonly LaboratoryOffset[],
  clocks: readonly ClockSources[],
): Remark[] {
  return [
    ...offsetRemarks(offsets),
    ...clocks.flatMap((clock) => {
      const own = analyses.filter((row) => row.taxon === clock.taxon && row.fraction === clock.fraction);
      return [
        ...mixedRemarks(clock.clock, own, 'laboratory', 'laboratories', (row) => row.lab, offsets),
        ...mixedRemarks(clock.clock, own, 'method', 'methods', (row) => row.method, []),
      ];
    }),
  ];
}

function offsetRemarks(offsets: readonly LaboratoryOffset[]): Remark[] {
  const labs = [...new Set(offsets.map(({ lab }) => lab))];
  return labs.map((lab) => {
    const own = offsets.filter((offset) => offset.lab === lab);
    const each = own.map(
      ({ amino_acid, offset, se, standards }) =>
        `${amino_acid} ${percent(offset)} ± ${shown(100 * se, 2)} % (${counted(standards, 'standard')})`,
    );
    const assumed = own.some((offset) => offset.assumed)
      ? ' Too few standards show how well they agree; 7 % for each measurement is assumed.'
      : '';
    return finding(
      `Ratios of laboratory ${lab} were put on the scale of ${own[0].reference} by shared standards; it read ${each.join(', ')} off. The errors are carried into its beds.${assumed}`,
    );
  });
}

const percent = (offset: number): string => {
  const value = 100 * (Math.exp(offset) - 1);
  return `${value < 0 ? '−' : '+'}${shown(Math.abs(value), 2)} %`;
};

function mixedRemarks(
  clock: string,
  rows: readonly Analysis[],
  one: string,
  many: string,
  of: (row: Analysis) => string | null,
  offsets: readonly LaboratoryOffset[],
): Remark[] {
  const names = [...new Set(rows.map(of).filter((name): name is string => name !== null))];
  if (names.length < 2) return [];
  const tied = new Set(offsets.flatMap(({ lab, reference }) => [lab, reference]));
  const loose = one === 'laboratory' ? names.filter((name) => !tied.has(name)) : names;
  const named = rows.filter((row) => of(row) === null).length;
  const beds = new Map<string, Set<string>>();
  for (const row of rows) {
    const name = of(row);
    if (name === null) continue;
    const key = `${row.section}/${row.bed}`;
    beds.set(key, (beds.get(key) ?? new Set()).add(name));
  }
  const mixed = [...beds].flatMap(([key, own]) =>
    own.size > 1 && [...own].some((n) => loose.includes(n)) ? [key] : [],
  );
  if (loose.length === 0) return [];
  const counts = one === 'laboratory' ? rowsByLaboratory(rows) : null;
  const list = names.map((name) =>
    counts === null ? name : `${name} (${counted(counts.get(name)!, 'analysis', 'analyses')})`,
  );
  const without =
    one === 'laboratory'
      ? loose.length < names.length
        ? ` No shared standard ties ${loose.join(', ')} to the others.`
        : ' No shared standards tie them: give a standards table.'
      : '';
  const unnamed = named > 0 ? ` ${counted(named, 'row names', 'rows name')} none.` : '';
  const inBeds = mixed.length > 0 ? ` ${counted(mixed.length, 'bed mixes', 'beds mix')} them: ${someOf(mixed)}.` : '';
  return [
    caution(
      `The clock mixes ${many}: ${list.join(', ')}.${without} Published offsets between instruments are 5 to 21 %, as large as a step between zones.${inBeds}${unnamed}`,
      clock,
    ),
  ];
}

/**
 * What is said of the staircase of one clock: how many relations were derived, or why none was.
 * @param elevations number of beds with an elevation
 */
export function staircaseRemarks(clock: string, staircase: Staircase | null, elevations: number): Remark[] {
  if (staircase === null) return [];
  const { relations, circles, cut } = staircase;
  if (relations.length === 0) {
    const why =
      elevations < 2
        ? 'fewer than 2 beds have an elevation_m'
        : 'no two beds stand on different terraces that superposition leaves unordered';
    return [caution(`No staircase relation was derived, since ${why}.`, clock)];
  }
  const binding =
    relations[0].certainty === 'certain' ? 'They bind the order.' : 'They are checked, and do not bind the order.';
  const remarks = [
    finding(
      `${counted(relations.length, 'staircase relation')} derived from elevations, the higher terrace the older. ${binding}`,
      clock,
    ),
  ];
  if (circles.length > 0) {
    const named = circles.map(({ lower, upper }) => `${lower} > ${upper}`);
    remarks.push(
      caution(
        `${counted(circles.length, 'staircase relation')} left out, since other relations say the opposite: ${someOf(named)}.`,
        clock,
      ),
    );
  }
  if (cut) {
    remarks.push(caution(`So many beds stand on terraces that each was held against the next lower ones only.`, clock));
  }
  return remarks;
}

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
