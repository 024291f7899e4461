import { isAlias, isMap, isScalar, LineCounter, type Node, parseDocument, visit } from 'yaml';
import { z } from 'zod';
import { AMINO_ACIDS, type AminoAcid, type InputFile, type Problem, type ScreeningLimits } from '../model/index.js';
import { aminoAcidOf } from './column-names.js';
import { decodeText } from './decode-text.js';
import { nearestName } from './edit-distance.js';
import { createProblemList, type ProblemList } from './problem-list.js';
import type { FileBytes } from './read-table.js';
import { sha256 } from './sha256.js';

const name = z.union([z.string().trim().min(1), z.number().transform(String)], 'a name is wanted');
const flag = z.boolean('true or false is wanted');
const whole = (low: number, high: number) =>
  z
    .number(`a whole number from ${low} to ${high} is wanted`)
    .int(`a whole number from ${low} to ${high} is wanted`)
    .min(low, `a whole number from ${low} to ${high} is wanted`)
    .max(high, `a whole number from ${low} to ${high} is wanted`);
const above = (low: number, what: string) =>
  z.number(`${what} is wanted`).gt(low, `${what} is wanted`).max(1e6, `${what} is wanted`);
const word = <const T extends readonly string[]>(words: T) => z.enum(words, `one of ${words.join(', ')} is wanted`);

const CODES = `amino-acid codes (${AMINO_ACIDS.join(', ')}) or all are wanted`;
const codes = z
  .union([z.string(), z.array(z.string(CODES), CODES)], CODES)
  .transform((value, context): AminoAcid[] | 'all' => {
    const parts = (typeof value === 'string' ? value.split(',') : value).map((part) => part.trim());
    if (parts.length === 1 && parts[0].toLowerCase() === 'all') return 'all';
    const known = parts.map(aminoAcidOf);
    if (known.length > 0 && known.every((amino) => amino !== null)) return [...new Set(known)];
    context.addIssue({ code: 'custom', message: CODES });
    return z.NEVER;
  });

const SCREENING = z.strictObject({
  serine_ratio: above(0, 'a number above 0').optional(),
  discordance: above(0, 'a number above 0').optional(),
  replicates: above(0, 'a number above 0').optional(),
  yield: z
    .number('a number from 0 to 1 is wanted')
    .min(0, 'a number from 0 to 1 is wanted')
    .max(1, 'a number from 0 to 1 is wanted')
    .optional(),
  burial_m: z
    .number('a number from 0 is wanted')
    .min(0, 'a number from 0 is wanted')
    .max(1e6, 'a number from 0 is wanted')
    .optional(),
  shells_a_bed: whole(1, 1_000_000).optional(),
});

const SETTINGS = z.strictObject({
  beds: name.optional(),
  relations: name.optional(),
  standards: name.optional(),
  aliases: name.optional(),
  out: name.optional(),
  taxon: name.optional(),
  amino_acid: codes.optional(),
  fraction: word(['THAA', 'FAA']).optional(),
  zones: whole(1, 50).optional(),
  alpha: z
    .number('a number above 0 and below 1 is wanted')
    .gt(0, 'a number above 0 and below 1 is wanted')
    .lt(1, 'a number above 0 and below 1 is wanted')
    .optional(),
  gradient: name.optional(),
  reference_taxon: name.optional(),
  staircase: z.preprocess((value) => (value === false ? 'no' : value), word(['no', 'section', 'coast'])).optional(),
  staircase_certain: flag.optional(),
  simulations: whole(1, 100_000).optional(),
  seed: whole(0, 2 ** 32 - 1).optional(),
  strict: flag.optional(),
  json: flag.optional(),
  quiet: flag.optional(),
  sheet: name.optional(),
  screening: SCREENING.optional(),
});

/**
 * Settings as the file gives them, absent where it is silent: each command-line option under its own name (with `_` or
 * `-`), and the limits of screening. Paths are as written.
 */
export type Settings = Omit<Readonly<z.infer<typeof SETTINGS>>, 'screening'> & {
  readonly screening?: Partial<ScreeningLimits>;
};

