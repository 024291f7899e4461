import type { Findings } from '../../model/index.js';
import { type Style, safe, wrap } from '../terminal.js';
import { explainBed } from './bed.js';
import { findName, type Named } from './find-name.js';
import { explainRelation } from './relation.js';
import { assumedPassage, type Passage } from './says.js';
import { explainShell } from './shell.js';

/**
 * All that the findings know of one bed, shell or relation, in plain sentences for the terminal.
 *
 * @param names One name (`section/bed`, `section/bed/shell`, `a > b`, `a < b`), or two beds.
 * @throws OutputError when the name is not known or may mean several things.
 */
export function explanation(findings: Findings, names: readonly string[], style: Style): string {
  const passages = [...passagesOf(findings, findName(findings, names)), ...assumedPassage(findings)];
  return `${passages.map((one) => passageText(one, style)).join('\n\n')}\n`;
}

function passagesOf(findings: Findings, named: Named): Passage[] {
  switch (named.kind) {
    case 'bed':
      return explainBed(findings, named.bed);
    case 'shell':
      return explainShell(findings, named.shell);
    case 'relation':
      return explainRelation(findings, named.a, named.b);
  }
}

function passageText({ heading, sentences }: Passage, style: Style): string {
  const lines = sentences.map((sentence) => wrap(`  ${safe(sentence)}`, 78, 4));
  return [style.bold(safe(heading)), ...lines].join('\n');
}
