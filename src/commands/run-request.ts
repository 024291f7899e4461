import { dirname, resolve } from 'node:path';
import { DEFAULT_OPTIONS, type RunOptions, type ScreeningLimits } from '../model/index.js';
import {
  type Complaints,
  type OptionReader,
  readAlpha,
  readAminoAcids,
  readFlag,
  readName,
  readSeed,
  readSimulations,
  readWord,
  readZones,
} from './option-values.js';

/** The input files of a survey; absent where not given. */
export interface SurveyPaths {
  readonly shells: string;
  readonly beds?: string;
  readonly relations?: string;
  readonly standards?: string;
  readonly aliases?: string;
  /** Sheet of an .xlsx. */
  readonly sheet?: string;
}

/** What a user asks of `run` or `check`, settings file and command line together. */
export interface RunRequest {
  readonly paths: SurveyPaths;
  /** The results folder. */
  readonly out: string;
  readonly options: RunOptions;
  readonly strict: boolean;
  readonly json: boolean;
  readonly quiet: boolean;
}

/** Options as they come from the command line or the settings file: by name with `_`, values not yet read. */
export type RawOptions = Readonly<Record<string, unknown>>;

/** The default results folder. */
export const DEFAULT_OUT = 'bedorder-results';

const OPTIONS: {
  readonly [Key in Exclude<keyof RunOptions, 'screening'>]: OptionReader<NonNullable<RunOptions[Key]>>;
} = {
  taxon: readName,
  amino_acid: readAminoAcids,
  fraction: readWord(['THAA', 'FAA'] as const),
  zones: readZones,
  alpha: readAlpha,
  gradient: readName,
  reference_taxon: readName,
  staircase: readWord(['no', 'section', 'coast'] as const),
  staircase_certain: readFlag,
  simulations: readSimulations,
  seed: readSeed,
};

const PATHS = ['beds', 'relations', 'standards', 'aliases', 'out'] as const;

/**
 * Puts settings file and command line together; the command line wins. Paths in the settings file are meant from the
 * folder in which it stands.
 *
 * @returns The request, and everything that is wrong with the options; with problems the request is not to be used.
 */
export function runRequest(
  shells: string,
  commandLine: RawOptions,
  settings: RawOptions = {},
  settingsPath = '',
): { readonly request: RunRequest; readonly problems: readonly string[] } {
  const problems: string[] = [];
  const complain: Complaints = (message) => problems.push(message);
  const read = <T>(key: string, reader: OptionReader<T>): T | undefined => {
    if (commandLine[key] !== undefined) return reader(`--${key.replaceAll('_', '-')}`, commandLine[key], complain);
    const value = settings[key];
    return value === undefined || value === null ? undefined : reader(`${key} in ${settingsPath}`, value, complain);
  };
  const path = (key: (typeof PATHS)[number]): string | undefined => {
    const given = read(key, readName);
    const fromSettings = commandLine[key] === undefined && given !== undefined;
    return fromSettings ? beside(settingsPath, given) : given;
  };
  const options = Object.fromEntries(
    Object.entries(OPTIONS).map(([key, reader]) => [
      key,
      read(key, reader as OptionReader<unknown>) ?? DEFAULT_OPTIONS[key as keyof RunOptions],
    ]),
  ) as unknown as RunOptions;
  const request: RunRequest = {
    paths: {
      shells,
      beds: path('beds'),
      relations: path('relations'),
      standards: path('standards'),
      aliases: path('aliases'),
      sheet: read('sheet', readName),
    },
    out: path('out') ?? DEFAULT_OUT,
    options: {
      ...options,
      screening: { ...DEFAULT_OPTIONS.screening, ...(settings.screening as ScreeningLimits | undefined) },
    },
    strict: read('strict', readFlag) ?? false,
    json: read('json', readFlag) ?? false,
    quiet: read('quiet', readFlag) ?? false,
  };
  problems.push(...outOverInput(request, settingsPath));
  return { request, problems };
}

function beside(settingsPath: string, given: string): string {
  const path = resolve(dirname(settingsPath), given);
  return dirname(settingsPath) === '.' ? given : path;
}

function outOverInput({ out, paths }: RunRequest, settingsPath: string): string[] {
  const target = resolve(out);
  const { sheet: _, ...files } = paths;
  return Object.entries({ ...files, settings: settingsPath || undefined })
    .filter(([, path]) => path !== undefined && `${resolve(path)}/`.startsWith(`${target}/`))
    .map(
      ([part, path]) => `--out ${out}: the ${part} file ${path} stands there, and would be lost. Give another folder.`,
    );
}
