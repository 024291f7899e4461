/**
 * A header or a name reduced to what counts in comparing it: lower case, letters and digits only; `±` reads as sd.
 *
 * @example
 * squash('D/L Asx') // => 'dlasx'
 * @example
 * squash('height (m)') // => 'heightm'
 */
export function squash(text: string): string {
  return text
    .replaceAll('±', ' sd ')
    .replaceAll('σ', ' sigma ')
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]/gu, '');
}
