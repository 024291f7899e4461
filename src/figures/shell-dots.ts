import * as Plot from '@observablehq/plot';
import { type BedView, type ClockView, inkOf, type ShellView } from './clock-view.js';
import { tagged } from './house-plot.js';
import { SHAPE } from './signs.js';
import { INK } from './theme.js';

/** A shell at a place of a plot. */
export interface ShellPoint {
  readonly bed: BedView;
  readonly shell: ShellView;
  readonly x: number;
  readonly y: number;
}

/**
 * The marks of shells in every figure: shape by status, fill by the zone of their bed; odd ones drawn last, on top.
 * Kept shells of one zone are one mark with shared paint, which keeps large figures small.
 */
export function shellDots(view: ClockView, points: readonly ShellPoint[], r = 2.6): Plot.Markish[] {
  const zones = [...view.zones.keys(), -1];
  const kept = points.filter((point) => point.shell.row.status === 'kept');
  const doubtful = points.filter((point) => point.shell.row.status === 'doubtful');
  const aside = points.filter((point) => point.shell.row.status === 'set aside');
  const tags = (own: readonly ShellPoint[]) => tagged((i) => ({ 'data-b': own[i].bed.id, 'data-s': own[i].shell.id }));
  return [
    ...zones.map((zone) => {
      const own = kept.filter((point) => point.bed.zone === zone);
      const fill = inkOf(view, zone).fill;
      return Plot.dot(own, { x: 'x', y: 'y', r, fill, stroke: INK, strokeWidth: 0.55, render: tags(own) });
    }),
    ...zones.map((zone) => {
      const own = doubtful.filter((point) => point.bed.zone === zone);
      const fill = inkOf(view, zone).fill;
      const symbol = SHAPE.doubtful;
      return Plot.dot(own, {
        x: 'x',
        y: 'y',
        r: r + 0.4,
        symbol,
        fill,
        stroke: INK,
        strokeWidth: 0.9,
        render: tags(own),
      });
    }),
    Plot.dot(aside, {
      x: 'x',
      y: 'y',
      r,
      symbol: SHAPE['set aside'],
      stroke: INK,
      strokeWidth: 1.4,
      render: tags(aside),
    }),
  ];
}
