import type { ClockView } from './clock-view.js';
import { inkOf } from './clock-view.js';
import { drawSlice, sectionHead } from './correlation-column.js';
import { compactPanel } from './correlation-compact.js';
import { bedHeight, layColumns, metreScale, type SectionColumn } from './correlation-layout.js';
import { CELL, missingZones, presence, presenceAcross } from './correlation-presence.js';
import { type Gap, openTies, tiesBetween } from './correlation-ties.js';
import { panelAlt, panelCaption, panelEntries } from './correlation-words.js';
import { type Figure, finishFigure, label } from './figure.js';
import { legend } from './legend.js';
import { hatchPattern } from './palette.js';
import { brackets, relationNumbers } from './reversed-marks.js';
import { element, type SvgNode } from './svg-node.js';
import { textWidth, wrapText } from './text-width.js';
import { INK, MOST_BEDS, NARROW, SOFT, TYPE, WIDE } from './theme.js';

const GUTTER = 23;
const STUB = 16;
/** Least room for the ties between two columns and the next one's gutter. */
const TIES = 17;
/** Tallest sheet: what prints on A4 at full size. */
const TALLEST_SHEET = 890;

/**
 * The correlation panel: sections side by side in coast order, beds in superposition, zones tied across. Long coasts
 * go on in further rows, and in further sheets that each fit a page; above {@link MOST_BEDS} beds the panel is drawn
 * without names.
 */
export function correlationPanel(view: ClockView): Figure[] {
  if (view.beds.length === 0) return [];
  if (view.beds.length > MOST_BEDS) return [compactPanel(view)];
  const columns = layColumns(view);
  const shape = panelShape(view, columns);
  const sheets: { row: number; y: number; height: number }[][] = [[]];
  let y = 4;
  for (let row = 0; row < shape.rows; row++) {
    const { height } = measureRow(view, columns, shape, row);
    if (y > 4 && y + height > TALLEST_SHEET) {
      sheets.push([]);
      y = 4;
    }
    sheets[sheets.length - 1].push({ row, y, height });
    y += height;
  }
  const across = Math.min(columns.length, shape.each) * shape.slot + shape.gutter + STUB;
  const width = Math.min(WIDE, Math.max(NARROW, across));
  return sheets.map((rows, sheet) => {
    const name = `correlation${view.suffix}${sheet === 0 ? '' : `-part-${sheet + 1}`}`;
    const hatch = (zone: number) => `${name}-h${zone}`;
    const body = rows.flatMap((one) => drawRow(view, columns, shape, one.row, one.y, hatch));
    const last = rows[rows.length - 1];
    let bottom = last.y + last.height - 6;
    const scale = columns.some((column) => column.metric) ? metreScale(view) : null;
    if (scale !== null) {
      body.push(scaleBar(scale, STUB, bottom));
      bottom += 17;
    }
    const key = legend(panelEntries(view, hatch, shape.numbers.size > 0), STUB, bottom + 6, width - 2 * STUB);
    const part = sheets.length > 1 ? `, part ${sheet + 1} of ${sheets.length}` : '';
    return finishFigure({
      name,
      title: `Correlation panel${view.heading}${part}`,
      caption:
        sheet === 0
          ? panelCaption(view, shape.rows, scale !== null, shape.metric)
          : 'The panel goes on, with the signs of its first part.',
      alt: panelAlt(
        view,
        rows.flatMap((one) => view.sections.slice(one.row * shape.each, (one.row + 1) * shape.each)),
      ),
      width,
      height: bottom + key.height + 2,
      body: [...body, key.node],
      defs: view.zones.map((_, zone) => hatchPattern(hatch(zone), inkOf(view, zone).hatch, inkOf(view, zone))),
    });
  });
}

interface Shape {
  readonly column: number;
  readonly gutter: number;
  readonly slot: number;
  /** Sections a row. */
  readonly each: number;
  readonly rows: number;
  readonly metric: boolean;
  readonly numbers: ReturnType<typeof relationNumbers>;
}

