import type { Findings, Plan } from '../model/index.js';
import { assumedScatter } from './assumed-scatter.js';
import { clocksInView } from './bed-on-clock.js';
import { checkBeds, reversedRelations } from './check-beds.js';
import { dateBeds } from './date-beds.js';
import { withDeposits } from './deposits.js';
import { knownOrder } from './known-order.js';
import type { PlanSettings } from './plan-settings.js';
import { percentInWords } from './plan-words.js';
import { separateBeds } from './separate-beds.js';
import { separateZones } from './separate-zones.js';
import { strengthenBeds } from './strengthen-beds.js';
import { unresolvedPairs } from './unresolved-pairs.js';

/** Options of {@link plan}. */
export interface PlanOptions {
  /** Lines are made for 1 to so many dates. Default 3. */
  readonly dates?: number;
  /** Chance of resolving a pair that shells are counted for. Default 0.8. */
  readonly power?: number;
  /** Shells of one bed beyond which no number is promised. Default 50. */
  readonly most?: number;
  /** Beds named that gain the order most, a clock. Default 10. */
  readonly strengthen?: number;
  /** Level. Default: that of the run. */
  readonly alpha?: number;
}

/**
 * What to collect or date next, worked out from the findings of a run alone (design 7.13): reversed and mixed beds to
 * check first, neighbouring zones and neighbouring beds that more shells would part, beds that gain the order most, and
 * beds to date so that the most others are bracketed. Every line says what it would settle.
 *
 * @param findings of a run, as results.json holds them
 * @throws RangeError when an option is out of its range
 */
export function plan(findings: Findings, options: PlanOptions = {}): Plan {
  const dates = options.dates ?? 3;
  const settings: PlanSettings = {
    alpha: options.alpha ?? findings.options.alpha,
    power: options.power ?? 0.8,
    most: options.most ?? 50,
  };
  if (!(Number.isInteger(dates) && dates >= 0)) {
    throw new RangeError(`plan: dates must be a whole number, 0 or more, got ${dates}`);
  }
  if (!(settings.alpha > 0 && settings.alpha < 1)) {
    throw new RangeError(`plan: alpha must lie between 0 and 1, got ${settings.alpha}`);
  }
  const known = knownOrder(findings, settings.alpha);
  const clocks = clocksInView(findings).map((view) => {
    const deposits = withDeposits(view, known);
    return { view, deposits, pairs: unresolvedPairs(deposits, known, settings.alpha) };
  });
  const reversed = new Set(
    clocks.flatMap(({ view }) => reversedRelations(findings, view.clock).flatMap((row) => [row.lower, row.upper])),
  );
  const rows = [
    ...clocks.flatMap(({ view, pairs }) => checkBeds(findings, view, pairs, settings)),
    ...clocks.flatMap(({ view }) => separateZones(findings, view, settings)),
    ...clocks.flatMap(({ deposits, pairs }) => strengthenBeds(deposits, pairs, options.strengthen ?? 10)),
    ...clocks.flatMap(({ deposits, pairs }) => separateBeds(findings, deposits, pairs, settings)),
    ...(dates > 0 ? dateBeds(findings, known, reversed, dates) : []),
  ];
  return { rows, criterion: criterion(settings), notes: notes(findings) };
}

function criterion({ alpha, power }: PlanSettings): string {
  return (
    `A pair of beds counts as resolved when the order gives one of them a probability of ${percentInWords(1 - alpha)} or more ` +
    `of being the older, as in order.csv. Numbers of shells give a power of ${percentInWords(power)}: of surveys with so many shells ` +
    `in these beds, that share resolves the pair the right way round, if the gap between the two beds is truly as measured and the zones stay as found. ` +
    'The chance from here also counts that the measured gap has an error of its own.'
  );
}

function notes(findings: Findings): string[] {
  return [
    ...assumedScatter(findings).map(
      ({ clock, scatter }) =>
        `On ${clock} a scatter of ${scatter} between the shells of one bed is assumed, and every number of shells rests on it: a few beds of 5 shells would measure it.`,
    ),
    'Shells are those that pass screening: collect a few more for those that will not.',
    'More shells from one place in a bed settle that place; take them from across the bed.',
    'A date bounds its bed only where the dated material is as old as the deposit; shells reworked into it are not.',
    'Collect within local rules and permits, and away from cliffs that fall and tides that cut off.',
  ];
}
