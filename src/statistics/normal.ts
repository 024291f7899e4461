import { requireThat } from './check.js';

const INV_SQRT_TWO_PI = 0.3989422804014327;
const LOG_SQRT_TWO_PI = 0.9189385332046728;

// Rational Chebyshev approximations of Cody (1969), as in the normal integral of Cody (1993).
const CENTRE_TOP = [0.06568233791820745, 2.2352520354606837, 161.02823106855587, 1067.6894854603709];
const CENTRE_TOP_LAST = 18154.98125334356;
const CENTRE_BOTTOM = [47.202581904688245, 976.0985517377767, 10260.932208618979];
const CENTRE_BOTTOM_LAST = 45507.78933502673;
const FLANK_TOP = [
  1.0765576773720192e-8, 0.39894151208813466, 8.883149794388377, 93.50665613217785, 597.2702763948002,
  2494.5375852903726, 6848.190450536283, 11602.65143764735,
];
const FLANK_TOP_LAST = 9842.714838383978;
const FLANK_BOTTOM = [
  22.266688044328117, 235.387901782625, 1519.3775994075547, 6485.558298266761, 18615.571640885097, 34900.95272114598,
  38912.00328609327,
];
const FLANK_BOTTOM_LAST = 19685.429676859992;
const TAIL_TOP = [
  0.023073441764940174, 0.215898534057957, 0.12740116116024736, 0.022235277870649807, 0.0014216191932278934,
];
const TAIL_TOP_LAST = 2.9112874951168793e-5;
const TAIL_BOTTOM = [1.284260096144911, 0.4682382124808651, 0.06598813786892856, 0.0037823963320275824];
const TAIL_BOTTOM_LAST = 7.297515550839662e-5;

/**
 * Probability that a standard normal lies below z, to about 1e-15 relative also far down the lower tail. For an upper
 * tail take `normalCdf(-z)`, never `1 - normalCdf(z)`.
 *
 * Cody (1969, 10.1090/S0025-5718-1969-0247736-4; 1993, 10.1145/151271.151273).
 *
 * @throws RangeError when z is NaN
 * @example
 * ```ts
 * normalCdf(-6); // => 9.86587645037698e-10
 * normalCdf(1.96); // => 0.9750021048517795
 * ```
 */
export function normalCdf(z: number): number {
  const size = Math.abs(z);
  if (size <= 0.67448975) return 0.5 + centre(z);
  if (size <= 38.6) {
    const tail = size <= Math.sqrt(32) ? flank(size) : farTail(size);
    return z > 0 ? 1 - tail : tail;
  }
  requireThat(!Number.isNaN(z), 'normalCdf', 'a number', z);
  return z > 0 ? 1 : 0;
}

function centre(z: number): number {
  const square = z * z;
  let top = CENTRE_TOP[0] * square;
  let bottom = square;
  for (let i = 0; i < 3; i++) {
    top = (top + CENTRE_TOP[i + 1]) * square;
    bottom = (bottom + CENTRE_BOTTOM[i]) * square;
  }
  return (z * (top + CENTRE_TOP_LAST)) / (bottom + CENTRE_BOTTOM_LAST);
}

function flank(z: number): number {
  let top = FLANK_TOP[0] * z;
  let bottom = z;
  for (let i = 0; i < 7; i++) {
    top = (top + FLANK_TOP[i + 1]) * z;
    bottom = (bottom + FLANK_BOTTOM[i]) * z;
  }
  return (gaussian(z) * (top + FLANK_TOP_LAST)) / (bottom + FLANK_BOTTOM_LAST);
}

function farTail(z: number): number {
  const inverse = 1 / (z * z);
  let top = TAIL_TOP[0] * inverse;
  let bottom = inverse;
  for (let i = 0; i < 4; i++) {
    top = (top + TAIL_TOP[i + 1]) * inverse;
    bottom = (bottom + TAIL_BOTTOM[i]) * inverse;
  }
  const correction = (inverse * (top + TAIL_TOP_LAST)) / (bottom + TAIL_BOTTOM_LAST);
  return (gaussian(z) * (INV_SQRT_TWO_PI - correction)) / z;
}

