import * as Plot from '@observablehq/plot';
import { quantileOfSorted } from '../statistics/index.js';
import { atCentre, type ClockView, inkOf, shellRatio, zoneTag } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot, ratioLabel, ratioTicks, tagged } from './house-plot.js';
import { padded, ratio } from './numbers.js';
import { INK, SOFT, TYPE, WIDE } from './theme.js';

const BINS = 90;

/** What is drawn of one zone: log ratios of its shells. */
interface Group {
  readonly zone: number;
  readonly kept: readonly number[];
  readonly aside: readonly number[];
  readonly beds: number;
}

function groupOf(view: ClockView, zone: number): Group {
  const [kept, aside]: [number[], number[]] = [[], []];
  let beds = 0;
  for (const bed of view.beds) {
    if (bed.zone !== zone) continue;
    beds++;
    for (const id of bed.shells) {
      const shell = view.shellRows[id];
      (shell.status === 'set aside' ? aside : kept).push(shellRatio(view, bed, shell));
    }
  }
  return { zone, kept, aside, beds };
}

function sortedTogether(lists: readonly (readonly number[])[]): Float64Array {
  const all = new Float64Array(lists.reduce((sum, list) => sum + list.length, 0));
  let at = 0;
  for (const list of lists) {
    all.set(list, at);
    at += list.length;
  }
  return all.sort();
}

/** Shells of a survey too large to name its beds: a histogram of log ratios a zone, set-aside shells below the line. */
export function shellsSummarised(view: ClockView): Figure | null {
  const groups = [...view.zones.keys(), -1]
    .map((zone) => groupOf(view, zone))
    .filter((group) => group.kept.length + group.aside.length > 0);
  if (groups.length === 0) return null;
  const all = sortedTogether(groups.flatMap((group) => [group.kept, group.aside]));
  const [low, high] = padded(quantileOfSorted(all, 0.0005), quantileOfSorted(all, 0.9995));
  const step = (high - low) / BINS;
  const bin = (values: readonly number[]) => {
    const counts = new Array<number>(BINS).fill(0);
    for (const value of values) counts[Math.min(BINS - 1, Math.max(0, Math.floor((value - low) / step)))]++;
    return counts;
  };
  const rowHeight = Math.max(64, Math.min(110, 560 / groups.length));
  const top = 40;
  const bars = groups
    .flatMap((group, g) => {
      const kept = bin(group.kept);
      const aside = bin(group.aside);
      const base = top + (g + 1) * rowHeight - 14;
      const most = Math.max(...kept, 1);
      return kept.flatMap((count, i) => [
        {
          zone: group.zone,
          x1: low + i * step,
          x2: low + (i + 1) * step,
          y1: base - (count / most) * (rowHeight - 32),
          y2: base,
          count,
        },
        {
          zone: -2,
          x1: low + i * step,
          x2: low + (i + 1) * step,
          y1: base,
          y2: base + Math.min(11, aside[i] === 0 ? 0 : 2 + (9 * aside[i]) / Math.max(...aside)),
          count: aside[i],
        },
      ]);
    })
    .filter((bar) => bar.count > 0);
  const heads = groups.map((group, g) => ({ group, y: top + g * rowHeight + 12 }));
  const bottom = top + groups.length * rowHeight;
  const body = housePlot({
    width: WIDE,
    height: bottom + 36,
    marginLeft: 12,
    marginRight: 12,
    marginTop: top,
    marginBottom: 36,
    x: { domain: [low, high] },
    y: { type: 'identity', axis: null },
    marks: [
      Plot.gridX({ ticks: ratioTicks(low, high).map(Math.log), stroke: INK, strokeOpacity: 0.1 }),
      Plot.rect(bars, {
        x1: 'x1',
        x2: 'x2',
        y1: 'y1',
        y2: 'y2',
        fill: (bar) => (bar.zone === -2 ? INK : inkOf(view, bar.zone).fill),
        stroke: INK,
        strokeWidth: 0.4,
        render: tagged((i) => ({ 'data-z': bars[i].zone >= 0 ? zoneTag(view, bars[i].zone) : undefined })),
      }),
      Plot.ruleY(groups, {
        y: (_: unknown, g: number) => top + (g + 1) * rowHeight - 14,
        stroke: INK,
        strokeWidth: 0.8,
      } as Plot.RuleYOptions),
      Plot.text(heads, {
        x: low,
        y: 'y',
        text: ({ group }) =>
          `${group.zone < 0 ? 'in no zone' : view.zoned ? `${view.zones[group.zone].zone}   D/L ${ratio(view.zones[group.zone].dl_mean)}` : 'all beds'}   ${group.beds} beds, ${group.kept.length} shells, ${group.aside.length} set aside`,
        textAnchor: 'start',
        fontSize: TYPE.small,
        fontWeight: 700,
        fill: SOFT,
      }),
      Plot.axisX({ ...AXIS, anchor: 'bottom', label: `log ratio, ln(D/L)${atCentre(view)}`, labelOffset: 32 }),
      Plot.axisX({
        ...AXIS,
        anchor: 'top',
        ticks: ratioTicks(low, high).map(Math.log),
        tickFormat: (v: number) => ratioLabel(Math.exp(v)),
        label: 'D/L',
        labelOffset: 32,
      }),
    ],
  });
  return finishFigure({
    name: `shells${view.suffix}`,
    title: `Log ratios of all shells by zone, summarised${view.heading}`,
    caption: `Histograms of the shells of each zone, each drawn to its own height; black bars below the line are shells set aside. The survey is too large to draw bed by bed: shells.csv holds every shell.`,
    alt: groups
      .map(
        (group) =>
          `${group.zone < 0 ? 'no zone' : view.zones[group.zone].zone}: ${group.kept.length} shells in ${group.beds} beds, ${group.aside.length} set aside`,
      )
      .join('; '),
    width: WIDE,
    height: bottom + 38,
    body: [body],
  });
}
