import { isAlias, isMap, isScalar, LineCounter, type Node, type Pair, parseDocument, visit } from 'yaml';
import { decodeText } from './decode-text.js';
import type { ProblemList } from './problem-list.js';
import type { FileBytes } from './read-table.js';
import { plainKey } from './settings-schema.js';

/** What a settings file holds, and on which line each of its keys stands. */
export interface ParsedSettings {
  readonly values: Readonly<Record<string, unknown>>;
  readonly lineOf: (path: readonly string[]) => number | null;
}

/** Mappings within mappings that settings may have; they need two. */
const DEEPEST = 8;

/**
 * Parses a settings file as YAML 1.2: one mapping, without aliases, nested no deeper than settings need.
 *
 * @returns null when it can't be read; why is in `problems`
 */
export function parseSettings({ file, bytes }: FileBytes, problems: ProblemList): ParsedSettings | null {
  const decoded = decodeText(bytes);
  if ('refused' in decoded) {
    problems.error('binary', { file }, 'This is no text file. Wanted are settings in YAML, such as "alpha: 0.05".');
    return null;
  }
  const deep = tooDeep(decoded.text);
  if (deep !== null) {
    problems.error(
      'depth',
      { file, line: deep },
      'The settings are nested too deeply. Wanted is one option a line, such as "alpha: 0.05".',
    );
    return null;
  }
  const lines = new LineCounter();
  const document = parseDocument(decoded.text, { lineCounter: lines, prettyErrors: false, uniqueKeys: true });
  for (const fault of document.errors) {
    const line = lines.linePos(fault.pos[0]).line;
    problems.error(
      'yaml',
      { file, line },
      `The line is no YAML that can be read (${fault.message}). Wanted is one option a line, such as "alpha: 0.05".`,
    );
  }
  if (document.errors.length > 0) return null;
  const lineOf = (node: unknown): number | null => {
    const start = (node as Node | null | undefined)?.range?.[0];
    return start === undefined ? null : lines.linePos(start).line;
  };
  let alias: Node | null = null;
  visit(document, {
    Alias: (_, node) => {
      alias = node;
      return visit.BREAK;
    },
  });
  if (alias !== null || isAlias(document.contents)) {
    problems.error(
      'alias',
      { file, line: lineOf(alias) },
      'Settings need no YAML aliases (*name). Write the value itself.',
    );
    return null;
  }
  if (document.contents === null) return { values: {}, lineOf: () => null };
  if (!isMap(document.contents)) {
    problems.error(
      'form',
      { file, line: lineOf(document.contents) },
      'Wanted is one option a line, such as "alpha: 0.05".',
    );
    return null;
  }
  const contents = document.contents;
  return {
    values: contents.toJSON() as Record<string, unknown>,
    lineOf: (path) => {
      let node: unknown = contents;
      let line = lineOf(node);
      for (const key of path) {
        const matches = (item: Pair) => isScalar(item.key) && plainKey(String(item.key.value)) === key;
        const pair: Pair | undefined = isMap(node) ? node.items.findLast(matches) : undefined;
        if (pair === undefined) break;
        line = lineOf(pair.key) ?? line;
        node = pair.value;
      }
      return line;
    },
  };
}

/** Line on which brackets, or `- ` and indented keys, nest deeper than settings need; null when none does. */
function tooDeep(text: string): number | null {
  let flow = 0;
  let line = 0;
  const indents: number[] = [];
  for (const content of text.split(/\r\n?|\n/)) {
    line += 1;
    for (const sign of content.replace(/#.*$/, '')) {
      if (sign === '[' || sign === '{') flow += 1;
      else if ((sign === ']' || sign === '}') && flow > 0) flow -= 1;
      if (flow > DEEPEST) return line;
    }
    if (content.trim() === '') continue;
    const opening = /^(?:[ \t]|[-?:](?=[ \t]|$))*/.exec(content)![0];
    const steps = opening.replace(/[ \t]/g, '').length;
    if (steps > DEEPEST) return line;
    while (indents.length > 0 && indents[indents.length - 1] >= opening.length) indents.pop();
    indents.push(opening.length);
    if (indents.length + steps > DEEPEST) return line;
  }
  return null;
}
