import { html, type Markup } from './html.js';

/**
 * Cautions that stand on every page, whatever was found.
 * @param said cautions that stand before them
 */
export function cautions(said: readonly string[]): Markup {
  const relative = said.some((text) => text.startsWith('The order is relative')) ? '' : 'The order is relative. ';
  return html`<ul>
<li>${relative}A zone is a group of beds with a like extent of racemization; it is no age, and two zones differ in age by an amount that only independent dates can tell.</li>
<li>Ratios depend on temperature, taxon and burial as well as on time. Beds of one age can differ in ratio where their histories differ.</li>
<li>Shells from eroding cliffs and foreshores are collected at risk from falls and tide, and laboratory hydrolysis uses hot concentrated acid. Follow local safety rules and permits.</li>
<li>Decisions about hazard, siting or uplift rates belong with licensed practice.</li>
</ul>`;
}
