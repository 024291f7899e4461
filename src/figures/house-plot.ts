import * as Plot from '@observablehq/plot';
import { element, type SvgNode, svgDocument } from './svg-node.js';
import { FONT, INK, SOFT, TYPE, WIDE } from './theme.js';

/** Attributes that tie an element to a bed, a shell or a zone. */
export type Tags = Readonly<Record<string, string | number | undefined>>;

/**
 * Draws a plot without a browser and gives its content as one group, to be put on a figure's sheet.
 * @param options as Plot takes them; house type and sizes are filled in
 * @param x left edge on the sheet
 * @param y upper edge on the sheet
 */
export function housePlot(options: Plot.PlotOptions, x = 0, y = 0): SvgNode {
  const plot = Plot.plot({ ...options, document: svgDocument as unknown as Document }) as unknown as SvgNode;
  const group = element('g', {
    transform: x === 0 && y === 0 ? undefined : `translate(${x},${y})`,
    'font-family': FONT,
    'font-size': TYPE.label,
    'text-anchor': 'middle',
    fill: INK,
  });
  for (const child of [...plot.childNodes]) if (child.name !== 'style') group.append(tidy(child));
  return group;
}

// Plot writes coordinates to sixteen digits: two decimals are a hundredth of a pixel, and half the size of the page.
function tidy(node: SvgNode): SvgNode {
  node.attributes.forEach((value, name) => {
    if (/\d\.\d{3}/.test(value) && !name.startsWith('data-'))
      node.setAttribute(
        name,
        value.replace(/-?\d+\.\d{3,}(e-?\d+)?/g, (number) => String(Math.round(Number(number) * 100) / 100)),
      );
  });
  for (const child of node.childNodes) if (child.name !== '#text') tidy(child);
  return node;
}

/**
 * A render step for a mark that ties each of its elements to what it stands for.
 * @param tags attributes of the element drawn for the datum with this index
 */
export function tagged(tags: (index: number) => Tags): Plot.RenderFunction {
  return (index, scales, values, dimensions, context, next) => {
    const group = next!(index, scales, values, dimensions, context) as unknown as SvgNode;
    for (const child of group.children) {
      if (typeof child.__data__ !== 'number') continue;
      for (const [name, value] of Object.entries(tags(child.__data__)))
        if (value !== undefined) child.setAttribute(name, value);
    }
    return group as unknown as SVGElement;
  };
}

/** Axis type of the house: small soft ticks, a label in words with its unit. */
export const AXIS = {
  fontSize: TYPE.small,
  color: SOFT,
  labelArrow: 'none',
  tickSize: 4,
  labelAnchor: 'center',
} as const;

/**
 * Round D/L values for the ticks of an axis in log ratios between `low` and `high`, thinned to keep `least` units apart
 * on an axis of `length` units.
 */
export function ratioTicks(low: number, high: number, length = WIDE - 150, least = 30): number[] {
  const all = [0.01, 0.02, 0.03, 0.05, 0.07, 0.1, 0.15, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1, 1.3];
  let inside = all.filter((v) => Math.log(v) >= low && Math.log(v) <= high);
  if (inside.length < 3) {
    const step = 10 ** Math.floor(Math.log10((Math.exp(high) - Math.exp(low)) / 3));
    inside = [];
    for (let k = Math.ceil(Math.exp(low) / step); k * step <= Math.exp(high) && inside.length < 40; k++)
      inside.push(k * step);
  }
  const kept: number[] = [];
  for (const tick of inside) {
    const last = kept[kept.length - 1];
    if (last === undefined || (Math.log(tick / last) / (high - low)) * length >= least) kept.push(tick);
  }
  return kept;
}

/** A ratio as the axis writes it. */
export const ratioLabel = (ratio: number) => String(Math.round(ratio * 1e4) / 1e4);
