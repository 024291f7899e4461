import * as Plot from '@observablehq/plot';
import { atCentre, type ClockView, inkOf } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot, ratioLabel, ratioTicks, tagged } from './house-plot.js';
import { extent, padded } from './numbers.js';
import { INK, MOST_BEDS, TYPE, WIDE } from './theme.js';
import { zoneLegend } from './zone-legend.js';

/** Height of the deposits above the sea against their ratio; null unless two beds or more have both. */
export function heightsAgainstRatio(view: ClockView): Figure | null {
  const beds = view.beds.flatMap((bed) => {
    const y = bed.site?.elevation_m ?? null;
    const x = bed.row.log_mean;
    return y === null || x === null ? [] : [{ bed, x, y, se: bed.row.log_se ?? 0 }];
  });
  if (beds.length < 2) return null;
  const x = padded(
    ...extent(
      beds,
      (p) => p.x - 1.96 * p.se,
      (p) => p.x + 1.96 * p.se,
    ),
  );
  const [lowest, highest] = extent(beds, (p) => p.y);
  const [yLow, yTop] = padded(Math.min(0, lowest), highest);
  // Room for the zones' names above the highest bed.
  const y = [yLow, yTop + 0.07 * (yTop - yLow)] as const;
  const means = view.zoned ? [...view.zones.keys()].filter((zone) => beds.some((p) => p.bed.zone === zone)) : [];
  const few = beds.length <= MOST_BEDS;
  const height = 380;
  const body = housePlot({
    width: WIDE,
    height,
    marginLeft: 52,
    marginRight: 16,
    marginTop: 30,
    marginBottom: 42,
    x: { domain: x },
    y: { domain: y },
    marks: [
      Plot.gridX({ ticks: ratioTicks(...x).map(Math.log), stroke: INK, strokeOpacity: 0.1 }),
      Plot.gridY({ stroke: INK, strokeOpacity: 0.1 }),
      Plot.rect(means, {
        x1: (zone) => Math.log(view.zones[zone].shell_low),
        x2: (zone) => Math.log(view.zones[zone].shell_high),
        y1: y[0],
        y2: y[1],
        fill: (zone) => inkOf(view, zone).fill,
        fillOpacity: 0.2,
      }),
      Plot.text(means, {
        x: (zone) => Math.log(view.zones[zone].dl_mean),
        y: y[1],
        dy: 9,
        text: (zone) => view.zones[zone].zone,
        fontWeight: 700,
        fontSize: TYPE.small,
      }),
      y[0] < 0 ? Plot.ruleY([0], { stroke: INK, strokeWidth: 0.9, strokeDasharray: '5 3' }) : null,
      Plot.ruleY(few ? beds : [], {
        x1: (p) => p.x - 1.96 * p.se,
        x2: (p) => p.x + 1.96 * p.se,
        y: 'y',
        stroke: INK,
        strokeWidth: 0.8,
        render: tagged((i) => ({ 'data-b': beds[i].bed.id })),
      }),
      Plot.dot(beds, {
        x: 'x',
        y: 'y',
        r: few ? 4 : 2,
        fill: (p) => inkOf(view, p.bed.zone).fill,
        stroke: INK,
        strokeWidth: few ? 0.8 : 0.4,
        render: tagged((i) => ({ 'data-b': beds[i].bed.id })),
      }),
      Plot.axisX({
        ...AXIS,
        anchor: 'bottom',
        label: `mean log ratio of the bed, ln(D/L)${atCentre(view)}`,
        labelOffset: 34,
      }),
      Plot.axisX({
        ...AXIS,
        anchor: 'top',
        ticks: ratioTicks(...x).map(Math.log),
        tickFormat: (v: number) => ratioLabel(Math.exp(v)),
        label: null,
      }),
      Plot.axisY({ ...AXIS, label: 'height above present sea level (m)', labelOffset: 44 }),
    ],
  });
  const key = zoneLegend(view, 52, height + 12, WIDE - 60);
  return finishFigure({
    name: `heights${view.suffix}`,
    title: `Height above the sea against the ratio${view.heading}`,
    caption: `One disc a bed, with the 95 % interval of its mean; the upper axis is D/L. On a rising coast older beds stand higher, so discs should climb to the right; a bed far below others of its zone was lowered, or is not of that zone.`,
    alt: `Height in metres against D/L of ${beds.length} beds${few ? `: ${beds.map((p) => `${p.bed.key} ${p.y} m, D/L ${ratioLabel(Math.exp(p.x))}`).join('; ')}` : ''}.`,
    width: WIDE,
    height: height + 8 + key.height,
    body: [body, key.node],
  });
}
