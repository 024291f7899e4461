import type { Remark } from '../model/index.js';

/** A remark that the reader should beware of; of one clock, or of the whole run. */
export const caution = (text: string, clock: string | null = null): Remark => ({ clock, level: 'caution', text });

/** A remark on what was found. */
export const finding = (text: string, clock: string | null = null): Remark => ({ clock, level: 'finding', text });

/** A number with so many significant digits, and a true minus sign. */
export const shown = (value: number, digits = 3): string => String(Number(value.toPrecision(digits))).replace('-', '−');

/** A number with its noun. */
export const counted = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

/** The first few names of a list, and how many more there are. */
export function someOf(names: readonly string[], most = 4): string {
  const more = names.length > most ? ` and ${names.length - most} more` : '';
  return `${names.slice(0, most).join(', ')}${more}`;
}
