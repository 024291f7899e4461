import { type ClockView, inkOf, zoneTag } from './clock-view.js';
import type { SectionColumn } from './correlation-layout.js';
import { contactOf, type Run, runsOf } from './correlation-runs.js';
import { element, type SvgNode } from './svg-node.js';
import { INK } from './theme.js';

/** Left and right edge of what ties run between. */
export interface Gap {
  readonly left: number;
  readonly right: number;
}

/**
 * The ties of all zones between two neighbouring columns. A zone that one of them lacks runs out to a point: at the
 * contact where it would lie, or halfway where it would lie above or below what is exposed there.
 * @param y what to add to the columns' own y
 * @param hatch the id of a zone's hatch
 */
export function tiesBetween(
  view: ClockView,
  left: SectionColumn,
  right: SectionColumn,
  gap: Gap,
  y: number,
  hatch: (zone: number) => string,
): SvgNode[] {
  const runsLeft = runsOf(left);
  const runsRight = runsOf(right);
  const out: SvgNode[] = [];
  for (let zone = view.zones.length - 1; zone >= 0; zone--) {
    const a = runsLeft.filter((run) => run.zone === zone);
    const b = runsRight.filter((run) => run.zone === zone);
    if (a.length > 0 && b.length > 0)
      for (const [from, to] of partners(a, b)) out.push(tie(view, zone, gap, from, to, y, hatch));
    else if (a.length > 0) for (const run of a) out.push(...runOut(view, zone, gap, run, right, 1, y, hatch));
    else for (const run of b) out.push(...runOut(view, zone, gap, run, left, -1, y, hatch));
  }
  return out;
}

/** Ties that leave a row of the panel towards the sections in the next or the last one. */
export function openTies(
  view: ClockView,
  column: SectionColumn,
  neighbour: SectionColumn,
  gap: Gap,
  side: 'left' | 'right',
  y: number,
  hatch: (zone: number) => string,
): SvgNode[] {
  const beyond = new Set(runsOf(neighbour).map((run) => run.zone));
  return runsOf(column)
    .filter((run) => beyond.has(run.zone))
    .map((run) => {
      const x = side === 'right' ? [gap.left, gap.right] : [gap.right, gap.left];
      const edge = ragged(x[1], run.top + y, run.bottom + y, side === 'right' ? -2.5 : 2.5);
      return band(view, run.zone, `M${x[0]},${run.bottom + y}V${run.top + y}H${x[1]}${edge}Z`, hatch);
    });
}

// A torn edge: the tie goes on elsewhere.
function ragged(x: number, top: number, bottom: number, depth: number): string {
  const steps = Math.max(2, 2 * Math.round((bottom - top) / 8));
  return Array.from(
    { length: steps },
    (_, i) => `L${x + (i % 2 === 0 ? depth : 0)},${top + ((i + 1) * (bottom - top)) / steps}`,
  ).join('');
}

// Every run finds the nearest on the other side.
function partners(a: readonly Run[], b: readonly Run[]): [Run, Run][] {
  const middle = (run: Run) => (run.top + run.bottom) / 2;
  const nearest = (run: Run, others: readonly Run[]) =>
    others.reduce((best, other) =>
      Math.abs(middle(other) - middle(run)) < Math.abs(middle(best) - middle(run)) ? other : best,
    );
  return a.length >= b.length ? a.map((run) => [run, nearest(run, b)]) : b.map((run) => [nearest(run, a), run]);
}

function tie(
  view: ClockView,
  zone: number,
  gap: Gap,
  from: Run,
  to: Run,
  y: number,
  hatch: (zone: number) => string,
): SvgNode {
  return band(view, zone, ribbon(gap, from.top + y, from.bottom + y, to.top + y, to.bottom + y), hatch);
}

function runOut(
  view: ClockView,
  zone: number,
  gap: Gap,
  run: Run,
  lacking: SectionColumn,
  direction: 1 | -1,
  y: number,
  hatch: (zone: number) => string,
): SvgNode[] {
  const contact = contactOf(lacking, zone);
  if (contact === null) return [];
  const middle = (run.top + run.bottom) / 2;
  const wholly = contact.where === 'between';
  const start = direction === 1 ? gap.left : gap.right;
  const end = direction === 1 ? gap.right : gap.left;
  const x = wholly ? end : start + 0.55 * (end - start);
  const at = (wholly ? contact.y : middle) + y;
  const edges = direction === 1 ? { left: start, right: x } : { left: x, right: start };
  const d =
    direction === 1
      ? ribbon(edges, run.top + y, run.bottom + y, at, at)
      : ribbon(edges, at, at, run.top + y, run.bottom + y);
  return [band(view, zone, d, hatch)];
}

// Two even curves: level where they meet the columns.
function ribbon(gap: Gap, topLeft: number, bottomLeft: number, topRight: number, bottomRight: number): string {
  const bend = (gap.left + gap.right) / 2;
  return (
    `M${gap.left},${topLeft}C${bend},${topLeft} ${bend},${topRight} ${gap.right},${topRight}` +
    `V${bottomRight}C${bend},${bottomRight} ${bend},${bottomLeft} ${gap.left},${bottomLeft}Z`
  );
}

function band(view: ClockView, zone: number, d: string, hatch: (zone: number) => string): SvgNode {
  return element('path', {
    d,
    class: 'tie',
    fill: `url(#${hatch(zone)})`,
    stroke: inkOf(view, zone).fill === '' ? undefined : INK,
    'stroke-width': 0.4,
    'stroke-opacity': 0.6,
    'data-z': zoneTag(view, zone),
  });
}
