/*
 * A document just large enough to draw SVG in: elements, attributes, text, and writing it all out. Plot draws into it
 * through the same few calls it makes on a browser's document. A full document library costs 120 ms to load, a tenth
 * of a whole run, for calls that are never made; measured, this one costs nothing.
 */

const SVG = 'http://www.w3.org/2000/svg';

/** Escapes text for the inside of an element or a double-quoted attribute of XML or HTML.
 * Characters that XML can't hold are replaced by U+FFFD.
 * @example
 * ```ts
 * escapeMarkup('a<b & "c"') // => 'a&lt;b &amp; &quot;c&quot;'
 * ```
 */
export function escapeMarkup(text: string): string {
  if (!SPECIAL.test(text)) return text;
  return text
    .replace(FORBIDDEN, '\uFFFD')
    .replace(/[&<>"']/g, (c) =>
      c === '&' ? '&amp;' : c === '<' ? '&lt;' : c === '>' ? '&gt;' : c === '"' ? '&quot;' : '&#39;',
    );
}

// Most texts hold nothing to escape, which one look tells; halves of pairs count too, whether alone or not.
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
const SPECIAL = /[&<>"'\u0000-\u0008\u000B\u000C\u000E-\u001F\uD800-\uDFFF\uFFFE\uFFFF]/;

// Control characters, lone surrogates and the two non-characters have no place in XML.
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
const FORBIDDEN = /[\u0000-\u0008\u000B\u000C\u000E-\u001F\uFFFE\uFFFF]|\p{Surrogate}/gu;

/** One element of a drawing, or a piece of text (name `#text`). */
export class SvgNode {
  readonly namespaceURI = SVG;
  readonly attributes = new Map<string, string>();
  readonly childNodes: SvgNode[] = [];
  parentNode: SvgNode | null = null;
  /** Where Plot's selections keep the index of the datum behind an element. */
  __data__: unknown;

  constructor(
    readonly name: string,
    readonly text = '',
  ) {}

  get ownerDocument(): SvgDocument {
    return svgDocument;
  }
  get tagName(): string {
    return this.name;
  }
  get children(): SvgNode[] {
    return this.childNodes.filter((child) => child.name !== '#text');
  }
  get firstChild(): SvgNode | null {
    return this.childNodes[0] ?? null;
  }
  get nextSibling(): SvgNode | null {
    const siblings = this.parentNode?.childNodes ?? [];
    return siblings[siblings.indexOf(this) + 1] ?? null;
  }
  set textContent(text: string) {
    this.childNodes.length = 0;
    this.appendChild(new SvgNode('#text', String(text)));
  }
  get textContent(): string {
    return this.name === '#text' ? this.text : this.childNodes.map((child) => child.textContent).join('');
  }
  setAttribute(name: string, value: unknown): void {
    this.attributes.set(name, String(value));
  }
  setAttributeNS(_space: string | null, name: string, value: unknown): void {
    this.setAttribute(name, value);
  }
  getAttribute(name: string): string | null {
    return this.attributes.get(name) ?? null;
  }
  hasAttribute(name: string): boolean {
    return this.attributes.has(name);
  }
  removeAttribute(name: string): void {
    this.attributes.delete(name);
  }
  appendChild(child: SvgNode): SvgNode {
    child.remove();
    child.parentNode = this;
    this.childNodes.push(child);
    return child;
  }
  append(...children: (SvgNode | string)[]): void {
    for (const child of children) this.appendChild(typeof child === 'string' ? new SvgNode('#text', child) : child);
  }
  insertBefore(child: SvgNode, before: SvgNode | null): SvgNode {
    child.remove();
    child.parentNode = this;
    const at = before === null ? -1 : this.childNodes.indexOf(before);
    this.childNodes.splice(at < 0 ? this.childNodes.length : at, 0, child);
    return child;
  }
  remove(): void {
    const siblings = this.parentNode?.childNodes;
    if (siblings !== undefined) siblings.splice(siblings.indexOf(this), 1);
    this.parentNode = null;
  }
  addEventListener(): void {}

  /** The element and all within it as markup. */
  get outerHTML(): string {
    if (this.name === '#text') return escapeMarkup(this.text);
    let out = `<${this.name}`;
    this.attributes.forEach((value, name) => {
      out += ` ${name}="${escapeMarkup(value)}"`;
    });
    if (this.childNodes.length === 0) return `${out}/>`;
    // joined, children are one plain string, and the many pieces they were made of can go
    return `${out}>${this.childNodes.map((child) => child.outerHTML).join('')}</${this.name}>`;
  }
}

/** What Plot asks of a document. */
export interface SvgDocument {
  readonly documentElement: SvgNode;
  createElement(name: string): SvgNode;
  createElementNS(space: string, name: string): SvgNode;
  createTextNode(text: string): SvgNode;
}

/** The document all figures are drawn in; it holds nothing itself. */
export const svgDocument: SvgDocument = {
  documentElement: new SvgNode('svg'),
  createElement: (name) => new SvgNode(name),
  createElementNS: (_space, name) => new SvgNode(name),
  createTextNode: (text) => new SvgNode('#text', text),
};

/** Values of attributes; undefined and null leave the attribute out, numbers are written with at most two decimals. */
export type Attributes = Readonly<Record<string, string | number | null | undefined>>;

/**
 * One element with its attributes and children.
 * @example
 * ```ts
 * element('text', { x: 1.2345 }, 'Z1').outerHTML // => '<text x="1.23">Z1</text>'
 * ```
 */
export function element(name: string, attributes: Attributes = {}, ...children: (SvgNode | string)[]): SvgNode {
  const node = new SvgNode(name);
  for (const key in attributes) {
    const value = attributes[key];
    if (value === undefined || value === null) continue;
    node.setAttribute(key, typeof value === 'number' ? round(value) : value);
  }
  node.append(...children);
  return node;
}

/** A number as drawings write it: at most two decimals, no minus zero.
 * @example
 * ```ts
 * round(-0.001) // => 0
 * ```
 */
export function round(value: number): number {
  return Math.round(value * 100) / 100 + 0;
}
