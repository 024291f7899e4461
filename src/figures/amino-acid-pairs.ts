import * as Plot from '@observablehq/plot';
import { AMINO_ACIDS, type AminoAcid, type ByAminoAcid, type Findings, type ShellRatios } from '../model/index.js';
import { type BedView, type ClockView, type ShellView, shellsOf } from './clock-view.js';
import { type Figure, finishFigure, label } from './figure.js';
import { AXIS, housePlot, ratioLabel, ratioTicks } from './house-plot.js';
import { extent, padded } from './numbers.js';
import { type ShellPoint, shellDots } from './shell-dots.js';
import { shellSign } from './signs.js';
import type { SvgNode } from './svg-node.js';
import { FAINT, INK, MOST_SHELLS, PAPER, TYPE, WIDE } from './theme.js';
import { zoneLegend } from './zone-legend.js';

const MOST_PANELS = 6;

/** Amino acids against each other, one small plot a pair, screened shells by shape; null with fewer than two. */
export function aminoAcidPairs(view: ClockView, findings: Findings): Figure | null {
  if (!findings.shell_ratios.some((row) => isOn(view, row) && hasTwo(row.ratios))) return null;
  const shells = entriesOf(view, findings);
  const pairs = commonPairs(shells).slice(0, MOST_PANELS);
  if (pairs.length === 0) return null;
  const across = Math.min(3, pairs.length === 4 ? 2 : pairs.length);
  const gap = 14;
  const width = Math.min((WIDE - gap * (across - 1)) / across, 330);
  const height = Math.min(width, 290);
  const body: SvgNode[] = [];
  pairs.forEach(([first, second], i) => {
    const left = (i % across) * (width + gap);
    const top = Math.floor(i / across) * (height + 8);
    body.push(panel(view, shells, first, second, width, height, left, top));
  });
  const bottom = Math.ceil(pairs.length / across) * (height + 8);
  const fill = view.inks[Math.floor((view.inks.length - 1) / 3)].fill;
  const sheet = across === 1 ? width + 8 : WIDE;
  const key = zoneLegend(view, 44, bottom + 12, sheet - 50, [
    { sign: [shellSign('doubtful', fill)], half: 4, text: 'doubtful' },
    { sign: [shellSign('set aside', PAPER)], half: 4, text: 'set aside' },
  ]);
  const odd = shells.filter((entry) => entry.shell.row.status !== 'kept').length;
  return finishFigure({
    name: `amino-acids${view.suffix}`,
    title: `Amino acids against each other${view.heading}`,
    caption: `D/L of every shell in two amino acids, both axes logarithmic. Sound shells of one taxon follow one line; a shell beside the line was contaminated, heated or leached, a shell far along the line from its bed more likely comes from an older or a younger deposit. ${odd === 0 ? 'No shell was marked.' : `The ${odd} doubtful or set-aside ones are marked by shape.`}${shells.length > MOST_SHELLS / 4 ? ' So many shells are drawn thinned; shells.csv holds all.' : ''}`,
    alt: `${pairs.map((pair) => pair.join(' against ')).join('; ')}: D/L of ${shells.length} shells, ${odd} of them doubtful or set aside.`,
    width: sheet,
    height: bottom + 8 + key.height,
    body: [...body, key.node],
  });
}

interface Entry {
  readonly bed: BedView;
  readonly shell: ShellView;
  readonly own: ByAminoAcid;
}

const isOn = ({ clock }: ClockView, row: ShellRatios) => row.taxon === clock.taxon && row.fraction === clock.fraction;

function hasTwo(ratios: ByAminoAcid): boolean {
  let count = 0;
  for (const name in ratios) if (ratios[name as AminoAcid] !== undefined && ++count === 2) return true;
  return false;
}

