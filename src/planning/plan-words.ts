/* How the lines of the plan write numbers. */

/** A count of shells. */
export const shellsInWords = (count: number): string => `${count} more ${count === 1 ? 'shell' : 'shells'}`;

/** A share as whole per cent, never a false 0 or 100. */
export function percentInWords(share: number): string {
  if (share > 0.99 && share < 1) return 'over 99 %';
  if (share < 0.01 && share > 0) return 'under 1 %';
  return `${Math.round(100 * share)} %`;
}

/** A difference of log ratios with its standard error, as a share of the ratio: ln(D/L) apart by 0.1 is 11 % of D/L. */
export function gapInWords(gap: number, error: number): string {
  return `${Math.abs(gap).toFixed(3)} ± ${error.toFixed(3)} in ln(D/L)`;
}

/** `a`, `a and b`, `a, b and c`. */
export function joinedInWords(parts: readonly string[]): string {
  return parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts[parts.length - 1]}`;
}

/** `5 more shells from A/1 and 2 from B/3`, beds that need none left out. */
export function dealInWords(beds: readonly string[], shells: readonly number[]): string {
  const parts = beds.flatMap((bed, i) => (shells[i] > 0 ? [{ bed, count: shells[i] }] : []));
  return joinedInWords(
    parts.map(({ bed, count }, i) => (i === 0 ? `${shellsInWords(count)} from ${bed}` : `${count} from ${bed}`)),
  );
}

/** An expected number of pairs. */
export const pairsInWords = (count: number): string =>
  `${count.toFixed(1)} ${count.toFixed(1) === '1.0' ? 'pair' : 'pairs'}`;
