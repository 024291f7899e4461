import { type ClockView, inkOf, zoneTag } from './clock-view.js';
import type { SectionColumn, Slice } from './correlation-layout.js';
import { label } from './figure.js';
import { mixedSign } from './signs.js';
import { element, type SvgNode } from './svg-node.js';
import { shorten, textWidth } from './text-width.js';
import { INK, PAPER, SOFT, TYPE } from './theme.js';

/** The name of a section, and how far along the coast it stands. */
export function sectionHead(
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
  const under = [
    ...(km === null ? [] : [`${Math.round(km * 10) / 10} km`]),
    ...(site?.place?.kind === 'depth_m' ? ['depths'] : []),
  ].join(', ');
  if (under !== '')
    out.push(
      label(x, y + height - 6, shorten(under, TYPE.tiny, slot - 8), {
        'text-anchor': 'middle',
        'font-size': TYPE.tiny,
        fill: SOFT,
      }),
    );
  return out;
}

/** One bed of a column with its name, its zone, and what is particular to it. */
export function drawSlice(
  view: ClockView,
  slice: Slice,
  x0: number,
  width: number,
  dy: number,
  metric: boolean,
): SvgNode[] {
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
