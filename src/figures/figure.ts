import { type Attributes, element, type SvgNode } from './svg-node.js';
import { FONT, INK, PAPER, SWAPS, TYPE } from './theme.js';

/** One finished figure. */
export interface Figure {
  /** File name without ending: letters, digits and hyphens. */
  readonly name: string;
  readonly title: string;
  /** What to see in it, in plain sentences. */
  readonly caption: string;
  /** What it shows, for those who can't see it. */
  readonly alt: string;
  /** One whole SVG document without XML declaration: white ground, plain type, no script, nothing from outside. */
  readonly svg: string;
}

/** What a drawing needs to become a figure. */
export interface Sheet {
  readonly name: string;
  readonly title: string;
  readonly caption: string;
  readonly alt: string;
  /** Size in units of 1/96 inch. */
  readonly width: number;
  readonly height: number;
  readonly body: readonly SvgNode[];
  readonly defs?: readonly SvgNode[];
}

/** Puts a drawing on white ground with its title and text alternative, sized in millimetres. */
export function finishFigure(sheet: Sheet): Figure {
  const { name, title, caption, alt, width, height } = sheet;
  const root = element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      class: 'fig',
      width: `${millimetres(width)}mm`,
      height: `${millimetres(height)}mm`,
      viewBox: `0 0 ${Math.round(width)} ${Math.round(height)}`,
      role: 'img',
      'aria-labelledby': `${name}-t ${name}-d`,
      'font-family': FONT,
      'font-size': TYPE.label,
      fill: INK,
    },
    element('title', { id: `${name}-t` }, title),
    element('desc', { id: `${name}-d` }, alt),
  );
  if (sheet.defs !== undefined && sheet.defs.length > 0) root.append(element('defs', {}, ...sheet.defs));
  root.append(element('rect', { class: 'paper', width: Math.round(width), height: Math.round(height), fill: PAPER }));
  // one by one: a large sheet has more nodes than a call takes arguments
  for (const node of sheet.body) root.append(node);
  dress(root);
  return { name, title, caption, alt, svg: root.outerHTML };
}

const millimetres = (units: number) => Math.round((units * 25.4 * 10) / 96) / 10;

/** Names the role of every ink by a class, so that the page can swap it, and drops what only a lone plot needs. */
function dress(node: SvgNode): void {
  for (const name of ['aria-label', 'aria-hidden', 'aria-description']) node.removeAttribute(name);
  const classes: string[] = [];
  for (const paint of ['fill', 'stroke'] as const) {
    const colour = node.getAttribute(paint);
    if (colour === null) continue;
    const swap = SWAPS[colour];
    if (colour === 'currentColor') node.setAttribute(paint, INK);
    if (swap !== undefined) classes.push(`${paint === 'fill' ? 'f' : 's'}${swap}`);
  }
  if (classes.length > 0 && node.getAttribute('class') !== 'paper') {
    const own = node.getAttribute('class');
    node.setAttribute('class', own === null ? classes.join(' ') : `${own} ${classes.join(' ')}`);
  }
  for (const child of node.childNodes) if (child.name !== '#text') dress(child);
}

/** A line of type. */
export function label(x: number, y: number, text: string, attributes: Attributes = {}): SvgNode {
  return element('text', { x, y, ...attributes }, text);
}
