import type { InputFile, Problem } from '../model/index.js';
import { nearestName } from './edit-distance.js';
import { createProblemList, type ProblemList } from './problem-list.js';
import type { FileBytes } from './read-table.js';
import { plainKey, SCREENING, SETTINGS, type Settings, written } from './settings-schema.js';
import { type ParsedSettings, parseSettings } from './settings-yaml.js';
import { sha256 } from './sha256.js';

/** Settings, or none when any problem is an error. */
export interface SettingsResult {
  readonly settings: Settings | null;
  /** The file for results.json; null when it was refused. */
  readonly input: InputFile | null;
  readonly problems: Problem[];
}

/** Reads settings from the bytes of a YAML file (YAML 1.2). */
export async function settingsFromBytes(
  source: FileBytes,
  problems: ProblemList = createProblemList(),
): Promise<SettingsResult> {
  const { file, bytes } = source;
  const parsed = parseSettings(source, problems);
  const settings = parsed === null ? null : validate(parsed, problems, file);
  const list = problems.list();
  if (settings === null || problems.hasErrors()) return { settings: null, input: null, problems: list };
  const input: InputFile = { role: 'settings', file, sha256: await sha256(bytes), rows: Object.keys(settings).length };
  return { settings, input, problems: list };
}

function validate({ values, lineOf }: ParsedSettings, problems: ProblemList, file: string): Settings | null {
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
  const tidy = plain(values, []);
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

function shown(value: unknown): string {
  // as YAML writes what JSON has no word for
  if (typeof value === 'number' && !Number.isFinite(value))
    return Number.isNaN(value) ? '.nan' : value > 0 ? '.inf' : '-.inf';
  const text = typeof value === 'string' ? `"${value}"` : (JSON.stringify(value) ?? String(value));
  return text.length > 60 ? `${text.slice(0, 60)}…` : text;
}
