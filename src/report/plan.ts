import type { ClockView } from '../figures/clock-view.js';
import type { Findings, PlanKind, PlanRow } from '../model/index.js';
import { type HtmlValue, html, type Markup } from './html.js';
import { bedLink } from './links.js';
import { chance, counted, figures } from './numbers.js';
import { type Column, type RowTies, table } from './table.js';

/** Headings, in the order of the page: what costs least and settles most first. */
const HEADINGS: Readonly<Record<PlanKind, string>> = {
  'check bed': 'Collect again first: reversed or mixed beds',
  'separate zones': 'Zones not yet shown to be distinct',
  'strengthen bed': 'Beds from which more shells gain most',
  'separate beds': 'Neighbours that more shells would part',
  'date beds': 'Beds to date',
};
const KINDS = Object.keys(HEADINGS) as PlanKind[];

/** Lines of one kind shown as sentences; the table holds them all. */
const SHOWN = 6;

/** Beds of one clock shown that gain the order most. */
const MOST_BEDS = 8;

/** What to collect or date next: the best lines in words, all of them in a table, and what counts as resolved. */
export function planSection(findings: Findings, views: readonly ClockView[]): HtmlValue {
  const { plan } = findings;
  if (plan.length === 0) {
    return findings.plan_notes.length === 0 ? null : html`<p>${findings.plan_notes.join(' ')}</p>`;
  }
  const named = new Set(plan.flatMap((row) => row.clock ?? [])).size > 1;
  return [
    html`<p>Shells and dates are dear. This is what more of them would settle, worked out from the errors of this survey; the order itself stays relative.</p>`,
    KINDS.map((kind) => part(kind, plan, views, named)),
    folded(plan, views, named),
    html`<p class="note">${findings.plan_criterion}</p><ul class="note">${findings.plan_notes.map((note) => html`<li>${note}</li>`)}</ul>`,
  ];
}

function part(kind: PlanKind, plan: readonly PlanRow[], views: readonly ClockView[], named: boolean): Markup | null {
  const rows = plan.filter((row) => row.kind === kind);
  if (rows.length === 0) return null;
  const heading = html`<h3>${HEADINGS[kind]}</h3>`;
  if (kind === 'strengthen bed') return html`${heading}${strengthen(rows, views, named)}`;
  const useful = kind === 'separate beds' ? rows.filter((row) => row.total !== null) : rows;
  const rest = rows.length - useful.length;
  const tied = counted(rest, 'further neighbour', 'further neighbours');
  const none =
    rest === 0
      ? null
      : html`<p>${useful.length === 0 ? `No number of shells is promised to part any of the ${counted(rest, 'unresolved pair')} of neighbours` : `For ${tied} in the order no number of shells is promised`}: within their errors, or within what beds of one age differ, they may truly be as old. The table says of each pair why.</p>`;
  return html`${heading}${lines(useful, views, named)}${none}`;
}

function lines(rows: readonly PlanRow[], views: readonly ClockView[], named: boolean): Markup | null {
  if (rows.length === 0) return null;
  const more = rows.length - SHOWN;
  return html`<ol class="odd">${rows
    .slice(0, SHOWN)
    .map(
      (row) =>
        html`<li${ties(row, views)}><p>${named && row.clock !== null ? html`<b>${row.clock}:</b> ` : ''}${row.settles}</p></li>`,
    )}</ol>${more > 0 ? html`<p class="note">${counted(more, 'more line')} in the table.</p>` : ''}`;
}