/** exp(−z²/2) with z split at sixteenths, so that squaring loses no digits. */
function gaussian(z: number): number {
  const coarse = Math.trunc(z * 16) / 16;
  return Math.exp(-0.5 * coarse * coarse) * Math.exp(-0.5 * (z - coarse) * (z + coarse));
}

const QUANTILE_CENTRE = {
  top: [
    2509.0809287301227, 33430.57558358813, 67265.7709270087, 45921.95393154987, 13731.69376550946, 1971.5909503065513,
    133.14166789178438, 3.3871328727963665,
  ],
  bottom: [
    5226.495278852854, 28729.085735721943, 39307.89580009271, 21213.794301586597, 5394.196021424751, 687.1870074920579,
    42.31333070160091, 1,
  ],
};
const QUANTILE_FLANK = {
  top: [
    0.0007745450142783414, 0.022723844989269184, 0.2417807251774506, 1.2704582524523684, 3.6478483247632045,
    5.769497221460691, 4.630337846156546, 1.4234371107496835,
  ],
  bottom: [
    1.0507500716444169e-9, 0.0005475938084995345, 0.015198666563616457, 0.14810397642748008, 0.6897673349851,
    1.6763848301838038, 2.053191626637759, 1,
  ],
};
const QUANTILE_TAIL = {
  top: [
    2.0103343992922881e-7, 2.7115555687434876e-5, 0.0012426609473880784, 0.026532189526576124, 0.29656057182850487,
    1.7848265399172913, 5.463784911164114, 6.657904643501103,
  ],
  bottom: [
    2.0442631033899397e-15, 1.421511758316446e-7, 1.8463183175100548e-5, 0.0007868691311456133, 0.014875361290850615,
    0.1369298809227358, 0.599832206555888, 1,
  ],
};

/**
 * The z below which a standard normal lies with probability p; −Infinity for 0, Infinity for 1.
 *
 * Wichura (1988, AS 241, 10.2307/2347330), about 1e-16 relative.
 *
 * @throws RangeError when p is not from 0 to 1
 * @example
 * ```ts
 * normalQuantile(0.975); // => 1.959963984540054
 * ```
 */
export function normalQuantile(p: number): number {
  requireThat(p >= 0 && p <= 1, 'normalQuantile', 'a probability from 0 to 1', p);
  const fromHalf = p - 0.5;
  if (Math.abs(fromHalf) <= 0.425) return fromHalf * ratio(QUANTILE_CENTRE, 0.180625 - fromHalf * fromHalf);
  const tail = Math.min(p, 1 - p);
  if (tail === 0) return fromHalf < 0 ? -Infinity : Infinity;
  const r = Math.sqrt(-Math.log(tail));
  const size = r <= 5 ? ratio(QUANTILE_FLANK, r - 1.6) : ratio(QUANTILE_TAIL, r - 5);
  return fromHalf < 0 ? -size : size;
}

function ratio({ top, bottom }: { top: readonly number[]; bottom: readonly number[] }, x: number): number {
  let above = 0;
  let below = 0;
  for (let i = 0; i < 8; i++) {
    above = above * x + top[i];
    below = below * x + bottom[i];
  }
  return above / below;
}

/**
 * Natural logarithm of the normal density at x.
 *
 * @param sd standard deviation, above 0
 * @throws RangeError when sd is not above 0
 * @example
 * ```ts
 * logNormalDensity(0, 0, 1); // => -0.9189385332046728
 * ```
 */
export function logNormalDensity(x: number, mean: number, sd: number): number {
  requireThat(sd > 0, 'logNormalDensity', 'sd above 0', sd);
  const z = (x - mean) / sd;
  return -0.5 * z * z - Math.log(sd) - LOG_SQRT_TWO_PI;
}
