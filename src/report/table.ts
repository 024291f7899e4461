import { type HtmlValue, html, type Markup, raw } from './html.js';

/** One column of a table on the page. */
export interface Column<Row> {
  readonly head: string;
  /** What the cell shows. */
  readonly cell: (row: Row) => HtmlValue;
  /** What the column sorts by, where that is not the text shown. */
  readonly sort?: (row: Row) => number | string | null;
  /** Right-aligned numbers. */
  readonly number?: boolean;
  /** Text that may run over several lines. */
  readonly long?: boolean;
}

/** Ties a row to beds, a shell, a zone, a clock and an anchor. */
export interface RowTies {
  readonly id?: string;
  readonly beds?: readonly number[];
  readonly shell?: number;
  readonly zone?: string;
  readonly clock?: number;
  readonly section?: string;
}

/** A table with a caption; the page's script adds sorting and a filter, without it all rows stand as they are. */
export function table<Row>(
  caption: string,
  columns: readonly Column<Row>[],
  rows: readonly Row[],
  ties: (row: Row) => RowTies = () => ({}),
): Markup {
  return html`<div class="tablebox" role="region" tabindex="0" aria-label="${caption}"><table><caption>${caption}</caption><thead><tr>${columns.map(
    (column) => html`<th scope="col"${column.number ? html` class="num"` : ''}>${column.head}</th>`,
  )}</tr></thead><tbody>${joined(rows, (row) => {
    const tie = ties(row);
    return html`<tr${attribute('id', tie.id)}${attribute('data-b', tie.beds?.join(' '))}${attribute('data-s', tie.shell)}${attribute('data-z', tie.zone)}${attribute('data-c', tie.clock)}>${columns.map((column, i) => cell(column, row, i))}</tr>`;
  })}</tbody></table></div>`;
}

/** The rows as one plain string, so that the many pieces it was made of can go. */
const joined = <Row>(rows: readonly Row[], markup: (row: Row) => Markup): Markup =>
  raw(rows.map((row) => markup(row).markup).join(''));

function cell<Row>(column: Column<Row>, row: Row, index: number): Markup {
  const exact = column.sort?.(row);
  // as many digits as any table shows
  const value = typeof exact === 'number' ? Number(exact.toPrecision(6)) : exact;
  const name = column.number ? 'num' : column.long ? 'long' : null;
  const attributes = html`${attribute('class', name ?? undefined)}${attribute('data-v', value ?? undefined)}`;
  return index === 0
    ? html`<th scope="row"${attributes}>${column.cell(row)}</th>`
    : html`<td${attributes}>${column.cell(row)}</td>`;
}

const attribute = (name: string, value: string | number | undefined): Markup | null =>
  value === undefined || value === '' ? null : html` ${name}="${value}"`;