/** The shells of a clock with all their ratios. */
function entriesOf(view: ClockView, findings: Findings): Entry[] {
  const ratios = new Map<string, ByAminoAcid>();
  for (const row of findings.shell_ratios)
    if (isOn(view, row)) ratios.set(`${row.section}/${row.bed}/${row.shell}`, row.ratios);
  const entries: Entry[] = [];
  for (const bed of view.beds)
    for (const shell of shellsOf(view, bed)) {
      const own = ratios.get(`${bed.key}/${shell.row.shell}`);
      if (own !== undefined) entries.push({ bed, shell, own });
    }
  return entries;
}

function panel(
  view: ClockView,
  shells: readonly Entry[],
  first: AminoAcid,
  second: AminoAcid,
  width: number,
  height: number,
  left: number,
  top: number,
): SvgNode {
  const points: ShellPoint[] = [];
  for (const { bed, shell, own } of shells) {
    const [a, b] = [own[first], own[second]];
    if (a !== undefined && b !== undefined) points.push({ bed, shell, x: Math.log(a), y: Math.log(b) });
  }
  const x = padded(...extent(points, (p) => p.x));
  const y = padded(...extent(points, (p) => p.y));
  const odd = points.filter((p) => p.shell.row.status !== 'kept');
  const kept = points.filter((p) => p.shell.row.status === 'kept');
  const drawn = [...thinned(kept, MOST_SHELLS / 4), ...thinned(odd, MOST_SHELLS / 10)];
  const ticksX = ratioTicks(x[0], x[1], width - 60, 26);
  const ticksY = ratioTicks(y[0], y[1], height - 60, 16);
  const group = housePlot(
    {
      width,
      height,
      marginLeft: 46,
      marginRight: 8,
      marginTop: 12,
      marginBottom: 40,
      x: { domain: x },
      y: { domain: y },
      marks: [
        Plot.gridX({ ticks: ticksX.map(Math.log), stroke: INK, strokeOpacity: 0.1 }),
        Plot.gridY({ ticks: ticksY.map(Math.log), stroke: INK, strokeOpacity: 0.1 }),
        Plot.frame({ stroke: FAINT, strokeWidth: 0.7 }),
        shellDots(view, drawn, 2.3),
        Plot.axisX({
          ...AXIS,
          ticks: ticksX.map(Math.log),
          tickFormat: (v: number) => ratioLabel(Math.exp(v)),
          label: `D/L ${first}`,
          labelOffset: 32,
        }),
        Plot.axisY({
          ...AXIS,
          ticks: ticksY.map(Math.log),
          tickFormat: (v: number) => ratioLabel(Math.exp(v)),
          label: `D/L ${second}`,
          labelOffset: 42,
        }),
      ],
    },
    left,
    top,
  );
  group.append(label(52, 24, `${points.length} shells`, { 'font-size': TYPE.tiny, 'text-anchor': 'start' }));
  return group;
}

const thinned = <Item>(items: readonly Item[], most: number): Item[] => {
  const every = Math.ceil(items.length / most);
  return items.filter((_, i) => i % every === 0);
};

/** Pairs of amino acids measured together, on most shells first; each with the faster known one on the first axis. */
function commonPairs(all: readonly Entry[]): [AminoAcid, AminoAcid][] {
  const counts = AMINO_ACIDS.map(() => new Array<number>(AMINO_ACIDS.length).fill(0));
  for (const { own } of all) {
    const measured = [...AMINO_ACIDS.keys()].filter((i) => own[AMINO_ACIDS[i]] !== undefined);
    for (const first of measured) for (const second of measured) counts[first][second]++;
  }
  const pairs: { pair: [AminoAcid, AminoAcid]; shells: number }[] = [];
  AMINO_ACIDS.forEach((first, i) => {
    for (let k = i + 1; k < AMINO_ACIDS.length; k++)
      if (counts[i][k] >= 2) pairs.push({ pair: [first, AMINO_ACIDS[k]], shells: counts[i][k] });
  });
  return pairs.sort((a, b) => b.shells - a.shells).map((entry) => entry.pair);
}
