/**
 * A finite number as text with at most `digits` significant digits: no trailing zeros, no minus before a zero, and an
 * exponent only below 1e-6 or from 1e21 on. Whole numbers below 10^digits are written in full.
 *
 * @throws Error when the number is not finite; tables write unknown values as null.
 *
 * @example
 * numberText(0.123456789, 6) // => '0.123457'
 * numberText(-0, 6) // => '0'
 * numberText(0.1 + 0.2, 6) // => '0.3'
 */
export function numberText(value: number, digits: number): string {
  if (!Number.isFinite(value)) throw new Error(`a finite number was wanted, ${value} came`);
  if (value === 0) return '0';
  if (Number.isInteger(value) && Math.abs(value) < POWERS[digits]) return String(value);
  const size = Math.abs(value);
  if (!(size >= 1e-6 && size < 1e6)) return String(Number(value.toPrecision(digits)));
  // Powers of ten up to 1e22 are exact, so the digits asked for are those of a whole number that is exact too, and
  // only a point has to be put into it. Several times as fast as toPrecision, and a survey has millions of numbers.
  const decimals = digits - digitsBefore(size);
  const whole = Math.round(value * POWERS[decimals]);
  const text = withPoint(wholeText(Math.abs(whole)), decimals);
  return whole < 0 ? `-${text}` : text;
}

const POWERS = Array.from({ length: 23 }, (_, exponent) => Number(`1e${exponent}`));

/** Digits before the point of a size from 1e-6 to 1e6; below 1 minus the zeros behind the point. */
function digitsBefore(size: number): number {
  if (size >= 1) return size < 10 ? 1 : size < 100 ? 2 : size < 1e3 ? 3 : size < 1e4 ? 4 : size < 1e5 ? 5 : 6;
  return size >= 0.1 ? 0 : size >= 0.01 ? -1 : size >= 1e-3 ? -2 : size >= 1e-4 ? -3 : size >= 1e-5 ? -4 : -5;
}

/** A whole number in two halves, each of which is small enough to be written fast. */
function wholeText(whole: number): string {
  if (whole < 1e9) return String(whole | 0);
  const upper = Math.floor(whole / 1e6);
  return String(upper) + String((whole - upper * 1e6) | 0).padStart(6, '0');
}

/** Puts the point before the last `decimals` digits, and leaves zeros out that end the number. */
function withPoint(digits: string, decimals: number): string {
  let end = digits.length;
  const point = end - decimals;
  while (end > point && end > 0 && digits.charCodeAt(end - 1) === ZERO) end--;
  if (point <= 0) return `0.${'0'.repeat(-point)}${digits.slice(0, end)}`;
  return end > point ? `${digits.slice(0, point)}.${digits.slice(point, end)}` : digits.slice(0, point);
}

const ZERO = 48;
