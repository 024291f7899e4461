import * as Plot from '@observablehq/plot';
import { atCentre, type BedView, type ClockView, inkOf, shellRatio, zoneTag } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot, tagged } from './house-plot.js';
import { padded, ratio } from './numbers.js';
import { INK, NARROW, SOFT, TYPE } from './theme.js';

const STEP = 40;

/** The zones on the D/L scale with how far neighbours overlap, for one journal column; null without zones. */
export function zoneRanges(view: ClockView): Figure | null {
  if (!view.zoned) return null;
  const zones = view.zones.map((zone, i) => ({ zone, i, y: 10 + (i + 0.5) * STEP }));
  const shells = zones.flatMap(({ i, y }) => ticksOf(view, i).map((tick) => ({ ...tick, y })));
  const [low, high] = padded(
    Math.min(...view.zones.map((zone) => zone.shell_low), ...shells.map((shell) => shell.x)),
    Math.max(...view.zones.map((zone) => zone.shell_high), ...shells.map((shell) => shell.x)),
  );
  const between = view.adjacent.flatMap((row) => {
    const at = view.zones.findIndex((zone) => zone.zone === row.younger);
    return at < 0 ? [] : [{ row, y: 10 + (at + 1) * STEP }];
  });
  const bottom = 10 + zones.length * STEP;
  const tags = tagged((i) => ({ 'data-z': zoneTag(view, i) }));
  const body = housePlot({
    width: NARROW,
    height: bottom + 40,
    marginLeft: 34,
    marginRight: 88,
    marginTop: 10,
    marginBottom: 40,
    x: { domain: [Math.max(0, low), high] },
    y: { type: 'identity', axis: null },
    marks: [
      Plot.gridX({ stroke: INK, strokeOpacity: 0.1, ticks: 4 }),
      Plot.link(shells, {
        x1: 'x',
        x2: 'x',
        y1: (shell) => shell.y + 5,
        y2: (shell) => shell.y + 11,
        stroke: INK,
        strokeWidth: 0.6,
        strokeOpacity: 0.55,
        render: tagged((i) => ({ 'data-s': shells[i].id })),
      }),
      Plot.rect(zones, {
        x1: (row) => row.zone.shell_low,
        x2: (row) => row.zone.shell_high,
        y1: (row) => row.y - 11,
        y2: (row) => row.y + 2,
        fill: (row) => inkOf(view, row.i).fill,
        stroke: INK,
        strokeWidth: 0.8,
        render: tags,
      }),
      Plot.ruleY(zones, {
        x1: (row) => row.zone.dl_low,
        x2: (row) => row.zone.dl_high,
        y: (row) => row.y - 14,
        stroke: INK,
        strokeWidth: 1.8,
      }),
      Plot.link(zones, {
        x1: (row) => row.zone.dl_mean,
        x2: (row) => row.zone.dl_mean,
        y1: (row) => row.y - 16,
        y2: (row) => row.y + 11,
        stroke: INK,
        strokeWidth: 1.1,
      }),
      Plot.text(zones, {
        x: Math.max(0, low),
        y: 'y',
        dx: -8,
        text: (row) => row.zone.zone,
        textAnchor: 'end',
        fontWeight: 700,
        render: tags,
      }),
      Plot.text(between, {
        x: high,
        y: (entry) => entry.y + 1.5,
        dx: 6,
        text: (entry) => `${entry.row.verdict}, ${overlapText(entry.row.overlap)}`,
        textAnchor: 'start',
        fontSize: TYPE.tiny,
        fill: SOFT,
      }),
      Plot.axisX({ ...AXIS, ticks: 4, label: `D/L${atCentre(view)}`, labelOffset: 32 }),
    ],
  });
  return finishFigure({
    name: `zones${view.suffix}`,
    title: `The zones and how far neighbours overlap${view.heading}`,
    caption: `Boxes span one standard deviation of shells either side of the zone mean; the heavy line above a box is the 95 % interval of the mean${view.beds.some((bed) => bed.shells.length > 0) ? ', and the ticks below are single shells' : ''}. Beside each pair of neighbours stand the verdict and the overlap coefficient of their shells: 0 apart, 1 alike, 0.32 where the boxes just touch.`,
    alt: `${view.zones.map((zone) => `${zone.zone}: D/L ${ratio(zone.dl_mean)}, shells ${ratio(zone.shell_low)} to ${ratio(zone.shell_high)}`).join('; ')}. ${view.adjacent.map((row) => `${row.younger} and ${row.older}: ${row.verdict}, overlap ${overlapText(row.overlap)}`).join('; ')}.`,
    width: NARROW,
    height: bottom + 42,
    body: [body],
  });
}

/** Most shells of one zone that are drawn. */
const MOST_TICKS = 400;

/** D/L of the shells of a zone that were not set aside; of very many every so manieth. */
function ticksOf(view: ClockView, zone: number): { readonly x: number; readonly id: number }[] {
  const beds = view.beds.filter((bed) => bed.zone === zone);
  const count = beds.reduce((sum, bed) => sum + bed.shells.length - setAside(bed).size, 0);
  const every = Math.ceil(count / MOST_TICKS);
  const ticks: { x: number; id: number }[] = [];
  let k = 0;
  for (const bed of beds) {
    const aside = setAside(bed);
    for (const id of bed.shells)
      if (!aside.has(id) && k++ % every === 0)
        ticks.push({ x: Math.exp(shellRatio(view, bed, view.shellRows[id])), id });
  }
  return ticks;
}

const setAside = ({ odd }: BedView): ReadonlySet<number> =>
  new Set(odd.flatMap(({ id, row }) => (row.status === 'set aside' ? [id] : [])));

const overlapText = (overlap: number) => (overlap < 0.005 ? '< 0.01' : overlap.toFixed(2));
