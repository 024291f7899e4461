import { type BedView, type ClockView, type ShellView, zoneTag } from '../figures/clock-view.js';
import { foremost } from '../figures/foremost.js';
import { relationNumbers } from '../figures/reversed-marks.js';
import type { RelationRow, ZoneRow } from '../model/index.js';
import { html, listed, type Markup } from './html.js';
import { bedLink, shellLink } from './links.js';
import { chance, figures, pValue, ratio, thousands } from './numbers.js';
import { type Column, type RowTies, table } from './table.js';

/** All rows of a table, or the first 500 of more than 1,500, which would only make the page slow: the CSV holds all. */
export const atMost = <Row>(rows: readonly Row[]): readonly Row[] => rows.slice(0, shownOf(rows.length));

/** How many of so many rows a table shows. */
const shownOf = (rows: number) => (rows > 1500 ? 500 : rows);

/** Said under a table that does not show every row. */
export const cut = (shown: number, all: number, file: string): Markup | null =>
  shown < all ? html`<p class="note">${shown} of ${thousands(all)} rows are shown; ${file} holds all.</p>` : null;

/** A zone's name with its colour, which says nothing that the name doesn't. */
const zoneChip = (view: ClockView, zone: string | null): Markup => {
  const index = view.zones.findIndex((row) => row.zone === zone);
  return index < 0 ? html`${zone ?? '–'}` : html`<span class="chip z${view.index}-${index}">${zone}</span>`;
};

/** Zones of one clock. */
export function zonesTable(view: ClockView): Markup {
  const older = new Map(view.adjacent.map((row) => [row.younger, row]));
  const columns: Column<ZoneRow>[] = [
    { head: 'zone', cell: (row) => zoneChip(view, row.zone) },
    { head: 'beds', number: true, cell: (row) => row.beds },
    { head: 'shells', number: true, cell: (row) => row.shells },
    { head: 'D/L', number: true, cell: (row) => ratio(row.dl_mean) },
    {
      head: '95 % of the mean',
      number: true,
      cell: (row) => html`${ratio(row.dl_low)} to ${ratio(row.dl_high)}`,
      sort: (row) => row.dl_low,
    },
    {
      head: 'shells ± 1 sd',
      number: true,
      cell: (row) => html`${ratio(row.shell_low)} to ${ratio(row.shell_high)}`,
      sort: (row) => row.shell_low,
    },
    ...(view.zones.some((row) => row.stability !== null)
      ? [{ head: 'stability', number: true, cell: (row: ZoneRow) => row.stability?.toFixed(2) ?? '–' }]
      : []),
    ...(view.adjacent.length > 0
      ? [
          { head: 'against the next older', cell: (row: ZoneRow) => older.get(row.zone)?.verdict ?? '–' },
          { head: 'overlap', number: true, cell: (row: ZoneRow) => chance(older.get(row.zone)?.overlap ?? null) },
          { head: 'p (beds)', number: true, cell: (row: ZoneRow) => pValue(older.get(row.zone)?.p_difference ?? null) },
        ]
      : []),
    ...(view.adjacent.some((row) => row.p_mann_whitney !== null)
      ? [
          {
            head: 'p (shells)',
            number: true,
            cell: (row: ZoneRow) => pValue(older.get(row.zone)?.p_mann_whitney ?? null),
          },
        ]
      : []),
  ];
  return table(`Zones of ${view.clock.clock}`, columns, view.zones, (row) => ({
    zone: zoneTag(view, view.zones.indexOf(row)),
    clock: view.index,
  }));
}

/** What the columns of the zone tables mean, and how much they are worth. */
export function zonesKey(views: readonly ClockView[]): Markup | null {
  const said = [
    views.some((view) => view.zones.some((row) => row.stability !== null))
      ? 'Stability: how much of a zone comes back when beds and shells are drawn again, from 0 to 1 (mean Jaccard similarity); from 0.75 up a zone is stable, under 0.6 it should not be believed.'
      : '',
    views.some((view) => view.adjacent.length > 0)
      ? 'Overlap: how far the shells of two zones share one range, 0 apart and 1 alike. The p-values, by the means of beds and by the ranks of shells, test groups that were found in these same data and so come out too small: a large one speaks against two zones, a small one does not prove them.'
      : '',
  ].filter((words) => words !== '');
  return said.length === 0 ? null : html`<p class="note">${said.join(' ')}</p>`;
}

