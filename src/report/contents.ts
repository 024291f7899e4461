import type { ClockView } from '../figures/clock-view.js';
import { zoneTag } from '../figures/clock-view.js';
import { html, type Markup } from './html.js';
import { ratio } from './numbers.js';
import type { Part } from './sections.js';

/** The side of the page: where things are, the zones, and the filters (which the script uncovers). */
export function contents(parts: readonly Part[], views: readonly ClockView[]): Markup {
  return html`<nav class="side" aria-label="Contents">
<ol class="toc">${parts.map((part) => html`<li><a href="#${part.id}">${part.short}</a></li>`)}</ol>
${views.filter((view) => view.zoned).map(zoneKeys)}
<form class="filters" hidden aria-label="Filters">
<p class="sidehead">Show only</p>
${views.length > 1 ? html`<label>clock <select data-filter="clock"><option value="">all</option>${views.map((view) => html`<option value="${view.index}">${view.clock.clock}</option>`)}</select></label>` : ''}
<label>section <select data-filter="section"><option value="">all</option>${sectionsOf(views).map((section, i) => html`<option value="${i}">${section}</option>`)}</select></label>
<label>zone <select data-filter="zone"><option value="">all</option>${views.filter((view) => view.zoned).flatMap((view) => view.zones.map((zone, i) => html`<option value="${zoneTag(view, i)}">${zone.zone}${views.length > 1 ? `, ${view.clock.clock}` : ''}</option>`))}</select></label>
<p class="count" aria-live="polite"></p>
</form>
<p class="hint" hidden>Point at a bed, shell or zone to light it up everywhere; click to hold it. On a figure, the arrow keys step through beds and shells. <kbd>Esc</kbd> lets go.</p>
</nav>`;
}

/** Sections of all clocks, in coast order. */
export const sectionsOf = (views: readonly ClockView[]): string[] => [
  ...new Set(views.flatMap((view) => view.sections)),
];

function zoneKeys(view: ClockView): Markup {
  return html`<div class="zones" role="group" aria-label="Zones of ${view.clock.clock}"><p class="sidehead">Zones${view.heading}, D/L</p>${view.zones.map(
    (zone, i) =>
      html`<button type="button" class="zonekey" data-z="${zoneTag(view, i)}" disabled><span class="chip z${view.index}-${i}">${zone.zone}</span> ${ratio(zone.dl_mean)}${i === 0 ? ' youngest' : i === view.zones.length - 1 ? ' oldest' : ''}</button>`,
  )}</div>`;
}
