import { LIMITS } from './limits.js';
import { splitCells } from './split-records.js';

const DELIMITERS = [',', ';', '\t'] as const;

/** What separates the cells of a text table. */
export type Delimiter = (typeof DELIMITERS)[number];

/**
 * Chooses the delimiter under which one of the first lines holds the most known headers; where none is known, the one
 * that splits the first lines most, and most evenly.
 *
 * @param isKnown whether a header is one that the table may have
 * @example
 * chooseDelimiter('section;bed;D/L Asx\nA;1;0,43\n', (header) => header === 'bed') // => ';'
 */
export function chooseDelimiter(text: string, isKnown: (header: string) => boolean): Delimiter {
  const head = text.slice(0, 200_000).split(/\r\n?|\n/, 60);
  const lines = head.filter((line) => line.trim() !== '');
  let best: Delimiter = ',';
  let bestScore = -1;
  for (const delimiter of DELIMITERS) {
    const widths = lines.map((line) => splitCells(line, delimiter).length);
    let known = 0;
    for (const line of lines.slice(0, LIMITS.headerSearch)) {
      known = Math.max(known, splitCells(line, delimiter).filter(isKnown).length);
    }
    const width = widths.length === 0 ? 0 : median(widths);
    const even = widths.filter((w) => w === width).length / Math.max(1, widths.length);
    const score = known * 10 + (width > 1 ? 1 + even : 0);
    if (score > bestScore) {
      best = delimiter;
      bestScore = score;
    }
  }
  return best;
}

function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[values.length >> 1];
}
