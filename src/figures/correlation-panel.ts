import { type BedView, type ClockView, inkOf, zoneTag } from './clock-view.js';
import { compactPanel } from './correlation-compact.js';
import { bedHeight, contactOf, layColumns, metreScale, type SectionColumn, type Slice } from './correlation-layout.js';
import { type Gap, openTies, tiesBetween } from './correlation-ties.js';
import { type Figure, finishFigure, label } from './figure.js';
import { type LegendEntry, legend } from './legend.js';
import { hatchPattern } from './palette.js';
import { brackets, relationNumbers } from './reversed-marks.js';
import { mixedSign } from './signs.js';
import { element, type SvgNode } from './svg-node.js';
import { shorten, textWidth, wrapText } from './text-width.js';
import { ALARM, FAINT, INK, MOST_BEDS, PAPER, SOFT, TYPE, WIDE } from './theme.js';

const GUTTER = 27;
const STUB = 16;

/**
 * The correlation panel: sections side by side in coast order, beds in superposition, zones tied across. Long coasts
 * go on in further rows; above {@link MOST_BEDS} beds the panel is drawn without names.
 */
export function correlationPanel(view: ClockView): Figure | null {
  if (view.beds.length === 0) return null;
  if (view.beds.length > MOST_BEDS) return compactPanel(view);
  const columns = layColumns(view);
  const scale = columns.some((column) => column.metric) ? metreScale(view) : null;
  const metric = view.beds.some((bed) => bedHeight(bed) !== null);
  const name = `correlation${view.suffix}`;
  const hatch = (zone: number) => `${name}-h${zone}`;
  const widest = Math.max(...view.beds.map((bed) => textWidth(bed.row.bed, TYPE.small)));
  const straddling = view.beds.some((bed) => bed.row.straddles) ? 10 : 0;
  const column = Math.min(Math.max(widest + 29, 36) + straddling, 96);
  const gutter = metric ? GUTTER : 4;
  const perRow = Math.max(2, Math.floor((WIDE - 2 * STUB + 26) / (column + gutter + 26)));
  const rows = Math.ceil(columns.length / perRow);
  const each = Math.ceil(columns.length / rows);
  const slot = Math.min((WIDE - 2 * STUB + 26) / each, 190);
  const numbers = relationNumbers(view);
  const body: SvgNode[] = [];
  const ruler = scale === null ? 0 : 14;
  let y = 4;
  for (let row = 0; row < rows; row++) {
    const members = columns.slice(row * each, (row + 1) * each);
    const heads = members.map((member) => wrapText(member.section, TYPE.label, slot - 8, 3));
    const head = 12 * Math.max(...heads.map((lines) => lines.length)) + 16;
    const top = Math.min(...members.map((member) => member.top + member.shift));
    const bottom = Math.max(...members.map((member) => member.bottom + member.shift));
    const offset = y + head - top;
    const left = (i: number) => STUB + i * slot + gutter;
    const gapAfter = (i: number): Gap => ({ left: left(i) + column, right: left(i + 1) });
    const ties: SvgNode[] = [];
    const beds: SvgNode[] = [];
    members.forEach((member, i) => {
      const before = columns[row * each + i - 1];
      const after = columns[row * each + i + 1];
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
        ...member.slices.flatMap((slice) => drawSlice(view, slice, left(i), column, offset + member.shift, metric)),
        ...missingZones(view, member, columns, left(i), column, offset),
        presence(view, member, left(i), column, offset + bottom + 9),
      );
    });
    const reversed = brackets(
      view,
      members,
      numbers,
      (i) => left(i) + column,
      (member) => offset + member.shift,
    );
    body.push(element('g', {}, ...ties), element('g', {}, ...beds), element('g', {}, ...reversed));
    y = offset + bottom + 9 + 11 * Math.ceil(view.zones.length / presenceAcross(column)) + (row === rows - 1 ? 10 : 24);
  }
  if (scale !== null) {
    body.push(scaleBar(scale, STUB, y + 4));
    y += ruler + 4;
  }
  const key = legend(entries(view, hatch, numbers.size > 0), STUB, y + 10, WIDE - 2 * STUB);
  body.push(key.node);
  return finishFigure({
    name,
    title: `Correlation panel${view.heading}`,
    caption: caption(view, rows, scale !== null, metric),
    alt: alt(view),
    width: WIDE,
    height: y + 6 + key.height,
    body,
    defs: view.zones.map((_, zone) => hatchPattern(hatch(zone), inkOf(view, zone).hatch, inkOf(view, zone))),
  });
}

