import type { BedRow, BedSite, Findings, OrderRow } from '../../model/index.js';
import { BED_MARKS } from '../../output/choices.js';
import { counted, figure, probability } from '../terminal.js';
import { bedChanges } from './changes.js';
import { relationLine } from './relation.js';
import { bedKey, evidenceOf, type Passage, passage } from './says.js';
import { shellLine } from './shell.js';

/** All that is known of one bed. */
export function explainBed(findings: Findings, name: string): Passage[] {
  const site = findings.sites.find((one) => bedKey(one) === name);
  const rows = findings.beds.filter((row) => bedKey(row) === name);
  const where = site ? siteSentences(site) : [];
  if (rows.length === 0) where.push('It has no shells on a main clock, so it is in no zone and no order.');
  return [
    ...passage(name, where),
    ...rows.flatMap((row) => onClock(findings, row, name)),
    ...passage('To date', datingSentences(findings, name)),
  ];
}

function siteSentences(site: BedSite): string[] {
  const kinds = {
    level: (value: number) => `at level ${value} of its section, counted upwards`,
    height_m: (value: number) => `with its base at a height of ${value} m`,
    depth_m: (value: number) => `at a depth of ${value} m`,
  };
  const place = site.place ? kinds[site.place.kind](site.place.value) : 'with no place in its section';
  const sentences = [`A bed of section ${site.section}, ${place}.`];
  if (site.elevation_m !== null) sentences.push(`It lies ${site.elevation_m} m above present sea level.`);
  if (site.burial_m !== null) sentences.push(`${site.burial_m} m of cover lie above its shells.`);
  if (site.note) sentences.push(`Note: ${site.note}`);
  return sentences;
}

function onClock(findings: Findings, row: BedRow, name: string): Passage[] {
  const { clock } = row;
  const relations = findings.relations.filter(
    (one) => one.clock === clock && (one.lower === name || one.upper === name),
  );
  const shells = findings.shells.filter((one) => one.clock === clock && bedKey(one) === name);
  return [
    ...passage(clock, [...valueSentences(row), ...zoneSentences(row), ...orderSentences(findings, row)]),
    ...passage('Marks and reading', [
      ...row.marks.map((mark) => `${capital(mark)}: ${BED_MARKS[mark]}.`),
      ...(row.reading === '' || row.reading === 'none' ? [] : [`Reading: ${row.reading}`]),
      ...evidenceOf(findings, clock, 'bed', name),
    ]),
    ...passage('Relations', relations.map(relationLine)),
    ...passage('Shells', shells.map(shellLine)),
    ...passage('Amino acids that disagree', voteSentences(findings, clock, name)),
    ...passage('What would change this', bedChanges(findings, row)),
    ...passage('In the plan', planSentences(findings, clock, name)),
  ];
}

function valueSentences(row: BedRow): string[] {
  const aside = row.set_aside > 0 ? `, and ${counted(row.set_aside, 'shell')} set aside` : '';
  if (row.dl_mean === null) return [`${counted(row.shells, 'shell')} kept${aside}; it has no mean on this clock.`];
  const sd = row.dl_sd === null ? '' : `, with a standard deviation of ${figure(row.dl_sd, 2)} between shells`;
  const se = row.dl_se === null ? '' : ` (standard error ${figure(row.dl_se, 2)})`;
  const mean = row.log_mean === null ? '' : ` Its mean log ratio is ${figure(row.log_mean)}${pm(row.log_se)}.`;
  return [`Mean D/L ${figure(row.dl_mean)}${se}${sd}, from ${counted(row.shells, 'shell')}${aside}.${mean}`];
}

function pm(se: number | null): string {
  return se === null ? '' : `, standard error ${figure(se, 2)}`;
}

function zoneSentences(row: BedRow): string[] {
  if (row.zone === null) return ['It is in no zone.'];
  const p = row.zone_probability === null ? '' : `, with probability ${probability(row.zone_probability)}`;
  const second =
    row.second_zone !== null && row.second_probability !== null
      ? ` Second best is ${row.second_zone}, with ${probability(row.second_probability)}.`
      : '';
  const straddles = row.straddles ? ' It straddles the two: no zone reaches 0.9.' : '';
  return [`Zone ${row.zone}${p}.${second}${straddles}`];
}

function orderSentences(findings: Findings, row: BedRow): string[] {
  const order = findings.order.filter(({ clock }) => clock === row.clock).sort((a, b) => a.rank - b.rank);
  const at = order.findIndex((one) => bedKey(one) === bedKey(row));
  if (at < 0) return ['It has no place in the order.'];
  const mine = order[at];
  const sentences = [
    `Rank ${mine.rank} of ${order.length} from the oldest (95 % interval ${mine.rank_low} to ${mine.rank_high}).`,
  ];
  if (at > 0) sentences.push(step(order[at - 1], bedKey(order[at - 1]), bedKey(row)));
  if (at + 1 < order.length) sentences.push(step(mine, bedKey(row), bedKey(order[at + 1])));
  return sentences;
}

function step(row: OrderRow, older: string, younger: string): string {
  if (row.p_older_than_next === null) return `${older} comes before ${younger}.`;
  const p = probability(row.p_older_than_next);
  return `${older} is older than ${younger} with probability ${p}${row.resolved ? '' : ', which is not resolved'}.`;
}

function voteSentences(findings: Findings, clock: string, name: string): string[] {
  return findings.votes
    .filter((row) => row.clock === clock && (row.bed_a === name || row.bed_b === name))
    .slice(0, 10)
    .map(({ bed_a, bed_b, votes }) => {
      const words = votes.map(({ amino_acid, older, p }) => `${amino_acid} says ${older} (${probability(p)})`);
      return `Which of ${bed_a} and ${bed_b} is older: ${words.join(', ')}.`;
    });
}

/** Lines of the plan that ask for shells of the bed; of several sizes of one collection, the middle one. */
function planSentences(findings: Findings, clock: string, name: string): string[] {
  const own = findings.plan.filter((row) => row.clock === clock && row.beds.includes(name));
  const lines = own.filter((row) => row.kind !== 'strengthen bed' || row.total === 5);
  return lines.slice(0, 6).map(({ settles }) => settles);
}

/** Lines of the plan that would date the bed. */
const datingSentences = (findings: Findings, name: string): string[] =>
  findings.plan.filter((row) => row.kind === 'date beds' && row.beds.includes(name)).map(({ settles }) => settles);

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
