import type { ClockView, ShellView } from '../figures/clock-view.js';
import { html, type Markup } from './html.js';

/** A link to the place of a bed in the correlation panel, which lights it up; plain text for a bed not on the clock. */
export function bedLink(view: ClockView, key: string): Markup {
  const bed = view.byKey.get(key);
  return bed === undefined
    ? html`${key}`
    : html`<a href="#fig-correlation${view.suffix}" data-b="${bed.id}">${key}</a>`;
}

/** A link to the place of a shell in the figure of all shells. */
export function shellLink(view: ClockView, shell: ShellView): Markup {
  const { section, bed, shell: name } = shell.row;
  const id = view.byKey.get(`${section}/${bed}`)?.id;
  return html`<a href="#fig-shells${view.suffix}" data-b="${id}" data-s="${shell.id}">${section}/${bed}/${name}</a>`;
}
