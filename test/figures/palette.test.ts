import { describe, expect, it } from 'vitest';
import { contrast, hatchPattern, luminance, zoneInks } from '../../src/figures/palette.js';

const channels = (colour: string) => [1, 3, 5].map((at) => Number.parseInt(colour.slice(at, at + 2), 16) / 255);
const linear = (c: number) => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4);

/** CIE L*a*b* (D65) of linear RGB. */
function lab(rgb: number[]): number[] {
  const [r, g, b] = rgb;
  const xyz = [
    (0.4124 * r + 0.3576 * g + 0.1805 * b) / 0.95047,
    0.2126 * r + 0.7152 * g + 0.0722 * b,
    (0.0193 * r + 0.1192 * g + 0.9505 * b) / 1.08883,
  ].map((v) => (v > 0.008856 ? Math.cbrt(v) : 7.787 * v + 16 / 116));
  return [116 * xyz[1] - 16, 500 * (xyz[0] - xyz[1]), 200 * (xyz[1] - xyz[2])];
}

/** Colour difference CIE 1976 as a deuteranope sees it (Machado, Oliveira and Fernandes 2009, severity 1; from memory). */
function deuteranopeDifference(first: string, second: string): number {
  const see = (colour: string) => {
    const [r, g, b] = channels(colour).map(linear);
    return lab([
      0.367322 * r + 0.860646 * g - 0.227968 * b,
      0.280085 * r + 0.672501 * g + 0.047413 * b,
      -0.01182 * r + 0.04294 * g + 0.968881 * b,
    ]);
  };
  const [a, b] = [see(first), see(second)];
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
}

const lightness = (colour: string) => lab(channels(colour).map(linear))[0];

describe('zone colours', () => {
  const counts = Array.from({ length: 10 }, (_, i) => i + 1);

  it.each(counts)('%i: older is always darker, and grey print keeps neighbours apart', (count) => {
    const fills = zoneInks(count).map((ink) => ink.fill);
    for (let i = 1; i < fills.length; i++) {
      expect(luminance(fills[i])).toBeLessThan(luminance(fills[i - 1]));
      expect(lightness(fills[i - 1]) - lightness(fills[i])).toBeGreaterThan(count <= 6 ? 10 : 5.5);
    }
  });

  it.each(counts)('%i: neighbours differ to a reader who does not tell red from green', (count) => {
    const fills = zoneInks(count).map((ink) => ink.fill);
    for (let i = 1; i < fills.length; i++)
      expect(deuteranopeDifference(fills[i - 1], fills[i])).toBeGreaterThan(count <= 6 ? 14 : 8);
  });

  it.each(counts)('%i: type on a zone can be read', (count) => {
    for (const ink of zoneInks(count)) expect(contrast(ink.fill, ink.type)).toBeGreaterThanOrEqual(4.5);
  });

  it('gives neighbours different hatches', () => {
    const inks = zoneInks(9);
    for (let i = 1; i < inks.length; i++) {
      const [a, b] = [inks[i - 1], inks[i]].map((ink) => hatchPattern('h', ink.hatch, inks[0]).outerHTML);
      expect(a).not.toBe(b);
    }
  });
});
