import type { ClockView } from '../figures/clock-view.js';
import type { ConversionFinding, Findings } from '../model/index.js';
import { html, type Markup } from './html.js';
import { counted, figures } from './numbers.js';
import { type Column, table } from './table.js';

/** How taxa were put on the scale of the reference taxon, or why they were not; null where none was asked for. */
export function conversions(findings: Findings, views: readonly ClockView[]): Markup | null {
  const rows = findings.conversions;
  if (rows.length === 0) return null;
  const several = new Set(rows.map((row) => row.fraction)).size > 1;
  const columns: Column<ConversionFinding>[] = [
    { head: 'taxon', cell: (row) => html`<i>${row.taxon}</i>` },
    { head: 'to the scale of', cell: (row) => html`<i>${row.reference}</i>` },
    ...(several ? [{ head: 'fraction', cell: (row: ConversionFinding) => row.fraction }] : []),
    { head: 'outcome', cell: (row) => row.verdict },
    { head: 'beds with both', number: true, cell: (row) => row.paired_beds.length },
    {
      head: 'slope',
      number: true,
      cell: (row) => (row.slope === null ? '–' : row.slope_fixed ? '1 (fixed)' : plusMinus(row.slope, row.slope_se)),
      sort: (row) => row.slope,
    },
    {
      head: 'intercept',
      number: true,
      cell: (row) => (row.intercept === null ? '–' : plusMinus(row.intercept, row.intercept_se)),
      sort: (row) => row.intercept,
    },
    { head: 'extra scatter', number: true, cell: (row) => figures(row.extra_scatter, 2) },
    {
      head: 'χ² (df)',
      number: true,
      cell: (row) => (row.chi_squared === null ? '–' : `${figures(row.chi_squared)} (${row.df ?? '–'})`),
      sort: (row) => row.chi_squared,
    },
    { head: 'beds converted', number: true, cell: (row) => row.converted_beds },
    { head: 'remark', long: true, cell: (row) => row.reason || '–' },
  ];
  const joined = views.filter((view) => view.combined !== null);
  return html`<p>Taxa racemize at different rates, so each has its own clock. Where beds hold two taxa, a line between their log ratios puts one on the scale of the other: ln(D/L) of the reference = intercept + slope · ln(D/L) of the taxon. The error of the line is carried into every converted bed, and these errors belong together: if the line is off, all converted beds are off with it.${joined.length > 0 ? html` The clock ${joined[0].clock.clock} holds ${joined.length > 1 ? 'such ' : ''}${counted(joined[0].beds.length, 'bed')} of all taxa together.` : ''}</p>${table('Taxa on the scale of the reference', columns, rows)}`;
}

const plusMinus = (value: number, error: number | null): Markup =>
  html`${figures(value)}${error === null ? '' : html` ± ${figures(error, 2)}`}`;