function sectionHead(
  view: ClockView,
  column: SectionColumn,
  lines: readonly string[],
  x: number,
  y: number,
  height: number,
  slot: number,
): SvgNode[] {
  const site = view.beds.find((bed) => bed.row.section === column.section)?.site;
  const km = site?.coast_km ?? null;
  const out = lines.map((line, k) =>
    label(x, y + height - 17 - 12 * (lines.length - 1 - k), line, { 'text-anchor': 'middle', 'font-weight': 700 }),
  );
  if (km !== null) {
    const text = shorten(`${Math.round(km * 10) / 10} km`, TYPE.tiny, slot - 8);
    out.push(label(x, y + height - 6, text, { 'text-anchor': 'middle', 'font-size': TYPE.tiny, fill: SOFT }));
  }
  return out;
}

function drawSlice(view: ClockView, slice: Slice, x0: number, width: number, dy: number, metric: boolean): SvgNode[] {
  const { bed } = slice;
  const ink = inkOf(view, bed.zone);
  const x = x0 + slice.left * width;
  const w = (slice.right - slice.left) * width;
  const y = slice.top + dy;
  const h = slice.bottom - slice.top;
  const group = element('g', { class: 'bed', 'data-b': bed.id, 'data-z': zoneTag(view, bed.zone) });
  group.append(element('rect', { x, y, width: w, height: h, fill: ink.fill }));
  let strip = 0;
  if (bed.row.straddles && bed.row.second_zone !== null) {
    const second = view.zones.findIndex((zone) => zone.zone === bed.row.second_zone);
    strip = Math.max(4, Math.min(0.3, (bed.row.second_probability ?? 0) * 0.6) * w);
    group.append(
      element('rect', { x: x + w - strip, y, width: strip, height: h, fill: inkOf(view, second).fill }),
      element('path', {
        d: `M${x + w - strip},${y}V${y + h}`,
        stroke: ink.type,
        'stroke-width': 0.8,
        'stroke-dasharray': '2 1.5',
      }),
    );
  }
  group.append(
    element('rect', {
      class: 'edge',
      x,
      y,
      width: w,
      height: h,
      fill: 'none',
      stroke: INK,
      'stroke-width': 0.9,
      'stroke-dasharray': slice.placed ? undefined : '3 2',
    }),
  );
  const middle = y + h / 2 + 3.2;
  const zone = bed.zone < 0 ? '?' : view.zoned ? view.zones[bed.zone].zone : '';
  const mixed = bed.row.marks.includes('mixed age') ? 9 : 0;
  const room = w - strip - 8 - mixed;
  const zoneWide = textWidth(zone, TYPE.small) + 3;
  if (zone !== '' && room > zoneWide + 6)
    group.append(
      label(x + w - strip - mixed * 0.7 - 4, middle, zone, {
        'text-anchor': 'end',
        'font-size': TYPE.small,
        'font-weight': 700,
        fill: ink.type,
      }),
    );
  if (room - zoneWide > 5)
    group.append(
      label(x + 4, middle, shorten(bed.row.bed, TYPE.small, room - zoneWide - 2), {
        'font-size': TYPE.small,
        fill: ink.type,
      }),
    );
  if (bed.row.marks.includes('mixed age'))
    group.append(
      element('g', { transform: `translate(${Math.round(x + w - 1)},${Math.round(y + h / 2)})` }, mixedSign()),
    );
  const out = [group];
  const place = bed.site?.place ?? null;
  if (metric && place !== null && place.kind !== 'level' && slice.left === 0) {
    const at = y + h;
    const text = String(Math.round(place.value * 10) / 10);
    const wide = textWidth(text, TYPE.tiny);
    out.push(
      element('rect', {
        x: x0 - 6 - wide,
        y: at - 4.5,
        width: wide + 3,
        height: 9,
        rx: 2,
        fill: PAPER,
        'fill-opacity': 0.85,
      }),
      element('path', { d: `M${x0 - 3},${at}H${x0}`, stroke: SOFT, 'stroke-width': 0.7 }),
      label(x0 - 4.5, at + 2.8, text, {
        'text-anchor': 'end',
        'font-size': TYPE.tiny,
        fill: SOFT,
      }),
    );
  }
  return out;
}

