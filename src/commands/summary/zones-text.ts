import type { ZoneCountRow } from '../../model/index.js';
import { counted, figure, type Style, safe, textTable, wrap } from '../terminal.js';
import type { ClockFacts } from './facts.js';

/** The zones of one clock: what decided on their number, and a table of them, oldest first. */
export function zonesText(facts: ClockFacts, style: Style): string[] {
  const [first, ...more] = headline(facts).split(/(?<=\.) /);
  const lines = [wrap(`  ${[style.bold(first), ...more, decided(facts)].join(' ')}`.trimEnd(), 78, 2)];
  const { zones } = facts;
  if (zones.length === 0) return lines;
  const withStability = zones.some(({ stability }) => stability !== null);
  const rows = zones.map((zone) => [
    safe(zone.zone),
    figure(zone.dl_mean),
    `${figure(zone.dl_low)} to ${figure(zone.dl_high)}`,
    `${figure(zone.shell_low)} to ${figure(zone.shell_high)}`,
    String(zone.beds),
    String(zone.shells),
    ...(withStability ? [zone.stability === null ? '' : zone.stability.toFixed(2)] : []),
  ]);
  const header = [
    'zone',
    'D/L',
    '95 % of the mean',
    'shells, 1 sd',
    'beds',
    'shells',
    ...(withStability ? ['stable'] : []),
  ];
  const [top, ...rest] = textTable([header, ...rows], [false, true, true, true, true, true, true], 4);
  return [...lines, style.dim(top), ...rest, ...notDistinct(facts)];
}

function headline({ clock, forced, choice }: ClockFacts): string {
  if (choice !== null) return choice;
  const supported = {
    zones: `${clock.zones} zones are supported.`,
    'one zone': 'No separate zones are supported: all beds agree with one.',
    continuum: 'No zones are supported: the ratios run on without gaps.',
    'too few beds': 'Too few beds to tell zones apart.',
  }[clock.verdict];
  if (forced === null) return supported;
  const meant = clock.verdict === 'zones' ? 'the data do support zones' : supported.replace(/\.$/, '').toLowerCase();
  return `${counted(forced, 'zone')} asked for with --zones; ${meant}.`;
}

function decided({ models, clock, forced, choice }: ClockFacts): string {
  if (models.length < 2) return '';
  const ordered = [...models].sort((a, b) => a.bic - b.bic);
  const rival = ordered.find((row) => (row.model === 'continuum') !== (ordered[0].model === 'continuum')) ?? ordered[1];
  const next = ordered[1];
  const against = [...new Set([next, rival])].map((row) => `${gain(row, ordered[0])} above ${modelName(row, 'the')}`);
  const best = `BIC is lowest for ${modelName(ordered[0], 'the')} (${figure(ordered[0].bic, 4)}): `;
  const joined =
    choice === null && forced === null && clock.verdict === 'zones' && ordered[0].model !== String(clock.zones)
      ? ` Neighbours that fail the overlap test were joined, which leaves ${clock.zones}.`
      : '';
  return `${best}${against.map((words) => words.replace(' above ', ' less than for ')).join(', ')}.${joined}`;
}

function gain(row: ZoneCountRow, best: ZoneCountRow): string {
  return figure(row.bic - best.bic, 2);
}

function modelName({ model }: ZoneCountRow, article: string): string {
  return model === 'continuum' ? `${article} continuum` : counted(Number(model), 'zone');
}

function notDistinct({ adjacent }: ClockFacts): string[] {
  return adjacent
    .filter(({ verdict }) => verdict !== 'distinct')
    .map((row) => {
      const why = row.verdict === 'not resolved' ? 'too few shells or beds to resolve' : 'not really distinct';
      return wrap(
        `    ${safe(row.older)} and ${safe(row.younger)}: ${why} (overlap ${figure(row.overlap, 2)}).`,
        78,
        6,
      );
    });
}
