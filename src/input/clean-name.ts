/** Plain names need no cleaning: printable ASCII, no space at the ends, no two spaces together. */
const PLAIN = /^[\x21-\x7e]+(?: [\x21-\x7e]+)*$/;
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is looked for
const CONTROL = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f-\u009f\ufffd\ud800-\udfff]/u;

/**
 * A name as it is kept: trimmed, white space (line breaks and no-break spaces too) as single spaces, characters without
 * width left out, composed (Unicode NFC), so that names that look the same are the same.
 *
 * @returns the name, or null when it holds control characters
 * @example
 * cleanName('  Cape\u00a0Sorrel  north ') // => 'Cape Sorrel north'
 * @example
 * cleanName('A\u0007') // => null
 */
export function cleanName(raw: string): string | null {
  if (raw === '' || PLAIN.test(raw)) return raw;
  const name = raw
    .replace(/[\u00ad\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]/g, '')
    .replace(/\s+/g, ' ')
    .trim()
    .normalize('NFC');
  return CONTROL.test(name) ? null : name;
}
