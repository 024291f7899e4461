import type { Plan, PlanKind, PlanRow } from '../model/index.js';
import { counted, probability, type Style, safe, textTable, wrap } from './terminal.js';

const HEADINGS: Readonly<Record<PlanKind, string>> = {
  'check bed': 'Reversed or mixed beds that deserve new shells first',
  'separate zones': 'Neighbouring zones not shown to be distinct',
  'strengthen bed': 'Beds that gain the order most: pairs expected to be newly resolved',
  'separate beds': 'Neighbours in the order, and the shells that would resolve them',
  'date beds': 'Beds to date so that the most others are bracketed',
};

/** Lines of one kind that the terminal shows; the table holds them all. */
const SHOWN = 8;

/**
 * The plan for a terminal of 80 columns.
 *
 * @param path The file that holds the whole of it.
 */
export function planText(plan: Plan, path: string, style: Style): string {
  if (plan.rows.length === 0) return 'Nothing to plan: no bed has a mean on a main clock.';
  const clocks = new Set(plan.rows.flatMap(({ clock }) => clock ?? []));
  const parts: string[] = [];
  for (const kind of Object.keys(HEADINGS) as PlanKind[]) {
    const rows = plan.rows.filter((row) => row.kind === kind);
    for (const clock of kind === 'date beds' ? [null] : clocks) {
      const own = rows.filter((row) => row.clock === clock);
      if (own.length === 0) continue;
      const of = clocks.size > 1 && clock !== null ? `, ${safe(clock)}` : '';
      parts.push([style.bold(wrap(`${HEADINGS[kind]}${of}`)), ...linesOf(kind, own)].join('\n'));
    }
  }
  const notes = [plan.criterion, ...plan.notes].map((note) => wrap(note));
  return [...parts, notes.join('\n'), wrap(`Every line in full: ${safe(path)}`)].join('\n\n');
}

function linesOf(kind: PlanKind, rows: readonly PlanRow[]): string[] {
  if (kind === 'strengthen bed') return strengthenTable(rows);
  if (kind === 'separate beds') return pairTable(rows);
  return shortened(rows).concat(more(rows.length, 'line'));
}

/** Sentences, numbered. */
function shortened(rows: readonly PlanRow[]): string[] {
  return rows.slice(0, SHOWN).map((row) => wrap(`${String(row.rank).padStart(3)}  ${safe(row.settles)}`, 80, 5));
}

function strengthenTable(rows: readonly PlanRow[]): string[] {
  const beds = [...new Set(rows.map((row) => row.beds[0]))];
  const sizes = [...new Set(rows.map((row) => row.total ?? 0))];
  const gain = (bed: string, size: number) =>
    rows.find((row) => row.beds[0] === bed && row.total === size)?.pairs_gained?.toFixed(1) ?? '';
  const table = [
    ['', 'bed', ...sizes.map((size) => `+${size} shells`)],
    ...beds.slice(0, SHOWN).map((bed, at) => [String(at + 1), short(bed, 34), ...sizes.map((size) => gain(bed, size))]),
  ];
  return textTable(table, [true, false, ...sizes.map(() => true)]).concat(more(beds.length, 'bed'));
}

function pairTable(rows: readonly PlanRow[]): string[] {
  const promised = rows.filter((row) => row.total !== null);
  const rest = rows.length - promised.length;
  const lines: string[] = [];
  if (promised.length > 0) {
    const table = [
      ['', 'older?', 'younger?', 'more shells', 'power', 'chance', 'pairs'],
      ...promised
        .slice(0, SHOWN)
        .map((row) => [
          String(row.rank),
          short(row.beds[0], 18),
          short(row.beds[1], 18),
          row.shells.join(' + '),
          probability(row.power ?? 0),
          probability(row.chance ?? 0),
          (row.pairs_gained ?? 0).toFixed(1),
        ]),
    ];
    lines.push(...textTable(table, [true, false, false, true, true, true, true]), ...more(promised.length, 'pair'));
    lines.push(
      wrap(
        '  Power: if the gap is as measured. Chance: with its error counted. Pairs: expected to be newly resolved in the whole order.',
        80,
        2,
      ),
    );
  }
  if (rest > 0) {
    lines.push(
      wrap(
        `  No number of shells is promised to split ${counted(rest, 'neighbouring pair')}: within their errors, or within what beds of one age differ, they may truly be as old.`,
        80,
        2,
      ),
    );
  }
  return lines;
}

function more(count: number, noun: string): string[] {
  return count > SHOWN ? [`  … and ${counted(count - SHOWN, `more ${noun}`)}`] : [];
}

/** A name cut to a width. */
function short(name: string, width: number): string {
  const shown = safe(name);
  return shown.length > width ? `${shown.slice(0, width - 1)}…` : shown;
}
