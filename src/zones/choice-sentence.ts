import type { ClockVerdict } from '../model/index.js';
import type { Comparison } from './compare-models.js';

/** What each criterion says of the number of zones. */
export interface Criteria {
  /** What the data support, after everything. */
  readonly verdict: ClockVerdict;
  /** Zones in use where zones are supported, after joining neighbours; 1 else. */
  readonly zones: number;
  /** Number of the user's own, null where the data chose. */
  readonly forced: number | null;
  /** Best number of zones by BIC, and whether the continuum's BIC is lower still. */
  readonly byBic: number;
  readonly continuumByBic: boolean;
  /** null where the statistic is not to be had. */
  /** Zones after the bootstraps and before neighbours were joined; 1 where there were none. */
  readonly beforeJoining: number;
  readonly byGap: number | null;
  readonly bySilhouette: number | null;
  readonly comparisons: readonly Comparison[];
}

/**
 * How the number of zones was chosen and which criteria agree, in sentences for the page.
 * @example
 * choiceSentence({ verdict: 'zones', zones: 3, forced: null, byBic: 3, continuumByBic: false,
 *   beforeJoining: 3, byGap: 3, bySilhouette: 3, comparisons: [] })
 * // => 'The data support 3 zones. BIC, the gap statistic and the silhouette agree.'
 */
export function choiceSentence(criteria: Criteria): string {
  const { verdict, zones, forced, byBic, continuumByBic, beforeJoining, byGap, bySilhouette, comparisons } = criteria;
  const supported = SUPPORT[verdict]?.(zones);
  if (verdict === 'too few beds') return forced === null ? supported : `${supported} ${forcedText(forced)}`;
  const sentences = [supported];
  const settled = verdict === 'zones' ? zones : 1;
  const opinions = [
    { name: 'BIC', says: continuumByBic ? 1 : byBic, text: continuumByBic ? 'BIC prefers a continuum' : undefined },
    { name: 'the gap statistic', says: byGap, text: undefined },
    // a silhouette needs two groups at least, so it has no say where there is one
    { name: 'the silhouette', says: settled === 1 ? null : bySilhouette, text: undefined },
  ].filter((opinion) => opinion.says !== null);
  const agree = opinions.filter((opinion) => opinion.says === settled);
  const other = opinions.filter((opinion) => opinion.says !== settled);
  if (agree.length > 0)
    sentences.push(`${upper(list(agree.map(({ name }) => name)))} ${agree.length > 1 ? 'agree' : 'agrees'}.`);
  for (const { name, says, text } of other) sentences.push(`${upper(text ?? `${name} prefers ${zoneCount(says!)}`)}.`);
  if (verdict === 'zones' && beforeJoining > settled) {
    sentences.push('Neighbours that the overlap test does not tell apart were joined.');
  }
  const bicForZones = byBic > 1 && !continuumByBic;
  sentences.push(
    ...whetherText(
      comparisons.filter(({ of }) => of === 'any'),
      bicForZones,
    ),
    ...comparisons.filter(({ of }) => of === 'these').map((comparison) => theseText(comparison, settled)),
  );
  if (forced !== null) sentences.push(forcedText(forced));
  return sentences.join(' ');
}

const SUPPORT: Record<ClockVerdict, (zones: number) => string> = {
  zones: (zones) => `The data support ${zoneCount(zones)}.`,
  'one zone': () => 'The data support no division into zones: one zone explains all beds.',
  continuum: () => 'The data support no zones: the beds spread evenly over their range.',
  'too few beds': () => 'There are too few beds to look for zones.',
};

/** Whether there are zones at all, where a bootstrap decided it. */
function whetherText(tests: readonly Comparison[], bicForZones: boolean): string[] {
  if (tests.length === 0) return [];
  const rival = (test: Comparison): string =>
    `${test.simpler === 'continuum' ? 'a continuum' : 'one zone'} (${outcome(test)})`;
  const against = tests.find(({ p, level }) => !(p <= level));
  const how = 'A bootstrap that makes the whole choice again in samples without zones';
  if (against !== undefined) {
    return [`${how} does not rule out ${rival(against)}${bicForZones ? ', so no zones are taken' : ''}.`];
  }
  return [`${how} finds ${list(tests.map(rival))} unlikely${bicForZones ? '' : ', and decides for zones'}.`];
}

function theseText(test: Comparison, settled: number): string {
  const { simpler, zones, p, level } = test;
  const rival = simpler === 'continuum' ? 'a continuum' : zoneCount(Number(simpler));
  const note =
    zones > settled && Number(simpler) === settled && p <= level ? '; BIC asks for more, so the simpler stands' : '';
  return `A bootstrap of ${zoneCount(zones)} against ${rival} gives ${outcome(test)}${note}.`;
}

const outcome = ({ p, repeats }: Comparison): string =>
  `p = ${p < 0.001 ? p.toExponential(0) : Number(p.toPrecision(2))}, ${repeats} simulations`;

const forcedText = (forced: number): string =>
  `${upper(zoneCount(forced))} ${forced === 1 ? 'is' : 'are'} used, as you asked.`;

const zoneCount = (zones: number): string => (zones === 1 ? 'one zone' : `${zones} zones`);

const upper = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

function list(names: readonly string[]): string {
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
}
