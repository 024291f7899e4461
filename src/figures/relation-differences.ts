import * as Plot from '@observablehq/plot';
import type { RelationRow } from '../model/index.js';
import type { ClockView } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { foremost } from './foremost.js';
import { AXIS, housePlot, tagged } from './house-plot.js';
import { padded } from './numbers.js';
import { everReversed, relationNumbers } from './reversed-marks.js';
import { shorten } from './text-width.js';
import { ALARM, INK, PAPER, SOFT, TYPE, WIDE } from './theme.js';

const LINE = 12;
const MOST = 60;

/** How far every tested relation agrees: the lower bed's log ratio minus the upper's; null when none was tested. */
export function relationDifferences(view: ClockView): Figure | null {
  const tested = view.relations.filter((row) => row.difference !== null && row.z !== null && row.z !== 0);
  if (tested.length === 0) return null;
  const rank = (row: RelationRow) => (row.verdict_after === 'reversed' ? 0 : everReversed(row) ? 1 : 2);
  const least = foremost(tested, MOST, (a, b) => rank(a) - rank(b) || a.difference! - b.difference!);
  const rows = least.map((row, i) => ({ row, y: 12 + (i + 0.5) * LINE, se: Math.abs(row.difference! / row.z!) }));
  const numbers = relationNumbers(view);
  const labels = 250;
  const bottom = 12 + rows.length * LINE;
  const [low, high] = padded(
    Math.min(0, ...rows.map((entry) => entry.row.difference! - 1.96 * entry.se)),
    Math.max(0, ...rows.map((entry) => entry.row.difference! + 1.96 * entry.se)),
  );
  const bedsOf = (row: RelationRow) =>
    [row.lower, row.upper].flatMap((key) => view.byKey.get(key)?.id ?? []).join(' ') || undefined;
  const tags = tagged((i) => ({ 'data-b': bedsOf(rows[i].row) }));
  const body = housePlot({
    width: WIDE,
    height: bottom + 38,
    marginLeft: labels,
    marginRight: 30,
    marginTop: 12,
    marginBottom: 38,
    x: { domain: [low, high] },
    y: { type: 'identity', axis: null },
    marks: [
      Plot.gridX({ stroke: INK, strokeOpacity: 0.1 }),
      low < 0 ? Plot.rect([0], { x1: low, x2: 0, y1: 12, y2: bottom, fill: ALARM, fillOpacity: 0.07 }) : null,
      Plot.ruleX([0], { stroke: INK, strokeWidth: 1 }),
      Plot.ruleY(rows, {
        x1: (entry) => entry.row.difference! - 1.96 * entry.se,
        x2: (entry) => entry.row.difference! + 1.96 * entry.se,
        y: 'y',
        stroke: (entry) => (entry.row.verdict_after === 'reversed' ? ALARM : INK),
        strokeWidth: 1.1,
        render: tags,
      }),
      Plot.dot(rows, {
        x: (entry) => entry.row.difference!,
        y: 'y',
        r: 3.1,
        symbol: (entry: (typeof rows)[number]) =>
          everReversed(entry.row) ? 'square' : entry.row.kind === 'same' ? 'triangle' : 'circle',
        fill: (entry) =>
          entry.row.verdict_after === 'reversed' ? ALARM : entry.row.verdict_after === 'agrees' ? INK : PAPER,
        stroke: (entry) => (entry.row.verdict_after === 'reversed' ? ALARM : INK),
        strokeWidth: 1,
        render: tags,
      }),
      Plot.text(rows, {
        x: low,
        y: 'y',
        dx: -8,
        text: (entry) => {
          const half = (labels - 62) / 2;
          return `${shorten(entry.row.lower, TYPE.small, half)} below ${shorten(entry.row.upper, TYPE.small, half)}`;
        },
        textAnchor: 'end',
        fontSize: TYPE.small,
        render: tags,
      }),
      Plot.text(
        rows.filter((entry) => numbers.has(entry.row)),
        {
          x: high,
          y: 'y',
          dx: 6,
          text: (entry) => numbers.get(entry.row)!,
          textAnchor: 'start',
          fontSize: TYPE.small,
          fontWeight: 700,
          fill: ALARM,
        },
      ),
      Plot.axisX({ ...AXIS, label: 'log ratio of the lower bed minus that of the upper', labelOffset: 32, fill: SOFT }),
    ],
  });
  return finishFigure({
    name: `relations${view.suffix}`,
    title: `Field relations against the ratios${view.heading}`,
    caption: `Each line is one relation with the 95 % interval of the difference: right of zero the lower bed has the higher ratio, as it should. Filled signs agree, open ones are tied (triangles: relations of one age), red squares (numbered) are reversed, open squares were reversed until odd shells were set aside.${tested.length > rows.length ? ` The ${rows.length} least agreeable of ${tested.length} are drawn.` : ''}`,
    alt: `${tested.length} relations: ${['agrees', 'tied', 'reversed'].map((verdict) => `${tested.filter((row) => row.verdict_after === verdict).length} ${verdict}`).join(', ')}. Reversed: ${
      least
        .filter((row) => row.verdict_after === 'reversed')
        .slice(0, 20)
        .map((row) => `${row.lower} below ${row.upper}`)
        .join('; ') || 'none'
    }.`,
    width: WIDE,
    height: bottom + 40,
    body: [body],
  });
}
