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
  return String(rounded(value, digits));
}

// Powers of ten up to 1e22 are exact, so whole / power is the double nearest to the decimal that is meant, and String
// writes it with its few digits. Several times as fast as toPrecision, which serves the rest.
function rounded(value: number, digits: number): number {
  const size = Math.abs(value);
  if (!(size >= 1e-6 && size < 1e6)) return Number(value.toPrecision(digits));
  let before = 0;
  if (size >= 1) while (size >= POWERS[before]) before++;
  else while (size < 1 / POWERS[1 - before]) before--;
  const power = POWERS[digits - before];
  return Math.round(value * power) / power;
}

const POWERS = Array.from({ length: 23 }, (_, exponent) => Number(`1e${exponent}`));
