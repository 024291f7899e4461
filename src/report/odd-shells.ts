import type { ClockView, ShellView } from '../figures/clock-view.js';
import { foremost } from '../figures/foremost.js';
import type { Findings, ShellStatus } from '../model/index.js';
import { cut } from './clock-tables.js';
import { evidenceOf } from './evidence-of.js';
import { html, type Markup } from './html.js';
import { shellLink } from './links.js';
import { counted, figures, ratio } from './numbers.js';

const MOST = 250;

/** Shells set aside or doubtful, each with its reading and what speaks for it; the surest first. */
export function oddShells(view: ClockView, findings: Findings): Markup {
  const aside = shellsThatAre('set aside', view);
  const doubtful = shellsThatAre('doubtful', view);
  if (aside.length + doubtful.length === 0)
    return html`<p>No shell of ${view.clock.clock} was set aside or called doubtful.</p>`;
  const list = (heading: string, rows: readonly OddShell[]) => {
    if (rows.length === 0) return null;
    const shown = foremost(rows, MOST, bySureness);
    const names = new Set(shown.map(({ shell }) => nameOf(shell)));
    const evidence = evidenceOf(findings, view.clock.clock, 'shell', names);
    return html`<h3>${heading}${view.heading}</h3><ol class="odd">${shown.map(({ bed, shell }) => entry(view, bed, shell, evidence.get(nameOf(shell)) ?? []))}</ol>${cut(shown.length, rows.length, 'shells.csv')}`;
  };
  return html`${list(`${counted(aside.length, 'shell')} set aside`, aside)}${list(`${counted(doubtful.length, 'shell')} doubtful, and counted`, doubtful)}`;
}

interface OddShell {
  readonly bed: number;
  readonly shell: ShellView;
}

function shellsThatAre(status: ShellStatus, view: ClockView): OddShell[] {
  const found: OddShell[] = [];
  for (const bed of view.beds)
    for (const shell of bed.odd) if (shell.row.status === status) found.push({ bed: bed.id, shell });
  return found;
}

const nameOf = ({ row }: ShellView) => `${row.section}/${row.bed}/${row.shell}`;

const SURENESS = { high: 0, moderate: 1, low: 2 } as const;
const sureness = (shell: ShellView) => (shell.row.confidence === null ? 3 : SURENESS[shell.row.confidence]);
const bySureness = (a: OddShell, b: OddShell) => sureness(a.shell) - sureness(b.shell);

function entry(view: ClockView, bed: number, shell: ShellView, sentences: readonly string[]): Markup {
  const { row } = shell;
  const sign = row.status === 'set aside' ? '✕' : '◆';
  const reading = row.reading === 'none' ? (row.marks.length > 0 ? row.marks.join(', ') : 'no reading') : row.reading;
  const from =
    row.residual === null ? '' : `, ${figures(row.residual, 2).replace(/^(?!−)/, '+')} log ratios from its bed`;
  return html`<li data-b="${bed}" data-s="${shell.id}"><p class="what"><span aria-hidden="true">${sign}</span> ${shellLink(view, shell)}: <b>${reading}</b>${row.confidence === null ? '' : ` (${row.confidence} confidence)`}</p><p class="why">D/L ${ratio(row.dl)}${from}. ${sentences.join(' ')}${row.reading !== 'none' && row.marks.length > 0 ? ` Marks: ${row.marks.join(', ')}.` : ''}</p></li>`;
}
