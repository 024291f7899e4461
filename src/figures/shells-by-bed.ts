import { bedColumns, bedNote } from './bed-rows.js';
import { type BedView, type ClockView, shellRatio, shellsOf } from './clock-view.js';
import { type Figure, finishFigure } from './figure.js';
import { legend } from './legend.js';
import { padded, ratio } from './numbers.js';
import { logSd, shellColumn } from './shell-column.js';
import { shellsSummarised } from './shells-summarised.js';
import { meanSign, shellSign } from './signs.js';
import { element } from './svg-node.js';
import { INK, MOST_BEDS, MOST_SHELLS, PAPER, WIDE } from './theme.js';

/** Log ratios of all shells, one line a bed, beds listed by zone with the youngest on top; null without shells. */
export function shellsByBed(view: ClockView): Figure | null {
  if (view.beds.length > MOST_BEDS || view.clock.shells > MOST_SHELLS) return shellsSummarised(view);
  const shells = view.beds.flatMap((bed) => shellsOf(view, bed));
  const values = [
    ...view.beds.flatMap((bed) => shellsOf(view, bed).map(({ row }) => shellRatio(view, bed, row))),
    ...view.beds.flatMap(reachOfBed),
    ...(view.zoned ? view.zones.flatMap((zone) => [Math.log(zone.shell_low), Math.log(zone.shell_high)]) : []),
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
  const shape = {
    domain: [low, high],
    top,
    bottom,
    width,
    labels,
    notes,
    line: lineHeight,
    columns: columns.length,
  } as const;
  const body = columns.map((column, c) => shellColumn(view, column, shape, c * (width + gap)));
  const fill = view.inks[Math.floor((view.inks.length - 1) / 3)].fill;
  const key = legend(
    [
      ...(['kept', 'doubtful', 'set aside'] as const)
        .filter((status) => shells.some((shell) => shell.row.status === status))
        .map((status) => ({
          sign: [shellSign(status, status === 'set aside' ? PAPER : fill)],
          half: 4,
          text: WORDS[status],
        })),
      ...(view.beds.some((bed) => bed.shells.length === 0 && logSd(bed) > 0)
        ? [
            {
              sign: [
                element('rect', { x: -8, y: -3.2, width: 16, height: 6.4, fill, stroke: INK, 'stroke-width': 0.6 }),
              ],
              half: 8,
              text: 'published: 1 standard deviation of shells',
            },
          ]
        : []),
      { sign: [meanSign()], half: 8, text: 'mean of the bed with its 95 % interval' },
    ],
    labels,
    bottom + 48,
    WIDE - labels,
  );
  const aside = shells.filter((shell) => shell.row.status === 'set aside').length;
  return finishFigure({
    name: `shells${view.suffix}`,
    title: `${shells.length === 0 ? 'Mean log ratios of the beds' : 'Log ratios of all shells by bed'}${view.heading}`,
    caption: `One line a bed, ${view.zoned ? 'grouped by zone with the youngest zone and bed on top' : 'the youngest on top'}; older beds lie further to the right. ${whatToSee(view, shells.length, aside)} ${ranges(view)}`,
    alt: `${view.clock.shells} shells of ${view.combined?.join(' and ') ?? view.clock.taxon} in ${view.beds.length} beds. ${view.zones.map((zone) => `${zone.zone}: ${zone.beds} beds, D/L ${ratio(zone.dl_mean)}`).join('; ')}. ${aside} shells set aside.`,
    width: WIDE,
    height: bottom + 44 + key.height,
    body: [...body, key.node],
  });
}

const WORDS = { kept: 'shell', doubtful: 'doubtful shell, counted', 'set aside': 'shell set aside' } as const;

/** Ends of what is drawn of a bed beside its shells. */
function reachOfBed(bed: BedView): number[] {
  const { log_mean, log_se } = bed.row;
  if (log_mean === null) return [];
  const reach = Math.max(1.96 * (log_se ?? 0), bed.shells.length === 0 ? logSd(bed) : 0);
  return [log_mean - reach, log_mean + reach];
}

const ranges = (view: ClockView) =>
  [
    view.zoned
      ? 'The darker part of each band spans one standard deviation of shells either side of the zone mean.'
      : '',
    view.gradient?.used ? `The slope along ${view.gradient.column} is taken out of every ratio.` : '',
  ].join(' ');

/** What the reader should look for: odd shells where shells are drawn, else how the means lie. */
function whatToSee(view: ClockView, shells: number, aside: number): string {
  if (shells > 0)
    return `Look for shells that stand apart from their own line${['', ': the crossed one was set aside'][aside] ?? `: the ${aside} crossed ones were set aside`}.`;
  return view.combined === null
    ? 'Only means were published, so no shell is drawn; look for beds whose interval reaches into another zone.'
    : 'Shells stand in the figures of their own taxa; look for beds whose interval reaches into another zone.';
}
