import type { ClockView } from '../figures/clock-view.js';
import type {
  AminoAcidShare,
  AminoAcidVotes,
  ClockRow,
  Findings,
  Problem,
  SectionRow,
  ZoneCountRow,
} from '../model/index.js';
import { atMost, cut } from './clock-tables.js';
import { html, type Markup } from './html.js';
import { figures, pValue } from './numbers.js';
import { type Column, table } from './table.js';

/** Every clock of the run, main ones first. */
export function clocksTable(findings: Findings): Markup {
  const columns: Column<ClockRow>[] = [
    { head: 'clock', cell: (row) => row.clock },
    { head: 'main', cell: (row) => (row.main ? 'main' : '–') },
    { head: 'amino acids', cell: (row) => row.amino_acids.join(', ') },
    { head: 'shells', number: true, cell: (row) => row.shells },
    { head: 'beds', number: true, cell: (row) => row.beds },
    { head: 'scatter', number: true, cell: (row) => figures(row.scatter) },
    { head: 'spread', number: true, cell: (row) => figures(row.spread) },
    { head: 'zones', number: true, cell: (row) => row.zones },
    { head: 'verdict', cell: (row) => row.verdict },
    {
      head: 'slope',
      number: true,
      cell: (row) =>
        row.slope === null
          ? '–'
          : html`${figures(row.slope)} (${figures(row.slope_low)} to ${figures(row.slope_high)})`,
      sort: (row) => row.slope,
    },
    { head: 'Rand with main', number: true, cell: (row) => figures(row.rand_with_main, 2) },
  ];
  return table(
    'Clocks',
    columns,
    [...findings.clocks].sort((a, b) => Number(b.main) - Number(a.main)),
  );
}

/** The criteria for every number of zones. */
export function zoneCountsTable(findings: Findings, views: readonly ClockView[]): Markup | null {
  const names = new Map(views.map((view) => [view.clock.clock, view]));
  const rows = findings.zone_counts.filter((row) => names.has(row.clock));
  if (rows.length === 0) return null;
  const columns: Column<ZoneCountRow>[] = [
    { head: 'zones', cell: (row) => row.model },
    ...(views.length > 1 ? [{ head: 'clock', cell: (row: ZoneCountRow) => row.clock }] : []),
    { head: 'log likelihood', number: true, cell: (row) => figures(row.log_likelihood, 4) },
    { head: 'BIC', number: true, cell: (row) => figures(row.bic, 4) },
    ...optional(rows, 'gap', (row) => row.gap),
    ...optional(rows, 'se of the gap', (row) => row.gap_se),
    ...optional(rows, 'silhouette', (row) => row.silhouette),
    { head: 'in use', cell: (row) => (row.chosen ? '✓ chosen' : '–') },
  ];
  return table('Criteria for the number of zones', columns, rows, (row) => ({ clock: names.get(row.clock)?.index }));
}

/** Consistency of each section with its own order. */
export function sectionsTable(findings: Findings, views: readonly ClockView[]): Markup {
  const index = new Map(views.map((view) => [view.clock.clock, view.index]));
  const columns: Column<SectionRow>[] = [
    { head: 'section', cell: (row) => row.section },
    ...(views.length > 1 ? [{ head: 'clock', cell: (row: SectionRow) => row.clock }] : []),
    { head: 'beds', number: true, cell: (row) => row.beds },
    { head: 'relations', number: true, cell: (row) => row.relations },
    { head: 'statistic', number: true, cell: (row) => figures(row.statistic) },
    { head: 'p', number: true, cell: (row) => pValue(row.p_order), sort: (row) => row.p_order },
    { head: 'verdict', cell: (row) => row.verdict },
  ];
  const rows = findings.sections.filter((row) => index.has(row.clock));
  const shown = atMost(rows);
  return html`${table('Sections', columns, shown, (row) => ({ clock: index.get(row.clock) }))}${cut(shown.length, rows.length, 'sections.csv')}`;
}

/** What each amino acid brings to an index. */
export function sharesTable(findings: Findings): Markup {
  const columns: Column<AminoAcidShare>[] = [
    { head: 'amino acid', cell: (row) => row.amino_acid },
    { head: 'clock', cell: (row) => row.clock },
    { head: 'weight', number: true, cell: (row) => figures(row.weight, 2) },
    { head: 'between beds over within', number: true, cell: (row) => figures(row.resolution, 3) },
    { head: 'verdict', cell: (row) => row.verdict },
  ];
  return table('What each amino acid brings', columns, findings.shares);
}

/** Pairs of beds on whose order the amino acids disagree, with every vote. */
export function votesTable(findings: Findings): Markup {
  const columns: Column<AminoAcidVotes>[] = [
    { head: 'bed', cell: (row) => row.bed_a },
    { head: 'against', cell: (row) => row.bed_b },
    { head: 'clock', cell: (row) => row.clock },
    {
      head: 'votes for the older',
      long: true,
      cell: (row) => row.votes.map((vote) => `${vote.amino_acid}: ${vote.older} (${figures(vote.p, 2)})`).join('; '),
    },
  ];
  const shown = atMost(findings.votes);
  return html`${table('Beds whose amino acids disagree', columns, shown)}${cut(shown.length, findings.votes.length, 'results.json')}`;
}

/** Warnings about the input, each with its place. */
export function problemsTable(findings: Findings): Markup {
  const columns: Column<Problem>[] = [
    { head: 'file', cell: (row) => row.file },
    { head: 'line', number: true, cell: (row) => row.line ?? '–' },
    { head: 'column', cell: (row) => row.column ?? '–' },
    { head: 'severity', cell: (row) => row.severity },
    { head: 'message', long: true, cell: (row) => row.message },
  ];
  const shown = atMost(findings.problems);
  return html`${table('Warnings about the input', columns, shown)}${cut(shown.length, findings.problems.length, 'problems.csv')}`;
}

/** A column of numbers, left out where no row has one. */
function optional<Row>(rows: readonly Row[], head: string, value: (row: Row) => number | null): Column<Row>[] {
  return rows.some((row) => value(row) !== null) ? [{ head, number: true, cell: (row) => figures(value(row), 2) }] : [];
}
