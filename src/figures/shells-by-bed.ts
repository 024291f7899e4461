import * as Plot from '@observablehq/plot';
import { bedColumns, bedNote } from './bed-rows.js';
import { atCentre, type ClockView, inkOf, shellRatio, zoneTag } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot, ratioLabel, ratioTicks, tagged } from './house-plot.js';
import { legend } from './legend.js';
import { shellDots } from './shell-dots.js';
import { shellsSummarised } from './shells-summarised.js';
import { meanSign, shellSign } from './signs.js';
import type { SvgNode } from './svg-node.js';
import { shorten } from './text-width.js';
import { INK, MOST_BEDS, MOST_SHELLS, PAPER, SOFT, TYPE, WIDE } from './theme.js';

/** Log ratios of all shells, one line a bed, beds listed by zone with the youngest on top; null without shells. */
export function shellsByBed(view: ClockView): Figure | null {
  if (view.beds.length > MOST_BEDS || view.clock.shells > MOST_SHELLS) return shellsSummarised(view);
  const shells = view.beds.flatMap((bed) => bed.shells);
  const values = [
    ...view.beds.flatMap((bed) => bed.shells.map((shell) => shellRatio(view, bed, shell))),
    ...view.beds.flatMap((bed) => (bed.row.log_mean === null ? [] : [bed.row.log_mean])),
  ].filter(Number.isFinite);
  if (values.length === 0) return null;
  const [low, high] = padded(Math.min(...values), Math.max(...values));
  const top = 40;
  const { columns, line: lineHeight } = bedColumns(view, top);
  const gap = 10;
  const width = (WIDE - gap * (columns.length - 1)) / columns.length;
  const labels = columns.length === 1 ? 132 : columns.length === 2 ? 96 : 72;
  const notes = view.beds.some((bed) => bedNote(bed) !== '') ? 42 : 6;
  const bottom = Math.max(...columns.map((column) => column.bottom));
  const ticks = ratioTicks(low, high, width - labels - notes).map(Math.log);
  const body: SvgNode[] = columns.map((column, c) => {
    const beds = column.lines.filter((line) => line.kind === 'bed');
    const heads = column.lines.filter((line) => line.kind === 'zone');
    const points = beds.flatMap((line) =>
      line.bed.shells.map((shell) => ({ shell, bed: line.bed, x: shellRatio(view, line.bed, shell), y: line.y })),
    );
    const bandTags = tagged((i) => ({ 'data-z': zoneTag(view, column.bands[i].zone) }));
    const byBed = tagged((i) => ({ 'data-b': beds[i].bed.id }));
    const means = beds.filter((line) => line.bed.row.log_mean !== null);
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
            text: (line) => zoneHead(view, line.zone, columns.length),
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
            ticks: columns.length > 1 ? 4 : 6,
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
      c * (width + gap),
      0,
    );
  });
  const fill = view.inks[Math.floor((view.inks.length - 1) / 3)].fill;
  const key = legend(
    [
      { sign: [shellSign('kept', fill)], half: 4, text: 'shell' },
      { sign: [shellSign('doubtful', fill)], half: 4, text: 'doubtful shell, counted' },
      { sign: [shellSign('set aside', PAPER)], half: 4, text: 'shell set aside' },
      { sign: [meanSign()], half: 8, text: 'mean of the bed with its 95 % interval' },
    ],
    labels,
    bottom + 48,
    WIDE - labels,
  );
  const aside = shells.filter((shell) => shell.row.status === 'set aside').length;
  return finishFigure({
    name: `shells${view.suffix}`,
    title: `Log ratios of all shells by bed${view.heading}`,
    caption: `One line a bed, ${view.zoned ? 'grouped by zone with the youngest zone and bed on top' : 'the youngest on top'}; older beds lie further to the right. Look for shells that stand apart from their own line${aside > 0 ? `: the ${aside} crossed ones were set aside` : ''}. ${ranges(view)}`,
    alt: `${shells.length} shells of ${view.clock.taxon} in ${view.beds.length} beds. ${view.zones.map((zone) => `${zone.zone}: ${zone.beds} beds, D/L ${ratio(zone.dl_mean)}`).join('; ')}. ${aside} shells set aside.`,
    width: WIDE,
    height: bottom + 44 + key.height,
    body: [...body, key.node],
  });
}

const ranges = (view: ClockView) =>
  [
    view.zoned
      ? 'The darker part of each band spans one standard deviation of shells either side of the zone mean.'
      : '',
    view.gradient?.used ? `The slope along ${view.gradient.column} is taken out of every ratio.` : '',
  ].join(' ');

const bedName = (row: { section: string; bed: string }) => `${row.section}/${row.bed}`;

/** A D/L ratio with three decimals. */
export const ratio = (value: number) => value.toFixed(3);

/** Three significant digits. */
export const short = (value: number) => String(Number(value.toPrecision(3)));

function zoneHead(view: ClockView, zone: number, columns: number): string {
  if (zone < 0) return 'in no zone';
  const { zone: name, dl_mean, dl_low, dl_high } = view.zones[zone];
  if (!view.zoned) return `all beds, D/L ${ratio(dl_mean)}`;
  return columns > 2
    ? `${name}  D/L ${ratio(dl_mean)}`
    : `${name}   D/L ${ratio(dl_mean)} (${ratio(dl_low)} to ${ratio(dl_high)})`;
}

/** Ends of an axis a little beyond the values. */
export function padded(low: number, high: number): [number, number] {
  const pad = Math.max(0.05 * (high - low), 0.02);
  return [low - pad, high + pad];
}
