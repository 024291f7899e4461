import * as Plot from '@observablehq/plot';
import { type BedView, type ClockView, inkOf, zoneTag } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot, ratioLabel, ratioTicks, tagged } from './house-plot.js';
import { extent, padded, short } from './numbers.js';
import { shorten } from './text-width.js';
import { FAINT, INK, MOST_BEDS, PAPER, TYPE, WIDE } from './theme.js';
import { zoneLegend } from './zone-legend.js';

/**
 * Ratios as measured against the gradient, with the isochron of each zone; null without a gradient. A bed's measured
 * mean is that of its kept shells, else its corrected mean with the slope put back.
 */
export function ratioAgainstGradient(view: ClockView): Figure | null {
  const { gradient } = view;
  if (gradient === null) return null;
  const beds = view.beds.flatMap((bed) => {
    const x = bed.site?.gradient ?? null;
    const y = measuredMean(view, bed);
    return x === null || y === null || !Number.isFinite(y) ? [] : [{ bed, x, y, se: bed.row.log_se ?? 0 }];
  });
  if (beds.length < 2) return null;
  const x = padded(...extent(beds, (p) => p.x));
  const slope = gradient.used ? gradient.slope : 0;
  const lines = view.zones.map((zone, i) => ({
    i,
    name: zone.zone,
    from: Math.log(zone.dl_mean) + slope * (x[0] - gradient.centre),
    to: Math.log(zone.dl_mean) + slope * (x[1] - gradient.centre),
  }));
  const [bedLow, bedHigh] = extent(
    beds,
    (p) => p.y - 1.96 * p.se,
    (p) => p.y + 1.96 * p.se,
  );
  const [lineLow, lineHigh] = extent(
    lines.flatMap((line) => [line.from, line.to]),
    (end) => end,
  );
  const y = padded(Math.min(bedLow, lineLow), Math.max(bedHigh, lineHigh));
  const few = beds.length <= MOST_BEDS;
  const height = 380;
  const ticks = ratioTicks(...y).map(Math.log);
  const body = housePlot({
    width: WIDE,
    height,
    marginLeft: 50,
    marginRight: 34,
    marginTop: 12,
    marginBottom: 42,
    x: { domain: x },
    y: { domain: y },
    marks: [
      Plot.gridY({ ticks, stroke: INK, strokeOpacity: 0.1 }),
      Plot.link(lines, { x1: x[0], x2: x[1], y1: 'from', y2: 'to', stroke: INK, strokeWidth: 3.6 }),
      Plot.link(lines, {
        x1: x[0],
        x2: x[1],
        y1: 'from',
        y2: 'to',
        stroke: (line) => inkOf(view, line.i).fill,
        strokeWidth: 2.4,
        render: tagged((i) => ({ 'data-z': zoneTag(view, i) })),
      }),
      Plot.text(view.zoned ? lines : [], {
        x: x[1],
        y: 'to',
        dx: 6,
        text: 'name',
        textAnchor: 'start',
        fontWeight: 700,
        fontSize: TYPE.small,
      }),
      Plot.ruleX(few ? beds : [], {
        x: 'x',
        y1: (p) => p.y - 1.96 * p.se,
        y2: (p) => p.y + 1.96 * p.se,
        stroke: INK,
        strokeWidth: 0.8,
        render: tagged((i) => ({ 'data-b': beds[i].bed.id })),
      }),
      Plot.dot(beds, {
        x: 'x',
        y: 'y',
        r: few ? 4 : 2,
        fill: (p) => (p.bed.zone < 0 ? PAPER : inkOf(view, p.bed.zone).fill),
        stroke: INK,
        strokeWidth: few ? 0.8 : 0.4,
        render: tagged((i) => ({ 'data-b': beds[i].bed.id })),
      }),
      Plot.frame({ stroke: FAINT, strokeWidth: 0.7 }),
      Plot.axisX({ ...AXIS, label: axisName(gradient.column), labelOffset: 34 }),
      Plot.axisY({
        ...AXIS,
        ticks,
        tickFormat: (v: number) => ratioLabel(Math.exp(v)),
        label: 'D/L of the bed, as measured',
        labelOffset: 46,
      }),
    ],
  });
  const key = zoneLegend(view, 50, height + 12, WIDE - 60);
  const interval = `${short(gradient.slope)} (95 % ${short(gradient.slope_low)} to ${short(gradient.slope_high)})`;
  return finishFigure({
    name: `gradient${view.suffix}`,
    title: `Ratio along the gradient ${gradient.column}${view.heading}`,
    caption: `One disc a bed with the 95 % interval of its mean; the lines are isochrons, one a zone: beds of one age lie along one line. The slope is ${interval} log ratios a unit of ${gradient.column}. ${gradient.used ? 'It was taken out of the ratios before zones, order and relations.' : 'The data do not support it, so it was not used.'} BIC is ${short(gradient.bic_with)} with it and ${short(gradient.bic_without)} without.`,
    alt: `D/L of ${beds.length} beds against ${gradient.column}; slope ${interval}, ${gradient.used ? 'used' : 'not used'}.`,
    width: WIDE,
    height: height + 8 + key.height,
    body: [body, key.node],
  });
}

function measuredMean({ shellRows }: ClockView, { row, shells }: BedView): number | null {
  let sum = 0;
  let kept = 0;
  for (const id of shells) {
    if (shellRows[id].status === 'set aside') continue;
    sum += Math.log(shellRows[id].dl);
    kept++;
  }
  if (kept > 0) return sum / kept;
  return row.dl_mean === null ? null : Math.log(row.dl_mean);
}

const KNOWN: Readonly<Record<string, string>> = {
  cmat_c: 'current mean annual temperature (°C)',
  latitude: 'latitude (degrees)',
  longitude: 'longitude (degrees)',
  coast_km: 'distance along the coast (km)',
  elevation_m: 'height above present sea level (m)',
  burial_m: 'burial (m)',
};

const axisName = (column: string) => KNOWN[column.toLowerCase()] ?? shorten(column, TYPE.small, WIDE - 120);
