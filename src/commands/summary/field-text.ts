import type { RelationRow, ShellRow } from '../../model/index.js';
import { counted, figure, probability, type Style, safe, wrap } from '../terminal.js';
import type { ClockFacts } from './facts.js';

/** Rows of one kind shown before the rest is only counted. */
const SHOWN = 12;

/** The order against the field: relations tested, and the reversed ones by name. */
export function relationsText({ relations, inconsistent_sections }: ClockFacts, style: Style): string[] {
  const { tested, agrees, tied, reversed, resolved } = relations;
  if (tested === 0) return [`  ${style.bold('Superposition')}: no relation could be tested.`];
  const count = reversed.length === 0 ? 'none reversed' : style.red(`${reversed.length} reversed`);
  const lines = [
    `  ${style.bold('Superposition')}: ${counted(tested, 'relation')} tested, ${agrees} agree, ${tied} tied, ${count}.`,
    ...limited(reversed, 'reversed relation', 'relations.csv', reversedText),
    ...limited(resolved, 'relation', 'relations.csv', resolvedText),
  ];
  if (inconsistent_sections.length > 0) {
    const names = inconsistent_sections.map(safe).join(', ');
    lines.push(wrap(`    Sections that contradict their own order as a whole: ${names}.`, 78, 6));
  }
  return lines;
}

function reversedText(row: RelationRow): string {
  const why = row.reading === '' ? '' : ` Reading: ${safe(row.reading)}.`.replace(/\.\.$/, '.');
  const p = row.p_reversed === null ? '' : ` (p ${probability(row.p_reversed)})`;
  return wrap(`    ${safe(row.lower)} should be older than ${safe(row.upper)}, and looks younger${p}.${why}`, 78, 6);
}

function resolvedText(row: RelationRow): string {
  const now = row.verdict_after === 'agrees' ? 'agrees' : row.verdict_after;
  return wrap(`    ${safe(row.lower)} > ${safe(row.upper)} was reversed, and ${now} once shells are set aside.`, 78, 6);
}

/** Shells set aside or doubtful, each with what most likely happened to it. */
export function shellsText({ odd_shells, clock }: ClockFacts, style: Style): string[] {
  if (odd_shells.length === 0) return [`  ${style.bold('Odd shells')}: none of ${counted(clock.shells, 'shell')}.`];
  const aside = odd_shells.filter(({ status }) => status === 'set aside').length;
  const doubtful = odd_shells.length - aside;
  return [
    `  ${style.bold('Odd shells')}: ${aside} set aside, ${doubtful} doubtful, of ${counted(clock.shells, 'shell')}.`,
    ...limited(odd_shells, 'shell', 'shells.csv', shellText),
  ];
}

function shellText(row: ShellRow): string {
  const reading = row.reading === 'none' ? row.marks.join(' and ') || 'no reading' : row.reading;
  const sure = row.confidence === null ? '' : ` (${row.confidence} confidence)`;
  const name = safe(`${row.section}/${row.bed}/${row.shell}`);
  return wrap(`    ${name}, D/L ${figure(row.dl)}, ${row.status}: ${reading}${sure}.`, 78, 6);
}

function limited<Row>(rows: readonly Row[], one: string, file: string, text: (row: Row) => string): string[] {
  const shown = rows.slice(0, SHOWN).map(text);
  const left = rows.length - SHOWN;
  return left > 0 ? [...shown, `    … and ${counted(left, `more ${one}`)}; see ${file}.`] : shown;
}