const VERDICT_ORDER = { reversed: 0, 'not tested': 3, tied: 1, agrees: 2 } as const;
const SIGN = { reversed: '⇅', tied: '≈', agrees: '✓', 'not tested': '–' } as const;

const reversedFirst = (a: RelationRow, b: RelationRow) =>
  VERDICT_ORDER[a.verdict_after] - VERDICT_ORDER[b.verdict_after] ||
  VERDICT_ORDER[a.verdict] - VERDICT_ORDER[b.verdict] ||
  (a.z ?? 0) - (b.z ?? 0);

/** Field relations of one clock, reversed first. */
export function relationsTable(view: ClockView): Markup {
  const numbers = relationNumbers(view);
  const verdict = (value: RelationRow['verdict']) =>
    html`<span class="verdict ${value === 'reversed' ? 'bad' : ''}"><span aria-hidden="true">${SIGN[value]}</span> ${value}</span>`;
  const columns: Column<RelationRow>[] = [
    ...(numbers.size > 0 ? [{ head: 'no.', cell: (row: RelationRow) => numbers.get(row) ?? '' }] : []),
    { head: 'lower', cell: (row) => bedLink(view, row.lower) },
    { head: 'upper', cell: (row) => bedLink(view, row.upper) },
    {
      head: 'rests on',
      cell: (row) =>
        html`${row.basis}${row.kind === 'same' ? ', same age' : ''}${row.certainty === 'probable' ? ', probable' : ''}`,
    },
    { head: 'difference', number: true, cell: (row) => figures(row.difference, 2), sort: (row) => row.difference },
    { head: 'z', number: true, cell: (row) => figures(row.z, 2), sort: (row) => row.z },
    { head: 'all shells', cell: (row) => verdict(row.verdict) },
    { head: 'after setting aside', cell: (row) => verdict(row.verdict_after) },
    ...(view.relations.some((row) => row.reading !== '')
      ? [{ head: 'reading', long: true, cell: (row: RelationRow) => row.reading }]
      : []),
  ];
  const shown = foremost(view.relations, shownOf(view.relations.length), reversedFirst);
  return html`${table(`Field relations on ${view.clock.clock}`, columns, shown, (row): RowTies => {
    const beds = [row.lower, row.upper].flatMap((key) => view.byKey.get(key)?.id ?? []);
    return { beds, clock: view.index };
  })}${cut(shown.length, view.relations.length, 'relations.csv')}`;
}

/** All beds of one clock. */
export function bedsTable(view: ClockView): Markup {
  const columns: Column<BedView>[] = [
    { head: 'bed', cell: (bed) => bedLink(view, bed.key) },
    { head: 'zone', cell: (bed) => zoneChip(view, bed.row.zone), sort: (bed) => bed.zone },
    {
      head: 'probability',
      number: true,
      cell: (bed) => chance(bed.row.zone_probability),
      sort: (bed) => bed.row.zone_probability,
    },
    {
      head: 'else',
      cell: (bed) =>
        bed.row.second_zone !== null && (bed.row.second_probability ?? 0) >= 0.005
          ? html`${bed.row.second_zone} (${chance(bed.row.second_probability)})`
          : '–',
    },
    { head: 'rank', number: true, cell: (bed) => bed.order?.rank ?? '–', sort: (bed) => bed.order?.rank ?? null },
    {
      head: '95 % rank',
      number: true,
      cell: (bed) => (bed.order === null ? '–' : `${bed.order.rank_low} to ${bed.order.rank_high}`),
      sort: (bed) => bed.order?.rank_low ?? null,
    },
    { head: 'D/L', number: true, cell: (bed) => ratio(bed.row.dl_mean), sort: (bed) => bed.row.dl_mean },
    { head: 'sd', number: true, cell: (bed) => figures(bed.row.dl_sd, 2), sort: (bed) => bed.row.dl_sd },
    { head: 'shells', number: true, cell: (bed) => bed.row.shells },
    { head: 'set aside', number: true, cell: (bed) => bed.row.set_aside || '–', sort: (bed) => bed.row.set_aside },
    { head: 'marks', cell: (bed) => bed.row.marks.join(', ') || '–' },
    { head: 'reading', long: true, cell: (bed) => bed.row.reading || '–' },
  ];
  const shown = atMost(view.beds);
  return html`${table(`Beds on ${view.clock.clock}`, columns, shown, (bed) => ({ beds: [bed.id], zone: zoneTag(view, bed.zone), clock: view.index }))}${cut(shown.length, view.beds.length, 'beds.csv')}`;
}

