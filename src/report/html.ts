import { escapeMarkup } from '../figures/svg-node.js';

/**
 * A template whose values are escaped, save for lists of markup and what {@link raw} let through.
 * @example
 * ```ts
 * html`<b>${'a<b'}</b>`.markup // => '<b>a&lt;b</b>'
 * ```
 */
export function html(parts: TemplateStringsArray, ...values: readonly HtmlValue[]): Markup {
  let out = parts[0];
  for (let i = 0; i < values.length; i++) out += write(values[i]) + parts[i + 1];
  return { markup: out };
}

/** A piece of finished markup. */
export interface Markup {
  readonly markup: string;
}

/** What may stand in a template. */
export type HtmlValue = string | number | null | undefined | false | Markup | readonly HtmlValue[];

/** Markup from elsewhere in the program that is known to be safe: figures, the page's own style. */
export const raw = (markup: string): Markup => ({ markup });

function write(value: HtmlValue): string {
  if (value === null || value === undefined || value === false) return '';
  if (typeof value === 'string') return escapeMarkup(value);
  if (typeof value === 'number') return String(value);
  if ('markup' in value) return value.markup;
  let out = '';
  for (const one of value) out += write(one);
  return out;
}

/** A list in a sentence: "a, b and c". */
export function listed(items: readonly HtmlValue[]): Markup {
  return html`${items.map((item, i) => [i === 0 ? '' : i === items.length - 1 ? ' and ' : ', ', item])}`;
}

/** Data for a script element: no character that could end it. */
export const jsonForScript = (data: unknown): Markup =>
  raw(JSON.stringify(data).replace(/[<>&\u2028\u2029]/g, (c) => `\\u${c.charCodeAt(0).toString(16).padStart(4, '0')}`));
