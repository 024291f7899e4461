/**
 * A number with at most `digits` significant digits, with a true minus sign; an en dash for an unknown one.
 * @example
 * ```ts
 * figures(-0.123456) // => '−0.123'
 * ```
 */
export function figures(value: number | null, digits = 3): string {
  if (value === null || !Number.isFinite(value)) return '–';
  const rounded = Number(value.toPrecision(digits));
  return (
    Math.abs(rounded) >= 1e6 || (rounded !== 0 && Math.abs(rounded) < 1e-4) ? rounded.toExponential(1) : String(rounded)
  ).replace('-', '−');
}

/**
 * A probability as sentences say it: two decimals, and never quite 0 or 1.
 * @example
 * ```ts
 * chance(0.9999) // => '> 0.99'
 * ```
 */
export function chance(value: number | null): string {
  if (value === null || !Number.isFinite(value)) return '–';
  return value > 0.995 ? '> 0.99' : value < 0.005 ? '< 0.01' : value.toFixed(2);
}

/** A p-value: three decimals, `< 0.001` below. */
export function pValue(value: number | null): string {
  if (value === null || !Number.isFinite(value)) return '–';
  return value < 0.001 ? '< 0.001' : value.toFixed(3);
}

/**
 * A whole number with its noun.
 * @example
 * ```ts
 * counted(1, 'bed') // => '1 bed'
 * ```
 */
export const counted = (count: number, noun: string, plural = `${noun}s`): string =>
  `${thousands(count)} ${count === 1 ? noun : plural}`;

/**
 * A whole number with commas between the thousands. (The first number that goes through a locale costs 20 ms.)
 * @example
 * ```ts
 * thousands(12345) // => '12,345'
 * ```
 */
export const thousands = (count: number): string => String(count).replace(/\B(?=(?:\d{3})+$)/g, ',');

/**
 * A D/L ratio with three decimals, as laboratories print it.
 * @example
 * ```ts
 * ratio(0.13) // => '0.130'
 * ```
 */
export const ratio = (value: number | null): string =>
  value === null || !Number.isFinite(value) ? '–' : value.toFixed(3);
