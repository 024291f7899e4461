import type { Findings } from '../../model/index.js';
import { counted, type Style, safe, wrap } from '../terminal.js';
import { type ClockFacts, type ReadFacts, type SummaryFacts, summaryFacts } from './facts.js';
import { relationsText, shellsText } from './field-text.js';
import { orderText } from './order-text.js';
import { zonesText } from './zones-text.js';

/** The summary of a run as JSON. */
export function summaryJson(findings: Findings, out: string): string {
  return JSON.stringify(summaryFacts(findings, out), null, 2);
}

/** The summary of a run for the terminal, at most 80 columns wide. */
export function summaryText(findings: Findings, out: string, style: Style): string {
  const facts = summaryFacts(findings, out);
  const blocks = [
    [wrap(`${style.bold('Read')} ${readText(facts.read)}`, 78, 2)],
    ...facts.clocks.map((clock) => clockText(clock, style)),
    sentences(facts.findings, ''),
    cautions(facts.cautions, style, ''),
    nextText(facts, style),
  ];
  return `${blocks
    .filter((block) => block.length > 0)
    .map((block) => block.join('\n'))
    .join('\n\n')}\n`;
}

function readText({ shells, beds, sections, taxa, warnings }: ReadFacts): string {
  const names = taxa.length > 0 && taxa.length <= 3 ? ` (${taxa.map(safe).join(', ')})` : '';
  const doubt = warnings > 0 ? `; ${counted(warnings, 'warning')}` : '';
  return (
    `${shells > 0 ? counted(shells, 'shell') : 'published means'} of ${counted(taxa.length, 'taxon', 'taxa')}${names} in ` +
    `${counted(beds, 'bed')} of ${counted(sections, 'section')}${doubt}.`
  );
}

function clockText(facts: ClockFacts, style: Style): string[] {
  const { clock, amino_acids, shells, beds } = facts.clock;
  const acids = amino_acids.length > 1 ? ` of ${amino_acids.join(', ')}` : '';
  return [
    wrap(`${style.bold(safe(clock))}${acids}: ${counted(shells, 'shell')} in ${counted(beds, 'bed')}`, 78, 2),
    ...aboutClock(facts),
    ...zonesText(facts, style),
    ...orderText(facts, style),
    ...relationsText(facts, style),
    ...shellsText(facts, style),
    ...sentences(facts.findings, '  '),
    ...cautions(facts.cautions, style, '  '),
  ];
}

// What an index rests on; a slope along a gradient is told by the remarks.
function aboutClock({ shares }: ClockFacts): string[] {
  const lines: string[] = [];
  if (shares.length > 1) {
    const verdicts = [...new Set(shares.map(({ verdict }) => verdict))];
    const words = verdicts.map((verdict) => {
      const acids = shares.filter((share) => share.verdict === verdict).map(({ amino_acid }) => amino_acid);
      return `${acids.join(', ')} ${acids.length > 1 ? PLURAL[verdict] : verdict}`;
    });
    lines.push(wrap(`  Amino acids: ${words.join('; ')}.`, 78, 4));
  }
  return lines;
}

const PLURAL = { 'carries the resolution': 'carry the resolution', helps: 'help', 'adds noise': 'add noise' } as const;

function sentences(texts: readonly string[], indent: string): string[] {
  return texts.map((text) => wrap(`${indent}${safe(text)}`, 78, indent.length + 2));
}

function cautions(texts: readonly string[], style: Style, indent: string): string[] {
  return texts.map((text) => wrap(`${indent}${style.yellow('Caution:')} ${safe(text)}`, 78, indent.length + 2));
}

function nextText({ written, clocks, next }: SummaryFacts, style: Style): string[] {
  const advice = next.map((text) => wrap(`${style.bold('Next')} ${safe(text)}`, 78, 2));
  const place = `${style.bold('Written')} ${safe(written)}: report.html to read first, tables and figures beside it.`;
  const lines = [...advice, wrap(place, 78, 2)];
  const name = exampleName(clocks);
  if (name !== null) {
    lines.push('More on one bed, shell or relation:', `  bedorder explain ${inShell(written)} ${inShell(name)}`);
  }
  lines.push('What to collect or date next, in full:', `  bedorder plan ${inShell(written)}`);
  return lines;
}

// The most telling thing to look at: a reversed relation, an odd shell, else the oldest bed.
function exampleName(clocks: readonly ClockFacts[]): string | null {
  for (const { relations } of clocks) {
    const row = relations.reversed[0];
    if (row) return `${row.lower} > ${row.upper}`;
  }
  for (const { odd_shells } of clocks) {
    const row = odd_shells[0];
    if (row) return `${row.section}/${row.bed}/${row.shell}`;
  }
  const bed = clocks[0]?.order[0];
  return bed ? `${bed.section}/${bed.bed}` : null;
}

function inShell(text: string): string {
  return /^[\w./-]+$/.test(text) ? text : `"${safe(text).replace(/(["$`\\])/g, '\\$1')}"`;
}
