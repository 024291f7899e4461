import { type ClockView, inkOf, zoneTag } from './clock-view.js';
import { type Figure, finishFigure, label } from './figure.js';
import { legend } from './legend.js';
import { element, type SvgNode } from './svg-node.js';
import { shorten } from './text-width.js';
import { INK, PAPER, SOFT, TYPE, WIDE } from './theme.js';

const MOST = 4500;

/** The correlation panel of a survey too large for names: every bed a slice of its zone's colour, sections in rows. */
export function compactPanel(view: ClockView): Figure {
  const every = Math.ceil(view.beds.length / MOST);
  const sections = view.sections.filter((_, i) => i % every === 0);
  const beds = new Map<string, (typeof view.beds)[number][]>();
  for (const bed of view.beds) {
    const list = beds.get(bed.row.section);
    if (list === undefined) beds.set(bed.row.section, [bed]);
    else list.push(bed);
  }
  const across = Math.min(sections.length, 60);
  const rows = Math.ceil(sections.length / across);
  const slot = WIDE / Math.ceil(sections.length / rows);
  const each = Math.ceil(sections.length / rows);
  const body: SvgNode[] = [];
  let y = 14;
  for (let row = 0; row < rows; row++) {
    const members = sections.slice(row * each, (row + 1) * each);
    const most = Math.max(...members.map((section) => beds.get(section)!.length));
    const thick = Math.max(2.5, Math.min(9, 240 / most));
    const bottom = y + most * thick + 6;
    body.push(
      label(0, y, shorten(members[0], TYPE.small, WIDE * 0.45), { 'font-size': TYPE.small, fill: SOFT }),
      label(WIDE, y, shorten(members[members.length - 1], TYPE.small, WIDE * 0.45), {
        'font-size': TYPE.small,
        fill: SOFT,
        'text-anchor': 'end',
      }),
    );
    members.forEach((section, i) => {
      beds.get(section)!.forEach((bed, k) => {
        body.push(
          element('rect', {
            x: i * slot + 0.5,
            y: bottom - (k + 1) * thick,
            width: Math.max(1, slot - 1.5),
            height: thick,
            fill: inkOf(view, bed.zone).fill,
            stroke: PAPER,
            'stroke-width': 0.25,
            'data-b': bed.id,
          }),
        );
      });
    });
    body.push(element('path', { d: `M0,${bottom}H${WIDE}`, stroke: INK, 'stroke-width': 0.6 }));
    y = bottom + 22;
  }
  const key = legend(
    view.zones.map((zone, i) => ({
      sign: [
        element('rect', {
          x: -7,
          y: -5,
          width: 14,
          height: 10,
          fill: inkOf(view, i).fill,
          stroke: INK,
          'stroke-width': 0.7,
          'data-z': zoneTag(view, i),
        }),
      ],
      half: 7,
      text: zone.zone,
    })),
    4,
    y,
    WIDE - 8,
  );
  return finishFigure({
    name: `correlation${view.suffix}`,
    title: `Correlation panel${view.heading}`,
    caption: `${sections.length} sections in coast order, left to right and row by row; the first and the last section of each row are named. Each slice is a bed in its zone's colour, the lowest bed at the bottom; thickness is not to scale.${every > 1 ? ` One section in ${every} is drawn.` : ''} correlation.csv lists every bed.`,
    alt: `${view.beds.length} beds of ${view.sections.length} sections as stacks of zone colours, in coast order. correlation.csv holds the same as a table.`,
    width: WIDE,
    height: y + key.height - 4,
    body: [...body, key.node],
  });
}
