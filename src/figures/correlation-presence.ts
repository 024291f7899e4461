import { type ClockView, inkOf, zoneTag } from './clock-view.js';
import type { SectionColumn } from './correlation-layout.js';
import { contactOf } from './correlation-runs.js';
import { label } from './figure.js';
import { element, type SvgNode } from './svg-node.js';
import { FAINT, INK, PAPER } from './theme.js';

/** A wavy line across the column where a zone is missing between an older and a younger one. */
export function missingZones(
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

/** Size of a cell that says whether a zone is there. */
export const CELL = 11;
/** How many cells of zones stand beside each other under a column. */
export const presenceAcross = (width: number) => Math.max(3, Math.floor((width + 10) / CELL));

/** Which zones a section has: a filled cell a zone, an empty struck one where it is missing. */
export function presence(view: ClockView, column: SectionColumn, x: number, width: number, y: number): SvgNode {
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
