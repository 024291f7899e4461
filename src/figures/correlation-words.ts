import { type BedView, type ClockView, inkOf } from './clock-view.js';
import type { LegendEntry } from './legend.js';
import { mixedSign } from './signs.js';
import { element } from './svg-node.js';
import { ALARM, INK } from './theme.js';

/** What the signs of the panel mean; only those that occur. */
export function panelEntries(view: ClockView, hatch: (zone: number) => string, reversed: boolean): LegendEntry[] {
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
      text: 'no place in its section: stands by its rank',
    });
  if (reversed)
    out.push({
      sign: [element('path', { d: 'M-3,-5H4V5H-3', stroke: ALARM, 'stroke-width': 1.8, fill: 'none' })],
      half: 5,
      text: 'R1 … reversed relation; broken line: settled by shells set aside',
    });
  return out;
}

/** What to see in the panel. */
export function panelCaption(view: ClockView, rows: number, scaled: boolean, metric: boolean): string {
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
  if (metric) parts.push('Numbers beside a column are metres at the base of each bed, as logged.');
  return parts.join(' ');
}

/** The panel in words. */
export function panelAlt(view: ClockView, sections: readonly string[]): string {
  const one = (section: string) => {
    const beds = view.beds.filter((bed) => bed.row.section === section);
    return `${section}, from the lowest bed: ${beds.map((bed: BedView) => `${bed.row.bed}${bed.row.zone === null ? '' : ` ${bed.row.zone}`}`).join(', ')}`;
  };
  return `${sections.length} sections in coast order. ${sections.map(one).join('. ')}.`;
}
