import type { Random } from '../../src/statistics/index.js';

type Change = (bytes: Uint8Array, random: Random) => Uint8Array;

const joined = (...pieces: (Uint8Array | readonly number[])[]) =>
  Uint8Array.from(pieces.flatMap((piece) => [...piece]));
const latin = (bytes: Uint8Array) => Buffer.from(bytes).toString('latin1');
const place = (bytes: Uint8Array, random: Random) => random.integer(bytes.length + 1);
const utf16 = (bytes: Uint8Array, big: boolean) => {
  const text = Buffer.from(Buffer.from(bytes).toString('utf8'), 'utf16le');
  return new Uint8Array(big ? text.swap16() : text);
};
const replaced = (bytes: Uint8Array, pattern: RegExp, by: string) =>
  new Uint8Array(Buffer.from(latin(bytes).replaceAll(pattern, by), 'latin1'));

const TOKENS = [
  '"',
  ',',
  ';',
  '\t',
  '\n',
  '\r',
  '\0',
  "'",
  '\ufeff',
  '\u2028',
  '\u200b',
  '/',
  '\ud83d\udc1a',
  '"""',
  '\r\n\r\n',
];

/** Changes that know nothing of what the file means. */
export const BYTE_CHANGES: Readonly<Record<string, Change>> = {
  'flip some bytes': (bytes, random) => {
    const changed = Uint8Array.from(bytes);
    for (let k = 0; k <= random.integer(4); k++)
      if (changed.length) changed[random.integer(changed.length)] ^= 1 << random.integer(8);
    return changed;
  },
  'put random bytes in': (bytes, random) => {
    const at = place(bytes, random);
    return joined(
      bytes.subarray(0, at),
      Array.from({ length: 1 + random.integer(40) }, () => random.integer(256)),
      bytes.subarray(at),
    );
  },
  'put a sign in': (bytes, random) => {
    const at = place(bytes, random);
    return joined(bytes.subarray(0, at), Buffer.from(TOKENS[random.integer(TOKENS.length)]), bytes.subarray(at));
  },
  'cut a piece out': (bytes, random) => {
    const at = place(bytes, random);
    return joined(bytes.subarray(0, at), bytes.subarray(at + random.integer(200)));
  },
  'cut the end off': (bytes, random) => bytes.slice(0, place(bytes, random)),
  'write a piece twice': (bytes, random) => {
    const [from, at] = [place(bytes, random), place(bytes, random)];
    return joined(bytes.subarray(0, at), bytes.subarray(from, from + random.integer(400)), bytes.subarray(at));
  },
  'UTF-16, with or without mark': (bytes, random) => {
    const big = random.integer(2) === 1;
    const mark = [[], [0xff, 0xfe], [0xfe, 0xff]][random.integer(3)];
    return joined(mark, utf16(bytes, big));
  },
  'UTF-8 with mark': (bytes) => joined([0xef, 0xbb, 0xbf], bytes),
  'a byte of another encoding': (bytes, random) => {
    const at = place(bytes, random);
    return joined(bytes.subarray(0, at), [0x80 + random.integer(128)], bytes.subarray(at));
  },
  'other ends of lines': (bytes, random) =>
    replaced(bytes, /\r?\n/g, ['\r', '\r\n', '\n\n', '\n\r'][random.integer(4)]),
  'another delimiter': (bytes, random) => replaced(bytes, /[,;]/g, [',', ';', '\t', '|'][random.integer(4)]),
  'decimal commas': (bytes) => replaced(replaced(bytes, /,/g, ';'), /\./g, ','),
  'a huge field': (bytes, random) => {
    const at = place(bytes, random);
    return joined(
      bytes.subarray(0, at),
      new Uint8Array([9_990, 10_050, 70_000][random.integer(3)]).fill(97),
      bytes.subarray(at),
    );
  },
  nothing: () => new Uint8Array(),
};