/** A wavy line across the column where a zone is missing between an older and a younger one. */
function missingZones(
  view: ClockView,
  column: SectionColumn,
  all: readonly SectionColumn[],
  x: number,
  width: number,
  dy: number,
): SvgNode[] {
  if (!view.zoned) return [];
  const has = new Set(column.slices.map((slice) => slice.bed.zone));
  const lines = new Map<number, number[]>();
  view.zones.forEach((_, zone) => {
    if (has.has(zone) || !all.some((other) => other.slices.some((slice) => slice.bed.zone === zone))) return;
    const contact = contactOf(column, zone);
    if (contact?.where === 'between') lines.set(contact.y, [...(lines.get(contact.y) ?? []), zone]);
  });
  return [...lines].map(([y]) => {
    const steps = Math.max(2, Math.round((width + 8) / 9));
    const step = (width + 8) / steps;
    let d = `M${x - 4},${y + dy}`;
    for (let k = 0; k < steps; k++) d += `q${step / 4},-3 ${step / 2},0t${step / 2},0`;
    return element(
      'g',
      {},
      element('path', { d, stroke: PAPER, 'stroke-width': 3.4, fill: 'none' }),
      element('path', { d, stroke: INK, 'stroke-width': 1.2, fill: 'none' }),
    );
  });
}

const CELL = 11;
const presenceAcross = (width: number) => Math.max(3, Math.floor((width + 10) / CELL));

