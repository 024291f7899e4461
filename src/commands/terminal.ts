import picocolors from 'picocolors';

/** What the words of a terminal may be dressed in. Without colour every function gives its text back. */
export interface Style {
  readonly bold: (text: string) => string;
  readonly dim: (text: string) => string;
  readonly red: (text: string) => string;
  readonly yellow: (text: string) => string;
  readonly green: (text: string) => string;
}

/**
 * The style for a stream: colours only where it is a terminal, NO_COLOR (no-color.org) is not set, and TERM is not dumb.
 *
 * @param stream `process.stdout` or `process.stderr`, or anything with isTTY.
 */
export function styleFor(stream: { readonly isTTY?: boolean }, env: NodeJS.ProcessEnv = process.env): Style {
  return styleOf(wantsColours(stream, env));
}

/** Whether colours are wanted on a stream. */
export function wantsColours(stream: { readonly isTTY?: boolean }, env: NodeJS.ProcessEnv = process.env): boolean {
  return stream.isTTY === true && !env.NO_COLOR && env.TERM !== 'dumb';
}

/** The style with or without colours. */
export function styleOf(colours: boolean): Style {
  const { bold, dim, red, yellow, green } = picocolors.createColors(colours);
  return { bold, dim, red, yellow, green };
}

/** The style without colour. */
export const PLAIN: Style = styleOf(false);

/**
 * Text from outside made safe for a terminal: control characters, which could move the cursor or change colours, are
 * shown as codes. Line ends stay.
 *
 * @example
 * safe('bed\u001b[2J') // => 'bed\\u001b[2J'
 */
export function safe(text: string): string {
  return text.replace(/(?!\n)[\p{Cc}\p{Bidi_Control}]/gu, (sign) => {
    return `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`;
  });
}

/**
 * Breaks text into lines of at most `width` characters at spaces; lines after the first start with `hang` spaces.
 *
 * @example
 * wrap('one two three', 8, 2) // => 'one two\n  three'
 */
export function wrap(text: string, width = 80, hang = 0): string {
  const indent = text.length - text.trimStart().length;
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ').filter((part) => part !== '')) {
    if (line === '') {
      line = ' '.repeat(lines.length === 0 ? indent : hang) + word;
    } else if (seen(line) + 1 + seen(word) > width) {
      lines.push(line);
      line = ' '.repeat(hang) + word;
    } else {
      line += ` ${word}`;
    }
  }
  return [...lines, line].join('\n');
}

// length on the screen: colour codes take no room
function seen(text: string): number {
  return text.replace(/\p{Cc}\[[0-9;]*m/gu, '').length;
}

/**
 * A table for the terminal: columns two spaces apart, numbers to the right.
 *
 * @param rows Cells; the first row is the header.
 * @param right Which columns stand to the right.
 */
export function textTable(rows: readonly (readonly string[])[], right: readonly boolean[], indent = 2): string[] {
  const widths = rows[0].map((_, column) => Math.max(...rows.map((row) => row[column].length)));
  return rows.map((row) => {
    const cells = row.map((cell, i) => (right[i] ? cell.padStart(widths[i]) : cell.padEnd(widths[i])));
    return (' '.repeat(indent) + cells.join('  ')).trimEnd();
  });
}

/**
 * A count with its noun.
 *
 * @example
 * counted(1, 'shell') // => '1 shell'
 * counted(1200, 'taxon', 'taxa') // => '1,200 taxa'
 */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${thousands(count)} ${count === 1 ? one : many}`;
}

/** A whole number with commas between the thousands, whatever the locale. */
export function thousands(count: number): string {
  return String(count).replace(/\B(?=(?:\d{3})+$)/g, ',');
}

/**
 * A number as people write it in a sentence: `digits` significant digits, trailing zeros kept.
 *
 * @example
 * figure(0.5, 3) // => '0.500'
 * figure(0.00012, 2) // => '0.00012'
 */
export function figure(value: number, digits = 3): string {
  if (value === 0) return '0';
  const text = value.toPrecision(digits);
  return text.includes('e') ? String(Number(text)) : text;
}

/** A probability in words that never claims certainty: two digits, `> 0.999`, `< 0.001`. */
export function probability(p: number): string {
  if (p > 0.999) return '> 0.999';
  if (p < 0.001) return '< 0.001';
  const digits = p > 0.995 || p < 0.01 ? 3 : 2;
  return p.toFixed(digits);
}
