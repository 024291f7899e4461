import type { ClockView } from '../figures/clock-view.js';
import type { Figure } from '../figures/index.js';
import { html, type Markup, raw } from './html.js';

/** A figure on the page: title, drawing in a box that scrolls by itself, caption, and a button to save it. */
export function figureBlock(figure: Figure, all: readonly Figure[], views: readonly ClockView[]): Markup {
  const number = all.indexOf(figure) + 1;
  const view = views.find((one) => one.suffix !== '' && figure.name.replace(/-part-\d+$/, '').endsWith(one.suffix));
  const narrow = /width="(\d+(?:\.\d+)?)mm"/.exec(figure.svg);
  const wide = narrow === null || Number(narrow[1]) > 100;
  return html`<figure id="fig-${figure.name}"${view === undefined ? '' : html` data-c="${view.index}"`} class="${wide ? 'wide' : 'narrow'}">
<h3>${figure.title}</h3>
<div class="figbox" tabindex="0" role="group" aria-label="Figure ${number}: ${figure.title}">${raw(figure.svg)}</div>
<figcaption><b>Figure ${number}.</b> ${figure.caption} <button type="button" class="save" data-save="${figure.name}" hidden>Save as SVG</button></figcaption>
</figure>`;
}
