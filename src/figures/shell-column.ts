import * as Plot from '@observablehq/plot';
import { type BedColumn, bedNote } from './bed-rows.js';
import { atCentre, type BedView, type ClockView, inkOf, shellRatio, shellsOf, zoneTag } from './clock-view.js';
import { AXIS, housePlot, ratioLabel, ratioTicks, tagged } from './house-plot.js';
import { ratio } from './numbers.js';
import { shellDots } from './shell-dots.js';
import type { SvgNode } from './svg-node.js';
import { shorten } from './text-width.js';
import { INK, SOFT, TYPE } from './theme.js';

/** What all columns of the figure share. */
export interface ShellColumnShape {
  /** Ends of the axis, in log ratios. */
  readonly domain: readonly [number, number];
  readonly top: number;
  readonly bottom: number;
  readonly width: number;
  /** Room for the names of beds on the left, and for notes on the right. */
  readonly labels: number;
  readonly notes: number;
  /** Height of a bed's line. */
  readonly line: number;
  /** How many columns there are. */
  readonly columns: number;
}

/** One column of the figure of all shells: bands of zones, a line a bed with its shells and its mean. */
export function shellColumn(view: ClockView, column: BedColumn, shape: ShellColumnShape, left: number): SvgNode {
  const { top, bottom, width, labels, notes, line: lineHeight, columns } = shape;
  const [low, high] = shape.domain;
  const ticks = ratioTicks(low, high, width - labels - notes).map(Math.log);
  const beds = column.lines.filter((line) => line.kind === 'bed');
  const heads = column.lines.filter((line) => line.kind === 'zone');
  const points = beds.flatMap((line) =>
    shellsOf(view, line.bed).map((shell) => ({
      shell,
      bed: line.bed,
      x: shellRatio(view, line.bed, shell.row),
      y: line.y,
    })),
  );
  const bandTags = tagged((i) => ({ 'data-z': zoneTag(view, column.bands[i].zone) }));
  const byBed = tagged((i) => ({ 'data-b': beds[i].bed.id }));
  const means = beds.filter((line) => line.bed.row.log_mean !== null);
  const published = means.filter((line) => line.bed.shells.length === 0 && logSd(line.bed) > 0);
  const ofMean = tagged((i) => ({ 'data-b': means[i].bed.id }));
  const ranges = column.bands.filter((band) => band.zone >= 0 && view.zoned && view.zones[band.zone].shells > 1);
  return housePlot(
    {
      width,
      height: bottom + 36,
      marginLeft: labels,
      marginRight: notes,
      marginTop: top,
      marginBottom: 34,
      x: { domain: [low, high] },
      y: { type: 'identity', axis: null },
      marks: [
        Plot.rect(column.bands, {
          x1: low,
          x2: high,
          y1: 'top',
          y2: 'bottom',
          fill: (band) => inkOf(view, band.zone).fill,
          fillOpacity: 0.16,
          insetLeft: -labels + 6,
          insetRight: -notes,
          render: bandTags,
        }),
        Plot.rect(ranges, {
          x1: (band) => Math.log(view.zones[band.zone].shell_low),
          x2: (band) => Math.log(view.zones[band.zone].shell_high),
          y1: (band) => band.top + 16,
          y2: 'bottom',
          fill: (band) => inkOf(view, band.zone).fill,
          fillOpacity: 0.3,
        }),
        Plot.rect(column.bands, {
          x1: low,
          x2: low,
          y1: 'top',
          y2: 'bottom',
          fill: (band) => inkOf(view, band.zone).fill,
          stroke: INK,
          strokeWidth: 0.5,
          insetLeft: -labels,
          insetRight: labels - 5,
          render: tagged((i) => ({ 'data-z': zoneTag(view, column.bands[i].zone) })),
        }),
        Plot.gridX({
          ticks,
          stroke: INK,
          strokeOpacity: 0.1,
          strokeWidth: 0.75,
        }),
        Plot.ruleY(beds, { x1: low, x2: high, y: 'y', stroke: INK, strokeOpacity: 0.13, strokeWidth: 0.5 }),
        Plot.text(heads, {
          x: low,
          y: 'y',
          dx: -labels + 12,
          text: (line) => zoneHead(view, line.zone, columns),
          textAnchor: 'start',
          fontWeight: 700,
          fontSize: TYPE.small,
          render: tagged((i) => ({ 'data-z': zoneTag(view, heads[i].zone) })),
        }),
        Plot.text(beds, {
          x: low,
          y: 'y',
          dx: -7,
          text: (line) => shorten(bedName(line.bed.row), TYPE.small, labels - 22),
          textAnchor: 'end',
          fontSize: TYPE.small,
          render: byBed,
        }),
        Plot.text(
          beds.filter((line) => bedNote(line.bed) !== ''),
          {
            x: high,
            y: 'y',
            dx: 4,
            text: (line) => bedNote(line.bed),
            textAnchor: 'start',
            fontSize: TYPE.tiny,
            fill: SOFT,
          },
        ),
        Plot.rect(published, {
          x1: (line) => line.bed.row.log_mean! - logSd(line.bed),
          x2: (line) => line.bed.row.log_mean! + logSd(line.bed),
          y1: (line) => line.y - 3.2,
          y2: (line) => line.y + 3.2,
          fill: (line) => inkOf(view, line.zone).fill,
          fillOpacity: 0.45,
          stroke: INK,
          strokeWidth: 0.6,
          render: tagged((i) => ({ 'data-b': published[i].bed.id })),
        }),
        Plot.ruleY(means, {
          x1: (line) => line.bed.row.log_mean! - 1.96 * (line.bed.row.log_se ?? 0),
          x2: (line) => line.bed.row.log_mean! + 1.96 * (line.bed.row.log_se ?? 0),
          y: 'y',
          stroke: INK,
          strokeWidth: 1,
          render: ofMean,
        }),
        Plot.link(means, {
          x1: (line) => line.bed.row.log_mean,
          x2: (line) => line.bed.row.log_mean,
          y1: (line) => line.y - lineHeight / 2 + 1,
          y2: (line) => line.y + lineHeight / 2 - 1,
          stroke: INK,
          strokeWidth: 1.6,
          strokeLinecap: 'butt',
          render: ofMean,
        }),
        shellDots(view, points),
        Plot.axisX({
          ...AXIS,
          anchor: 'bottom',
          ticks: columns > 1 ? 4 : 6,
          label: `log ratio, ln(D/L)${atCentre(view)}`,
          labelOffset: 30,
        }),
        Plot.axisX({
          ...AXIS,
          anchor: 'top',
          ticks,
          tickFormat: (v: number) => ratioLabel(Math.exp(v)),
          label: 'D/L',
          labelOffset: 32,
        }),
      ],
    },
    left,
    0,
  );
}

/** Standard deviation of a bed's shells on the log scale, from the published one on D/L; 0 where none is known. */
export const logSd = (bed: BedView) =>
  bed.row.dl_sd === null || bed.row.dl_mean === null ? 0 : bed.row.dl_sd / bed.row.dl_mean;

const bedName = (row: { section: string; bed: string }) => `${row.section}/${row.bed}`;

function zoneHead(view: ClockView, zone: number, columns: number): string {
  if (zone < 0) return 'in no zone';
  const { zone: name, dl_mean, dl_low, dl_high } = view.zones[zone];
  if (!view.zoned) return `all beds, D/L ${ratio(dl_mean)}`;
  return columns > 2
    ? `${name}  D/L ${ratio(dl_mean)}`
    : `${name}   D/L ${ratio(dl_mean)} (${ratio(dl_low)} to ${ratio(dl_high)})`;
}
