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
  if (Number.isInteger(value) && Math.abs(value) < 10 ** digits) return String(value);
  return String(Number(value.toPrecision(digits)));
}
