import { type YorkLine, yorkLine } from '../statistics/index.js';

/** A bed of one taxon: mean log ratio before any gradient is taken out, its standard error, and the shells behind it. */
export interface BedOfTaxon {
  /** `section/bed`. */
  readonly key: string;
  readonly n: number;
  readonly mean: number;
  readonly se: number;
}

/** Paired beds under which the slope is fixed at 1: ratios of two taxa then differ by one factor. */
export const FEWEST_PAIRS_FOR_SLOPE = 5;

/** Standard error given to a slope that is fixed at 1, so that doubt grows away from the paired beds. */
export const DOUBT_OF_FIXED_SLOPE = 0.1;

/** Share of the range of the ratios to be converted that the paired beds must span. */
export const LEAST_SPAN = 0.25;

/** Line x_ref = intercept + slope · x that turns log ratios of one taxon into those of the reference. */
export interface ConversionLine {
  readonly slope: number;
  readonly slopeSe: number;
  readonly slopeFixed: boolean;
  readonly intercept: number;
  readonly interceptSe: number;
  /** Covariance of slope and intercept. */
  readonly covariance: number;
  /** Standard deviation of the pairs about the line beyond their errors; 0 where their errors explain it. */
  readonly extra: number;
  /** Of the pairs about the line, before any extra scatter. */
  readonly chiSquared: number;
  readonly df: number;
}

/** What the paired beds say of converting one taxon. */
export interface TaxonConversion {
  /** Keys of the beds that hold both taxa. */
  readonly pairs: readonly string[];
  /** null where there are too few pairs for any line. */
  readonly line: ConversionLine | null;
  /** Why the taxon is not converted, as a sentence; null where it is. */
  readonly refusal: string | null;
  /** How far each paired bed's own reference mean moves its converted one, 0 to 1, in the order of `pairs`. */
  readonly leverages: readonly number[];
}

/**
 * Conversion of one taxon to the scale of another from the beds that hold both (design 7.12): a line with errors in both
 * (York and others 2004, doi:10.1119/1.1632486), its slope fixed at 1 under five pairs. Where chi-squared exceeds its
 * degrees of freedom, the pairs scatter beyond their errors (one taxon's shells had another history): an extra scatter is
 * added to every pair until chi-squared equals them (Paule and Mandel 1982, doi:10.6028/jres.087.022), and every
 * converted bed carries it.
 *
 * Refused: fewer than 2 pairs; pairs that span less than a quarter of the ratios to be converted; a slope not above 0, or
 * known no better than to half of itself; under five pairs, clocks of different amino acids, which no slope of 1 ties.
 * @param reference beds of the reference taxon
 * @param other beds of the taxon to be converted
 * @param sameAminoAcids whether both clocks rest on the same amino acids
 */
export function taxonConversion(
  reference: readonly BedOfTaxon[],
  other: readonly BedOfTaxon[],
  sameAminoAcids = true,
): TaxonConversion {
  const byKey = new Map(reference.flatMap((bed) => (bed.n > 0 ? [[bed.key, bed] as const] : [])));
  const toConvert = other.filter((bed) => bed.n > 0);
  const paired = toConvert.filter((bed) => byKey.has(bed.key));
  const pairs = paired.map((bed) => bed.key);
  const refused = (refusal: string, line: ConversionLine | null = null): TaxonConversion => ({
    pairs,
    line,
    refusal,
    leverages: [],
  });
  if (pairs.length < 2) {
    const held = pairs.length === 0 ? 'no bed holds' : 'only one bed holds';
    return refused(`${held} both taxa, and at least 2 are needed (5 to find the slope as well)`);
  }
  const x = paired.map((bed) => bed.mean);
  const y = pairs.map((key) => byKey.get(key)!.mean);
  const slopeFixed = pairs.length < FEWEST_PAIRS_FOR_SLOPE;
  if (slopeFixed && !sameAminoAcids) {
    return refused(
      `the two clocks rest on different amino acids, and ${pairs.length} paired beds are too few to find how their ratios go together (5 are needed)`,
    );
  }
  const [span, range] = [spanOf(x), spanOf(toConvert.map((bed) => bed.mean))];
  if (!(span >= LEAST_SPAN * range) || !(span > 0)) {
    return refused(
      `the beds that hold both taxa span ${share(span, range)} of the range of log ratios to be converted, and at least a quarter is needed: pair older or younger beds too`,
    );
  }
  const varianceX = paired.map((bed) => bed.se ** 2);
  const varianceY = pairs.map((key) => byKey.get(key)!.se ** 2);
  const fitted = fitLine(x, y, varianceX, varianceY, slopeFixed);
  if (fitted === null) return refused('the beds that hold both taxa make no line');
  const { line, leverages } = fitted;
  if (!(line.slope > 0)) return refused(`the slope of the paired beds is ${shown(line.slope)}, not above 0`, line);
  if (!(line.slopeSe <= line.slope / 2)) {
    return refused(
      `the slope of the paired beds is ${shown(line.slope)} ± ${shown(line.slopeSe)}, known no better than to half of itself`,
      line,
    );
  }
  return { pairs, line, refusal: null, leverages };
}

