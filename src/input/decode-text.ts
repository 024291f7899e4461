/** Text of a file, and how its bytes were understood. */
export interface DecodedText {
  readonly text: string;
  readonly encoding: 'UTF-8' | 'UTF-16 LE' | 'UTF-16 BE' | 'Windows-1252';
}

/**
 * Turns the bytes of a table into text: UTF-8 or UTF-16 by byte-order mark, UTF-16 without a mark by its zero bytes,
 * else UTF-8 where the bytes are valid UTF-8, else Windows-1252. A leading byte-order mark is dropped.
 *
 * @returns the text, or `{ refused }` with what the file is and what to do when it is no text.
 * @example
 * decodeText(new Uint8Array([0x62, 0x65, 0x64])) // => { text: 'bed', encoding: 'UTF-8' }
 * @example
 * decodeText(new Uint8Array([0xff, 0xfe, 0x62, 0x00])) // => { text: 'b', encoding: 'UTF-16 LE' }
 */
export function decodeText(bytes: Uint8Array): DecodedText | { readonly refused: string } {
  const known = knownBinary(bytes);
  if (known !== null) return { refused: known };
  const utf16 = utf16Order(bytes);
  if (utf16 !== null) {
    const text = new TextDecoder(utf16 === 'LE' ? 'utf-16le' : 'utf-16be').decode(bytes);
    return refuse(text) ?? { text, encoding: `UTF-16 ${utf16}` };
  }
  if (bytes.includes(0)) return { refused: BINARY };
  try {
    const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return refuse(text) ?? { text, encoding: 'UTF-8' };
  } catch {
    const text = decodeWindows1252(bytes);
    return refuse(text) ?? { text, encoding: 'Windows-1252' };
  }
}

/** What Windows-1252 has at 0x80 to 0x9f; the five bytes it leaves out stay control characters. */
const HIGH = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ';

/** Node 20 decodes `windows-1252` as Latin-1 (seen in 20.20): the 32 signs in which they differ are put right here. */
function decodeWindows1252(bytes: Uint8Array): string {
  const text = new TextDecoder('windows-1252').decode(bytes);
  return text.replace(/[\u0080-\u009f]/g, (sign) => HIGH[sign.charCodeAt(0) - 0x80]);
}

const BINARY =
  'This is no text file. Wanted is a table as CSV, TSV or .xlsx: open the file in the program that made it and save the table as CSV.';

const SIGNATURES: readonly (readonly [readonly number[], string])[] = [
  [[0xd0, 0xcf, 0x11, 0xe0], 'This is an old Excel workbook (.xls). Save it as .xlsx or as CSV and give that file.'],
  [[0x25, 0x50, 0x44, 0x46], 'This is a PDF. Wanted is a table as CSV, TSV or .xlsx.'],
  [[0x1f, 0x8b], 'This file is compressed (gzip). Unpack it first.'],
  [[0x50, 0x4b, 0x03, 0x04], 'This is a zip archive. Wanted is a table as CSV, TSV or .xlsx.'],
  [[0x89, 0x50, 0x4e, 0x47], 'This is a picture (PNG). Wanted is a table as CSV, TSV or .xlsx.'],
  [[0xff, 0xd8, 0xff], 'This is a picture (JPEG). Wanted is a table as CSV, TSV or .xlsx.'],
];

const MARKUP = /^[\ufeff\s]*<(?:\?xml|!doctype|html|table|svg)\b/i;

function knownBinary(bytes: Uint8Array): string | null {
  for (const [signature, message] of SIGNATURES) {
    if (bytes.length >= signature.length && signature.every((byte, i) => bytes[i] === byte)) return message;
  }
  return null;
}

function utf16Order(bytes: Uint8Array): 'LE' | 'BE' | null {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'LE';
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return 'BE';
  if (bytes.length < 4 || bytes.length % 2 !== 0) return null;
  // Without a mark: text of a European language in UTF-16 has a zero in nearly every second byte, always on one side.
  const end = Math.min(bytes.length, 4096) & ~1;
  let even = 0;
  let odd = 0;
  for (let i = 0; i < end; i += 2) {
    if (bytes[i] === 0) even += 1;
    if (bytes[i + 1] === 0) odd += 1;
  }
  const pairs = end / 2;
  if (odd > 0.7 * pairs && even === 0) return 'LE';
  if (even > 0.7 * pairs && odd === 0) return 'BE';
  return null;
}

/** What to say of text that is no table. */
function refuse(text: string): { refused: string } | null {
  if (looksBinary(text)) return { refused: BINARY };
  return MARKUP.test(text.slice(0, 200))
    ? { refused: 'This is a page or a document in XML or HTML. Wanted is a table as CSV, TSV or .xlsx.' }
    : null;
}

/** Text has hardly any control characters; a few are left for the cells' own checks. */
function looksBinary(text: string): boolean {
  const end = Math.min(text.length, 65_536);
  let control = 0;
  for (let i = 0; i < end; i += 1) {
    const code = text.charCodeAt(i);
    if (code === 0) return true;
    if (code < 32 && code !== 9 && code !== 10 && code !== 13) control += 1;
    else if (code >= 0x7f && code < 0xa0) control += 1;
    else if (code === 0xfffd) control += 1;
  }
  return control > 4 && control > 0.02 * end;
}
