import { element, type SvgNode } from './svg-node.js';
import { INK } from './theme.js';

/*
 * Zone colours of our own: lightness falls evenly from the youngest zone to the oldest, so that grey print keeps the
 * order, while the hue turns from pale sea green over ochre, brick and wine to ink blue, so that neighbours differ in more than
 * lightness, also for readers who don't tell red from green. Labels, position and hatches always say the same.
 */

// Lightness, chroma and hue (degrees) of OKLCH at the young end, two stops between, and the old end.
const STOPS = [
  [0.915, 0.055, 172],
  [0.775, 0.12, 82],
  [0.6, 0.14, 42],
  [0.425, 0.115, 5],
  [0.27, 0.085, 272],
] as const;

// Type on a zone's fill stays as it is in dark mode, so these must differ from the inks that swap.
const DARK = '#1c1b1a';
const LIGHT = '#fffffe';

/** How one zone is drawn. */
export interface ZoneInk {
  /** Fill, as #rrggbb. */
  readonly fill: string;
  /** Colour of type on the fill, contrast at least 4.5. */
  readonly type: string;
  /** Index of its hatch. */
  readonly hatch: number;
}

/**
 * Fills of `count` zones, the youngest first.
 * @param count number of zones, at least 1
 */
export function zoneInks(count: number): ZoneInk[] {
  return Array.from({ length: count }, (_, i) => {
    const t = count === 1 ? 0.25 : count === 2 ? 0.25 + 0.5 * i : i / (count - 1);
    const fill = colourAt(t);
    const type = [DARK, LIGHT].find((colour) => contrast(fill, colour) >= 4.5) ?? '#000000';
    return { fill, type, hatch: i % 6 };
  });
}

/** What is drawn where no zone is given. */
export const NO_ZONE: ZoneInk = { fill: '#c9c5be', type: DARK, hatch: -1 };

function colourAt(t: number): string {
  const at = Math.min(t, 1) * (STOPS.length - 1);
  const i = Math.min(Math.floor(at), STOPS.length - 2);
  const mix = (k: 0 | 1 | 2) => STOPS[i][k] + (at - i) * (hueSafe(STOPS[i + 1][k], STOPS[i][k], k) - STOPS[i][k]);
  return oklchToHex(mix(0), mix(1), mix(2));
}

// Hues turn the short way round.
function hueSafe(to: number, from: number, k: number): number {
  if (k !== 2) return to;
  return to - from > 180 ? to - 360 : to - from < -180 ? to + 360 : to;
}

/** OKLCH to #rrggbb (Björn Ottosson 2020, "A perceptual color space for image processing"); clipped to sRGB. */
function oklchToHex(lightness: number, chroma: number, hue: number): string {
  const a = chroma * Math.cos((hue * Math.PI) / 180);
  const b = chroma * Math.sin((hue * Math.PI) / 180);
  const l = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const m = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const s = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3;
  const linear = [
    4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s,
    -1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s,
    -0.0041960863 * l - 0.7034186147 * m + 1.707614701 * s,
  ];
  const bytes = linear.map((v) => {
    const c = Math.min(1, Math.max(0, v));
    return Math.round(255 * (c <= 0.0031308 ? 12.92 * c : 1.055 * c ** (1 / 2.4) - 0.055));
  });
  return `#${bytes.map((byte) => byte.toString(16).padStart(2, '0')).join('')}`;
}

/**
 * Contrast ratio of two colours, 1 to 21 (WCAG 2.2, relative luminance).
 * @example
 * ```ts
 * contrast('#000000', '#ffffff') // => 21
 * ```
 */
export function contrast(first: string, second: string): number {
  const [low, high] = [luminance(first), luminance(second)].sort((a, b) => a - b);
  return (high + 0.05) / (low + 0.05);
}

/** Relative luminance of #rrggbb, 0 to 1 (WCAG 2.2). */
export function luminance(colour: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const c = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

/**
 * Hatches for the ties between sections, so that zones are told apart in black and white too: plain lines that differ
 * in angle and spacing. They name zones and no rock.
 */
export function hatchPattern(id: string, hatch: number, ink: ZoneInk): SvgNode {
  const [angle, gap] = [
    [0, 7],
    [45, 6],
    [90, 6],
    [135, 5],
    [20, 4],
    [70, 3.5],
  ][hatch];
  return element(
    'pattern',
    { id, width: gap, height: gap, patternUnits: 'userSpaceOnUse', patternTransform: `rotate(${angle})` },
    element('rect', { width: gap, height: gap, fill: ink.fill, 'fill-opacity': 0.5 }),
    element('path', { d: `M0,${gap / 2}H${gap}`, stroke: INK, 'stroke-width': 0.5, 'stroke-opacity': 0.55 }),
  );
}
