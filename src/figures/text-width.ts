// Advance widths of Helvetica in thousandths of the type size (Adobe Core 14 font metrics), from space to tilde.
const WIDTHS = [
  278, 278, 355, 556, 556, 889, 667, 191, 333, 333, 389, 584, 278, 333, 278, 278, 556, 556, 556, 556, 556, 556, 556,
  556, 556, 556, 278, 278, 584, 584, 584, 556, 1015, 667, 667, 722, 722, 667, 611, 778, 722, 278, 500, 667, 556, 833,
  722, 778, 667, 778, 722, 667, 611, 722, 667, 944, 667, 667, 611, 278, 278, 278, 469, 556, 333, 556, 556, 500, 556,
  556, 278, 556, 556, 222, 222, 500, 222, 833, 556, 556, 556, 556, 333, 500, 278, 556, 500, 722, 500, 500, 500, 334,
  260, 334, 584,
];

const SLIMMEST = Math.min(...WIDTHS);

/**
 * Width of a line of plain Helvetica (or Arial) in the unit of `size`. Letters beyond ASCII count as 0.6 of the size,
 * beyond Latin and Greek as a whole one.
 * @example
 * ```ts
 * textWidth('Z1', 10) // => 11.67
 * ```
 */
export function textWidth(text: string, size: number): number {
  let sum = 0;
  for (const letter of text) {
    const code = letter.codePointAt(0)!;
    sum += WIDTHS[code - 32] ?? (code < 0x500 || (code >= 0x2010 && code < 0x2040) ? 600 : 1000);
  }
  return (sum * size) / 1000;
}

/**
 * The text, shortened in the middle with an ellipsis where it is wider than `width`: both ends of a name tell it apart.
 * @example
 * ```ts
 * shorten('Old Harbour cliff 12', 10, 60) // => 'Old Har…ff 12'
 * ```
 */
export function shorten(text: string, size: number, width: number): string {
  if (textWidth(text, size) <= width) return text;
  const letters = [...text];
  // no more than so many of the slimmest letters fit, so a name of thousands of letters costs no more than a short one
  const most = Math.ceil((width * 1000) / (size * SLIMMEST));
  for (let keep = Math.min(letters.length - 1, most); keep > 1; keep--) {
    const head = Math.ceil(keep * 0.55);
    const short = `${letters.slice(0, head).join('')}…${letters.slice(letters.length - (keep - head)).join('')}`;
    if (textWidth(short, size) <= width) return short;
  }
  return `${letters[0] ?? ''}…`;
}

/**
 * Breaks a name at spaces and hyphens into at most `lines` lines of `width`, shortening what still does not fit.
 * @example
 * ```ts
 * wrapText('Old Harbour', 10, 40, 2) // => ['Old', 'Harbour']
 * ```
 */
export function wrapText(text: string, size: number, width: number, lines: number): string[] {
  const words = text.split(/(?<=[\s-])/);
  const out: string[] = [];
  let line = '';
  for (const word of words) {
    if (line !== '' && textWidth((line + word).trimEnd(), size) > width && out.length < lines - 1) {
      out.push(line.trim());
      line = '';
    }
    line += word;
  }
  out.push(line.trim());
  return out.map((part) => shorten(part, size, width));
}
