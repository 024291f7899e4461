import { type ClockView, inkOf, zoneTag } from './clock-view.js';
import { type LegendEntry, legend } from './legend.js';
import { element } from './svg-node.js';
import { INK } from './theme.js';

/** The zones of a clock as discs with their names, and what else a figure has to explain. */
export function zoneLegend(
  view: ClockView,
  x: number,
  y: number,
  width: number,
  more: readonly LegendEntry[] = [],
): ReturnType<typeof legend> {
  const zones = view.zoned
    ? view.zones.map((zone, i) => ({
        sign: [
          element('circle', {
            r: 4,
            fill: inkOf(view, i).fill,
            stroke: INK,
            'stroke-width': 0.8,
            'data-z': zoneTag(view, i),
          }),
        ],
        half: 5,
        text: `${zone.zone}${i === 0 ? ', youngest' : i === view.zones.length - 1 ? ', oldest' : ''}`,
      }))
    : [];
  return legend([...zones, ...more], x, y, width);
}
