import type { Findings, RelationRow } from '../../model/index.js';
import { BASES, RELATION_VERDICTS } from '../../output/choices.js';
import { figure, probability } from '../terminal.js';
import { relationChanges } from './changes.js';
import { bedKey, evidenceOf, type Passage, passage } from './says.js';

/** All that is known of how two beds stand to each other; `a` was named as the older. */
export function explainRelation(findings: Findings, a: string, b: string): Passage[] {
  const rows = findings.relations.filter(
    ({ lower, upper }) => (lower === a && upper === b) || (lower === b && upper === a),
  );
  const clocks = findings.clocks.filter(({ main }) => main).map(({ clock }) => clock);
  const field = rows[0] ? fieldSentence(rows[0]) : `No field relation ties ${a} and ${b} directly.`;
  return [
    ...passage(rows[0] ? `${rows[0].lower} > ${rows[0].upper}` : `${a} and ${b}`, [field]),
    ...clocks.flatMap((clock) =>
      onClock(
        findings,
        clock,
        a,
        b,
        rows.filter((row) => row.clock === clock),
      ),
    ),
  ];
}

function fieldSentence({ lower, upper, kind, basis, certainty }: RelationRow): string {
  const says = kind === 'same' ? `${lower} is as old as ${upper}` : `${lower} is older than ${upper}`;
  return `The field says that ${says}: ${basis} (${BASES[basis]}), ${certainty}.`;
}

function onClock(findings: Findings, clock: string, a: string, b: string, rows: readonly RelationRow[]): Passage[] {
  const beds = [a, b].map((name) => findings.beds.find((row) => row.clock === clock && bedKey(row) === name));
  if (beds.some((bed) => bed === undefined)) return [];
  const values = beds.map((bed) => {
    const mean = bed?.dl_mean === null || bed?.dl_mean === undefined ? 'no mean' : `D/L ${figure(bed.dl_mean)}`;
    return `${bed && bedKey(bed)}: ${mean}, ${bed?.zone ?? 'no zone'}.`;
  });
  return [
    ...passage(clock, [...values, ...pairSentences(findings, clock, a, b), ...rows.flatMap(testSentences)]),
    ...rows.flatMap((row) => [
      ...passage('Evidence', evidenceOf(findings, clock, 'relation', `${row.lower} > ${row.upper}`)),
      ...passage('What would change this', relationChanges(findings, row)),
    ]),
  ];
}

function pairSentences(findings: Findings, clock: string, a: string, b: string): string[] {
  const pair = findings.pairs.find(
    (row) => row.clock === clock && ((row.bed_a === a && row.bed_b === b) || (row.bed_a === b && row.bed_b === a)),
  );
  if (!pair) return rankSentence(findings, clock, a, b);
  const p = pair.bed_a === a ? pair.p_a_older : 1 - pair.p_a_older;
  const [older, chance] = p >= 0.5 ? [a, p] : [b, 1 - p];
  const together =
    pair.p_same_zone === null ? '' : ` They share a zone with probability ${probability(pair.p_same_zone)}.`;
  return [`In the order, ${older} is the older of the two with probability ${probability(chance)}.${together}`];
}

function rankSentence(findings: Findings, clock: string, a: string, b: string): string[] {
  const ranks = [a, b].map((name) => findings.order.find((row) => row.clock === clock && bedKey(row) === name));
  const words = ranks.map((row) => row && `${bedKey(row)} has rank ${row.rank} (${row.rank_low} to ${row.rank_high})`);
  return words.every((word) => word !== undefined) ? [`In the order, ${words.join(', and ')}.`] : [];
}

function testSentences(row: RelationRow): string[] {
  const sentences: string[] = [];
  if (row.difference !== null && row.z !== null && row.p_reversed !== null) {
    const side = row.difference >= 0 ? 'higher' : 'lower';
    sentences.push(
      `The mean log ratio of ${row.lower} is ${figure(Math.abs(row.difference), 2)} ${side} than that of ${row.upper} ` +
        `(z ${figure(row.z, 2)}, p of a reversed order ${probability(row.p_reversed)}).`,
    );
  }
  sentences.push(`Verdict on all shells: ${row.verdict}; ${RELATION_VERDICTS[row.verdict]}.`);
  sentences.push(
    row.verdict_after === row.verdict
      ? 'It is the same after shells were set aside.'
      : `After shells were set aside: ${row.verdict_after}; ${RELATION_VERDICTS[row.verdict_after]}.`,
  );
  if (row.reading !== '' && row.reading !== 'none') sentences.push(`Reading: ${row.reading}`);
  return sentences;
}

/** One relation on one line, within the explanation of a bed. */
export function relationLine({ lower, upper, kind, basis, verdict, verdict_after }: RelationRow): string {
  const after = verdict_after === verdict ? '' : `, ${verdict_after} after setting shells aside`;
  return `${lower} ${kind === 'same' ? '=' : '>'} ${upper} (${basis}): ${verdict}${after}.`;
}
