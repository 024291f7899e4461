import { label } from './figure.js';
import type { SvgNode } from './svg-node.js';
import { element } from './svg-node.js';
import { textWidth } from './text-width.js';
import { SOFT, TYPE } from './theme.js';

/** One entry of a legend: a sign drawn around (0, 0) within ±`half`, and its words. */
export interface LegendEntry {
  readonly sign: readonly SvgNode[];
  readonly half: number;
  readonly text: string;
}

/** A legend in lines no wider than `width`, and the height it takes. */
export function legend(
  entries: readonly LegendEntry[],
  x: number,
  y: number,
  width: number,
): { readonly node: SvgNode; readonly height: number } {
  const node = element('g', { 'font-size': TYPE.small, fill: SOFT });
  let at = 0;
  let line = 0;
  for (const { sign, half, text } of entries) {
    const needs = 2 * half + 5 + textWidth(text, TYPE.small) + 14;
    if (at > 0 && at + needs - 14 > width) {
      at = 0;
      line += 15;
    }
    node.append(
      element('g', { transform: `translate(${Math.round(x + at + half)},${y + line})` }, ...sign),
      label(x + at + 2 * half + 5, y + line + 3.2, text),
    );
    at += needs;
  }
  return { node, height: line + 15 };
}
