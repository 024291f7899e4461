import type { RelationRow } from '../model/index.js';
import type { ClockView } from './clock-view.js';
import type { SectionColumn } from './correlation-layout.js';
import { label } from './figure.js';
import { element, type SvgNode } from './svg-node.js';
import { textWidth } from './text-width.js';
import { ALARM, PAPER } from './theme.js';

/** Whether a relation is reversed before or after shells were set aside. */
export const everReversed = (row: RelationRow) => row.verdict === 'reversed' || row.verdict_after === 'reversed';

/** Numbers R1, R2 … of the reversed relations of a clock, those still reversed first, the worst of them on top. */
export function relationNumbers(view: ClockView): Map<RelationRow, string> {
  const still = (row: RelationRow) => (row.verdict_after === 'reversed' ? 0 : 1);
  const rows = view.relations.filter(everReversed).sort((a, b) => still(a) - still(b) || (a.z ?? 0) - (b.z ?? 0));
  return new Map(rows.map((row, i) => [row, `R${i + 1}`]));
}

/**
 * Marks of reversed relations in one row of the panel: a bracket beside the column where both beds are in one section,
 * else the relation's number at each of its beds.
 */
export function brackets(
  view: ClockView,
  columns: readonly SectionColumn[],
  numbers: ReadonlyMap<RelationRow, string>,
  right: (column: number) => number,
  offset: (column: SectionColumn) => number,
): SvgNode[] {
  const place = (key: string) => {
    for (const [i, column] of columns.entries()) {
      const slice = column.slices.find((one) => one.bed.key === key);
      if (slice !== undefined) return { i, y: (slice.top + slice.bottom) / 2 + offset(column), id: slice.bed.id };
    }
    return null;
  };
  const used = new Map<number, number>();
  return view.relations.flatMap((row) => {
    const name = numbers.get(row);
    if (name === undefined) return [];
    const ends = [place(row.lower), place(row.upper)];
    const settled = row.verdict_after !== 'reversed';
    const [lower, upper] = ends;
    if (lower !== null && upper !== null && lower.i === upper.i) {
      const nth = used.get(lower.i) ?? 0;
      used.set(lower.i, nth + 1);
      const x = right(lower.i) + 1;
      const out = x + 7 + 5 * nth;
      const middle = (lower.y + upper.y) / 2;
      return [
        element(
          'g',
          { class: 'reversed', 'data-r': name },
          element('path', {
            d: `M${x},${lower.y}H${out}V${upper.y}H${x}`,
            fill: 'none',
            stroke: ALARM,
            'stroke-width': 1.8,
            'stroke-dasharray': settled ? '3 2.2' : undefined,
          }),
          pill(out + 2, middle, name),
        ),
      ];
    }
    return ends.flatMap((end) =>
      end === null ? [] : [element('g', { class: 'reversed', 'data-r': name }, pill(right(end.i) + 2, end.y, name))],
    );
  });
}

function pill(x: number, y: number, text: string): SvgNode {
  const width = textWidth(text, 8) + 5;
  return element(
    'g',
    {},
    element('rect', {
      x: x - width / 2,
      y: y - 5.5,
      width,
      height: 11,
      rx: 2.5,
      fill: PAPER,
      stroke: ALARM,
      'stroke-width': 0.9,
    }),
    label(x, y + 2.9, text, { 'text-anchor': 'middle', 'font-size': 8, 'font-weight': 700, fill: ALARM }),
  );
}
