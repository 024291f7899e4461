/** Which sign stands before the decimals in a file. */
export type DecimalSign = 'point' | 'comma';

const POINT = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,4})?$/;
const COMMA = /^[+-]?(?:\d+,?\d*|,\d+)(?:[eE][+-]?\d{1,4})?$/;

const MONTHS =
  'jan|feb|mar|apr|may|jun|jul|aug|sep|sept|oct|nov|dec|january|february|march|april|june|july|august|september|october|november|december' +
  '|mär|mrz|mai|okt|dez|janv|févr|fevr|mars|avr|juin|juil|août|aout|déc|ene|abr|ago|dic|gen|mag|giu|lug|set|ott|out|fev';
const DATES: readonly RegExp[] = [
  new RegExp(`^(?:${MONTHS})\\.?[-/. ]\\d{1,4}$`, 'iu'),
  new RegExp(`^\\d{1,4}\\.?[-/. ]?(?:${MONTHS})\\.?(?:[-/. ]\\d{2,4})?$`, 'iu'),
  /^\d{1,3}:\d{2}(?::\d{2}(?:[.,]\d+)?)?(?:\s*[ap]m)?$/i,
  /^\d{4}[-/]\d{1,2}[-/]\d{1,2}(?:[ T].*)?$/,
  /^\d{1,2}\/\d{1,2}(?:\/\d{2,4})?(?: .*)?$/,
  /^\d{1,2}[.-]\d{1,2}[.-]\d{2,4}$/,
];

const NUMBER = '[+-]?\\d+(?:[.,]\\d+)?';
const RANGE = new RegExp(`^${NUMBER}\\s*(?:-|–|—|\\.\\.+|…|to|bis|à)\\s*${NUMBER}$`, 'iu');
const PLUS_MINUS = new RegExp(`^${NUMBER}\\s*(?:±|\\+\\s*/?\\s*-|\\()\\s*${NUMBER}\\)?$`, 'u');
const NOT_MEASURED =
  /^(?:nan|na|n\/a|n\.?a\.?|n\.?d\.?|n\.?m\.?|nil|none|null|missing|bdl|b\.d\.l\.?|lod|-+|–|—|\?+|\.+|\*+|x|tr|trace|#n\/?a)$/iu;

/**
 * The number in a cell whose text has no white space around it, or NaN: with `comma` a decimal comma is read, else a
 * decimal point. Leading zeros (`039.000`) and anything beyond floating point give NaN.
 *
 * @example
 * readNumber('0,43', 'comma') // => 0.43
 * @example
 * readNumber('0.43', 'comma') // => NaN
 * @example
 * readNumber('039.000', 'point') // => NaN
 */
export function readNumber(text: string, sign: DecimalSign): number {
  const plain = readPlain(text, sign === 'point' ? 46 : 44);
  if (!Number.isNaN(plain)) return plain;
  if (!(sign === 'point' ? POINT : COMMA).test(text) || hasLeadingZero(text)) return Number.NaN;
  const value = Number(sign === 'point' ? text : text.replace(',', '.'));
  return Number.isFinite(value) ? value : Number.NaN;
}

/**
 * Digits with at most one decimal sign, 15 digits at most: whole number and power of ten are then exact, so that their
 * quotient is the nearest floating-point number, as in Number(). NaN for anything else.
 */
function readPlain(text: string, decimalSign: number): number {
  const length = text.length;
  if (length === 0 || length > 16 || hasLeadingZero(text)) return Number.NaN;
  let whole = 0;
  let digits = 0;
  let decimals = -1;
  for (let i = 0; i < length; i += 1) {
    const code = text.charCodeAt(i);
    if (code >= 48 && code <= 57) {
      whole = whole * 10 + (code - 48);
      digits += 1;
      if (decimals >= 0) decimals += 1;
    } else if (code === decimalSign && decimals < 0) decimals = 0;
    else return Number.NaN;
  }
  if (digits === 0 || digits > 15) return Number.NaN;
  return decimals > 0 ? whole / POWERS[decimals] : whole;
}

const POWERS = Array.from({ length: 16 }, (_, i) => Number(`1e${i}`));

/** Text of a numeric cell without white space around it, a typographic minus as a hyphen. */
export function tidyNumber(text: string): string {
  const first = text.charCodeAt(0);
  const last = text.charCodeAt(text.length - 1);
  // Nearly every cell is plain; the test spares two passes over it.
  if (first > 32 && first < 127 && last > 32 && last < 127) return text;
  return text.trim().replace(/^[\u2212\u2013]/, '-');
}

/** A whole part of several digits that starts with 0. */
function hasLeadingZero(text: string): boolean {
  const at = text.charCodeAt(0) === 43 || text.charCodeAt(0) === 45 ? 1 : 0;
  if (text.charCodeAt(at) !== 48) return false;
  const next = text.charCodeAt(at + 1);
  return next >= 48 && next <= 57;
}

/**
 * Says why a cell is no number, and what to do: for the cells that {@link readNumber} gives NaN for.
 *
 * @example
 * whyNoNumber('10-12', 'point') // => 'is a range. Write one number; put the uncertainty into a column of its own'
 */
export function whyNoNumber(text: string, sign: DecimalSign): string {
  if (/^[+-]?inf(?:inity)?$|^[+-]?∞$/i.test(text)) return 'is infinite. Leave the cell empty if the value is not known';
  if (NOT_MEASURED.test(text)) return 'is no number. Leave the cell empty where nothing was measured';
  if (/^#|^err:\d+$/i.test(text)) {
    return 'is an error that a spreadsheet left. Mend its formula, or leave the cell empty';
  }
  if (DATES.some((date) => date.test(text))) {
    return (
      'is a date or a time, which a spreadsheet makes of a number it misreads. The number is lost in this file: go back to ' +
      "the laboratory's file, format the column as text or number before pasting, and export again"
    );
  }
  if (RANGE.test(text)) return 'is a range. Write one number; put the uncertainty into a column of its own';
  if (PLUS_MINUS.test(text)) {
    return 'holds two numbers. Write the mean here and the standard deviation into a column such as "D/L Asx sd"';
  }
  if (/^[<>≤≥~≈]|^ca?\.? ?\d/i.test(text))
    return 'is a limit or an estimate. Write a plain number, or leave the cell empty';
  if (/%$/.test(text)) return 'is a percentage. Write it as a plain number, such as 0.12 for 12 %';
  if (POINT.test(text) || COMMA.test(text)) {
    if (hasLeadingZero(text)) {
      return 'starts with a zero before other digits, so its decimal sign may be lost. Write the number as the laboratory gave it';
    }
    const other = sign === 'point' ? 'comma' : 'point';
    if (text.includes(sign === 'point' ? ',' : '.')) {
      return `has a decimal ${other}, but the file has a decimal ${sign}. Use one decimal sign in the whole file`;
    }
    return 'is too large for a number. Write the number as the laboratory gave it';
  }
  if (/^[+-]?\d{1,3}(?:[.,' \u00a0\u202f\u2009]\d{3})+(?:[.,]\d+)?$/.test(text)) {
    return 'has signs between its thousands. Write it without them, with one decimal sign, such as 1234.5';
  }
  if (/^[+-]?\d+([.,]\d+){2,}$/.test(text))
    return 'has more than one decimal sign. Write the number as the laboratory gave it';
  return 'is no number. Write a number, or leave the cell empty where nothing was measured';
}
