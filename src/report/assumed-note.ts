import type { ClockView } from '../figures/clock-view.js';
import { html, listed, type Markup } from './html.js';
import { figures } from './numbers.js';

/** Said where errors rest on a scatter that was assumed; null where every scatter was measured. */
export function assumedNote(views: readonly ClockView[]): Markup | null {
  const assumed = views.filter((view) => view.assumedScatter !== null);
  if (assumed.length === 0) return null;
  const each = assumed.map(
    (view) => html`${figures(view.assumedScatter)}${views.length > 1 ? html` on ${view.clock.clock}` : ''}`,
  );
  return html`<p class="note">Every error and probability here rests on an assumed scatter between shells of one bed: ${listed(each)}.</p>`;
}
