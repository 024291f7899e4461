import { xoroshiro128plusFromState } from 'pure-rand/generator/xoroshiro128plus';
import { requireThat } from './check.js';

/** A stream of random numbers. Two streams made from the same seed give the same numbers, always. */
export interface Random {
  /** Uniform on the open interval (0, 1), 52 bits. */
  uniform(): number;
  /** Standard normal. */
  normal(): number;
  /** Uniform whole number from 0 to n − 1; n from 1 to 2³². */
  integer(n: number): number;
  /** Exponential with mean 1. */
  exponential(): number;
  /** Gamma with the given shape (> 0) and scale 1. */
  gamma(shape: number): number;
  /**
   * An independent stream that depends only on this stream's seed and the label (a whole number), not on how many
   * numbers were drawn. Give every independent task its own fork, and results don't hang on who ran first.
   */
  fork(label: number): Random;
}

/** Four 32-bit words: what a stream is seeded with, and what its forks are derived from. */
type Key = readonly [number, number, number, number];

const TWO_32 = 2 ** 32;

/**
 * A seeded stream of random numbers.
 *
 * Bits come from xoroshiro128+ (Blackman and Vigna 2021, 10.1145/3460772) as pure-rand gives it; only the upper 26 bits of
 * each word are used for reals, since the lowest ones are the weakest. Normals are drawn exactly by the ziggurat (Marsaglia and Tsang
 * 2000, 10.18637/jss.v005.i08) with a full-width uniform beside the layer, gammas by Marsaglia and Tsang (2000,
 * 10.1145/358407.358414).
 *
 * @param seed any whole number up to 2⁵³ in size; near seeds give unrelated streams
 * @throws RangeError when the seed is not such a number
 * @example
 * ```ts
 * createRandom(1).integer(1); // => 0
 * createRandom(7).uniform() === createRandom(7).uniform(); // => true
 * ```
 */
export function createRandom(seed: number): Random {
  requireThat(Number.isSafeInteger(seed), 'createRandom', 'a whole number up to 2^53 in size as seed', seed);
  return stream(absorb([0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344], seed));
}

function stream(key: Key): Random {
  // All four words 0 is the one state the generator never leaves.
  const state = key.every((word) => word === 0) ? [1, 2, 3, 4] : key.map((word) => word | 0);
  const bits = xoroshiro128plusFromState(state);
  const { edges, heights } = ziggurat();

  const uniform = (): number => ((bits.next() >>> 6) * 67108864 + (bits.next() >>> 6) + 0.5) * 2 ** -52;

  const exponential = (): number => -Math.log(uniform());

  const normal = (): number => {
    for (;;) {
      const word = bits.next();
      const layer = word >>> 25;
      // 18 bits of this word that the layer does not use, and 26 of the next: symmetric about 0, never 0 itself.
      const signed = (((word >>> 7) & 0x3ffff) * 67108864 + (bits.next() >>> 6) + 0.5) * 2 ** -43 - 1;
      const x = signed * edges[layer];
      if (Math.abs(x) < edges[layer + 1]) return x;
      if (layer === 0) return signed < 0 ? -normalTail(edges[1], exponential) : normalTail(edges[1], exponential);
      const y = heights[layer] + uniform() * (heights[layer + 1] - heights[layer]);
      if (y < Math.exp(-0.5 * x * x)) return x;
    }
  };

  let lastN = Number.NaN;
  let limit = 0;
  const integer = (n: number): number => {
    // the same n mostly comes again and again
    if (n !== lastN) {
      requireThat(Number.isInteger(n) && n >= 1 && n <= TWO_32, 'integer', 'a whole number from 1 to 2^32', n);
      // Multiples of n above the last full one are thrown away, so that no value is favoured.
      limit = TWO_32 - (TWO_32 % n);
      lastN = n;
    }
    for (;;) {
      const word = bits.next() >>> 0;
      if (word < limit) return Math.floor(word / (limit / n));
    }
  };

  const gamma = (shape: number): number => {
    requireThat(shape > 0 && shape < Infinity, 'gamma', 'a shape above 0', shape);
    if (shape < 1) return gamma(shape + 1) * uniform() ** (1 / shape);
    const d = shape - 1 / 3;
    const c = 1 / Math.sqrt(9 * d);
    for (;;) {
      const x = normal();
      const root = 1 + c * x;
      if (root <= 0) continue;
      const v = root * root * root;
      if (Math.log(uniform()) < 0.5 * x * x + d * (1 - v + Math.log(v))) return d * v;
    }
  };

  return { uniform, normal, integer, exponential, gamma, fork: (label) => forked(key, label) };
}

function forked(key: Key, label: number): Random {
  requireThat(Number.isSafeInteger(label), 'fork', 'a whole number up to 2^53 in size as label', label);
  // The constant keeps a fork apart from a seed of the same number.
  return stream(absorb([key[0] ^ 0x5bd1e995, key[1], key[2], key[3]], label));
}

/** Stirs a whole number into a key so that every bit of both reaches every word (finaliser of Appleby's MurmurHash3). */
function absorb(key: Key, value: number): Key {
  const words = [(value % TWO_32) | 0, Math.floor(value / TWO_32) | 0];
  let [a, b, c, d] = key;
  for (const word of [...words, 0x9e3779b9, 0x7f4a7c15]) {
    a = mix(a ^ word);
    b = mix((b + a) | 0);
    c = mix(c ^ b);
    d = mix((d + c) | 0);
    a = (a + d) | 0;
  }
  return [a, b, c, d];
}

function mix(word: number): number {
  let h = word ^ (word >>> 16);
  h = Math.imul(h, 0x85ebca6b);
  h ^= h >>> 13;
  h = Math.imul(h, 0xc2b2ae35);
  return h ^ (h >>> 16);
}

/** Half normal beyond `start`, by two exponentials (Marsaglia 1964, 10.1080/00401706.1964.10490150). */
function normalTail(start: number, exponential: () => number): number {
  for (;;) {
    const x = exponential() / start;
    if (2 * exponential() > x * x) return start + x;
  }
}

const LAYERS = 128;
/** Start of the tail and area of each of 128 layers (Marsaglia and Tsang 2000). */
const TAIL_START = 3.442619855899;
const LAYER_AREA = 9.91256303526217e-3;

let tables: { edges: Float64Array; heights: Float64Array } | undefined;

/** Right edges (the first is the base strip's pretended width) and curve heights of the layers, from base to top. */
function ziggurat(): { edges: Float64Array; heights: Float64Array } {
  if (tables) return tables;
  const curve = (x: number) => Math.exp(-0.5 * x * x);
  const edges = new Float64Array(LAYERS + 1);
  const heights = new Float64Array(LAYERS + 1);
  edges[0] = LAYER_AREA / curve(TAIL_START);
  edges[1] = TAIL_START;
  heights[1] = curve(TAIL_START);
  for (let i = 2; i < LAYERS; i++) {
    heights[i] = heights[i - 1] + LAYER_AREA / edges[i - 1];
    edges[i] = Math.sqrt(-2 * Math.log(heights[i]));
  }
  heights[LAYERS] = 1;
  tables = { edges, heights };
  return tables;
}
