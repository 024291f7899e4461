import type { Findings, ShellRow } from '../../model/index.js';
import { SHELL_MARKS, SHELL_READINGS, SHELL_STATUSES } from '../../output/choices.js';
import { counted, figure, probability } from '../terminal.js';
import { shellChanges } from './changes.js';
import { bedKey, evidenceOf, type Passage, passage } from './says.js';

/** All that is known of one shell; shells of two taxa may share a name, and then each is told of. */
export function explainShell(findings: Findings, name: string): Passage[] {
  const ratios = findings.shell_ratios.filter((row) => shellKey(row) === name);
  const rows = findings.shells.filter((row) => shellKey(row) === name);
  const measured = ratios.map((row) => {
    const values = Object.entries(row.ratios).map(([acid, value]) => `${acid} ${figure(value)}`);
    return `${row.taxon}, ${row.fraction}: D/L ${values.join(', ')}.`;
  });
  if (rows.length === 0) measured.push('It is on no main clock, so nothing was concluded from it.');
  return [...passage(name, measured), ...rows.flatMap((row) => onClock(findings, row, name))];
}

function onClock(findings: Findings, row: ShellRow, name: string): Passage[] {
  const { clock } = row;
  return [
    ...passage(clock, [...valueSentences(findings, row), statusSentence(row), readingSentence(row)]),
    ...passage(
      'Marks',
      row.marks.map((mark) => `${mark.charAt(0).toUpperCase()}${mark.slice(1)}: ${SHELL_MARKS[mark]}.`),
    ),
    ...passage('Evidence', evidenceOf(findings, clock, 'shell', name)),
    ...passage('Conflicts with superposition', conflictSentences(findings, clock, name)),
    ...passage('What would change this', shellChanges(findings, row)),
  ];
}

function valueSentences(findings: Findings, row: ShellRow): string[] {
  const lab = row.lab_id.length > 0 ? `, laboratory number ${row.lab_id.join(' and ')}` : '';
  const sentences = [
    `D/L ${figure(row.dl)} (log ratio ${figure(row.log_ratio)}), from ${counted(row.preparations, 'preparation')}${lab}.`,
  ];
  const scatter = findings.clocks.find(({ clock }) => clock === row.clock)?.scatter;
  if (row.residual === null) sentences.push('It has no other kept shell in its bed to be compared with.');
  else {
    const side = row.residual >= 0 ? 'above' : 'below';
    const times = scatter ? `, ${figure(Math.abs(row.residual) / scatter, 2)} times the scatter between shells` : '';
    sentences.push(
      `It lies ${figure(Math.abs(row.residual), 2)} in log ratio ${side} the other kept shells of its bed${times}.`,
    );
  }
  if (row.zone !== null) {
    const p = row.zone_probability === null ? '' : `, with probability ${probability(row.zone_probability)}`;
    const bed = findings.beds.find((one) => one.clock === row.clock && bedKey(one) === bedKey(row));
    const its = bed?.zone
      ? bed.zone === row.zone
        ? ', as its bed does'
        : `, while its bed belongs to ${bed.zone}`
      : '';
    sentences.push(`By itself it would belong to ${row.zone}${p}${its}.`);
  }
  return sentences;
}

function statusSentence(row: ShellRow): string {
  return `Status: ${row.status}; it ${SHELL_STATUSES[row.status].replace(/^left/, 'is left')}.`;
}

function readingSentence(row: ShellRow): string {
  if (row.reading === 'none') {
    return row.marks.length > 0
      ? 'Reading: none; its marks stand for themselves.'
      : 'Reading: none; nothing is held against it.';
  }
  const sure = row.confidence === null ? '' : `, with ${row.confidence} confidence`;
  return `Reading: ${row.reading}${sure} (${SHELL_READINGS[row.reading]}).`;
}

function conflictSentences(findings: Findings, clock: string, name: string): string[] {
  const mine = findings.conflicts.filter((row) => row.clock === clock && (row.lower === name || row.upper === name));
  const shown = mine.slice(0, 10).map(({ lower, upper, shortfall }) => {
    const short = figure(shortfall, 2);
    return lower === name
      ? `It lies below ${upper}, but its ratio is the smaller, by ${short} in log ratio.`
      : `It lies above ${lower}, but its ratio is the greater, by ${short} in log ratio.`;
  });
  return mine.length > 10 ? [...shown, `${mine.length - 10} more shells contradict it.`] : shown;
}

/** One shell on one line, within the explanation of its bed. */
export function shellLine(row: ShellRow): string {
  const odd = [...row.marks, ...(row.reading === 'none' ? [] : [row.reading])].join('; ');
  return `${row.shell}: D/L ${figure(row.dl)}, ${row.status}${odd === '' ? '' : ` (${odd})`}.`;
}

function shellKey(row: { readonly section: string; readonly bed: string; readonly shell: string }): string {
  return `${bedKey(row)}/${row.shell}`;
}