/** All shells of one clock. */
export function shellsTable(view: ClockView): Markup {
  const all = view.beds.reduce((sum, bed) => sum + bed.shells.length, 0);
  const shown = firstShells(view, shownOf(all));
  const columns: Column<(typeof shown)[number]>[] = [
    { head: 'shell', cell: ({ shell }) => shellLink(view, shell) },
    { head: 'lab', cell: ({ shell }) => shell.row.lab_id.join(', ') || '–' },
    { head: 'D/L', number: true, cell: ({ shell }) => ratio(shell.row.dl) },
    {
      head: 'log ratio',
      number: true,
      cell: ({ shell }) => figures(shell.row.log_ratio),
      sort: ({ shell }) => shell.row.log_ratio,
    },
    {
      head: 'from its bed',
      number: true,
      cell: ({ shell }) => figures(shell.row.residual, 2),
      sort: ({ shell }) => shell.row.residual,
    },
    { head: 'zone', cell: ({ shell }) => zoneChip(view, shell.row.zone) },
    {
      head: 'probability',
      number: true,
      cell: ({ shell }) => chance(shell.row.zone_probability),
      sort: ({ shell }) => shell.row.zone_probability,
    },
    { head: 'status', cell: ({ shell }) => shell.row.status },
    { head: 'marks', cell: ({ shell }) => shell.row.marks.join(', ') || '–' },
    { head: 'reading', cell: ({ shell }) => (shell.row.reading === 'none' ? '–' : shell.row.reading) },
  ];
  return html`${table(`Shells on ${view.clock.clock}`, columns, shown, ({ bed, shell }) => ({ beds: [bed.id], shell: shell.id, clock: view.index }))}${cut(shown.length, all, 'shells.csv')}`;
}

function firstShells(view: ClockView, most: number): { readonly bed: BedView; readonly shell: ShellView }[] {
  const first: { bed: BedView; shell: ShellView }[] = [];
  for (const bed of view.beds)
    for (const id of bed.shells) {
      if (first.length === most) return first;
      first.push({ bed, shell: { id, row: view.shellRows[id] } });
    }
  return first;
}

/** Which beds of each section belong to each zone, in coast order. */
export function correlationTable(view: ClockView): Markup | null {
  if (!view.zoned) return null;
  const bySection = new Map<string, BedView[]>(view.sections.map((section) => [section, []]));
  for (const bed of view.beds) bySection.get(bed.row.section)!.push(bed);
  const columns: Column<string>[] = [
    { head: 'section', cell: (section) => section },
    ...view.zones.map(
      (zone, i): Column<string> => ({
        head: zone.zone,
        cell: (section) => {
          const beds = bySection.get(section)!.filter((bed) => bed.zone === i);
          return beds.length === 0
            ? 'missing'
            : listed(
                beds.map((bed) => html`<a href="#fig-correlation${view.suffix}" data-b="${bed.id}">${bed.row.bed}</a>`),
              );
        },
      }),
    ),
  ];
  const shown = view.sections.slice(0, 400);
  return html`${table(`Beds of each zone by section, ${view.clock.clock}`, columns, shown, () => ({ clock: view.index }))}${cut(shown.length, view.sections.length, 'correlation.csv')}`;
}
