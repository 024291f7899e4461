import type { OrderRow } from '../../model/index.js';
import { type Style, safe, wrap } from '../terminal.js';
import type { ClockFacts } from './facts.js';

/** Beds from which an order is shortened, and how much of each zone and how many lines are then kept. */
const SHORTEN = { beds: 80, ofZone: 4, zones: 12 } as const;

/**
 * The order of one clock, oldest to youngest, in a compact form: one paragraph a zone, `>` where a bed is surely older
 * than the next, `~` where that is not resolved, and the 95 % interval of each rank.
 */
export function orderText({ order }: ClockFacts, style: Style): string[] {
  if (order.length === 0) return ['  No order: no bed has a mean on this clock.'];
  const resolved = order.filter((row) => row.resolved === true).length;
  const lines = [
    `  ${style.bold('Order, oldest to youngest')} (> older, ~ not resolved, = as old)`,
    ...shortened(stretches(order), order.length),
  ];
  if (order.length > 1)
    lines.push(`    ${resolved} of ${order.length - 1} steps are resolved; [ ] is the 95 % interval of the rank.`);
  return lines;
}

interface Stretch {
  readonly zone: string | null;
  readonly rows: readonly OrderRow[];
  /** Whether the order ends with it. */
  readonly last: boolean;
}

// Neighbours in the order that share a zone.
function stretches(order: readonly OrderRow[]): Stretch[] {
  const found: { zone: string | null; rows: OrderRow[] }[] = [];
  for (const row of order) {
    const before = found.at(-1);
    if (before && before.zone === row.zone) before.rows.push(row);
    else found.push({ zone: row.zone, rows: [row] });
  }
  return found.map((stretch, i) => ({ ...stretch, last: i + 1 === found.length }));
}

function shortened(all: readonly Stretch[], beds: number): string[] {
  if (beds <= SHORTEN.beds) return all.map((stretch) => stretchText(stretch, stretch.rows.length));
  const shown = all.slice(0, SHORTEN.zones).map((stretch) => stretchText(stretch, SHORTEN.ofZone));
  const left = all.slice(SHORTEN.zones).reduce((sum, { rows }) => sum + rows.length, 0);
  return [...shown, ...(left > 0 ? [`    … ${left} more beds`] : []), '    The whole order is in order.csv.'];
}

function stretchText({ zone, rows, last }: Stretch, most: number): string {
  const cut = rows.length > most + 1;
  const kept = cut ? rows.slice(0, most) : rows;
  const words = kept.map((row, i) => bedText(row, i + 1 === rows.length && last));
  if (cut) words.push(`… ${rows.length - most - 1} more …`, bedText(rows[rows.length - 1], last));
  const name = (zone === null ? '-' : safe(zone)).padEnd(4);
  return unglued(wrap(`    ${name}${words.join(' ')}`, 78, 8));
}

// A bed, its interval and the sign that follows stay together on one line.
function bedText(row: OrderRow, isLast: boolean): string {
  const interval =
    row.rank_low === row.rank_high ? `[${row.rank_low}]` : `[${Math.round(row.rank_low)}-${Math.round(row.rank_high)}]`;
  // without a probability the two are as old by a relation `same`
  const sign = isLast ? '' : row.p_older_than_next === null ? ' =' : row.resolved ? ' >' : ' ~';
  return `${safe(`${row.section}/${row.bed}`)} ${interval}${sign}`.replaceAll(' ', GLUE);
}

const GLUE = '\u00a0';

function unglued(text: string): string {
  return text.replaceAll(GLUE, ' ');
}
