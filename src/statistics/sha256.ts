/**
 * SHA-256 of bytes (FIPS 180-4), 32 bytes. No statistic, but every room needs it: figures and report import no module of
 * Node, and a page that was not sent over a secure line has no Web Crypto. Node's own is taken where it is at hand.
 * @example
 * ```ts
 * [...sha256Bytes(new TextEncoder().encode('abc'))].slice(0, 4) // => [186, 120, 22, 191]
 * ```
 */
export function sha256Bytes(bytes: Uint8Array): Uint8Array {
  const node = globalThis.process?.getBuiltinModule?.('node:crypto');
  return node ? new Uint8Array(node.createHash('sha256').update(bytes).digest()) : sha256Here(bytes);
}

/** {@link sha256Bytes} without help. */
export function sha256Here(bytes: Uint8Array): Uint8Array {
  constants ??= { start: rootsOf(8, 2n), round: rootsOf(64, 3n) };
  const { start, round } = constants;
  const blocks = Math.ceil((bytes.length + 9) / 64);
  const view = new DataView(new ArrayBuffer(blocks * 64));
  new Uint8Array(view.buffer).set(bytes);
  view.setUint8(bytes.length, 0x80);
  view.setUint32(blocks * 64 - 8, Math.floor((bytes.length * 8) / 2 ** 32));
  view.setUint32(blocks * 64 - 4, (bytes.length * 8) >>> 0);
  const hash = Uint32Array.from(start);
  const w = new Uint32Array(64);
  for (let block = 0; block < blocks; block++) {
    for (let t = 0; t < 16; t++) w[t] = view.getUint32(block * 64 + t * 4);
    for (let t = 16; t < 64; t++) {
      const s0 = turn(w[t - 15], 7) ^ turn(w[t - 15], 18) ^ (w[t - 15] >>> 3);
      const s1 = turn(w[t - 2], 17) ^ turn(w[t - 2], 19) ^ (w[t - 2] >>> 10);
      w[t] = w[t - 16] + s0 + w[t - 7] + s1;
    }
    let [a, b, c, d, e, f, g, h] = hash;
    for (let t = 0; t < 64; t++) {
      const one = (h + (turn(e, 6) ^ turn(e, 11) ^ turn(e, 25)) + ((e & f) ^ (~e & g)) + round[t] + w[t]) | 0;
      const two = ((turn(a, 2) ^ turn(a, 13) ^ turn(a, 22)) + ((a & b) ^ (a & c) ^ (b & c))) | 0;
      h = g;
      g = f;
      f = e;
      e = (d + one) | 0;
      d = c;
      c = b;
      b = a;
      a = (one + two) | 0;
    }
    [a, b, c, d, e, f, g, h].forEach((word, i) => {
      hash[i] += word;
    });
  }
  const digest = new DataView(new ArrayBuffer(32));
  hash.forEach((word, i) => {
    digest.setUint32(4 * i, word);
  });
  return new Uint8Array(digest.buffer);
}

const turn = (word: number, by: number) => (word >>> by) | (word << (32 - by));

/** The first 32 bits of the fraction of a root, exact by whole numbers: floor(root(n) * 2^32) mod 2^32. */
function fractionOfRoot(prime: number, degree: 2n | 3n): number {
  const target = BigInt(prime) << (32n * degree);
  let low = 0n;
  let high = 1n << 40n;
  while (high - low > 1n) {
    const middle = (low + high) >> 1n;
    if (middle ** degree <= target) low = middle;
    else high = middle;
  }
  return Number(low & 0xffffffffn);
}

let constants: { readonly start: readonly number[]; readonly round: readonly number[] } | undefined;

/** {@link fractionOfRoot} of the first primes. */
function rootsOf(count: number, degree: 2n | 3n): number[] {
  const primes: number[] = [];
  for (let n = 2; primes.length < count; n++) if (primes.every((prime) => n % prime !== 0)) primes.push(n);
  return primes.map((prime) => fractionOfRoot(prime, degree));
}
