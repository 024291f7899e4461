import type { ClockView } from '../figures/clock-view.js';
import { relationNumbers } from '../figures/reversed-marks.js';
import type { Findings, RelationRow } from '../model/index.js';
import { cut } from './clock-tables.js';
import { evidenceOf } from './evidence-of.js';
import { html, type Markup } from './html.js';
import { bedLink } from './links.js';
import { figures } from './numbers.js';

const MOST = 250;

/** Reversed relations with what may explain each; those still reversed first. Null where there is none. */
export function reversedRelations(view: ClockView, findings: Findings): Markup | null {
  const rows = [...relationNumbers(view)];
  if (rows.length === 0) return null;
  const shown = rows.slice(0, MOST);
  const names = new Set(shown.map(([row]) => nameOf(row)));
  const evidence = evidenceOf(findings, view.clock.clock, 'relation', names);
  return html`<h3>Reversed relations, and what may explain them${view.heading}</h3><ol class="odd">${shown.map(
    ([row, number]) => {
      const beds = [row.lower, row.upper].flatMap((key) => view.byKey.get(key)?.id ?? []).join(' ');
      const state =
        row.verdict_after === 'reversed'
          ? 'reversed'
          : `reversed until odd shells were set aside, now ${row.verdict_after === 'agrees' ? 'agrees' : row.verdict_after}`;
      const sentences = evidence.get(nameOf(row)) ?? [];
      return html`<li id="relation-${view.index}-${number}" data-b="${beds}"><p class="what"><b>${number}</b> <span aria-hidden="true">⇅</span> ${bedLink(view, row.lower)} below ${bedLink(view, row.upper)}: <b>${state}</b></p><p class="why">Rests on ${row.basis}${row.certainty === 'probable' ? ', probable' : ''}; difference ${figures(row.difference, 2)} log ratios, z ${figures(row.z, 2)}.${row.reading === '' ? '' : ` Reading: ${row.reading}${/[.!?]$/.test(row.reading) ? '' : '.'}`}${sentences.length > 0 ? ` ${sentences[0]}` : ''}</p>${sentences.length > 1 ? html`<ul class="why">${sentences.slice(1).map((sentence) => html`<li>${sentence}</li>`)}</ul>` : ''}</li>`;
    },
  )}</ol>${cut(shown.length, rows.length, 'relations.csv')}`;
}

const nameOf = (row: RelationRow) => `${row.lower} > ${row.upper}`;
