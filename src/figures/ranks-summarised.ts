import * as Plot from '@observablehq/plot';
import { type BedView, type ClockView, inkOf } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot } from './house-plot.js';
import { INK, WIDE } from './theme.js';

/** Ranks of a survey too large to name its beds: the envelope of the 95 % intervals along the order. */
export function ranksSummarised(view: ClockView, beds: readonly BedView[]): Figure {
  const bins = 120;
  const sorted = [...beds].reverse();
  const groups = Array.from({ length: bins }, (_, i) =>
    sorted.slice(Math.floor((i * sorted.length) / bins), Math.floor(((i + 1) * sorted.length) / bins)),
  ).filter((group) => group.length > 0);
  const rows = groups.map((group) => ({
    from: group[0].order!.rank,
    to: group[group.length - 1].order!.rank + 1,
    low: group.reduce((sum, bed) => sum + bed.order!.rank_low, 0) / group.length,
    high: group.reduce((sum, bed) => sum + bed.order!.rank_high, 0) / group.length,
    zone: group[Math.floor(group.length / 2)].zone,
  }));
  const body = housePlot({
    width: WIDE,
    height: 320,
    marginLeft: 56,
    marginRight: 12,
    marginTop: 10,
    marginBottom: 40,
    x: { domain: [beds.length + 1, 1] },
    y: { domain: [1, beds.length] },
    marks: [
      Plot.gridY({ stroke: INK, strokeOpacity: 0.1 }),
      Plot.rect(rows, {
        x1: 'from',
        x2: 'to',
        y1: 'low',
        y2: 'high',
        fill: (row) => inkOf(view, row.zone).fill,
        stroke: INK,
        strokeWidth: 0.4,
      }),
      Plot.line(rows, {
        x: (row) => (row.from + row.to) / 2,
        y: (row) => (row.from + row.to) / 2,
        stroke: INK,
        strokeWidth: 1.2,
      }),
      Plot.axisX({ ...AXIS, label: 'rank (1 is the oldest bed)', labelOffset: 34 }),
      Plot.axisY({ ...AXIS, label: '95 % interval of the rank', labelOffset: 50 }),
    ],
  });
  return finishFigure({
    name: `ranks${view.suffix}`,
    title: `Ranks of the beds, summarised${view.heading}`,
    caption: `${beds.length} beds in ${rows.length} groups along the order; each bar is the mean 95 % interval of the ranks of its group, coloured by zone. Tall bars are stretches of the order where beds can't be told apart. order.csv holds every bed.`,
    alt: `Mean rank intervals of ${beds.length} beds in ${rows.length} groups along the order; order.csv holds the same as a table.`,
    width: WIDE,
    height: 322,
    body: [body],
  });
}
