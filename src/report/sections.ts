import type { ClockView } from '../figures/clock-view.js';
import type { Figure } from '../figures/index.js';
import type { Findings } from '../model/index.js';
import { assumedNote } from './assumed-note.js';
import { cautions } from './cautions.js';
import { bedsTable, correlationTable, relationsTable, shellsTable, zonesKey, zonesTable } from './clock-tables.js';
import { conversions } from './conversions.js';
import { figureBlock } from './figure-block.js';
import { type HtmlValue, html, type Markup } from './html.js';
import { methods } from './methods.js';
import { counted } from './numbers.js';
import { oddShells } from './odd-shells.js';
import { planSection } from './plan.js';
import { reversedRelations } from './reversed-relations.js';
import { clocksTable, problemsTable, sectionsTable, sharesTable, votesTable, zoneCountsTable } from './run-tables.js';
import { findingsInSentences } from './sentences.js';

/** One part of the page. */
export interface Part {
  readonly id: string;
  readonly heading: string;
  /** Its name in the contents. */
  readonly short: string;
  readonly body: Markup;
}

/** The parts of the report in the order of the page; a part with nothing in it is left out. */
export function sections(findings: Findings, views: readonly ClockView[], figures: readonly Figure[]): Part[] {
  const drawn = (kind: string) =>
    figures
      .filter((figure) => views.some((view) => figure.name.replace(/-part-\d+$/, '') === kind + view.suffix))
      .map((figure) => figureBlock(figure, figures, views));
  const assumed = assumedNote(views);
  /** A part whose numbers rest on the scatter. */
  const part = (id: string, heading: string, short: string, body: HtmlValue) =>
    partOf(id, heading, short, body, assumed);
  const folded = (name: string, size: string, body: HtmlValue) => foldedTable(name, size, [assumed, body]);
  const single = views.filter((view) => view.combined === null);
  const all: (Part | null)[] = [
    part('findings', 'What was found', 'Findings', [
      html`<div class="lead">${views.map((view) => [views.length > 1 ? html`<h3>${view.clock.clock}</h3>` : '', findingsInSentences(view), zonesTable(view)])}${zonesKey(views)}</div>`,
      remarks(findings, 'finding'),
      toCautions(findings),
    ]),
    part('shells', 'All shells, bed by bed', 'Shells by bed', drawn('shells')),
    part('correlation', 'Correlation along the coast', 'Correlation', drawn('correlation')),
    part('order', 'Order of the beds', 'Order', drawn('ranks')),
    part('heights', 'Do older beds stand higher?', 'Heights', drawn('heights')),
    part('relations', 'Does the field agree?', 'Relations', [
      views.map((view) => reversedRelations(view, findings)),
      drawn('relations'),
      views.some((view) => view.relations.length > 0)
        ? views
            .filter((view) => view.relations.length > 0)
            .map((view) => [views.length > 1 ? html`<h3>Every relation${view.heading}</h3>` : '', relationsTable(view)])
        : null,
    ]),
    part('amino-acids', 'Do the amino acids agree?', 'Amino acids', drawn('amino-acids')),
    part(
      'odd',
      'Shells set aside, and why',
      'Odd shells',
      single.map((view) => oddShells(view, findings)),
    ),
    part('number-of-zones', 'How many zones?', 'Number of zones', [
      views.map((view) => chosen(findings, view.clock.clock, views.length > 1)),
      views.some((view) => view.adjacent.length > 0)
        ? html`<p>The number of zones rests on the choice among models below, not on tests between the zones. A test between groups that were found in the same data flatters them: any cut through one continuous set of beds leaves two groups that differ at a small p.</p>`
        : null,
      html`<div class="figures">${[drawn('zones'), drawn('zone-counts')]}</div>`,
      folded('Criteria for every number of zones', counted(views.length, 'clock'), zoneCountsTable(findings, views)),
    ]),
    part('gradient', 'The slope along the coast', 'Gradient', drawn('gradient')),
    part('taxa', 'From one taxon to another', 'Taxa', conversions(findings, views)),
    part('next', 'What to collect or date next', 'What next', planSection(findings, views)),
    partOf('tables', 'Tables', 'Tables', [
      html`<p>Every table is also a CSV file in the results folder.</p>`,
      views.map((view) => [
        folded(`Beds, ${view.clock.clock}`, counted(view.beds.length, 'row'), bedsTable(view)),
        view.beds.some((bed) => bed.shells.length > 0)
          ? folded(`Shells, ${view.clock.clock}`, counted(view.clock.shells, 'shell'), shellsTable(view))
          : '',
        view.zoned
          ? folded(
              `Beds of each zone by section, ${view.clock.clock}`,
              counted(view.sections.length, 'row'),
              correlationTable(view),
            )
          : '',
      ]),
      folded('Clocks', counted(findings.clocks.length, 'row'), clocksTable(findings)),
      findings.sections.length > 0
        ? folded('Sections', counted(findings.sections.length, 'row'), sectionsTable(findings, views))
        : '',
      findings.shares.length > 0
        ? folded('What each amino acid brings', counted(findings.shares.length, 'row'), sharesTable(findings))
        : '',
      findings.votes.length > 0
        ? folded('Beds whose amino acids disagree', counted(findings.votes.length, 'pair'), votesTable(findings))
        : '',
      findings.problems.length > 0
        ? foldedTable('Warnings about the input', counted(findings.problems.length, 'row'), problemsTable(findings))
        : '',
    ]),
    partOf('methods', 'Methods, settings and sources', 'Methods', methods(findings, views)),
    partOf('cautions', 'Cautions', 'Cautions', [
      remarks(findings, 'caution'),
      cautions(findings.remarks.filter(({ level }) => level === 'caution').map(({ text }) => text)),
    ]),
  ];
  return all.filter((one) => one !== null);
}

function partOf(id: string, heading: string, short: string, body: HtmlValue, note: Markup | null = null): Part | null {
  const markup = html`${body}`;
  return markup.markup === '' ? null : { id, heading, short, body: html`${note}${markup}` };
}

function foldedTable(name: string, size: string, body: HtmlValue): Markup {
  return html`<details><summary>${name} <span class="size">${size}</span></summary>${body}</details>`;
}

/** How the number of zones of a clock was chosen, and which criteria agree. */
function chosen(findings: Findings, clock: string, named: boolean): Markup[] {
  return findings.evidence
    .filter((entry) => entry.about === 'clock' && entry.clock === clock)
    .map(({ sentences }) => html`<p>${named ? html`<b>${clock}:</b> ` : ''}${sentences.join(' ')}</p>`);
}

/** Leads to the cautions at the end of the page, where there are any beside those of every page. */
function toCautions(findings: Findings): Markup | null {
  const count = findings.remarks.filter((remark) => remark.level === 'caution').length;
  return count === 0
    ? null
    : html`<p>To be read with <a href="#cautions">${counted(count, 'caution')} at the end of the page</a>.</p>`;
}

function remarks(findings: Findings, level: 'finding' | 'caution'): Markup | null {
  const own = findings.remarks.filter((remark) => remark.level === level);
  if (own.length === 0) return null;
  const several = findings.clocks.filter((clock) => clock.main).length > 1;
  return html`<ul class="remarks ${level}">${own.map((remark) => html`<li>${several && remark.clock !== null ? html`<b>${remark.clock}:</b> ` : ''}${remark.text}</li>`)}</ul>`;
}
