import * as Plot from '@observablehq/plot';
import { listShape } from './bed-rows.js';
import { type BedView, type ClockView, inkOf, zoneTag } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot, tagged } from './house-plot.js';
import { ranksSummarised } from './ranks-summarised.js';
import type { SvgNode } from './svg-node.js';
import { shorten } from './text-width.js';
import { INK, MOST_BEDS, SOFT, TYPE, WIDE } from './theme.js';

/** The order of the beds: each bed's rank with its 95 % interval, youngest on top; null without an order. */
export function ranksWithIntervals(view: ClockView): Figure | null {
  const beds = view.beds.filter((bed) => bed.order !== null).sort((a, b) => b.order!.rank - a.order!.rank);
  if (beds.length === 0) return null;
  if (beds.length > MOST_BEDS) return ranksSummarised(view, beds);
  const { columns, line: lineHeight } = listShape(beds.length);
  const each = Math.ceil(beds.length / columns);
  const gap = 10;
  const width = (WIDE - gap * (columns - 1)) / columns;
  const labels = columns === 1 ? 132 : columns === 2 ? 96 : 72;
  const top = 8;
  const bottom = top + each * lineHeight;
  const body: SvgNode[] = [];
  for (let c = 0; c < columns; c++) {
    const own = beds.slice(c * each, (c + 1) * each).map((bed, i) => ({ bed, y: top + (i + 0.5) * lineHeight }));
    const steps = own.filter((line, i) => i > 0 && line.bed.order!.resolved === true);
    const byBed = tagged((i) => ({ 'data-b': own[i].bed.id, 'data-z': zoneTag(view, own[i].bed.zone) }));
    body.push(
      housePlot(
        {
          width,
          height: bottom + 34,
          marginLeft: labels,
          marginRight: 30,
          marginTop: top,
          marginBottom: 34,
          x: { domain: [beds.length + 0.5, 0.5] },
          y: { type: 'identity', axis: null },
          marks: [
            Plot.gridX({ ticks: rankTicks(beds.length, columns), stroke: INK, strokeOpacity: 0.1, strokeWidth: 0.75 }),
            Plot.ruleY(steps, {
              y: (line) => line.y - lineHeight / 2,
              x1: beds.length + 0.5,
              x2: 0.5,
              stroke: SOFT,
              strokeWidth: 0.6,
              strokeDasharray: '4 3',
              insetLeft: -labels + 10,
              insetRight: -26,
            }),
            Plot.link(own, {
              x1: (line) => line.bed.order!.rank_low,
              x2: (line) => line.bed.order!.rank_high,
              y1: 'y',
              y2: 'y',
              stroke: INK,
              strokeWidth: lineHeight * 0.6,
              strokeLinecap: 'round',
              render: tagged((i) => ({ 'data-b': own[i].bed.id, class: 'rim' })),
            }),
            Plot.link(own, {
              x1: (line) => line.bed.order!.rank_low,
              x2: (line) => line.bed.order!.rank_high,
              y1: 'y',
              y2: 'y',
              stroke: (line) => inkOf(view, line.bed.zone).fill,
              strokeWidth: lineHeight * 0.6 - 1.2,
              strokeLinecap: 'round',
              render: byBed,
            }),
            Plot.dot(own, {
              x: (line) => line.bed.order!.rank,
              y: 'y',
              r: 2,
              fill: '#ffffff',
              stroke: INK,
              strokeWidth: 1,
              render: byBed,
            }),
            Plot.text(own, {
              x: beds.length + 0.5,
              y: 'y',
              dx: -7,
              text: (line) => shorten(line.bed.key, TYPE.small, labels - 10),
              textAnchor: 'end',
              fontSize: TYPE.small,
              render: byBed,
            }),
            Plot.text(own, {
              x: 0.5,
              y: 'y',
              dx: 6,
              text: (line: { bed: BedView }) => (view.zoned ? (line.bed.row.zone ?? '') : ''),
              textAnchor: 'start',
              fontSize: TYPE.small,
              fontWeight: 700,
              render: tagged((i) => ({ 'data-z': zoneTag(view, own[i].bed.zone) })),
            }),
            Plot.axisX({
              ...AXIS,
              anchor: 'bottom',
              ticks: rankTicks(beds.length, columns),
              tickFormat: String,
              label: 'rank (1 is the oldest bed)',
              labelOffset: 30,
            }),
          ],
        },
        c * (width + gap),
        0,
      ),
    );
  }
  const resolved = beds.filter((bed) => bed.order!.resolved === true).length;
  return finishFigure({
    name: `ranks${view.suffix}`,
    title: `Ranks of the beds with their 95 % intervals${view.heading}`,
    caption: `Beds from the youngest (top) to the oldest (bottom). The dot is the rank, the bar its 95 % interval: beds whose bars cover each other can't be told apart in age. A broken line stands between neighbours whose order is resolved (${resolved} of ${beds.length - 1}). The order is relative and is no age.`,
    alt: `Ranks of ${beds.length} beds from the youngest to the oldest: ${beds.map((bed) => `${bed.key} ${bed.order!.rank} (${bed.order!.rank_low} to ${bed.order!.rank_high})`).join('; ')}.`,
    width: WIDE,
    height: bottom + 36,
    body,
  });
}

function rankTicks(count: number, columns: number): number[] {
  const step = [1, 2, 5, 10, 20, 50].find((size) => count / size <= 12 / columns + 1) ?? 100;
  return [
    1,
    ...Array.from({ length: Math.floor(count / step) }, (_, i) => (i + 1) * step).filter(
      (tick) => tick > 1 && (step === 1 || tick - 1 >= step / 2),
    ),
  ];
}