/** A log ratio on the reference's scale, with the error of the line and of its extra scatter in it. */
export function convertLogRatio(line: ConversionLine, x: number, se: number): { mean: number; se: number } {
  const ofLine = line.interceptSe ** 2 + 2 * x * line.covariance + (x * line.slopeSe) ** 2;
  const variance = (line.slope * se) ** 2 + Math.max(0, ofLine) + line.extra ** 2;
  return { mean: line.intercept + line.slope * x, se: Math.sqrt(variance) };
}

const spanOf = (values: readonly number[]): number => Math.max(...values) - Math.min(...values);
const shown = (value: number): string => String(Number(value.toPrecision(3)));
const share = (part: number, whole: number): string =>
  whole > 0 ? `${Math.round((100 * part) / whole)} %` : 'nothing';

function fitLine(
  x: readonly number[],
  y: readonly number[],
  varianceX: readonly number[],
  varianceY: readonly number[],
  slopeFixed: boolean,
): { line: ConversionLine; leverages: number[] } | null {
  const options = slopeFixed ? { slope: 1 } : {};
  const at = (extra2: number): YorkLine | null => {
    try {
      return yorkLine(
        x,
        y,
        varianceX.map((v) => 1 / v),
        varianceY.map((v) => 1 / (v + extra2)),
        options,
      );
    } catch {
      // points that make no line: the slope does not settle, or goes to infinity
      return null;
    }
  };
  const plain = at(0);
  if (plain === null || !Number.isFinite(plain.slope)) return null;
  let york = plain;
  let extra2 = 0;
  if (plain.df > 0 && plain.chiSquared > plain.df) {
    let [low, high] = [0, spanOf(y) ** 2 + 1e-6];
    for (let step = 0; step < 60; step++) {
      const middle = (low + high) / 2;
      const fit = at(middle);
      if (fit !== null && fit.chiSquared > plain.df) low = middle;
      else high = middle;
    }
    extra2 = high;
    york = at(extra2) ?? plain;
  }
  const weights = x.map((_, i) => 1 / (varianceY[i] + extra2 + york.slope ** 2 * varianceX[i]));
  const mass = weights.reduce((sum, w) => sum + w, 0);
  const centre = x.reduce((sum, value, i) => sum + weights[i] * value, 0) / mass;
  const squares = x.reduce((sum, value, i) => sum + weights[i] * (value - centre) ** 2, 0);
  const leverages = x.map(
    (value, i) => weights[i] * (1 / mass + (slopeFixed || squares === 0 ? 0 : (value - centre) ** 2 / squares)),
  );
  const slopeSe = slopeFixed ? DOUBT_OF_FIXED_SLOPE : york.slopeSe;
  return {
    line: {
      slope: york.slope,
      slopeSe,
      slopeFixed,
      intercept: york.intercept,
      // a doubtful fixed slope turns about the middle of the pairs
      interceptSe: slopeFixed ? Math.hypot(york.interceptSe, centre * slopeSe) : york.interceptSe,
      covariance: slopeFixed ? -centre * slopeSe ** 2 : york.covariance,
      extra: Math.sqrt(extra2),
      chiSquared: plain.chiSquared,
      df: plain.df,
    },
    leverages: leverages.map((h) => Math.min(1, Math.max(0, h))),
  };
}
