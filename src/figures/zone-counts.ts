import * as Plot from '@observablehq/plot';
import type { ZoneCountRow } from '../model/index.js';
import type { ClockView } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { AXIS, housePlot } from './house-plot.js';
import type { SvgNode } from './svg-node.js';
import { FAINT, INK, PAPER, TYPE, WIDE } from './theme.js';

/** How the number of zones was chosen: BIC, gap and silhouette for every number; null with fewer than two models. */
export function zoneCounts(view: ClockView): Figure | null {
  const rows = view.counts.filter((row) => Number.isFinite(row.bic));
  if (rows.length < 2) return null;
  const best = Math.min(...rows.map((row) => row.bic));
  const panels: SvgNode[] = [];
  const kinds: Panel[] = [
    { label: 'BIC above the best', value: (row) => row.bic - best, lowest: true },
    { label: 'gap statistic', value: (row) => row.gap, error: (row) => row.gap_se },
    { label: 'silhouette', value: (row) => row.silhouette },
  ];
  const drawn = kinds.filter((kind) => rows.some((row) => finite(kind.value(row))));
  const width = Math.min((WIDE - 12 * (drawn.length - 1)) / drawn.length, 332);
  drawn.forEach((kind, i) => {
    panels.push(onePanel(kind, rows, width, i * (width + 12)));
  });
  const chosen = rows.find((row) => row.chosen);
  const top = (value: (row: ZoneCountRow) => number | null) =>
    rows.filter((row) => finite(value(row))).sort((a, b) => value(b)! - value(a)!)[0]?.model;
  const votes = [
    `BIC is lowest for ${naming(rows.find((row) => row.bic === best)?.model)}`,
    ...(drawn.some((kind) => kind.label === 'gap statistic') ? [`the gap is largest at ${top((row) => row.gap)}`] : []),
    ...(drawn.some((kind) => kind.label === 'silhouette')
      ? [`the silhouette is largest at ${top((row) => row.silhouette)}`]
      : []),
  ];
  return finishFigure({
    name: `zone-counts${view.suffix}`,
    title: `How the number of zones was chosen${view.heading}`,
    caption: `${['', 'One criterion', 'Two criteria', 'Three criteria'][drawn.length]} for every number of zones${rows.some((row) => row.model === 'continuum') ? '; ~ is the continuum, without zones' : ''}. The ringed model is in use${chosen === undefined ? '' : ` (${naming(chosen.model)})`}. A BIC within 2 of the best is hardly worse${drawn.length > 1 ? '; the gap and the silhouette speak for a number where they are large' : ''}. Here ${votes.join(', ')}.`,
    alt: `BIC above the best: ${rows.map((row) => `${row.model} ${Math.round((row.bic - best) * 10) / 10}`).join(', ')}. ${votes.join('; ')}.`,
    width: drawn.length === 1 ? width : WIDE,
    height: 232,
    body: panels,
  });
}

interface Panel {
  readonly label: string;
  readonly value: (row: ZoneCountRow) => number | null;
  readonly error?: (row: ZoneCountRow) => number | null;
  readonly lowest?: boolean;
}

const finite = (value: number | null): value is number => value !== null && Number.isFinite(value);

const naming = (model: string | undefined) =>
  model === undefined ? 'none' : model === 'continuum' ? 'the continuum' : model === '1' ? '1 zone' : `${model} zones`;

function onePanel(kind: Panel, rows: readonly ZoneCountRow[], width: number, left: number): SvgNode {
  const points = rows.flatMap((row) => {
    const y = kind.value(row);
    return finite(y)
      ? [{ x: row.model === 'continuum' ? '~' : row.model, y, error: kind.error?.(row) ?? null, chosen: row.chosen }]
      : [];
  });
  const line = points.filter((point) => point.x !== '~');
  return housePlot(
    {
      width,
      height: 230,
      marginLeft: 48,
      marginRight: 10,
      marginTop: 14,
      marginBottom: 40,
      insetBottom: 12,
      insetTop: 8,
      x: { type: 'point', domain: points.map((point) => point.x), padding: 0.6 },
      y: { zero: kind.lowest === true },
      marks: [
        Plot.gridY({ stroke: INK, strokeOpacity: 0.1, ticks: 5 }),
        Plot.line(line, { x: 'x', y: 'y', stroke: FAINT, strokeWidth: 1.2 }),
        Plot.ruleX(
          points.filter((point) => finite(point.error)),
          {
            x: 'x',
            y1: (point) => point.y - point.error!,
            y2: (point) => point.y + point.error!,
            stroke: INK,
            strokeWidth: 0.9,
          },
        ),
        Plot.dot(points, {
          x: 'x',
          y: 'y',
          r: 3,
          fill: (point) => (point.x === '~' ? PAPER : INK),
          stroke: INK,
          strokeWidth: 1,
        }),
        Plot.dot(
          points.filter((point) => point.chosen),
          { x: 'x', y: 'y', r: 7, stroke: INK, strokeWidth: 1.4 },
        ),
        Plot.axisX({ ...AXIS, label: 'number of zones', labelOffset: 32 }),
        Plot.axisY({ ...AXIS, ticks: 5, label: kind.label, labelOffset: 44, fontSize: TYPE.small }),
      ],
    },
    left,
  );
}