/** Settings, or none when any problem is an error. */
export interface SettingsResult {
  readonly settings: Settings | null;
  /** The file for results.json; null when it was refused. */
  readonly input: InputFile | null;
  readonly problems: Problem[];
}

/** Mappings within mappings that settings may have; they need two. */
const DEEPEST = 8;

/** Reads settings from the bytes of a YAML file (YAML 1.2). */
export async function settingsFromBytes(
  source: FileBytes,
  problems: ProblemList = createProblemList(),
): Promise<SettingsResult> {
  const { file, bytes } = source;
  const settings = parse(source, problems);
  const list = problems.list();
  if (settings === null || problems.hasErrors()) return { settings: null, input: null, problems: list };
  const input: InputFile = { role: 'settings', file, sha256: await sha256(bytes), rows: Object.keys(settings).length };
  return { settings, input, problems: list };
}

function parse({ file, bytes }: FileBytes, problems: ProblemList): Settings | null {
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
  if (document.contents === null) return {};
  if (!isMap(document.contents)) {
    problems.error(
      'form',
      { file, line: lineOf(document.contents) },
      'Wanted is one option a line, such as "alpha: 0.05".',
    );
    return null;
  }
  return validate(document.contents.toJSON() as Record<string, unknown>, problems, file, (path) => {
    let node: unknown = document.contents;
    let line = lineOf(node);
    for (const key of path) {
      const pair = isMap(node)
        ? node.items.find((item) => isScalar(item.key) && plainKey(String(item.key.value)) === key)
        : undefined;
      if (pair === undefined) break;
      line = lineOf(pair.key) ?? line;
      node = pair.value;
    }
    return line;
  });
}

/** Option names may be written with `-` as on the command line, or with `_`. */
function plainKey(key: string): string {
  return key.trim().replaceAll('-', '_').toLowerCase();
}

function validate(
  raw: Readonly<Record<string, unknown>>,
  problems: ProblemList,
  file: string,
  lineOf: (path: readonly string[]) => number | null,
): Settings | null {
  const plain = (record: Readonly<Record<string, unknown>>, within: readonly string[]): Record<string, unknown> => {
    const entries = new Map<string, unknown>();
    for (const [key, value] of Object.entries(record)) {
      const known = plainKey(key);
      if (entries.has(known)) {
        problems.error(
          'option twice',
          { file, line: lineOf([...within, known]), column: key },
          `"${key}" is set twice. Keep one.`,
        );
      }
      // An option without a value is as good as not written.
      if (value !== null) entries.set(known, value);
    }
    return Object.fromEntries(entries);
  };
  const tidy = plain(raw, []);
  const screening = tidy.screening;
  if (typeof screening === 'object' && screening !== null && !Array.isArray(screening)) {
    tidy.screening = plain(screening as Record<string, unknown>, ['screening']);
  }
  const result = SETTINGS.safeParse(tidy);
  if (result.success) return result.data;
  for (const issue of result.error.issues) {
    const path = issue.path.map(String);
    if (issue.code === 'unrecognized_keys') {
      const known = Object.keys(path.length === 0 ? SETTINGS.shape : SCREENING.shape);
      for (const key of issue.keys) {
        const near = nearestName(key, known);
        const advice =
          near === null ? `Known are: ${known.map(written).join(', ')}.` : `Did you mean ${written(near)}?`;
        problems.error(
          'unknown option',
          { file, line: lineOf([...path, key]), column: key },
          `"${key}" is no option. ${advice}`,
        );
      }
      continue;
    }
    const value = path.reduce<unknown>((at, key) => (at as Record<string, unknown> | undefined)?.[key], tidy);
    problems.error(
      'option',
      { file, line: lineOf(path), column: path.map(written).join('.') },
      `${path.map(written).join('.') || 'The file'}: ${issue.message}, ${shown(value)} came.`,
    );
  }
  return null;
}

function written(key: string): string {
  return key in SCREENING.shape ? key : key.replaceAll('_', '-');
}

function shown(value: unknown): string {
  const text = typeof value === 'string' ? `"${value}"` : (JSON.stringify(value) ?? String(value));
  return text.length > 60 ? `${text.slice(0, 60)}…` : text;
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