/** Which zones a section has: a filled cell a zone, an empty struck one where it is missing. */
function presence(view: ClockView, column: SectionColumn, x: number, width: number, y: number): SvgNode {
  const group = element('g', { 'font-size': 7.4, 'text-anchor': 'middle' });
  if (!view.zoned) return group;
  const has = new Set(column.slices.map((slice) => slice.bed.zone));
  const across = Math.min(view.zones.length, presenceAcross(width));
  const start = x + width / 2 - (across * CELL) / 2;
  view.zones.forEach((zone, i) => {
    const cx = start + (i % across) * CELL;
    const cy = y + Math.floor(i / across) * CELL;
    const ink = inkOf(view, i);
    const number = zone.zone.replace(/^Z/, '');
    group.append(
      element(
        'g',
        { 'data-z': zoneTag(view, i) },
        element('rect', {
          x: cx,
          y: cy,
          width: CELL - 1.5,
          height: CELL - 1.5,
          fill: has.has(i) ? ink.fill : PAPER,
          stroke: has.has(i) ? INK : FAINT,
          'stroke-width': 0.7,
          'stroke-dasharray': has.has(i) ? undefined : '1.5 1.5',
        }),
        has.has(i)
          ? label(cx + (CELL - 1.5) / 2, cy + 7.4, number, { fill: ink.type })
          : element('path', {
              d: `M${cx + 1},${cy + CELL - 2.5}L${cx + CELL - 2.5},${cy + 1}`,
              stroke: FAINT,
              'stroke-width': 0.8,
            }),
      ),
    );
  });
  return group;
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

function entries(view: ClockView, hatch: (zone: number) => string, reversed: boolean): LegendEntry[] {
  const box = (fill: string) =>
    element('rect', { x: -9, y: -5, width: 18, height: 10, fill, stroke: INK, 'stroke-width': 0.7 });
  const out: LegendEntry[] = view.zoned
    ? view.zones.map((zone, i) => ({
        sign: [
          element('rect', {
            x: -14,
            y: -5,
            width: 12,
            height: 10,
            fill: inkOf(view, i).fill,
            stroke: INK,
            'stroke-width': 0.7,
          }),
          element('rect', {
            x: -2,
            y: -5,
            width: 16,
            height: 10,
            fill: `url(#${hatch(i)})`,
            stroke: INK,
            'stroke-width': 0.4,
          }),
        ],
        half: 14,
        text: `${zone.zone}${i === 0 ? ', youngest' : i === view.zones.length - 1 ? ', oldest' : ''}`,
      }))
    : [];
  const { beds } = view;
  if (beds.some((bed) => bed.row.straddles && bed.row.second_zone !== null)) {
    const [first, second] = [inkOf(view, view.zones.length - 1), inkOf(view, 0)];
    out.push({
      sign: [
        box(first.fill),
        element('rect', { x: 3, y: -5, width: 6, height: 10, fill: second.fill, stroke: INK, 'stroke-width': 0.7 }),
      ],
      half: 9,
      text: 'straddles two zones: the strip is the second one',
    });
  }
  if (view.zoned && view.sections.length > 1)
    out.push({
      sign: [
        element('path', { d: 'M-9,0q2.2,-3 4.5,0t4.5,0t4.5,0t4.5,0', stroke: INK, 'stroke-width': 1.2, fill: 'none' }),
      ],
      half: 9,
      text: 'a zone is missing here',
    });
  if (beds.some((bed) => bed.row.marks.includes('mixed age')))
    out.push({ sign: [mixedSign()], half: 5, text: 'bed of mixed age' });
  if (beds.some((bed) => bed.site?.place == null))
    out.push({
      sign: [
        element('rect', {
          x: -9,
          y: -5,
          width: 18,
          height: 10,
          fill: 'none',
          stroke: INK,
          'stroke-width': 0.9,
          'stroke-dasharray': '3 2',
        }),
      ],
      half: 9,
      text: 'no place in its section',
    });
  if (reversed)
    out.push({
      sign: [element('path', { d: 'M-3,-5H4V5H-3', stroke: ALARM, 'stroke-width': 1.8, fill: 'none' })],
      half: 5,
      text: 'R1 … reversed relation; broken line: settled by shells set aside',
    });
  return out;
}

function caption(view: ClockView, rows: number, scaled: boolean, metric: boolean): string {
  const parts = [
    `Sections stand side by side along the coast${rows > 1 ? `, in ${rows} rows: torn ties go on in the next one` : ''}; within each the lowest bed is at the bottom.`,
  ];
  if (view.zoned)
    parts.push(
      'Bands tie beds of one zone across. A band that runs out to a point ends at the contact where its zone is missing, or halfway where the zone would lie above or below what is exposed. The cells under a section say which zones it has. Hatches name zones, not rock.',
    );
  if (scaled)
    parts.push('Thickness follows the heights; each section is moved up or down as a whole so that zones run level.');
  else parts.push('Thickness is not to scale.');
  if (metric) parts.push('Numbers beside a column are metres at the base of each bed.');
  return parts.join(' ');
}

function alt(view: ClockView): string {
  const one = (section: string) => {
    const beds = view.beds.filter((bed) => bed.row.section === section);
    return `${section}, from the lowest bed: ${beds.map((bed: BedView) => `${bed.row.bed}${bed.row.zone === null ? '' : ` ${bed.row.zone}`}`).join(', ')}`;
  };
  return `${view.sections.length} sections in coast order. ${view.sections.map(one).join('. ')}.`;
}