/** The beds that gain most, a table a clock: a row a bed, a column for every number of further shells. */
function strengthen(rows: readonly PlanRow[], views: readonly ClockView[], named: boolean): Markup {
  const clocks = [...new Set(rows.map((row) => row.clock))];
  const most = named ? 5 : MOST_BEDS;
  const tables = clocks.map((clock) => {
    const own = rows.filter((row) => row.clock === clock && row.rank <= most);
    const sizes = [...new Set(own.map((row) => row.total ?? 0))];
    const gain = (of: PlanRow, size: number) =>
      own.find((row) => row.beds[0] === of.beds[0] && row.total === size)?.pairs_gained ?? null;
    const columns: Column<PlanRow>[] = [
      { head: 'bed', cell: (row) => links(row, views) },
      { head: 'shells now', number: true, cell: (row) => bedOf(row, views)?.row.shells ?? '–' },
      ...sizes.map(
        (size): Column<PlanRow> => ({
          head: `with ${size} more`,
          number: true,
          cell: (row) => gain(row, size)?.toFixed(1) ?? '–',
        }),
      ),
    ];
    const shown = own.filter((row) => row.total === sizes[0]);
    const caption = `Pairs of beds newly resolved${named ? `, ${clock ?? ''}` : ''}`;
    return html`${named ? html`<p><b>${clock}</b></p>` : ''}<div class="slim">${table(caption, columns, shown, (row) => rowTies(row, views))}</div>`;
  });
  return html`${tables}<p class="note">Pairs of beds in the whole order expected to be newly resolved by so many more shells from one bed.</p>`;
}

function folded(plan: readonly PlanRow[], views: readonly ClockView[], named: boolean): Markup {
  const columns: Column<PlanRow>[] = [
    { head: 'beds', cell: (row) => links(row, views) },
    { head: 'what', cell: (row) => row.kind },
    ...(named ? [{ head: 'clock', cell: (row: PlanRow) => row.clock ?? 'all' }] : []),
    { head: 'rank', number: true, cell: (row) => row.rank },
    { head: 'more shells', number: true, cell: (row) => row.shells.join(' + ') || '–', sort: (row) => row.total },
    { head: 'power', number: true, cell: (row) => chance(row.power) },
    { head: 'chance', number: true, cell: (row) => chance(row.chance) },
    { head: 'pairs gained', number: true, cell: (row) => figures(row.pairs_gained, 2) },
    { head: 'bracketed', number: true, cell: (row) => row.beds_bracketed ?? '–' },
    { head: 'what it settles', long: true, cell: (row) => row.settles },
  ];
  return html`<details><summary>Every line of the plan <span class="size">${counted(plan.length, 'line')}</span></summary>${table('Every line of the plan', columns, plan, (row) => rowTies(row, views))}</details>`;
}

const viewOf = (row: PlanRow, views: readonly ClockView[]) =>
  views.find((view) => row.clock === null || view.clock.clock === row.clock);

const bedOf = (row: PlanRow, views: readonly ClockView[]) => viewOf(row, views)?.byKey.get(row.beds[0]);

/** Numbers of the beds of a line, whichever clock has them. */
const idsOf = (row: PlanRow, views: readonly ClockView[]): number[] =>
  row.beds.flatMap((key) => views.flatMap((view) => view.byKey.get(key)?.id ?? []).slice(0, 1));

function links(row: PlanRow, views: readonly ClockView[]): Markup {
  const own = viewOf(row, views);
  const shown = row.beds.slice(0, 4);
  const link = (key: string) => {
    const view = own?.byKey.has(key) ? own : views.find((one) => one.byKey.has(key));
    return view === undefined ? html`${key}` : bedLink(view, key);
  };
  return html`${shown.map((key, i) => [i > 0 ? ', ' : '', link(key)])}${row.beds.length > shown.length ? ` and ${row.beds.length - shown.length} more` : ''}`;
}

function rowTies(row: PlanRow, views: readonly ClockView[]): RowTies {
  return { beds: idsOf(row, views), clock: row.clock === null ? undefined : viewOf(row, views)?.index };
}

function ties(row: PlanRow, views: readonly ClockView[]): Markup | null {
  const ids = idsOf(row, views);
  return ids.length === 0 ? null : html` data-b="${ids.join(' ')}"`;
}
