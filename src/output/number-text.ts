import { TextOut } from './text-out.js';

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
  writeNumber(scratch, value, digits);
  const text = String.fromCharCode(...scratch.room.subarray(0, scratch.at));
  scratch.at = 0;
  return text;
}

const scratch = new TextOut(() => {});

/** Writes {@link numberText}. */
export function writeNumber(out: TextOut, value: number, digits: number): void {
  if (!Number.isFinite(value)) throw new Error(`a finite number was wanted, ${value} came`);
  const size = Math.abs(value);
  const inFull = Number.isInteger(value) && size < POWERS[digits];
  if (inFull ? size >= 1e9 : size < 1e-6 || size >= 1e6) {
    out.text(String(inFull ? value : Number(value.toPrecision(digits))));
    return;
  }
  // Powers of ten up to 1e22 are exact, so the digits asked for are those of a whole number that is exact too, and
  // only a point has to be put into it. Several times as fast as toPrecision, and a survey has millions of numbers.
  const decimals = inFull ? 0 : digits - digitsBefore(size);
  const whole = Math.round(value * POWERS[decimals]);
  if (whole < 0) out.ascii(MINUS);
  writeWhole(out, Math.abs(whole), decimals);
}

const POWERS = Array.from({ length: 23 }, (_, exponent) => Number(`1e${exponent}`));

/** Digits before the point of a size from 1e-6 to 1e6; below 1 minus the zeros behind the point. */
function digitsBefore(size: number): number {
  if (size >= 1) return size < 10 ? 1 : size < 100 ? 2 : size < 1e3 ? 3 : size < 1e4 ? 4 : size < 1e5 ? 5 : 6;
  return size >= 0.1 ? 0 : size >= 0.01 ? -1 : size >= 1e-3 ? -2 : size >= 1e-4 ? -3 : size >= 1e-5 ? -4 : -5;
}

/** Digits of the number in hand, the last one first. */
const reversed = new Uint8Array(24);

/** Takes a whole number below 10^15 apart; returns how many digits it has, 0 for 0. */
function takeApart(whole: number): number {
  let count = 0;
  let rest = whole;
  // in halves, each small enough for whole-number arithmetic
  if (whole >= 1e9) {
    rest = Math.floor(whole / 1e6);
    for (let lower = (whole - rest * 1e6) | 0; count < 6; count++) {
      const next = (lower / 10) | 0;
      reversed[count] = ZERO + lower - 10 * next;
      lower = next;
    }
  }
  for (let upper = rest | 0; upper > 0; count++) {
    const next = (upper / 10) | 0;
    reversed[count] = ZERO + upper - 10 * next;
    upper = next;
  }
  return count;
}

/** A whole number with the point before its last `decimals` digits; zeros that end the decimals are left out. */
function writeWhole(out: TextOut, whole: number, decimals: number): void {
  const count = takeApart(whole);
  out.need(count + decimals + 2);
  const { room } = out;
  let at = out.at;
  let end = 0;
  while (end < decimals && end < count && reversed[end] === ZERO) end++;
  if (count <= decimals) room[at++] = ZERO;
  let digit = count - 1;
  for (; digit >= decimals; digit--) room[at++] = reversed[digit];
  if (end < decimals) {
    room[at++] = POINT;
    for (let zeros = decimals - count; zeros > 0; zeros--) room[at++] = ZERO;
    for (; digit >= end; digit--) room[at++] = reversed[digit];
  }
  out.at = at;
}

const ZERO = 48;
const MINUS = 45;
const POINT = 46;