function panelShape(view: ClockView, columns: readonly SectionColumn[]): Shape {
  const metric = view.beds.some((bed) => bedHeight(bed) !== null);
  const widest = Math.max(...view.beds.map((bed) => textWidth(bed.row.bed, TYPE.small)));
  const straddling = view.beds.some((bed) => bed.row.straddles) ? 10 : 0;
  const column = Math.min(Math.max(widest + 29, 36) + straddling, 96);
  const gutter = metric ? GUTTER : 4;
  const perRow = Math.max(2, Math.floor((WIDE - 2 * STUB + TIES) / (column + gutter + TIES)));
  const rows = Math.ceil(columns.length / perRow);
  const each = Math.ceil(columns.length / rows);
  const slot = Math.min((WIDE - 2 * STUB + TIES) / each, 190);
  return { column, gutter, slot, each, rows, metric, numbers: relationNumbers(view) };
}

function measureRow(view: ClockView, columns: readonly SectionColumn[], shape: Shape, row: number) {
  const members = columns.slice(row * shape.each, (row + 1) * shape.each);
  const heads = members.map((member) => wrapText(member.section, TYPE.label, shape.slot - 8, 3));
  const head = 12 * Math.max(...heads.map((lines) => lines.length)) + 16;
  const top = Math.min(...members.map((member) => member.top + member.shift));
  const bottom = Math.max(...members.map((member) => member.bottom + member.shift));
  const cells = view.zoned ? CELL * Math.ceil(view.zones.length / presenceAcross(shape.column)) + 9 : 0;
  return { members, heads, head, top, bottom, height: head + bottom - top + cells + 18 };
}

function drawRow(
  view: ClockView,
  columns: readonly SectionColumn[],
  shape: Shape,
  row: number,
  y: number,
  hatch: (zone: number) => string,
): SvgNode[] {
  const { members, heads, head, top, bottom } = measureRow(view, columns, shape, row);
  const { column, gutter, slot } = shape;
  const offset = y + head - top;
  const left = (i: number) => STUB + i * slot + gutter;
  const gapAfter = (i: number): Gap => ({ left: left(i) + column, right: left(i + 1) });
  const ties: SvgNode[] = [];
  const beds: SvgNode[] = [];
  members.forEach((member, i) => {
    const at = row * shape.each + i;
    const [before, after] = [columns[at - 1], columns[at + 1]];
    if (i > 0) ties.push(...tiesBetween(view, members[i - 1], member, gapAfter(i - 1), offset, hatch));
    if (i === 0 && before !== undefined)
      ties.push(
        ...openTies(view, member, before, { left: left(0) - gutter - 14, right: left(0) }, 'left', offset, hatch),
      );
    if (i === members.length - 1 && after !== undefined)
      ties.push(
        ...openTies(
          view,
          member,
          after,
          { left: left(i) + column, right: Math.min(left(i) + column + 18, WIDE) },
          'right',
          offset,
          hatch,
        ),
      );
    beds.push(
      ...sectionHead(view, member, heads[i], left(i) + column / 2, y, head, slot),
      ...member.slices.flatMap((slice) => drawSlice(view, slice, left(i), column, offset + member.shift, shape.metric)),
      ...missingZones(view, member, columns, left(i), column, offset),
      presence(view, member, left(i), column, offset + bottom + 9),
    );
  });
  const reversed = brackets(
    view,
    members,
    shape.numbers,
    (i) => left(i) + column,
    (member) => offset + member.shift,
  );
  return [element('g', {}, ...ties), element('g', {}, ...beds), element('g', {}, ...reversed)];
}

function scaleBar(scale: number, x: number, y: number): SvgNode {
  const metres = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100].filter((m) => m * scale <= 90).pop() ?? 0.1;
  const width = metres * scale;
  return element(
    'g',
    { stroke: INK, 'stroke-width': 1, fill: 'none' },
    element('path', { d: `M${x},${y - 3}V${y + 3}M${x},${y}H${x + width}M${x + width},${y - 3}V${y + 3}` }),
    label(x + width + 5, y + 3, `${metres} m of height`, { stroke: 'none', fill: SOFT, 'font-size': TYPE.small }),
  );
}
