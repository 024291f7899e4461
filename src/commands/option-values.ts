import { aminoAcidOf } from '../input/column-names.js';
import { nearestName } from '../input/edit-distance.js';
import { AMINO_ACIDS, type AminoAcid, type RunOptions } from '../model/index.js';

/** Collects what is wrong with the options. */
export type Complaints = (message: string) => void;

/** Reads one option: `name` as the user wrote it, `value` from the command line (text) or the settings file. */
export type OptionReader<T> = (name: string, value: unknown, complain: Complaints) => T | undefined;

/** Limits of the numbers that may be asked for. */
export const OPTION_LIMITS = {
  zones: 50,
  simulations: 100_000,
  seed: 2 ** 32 - 1,
  alpha: { from: 1e-6, below: 0.5 },
} as const;

function wholeNumber(low: number, high: number, advice: string): OptionReader<number> {
  return (name, value, complain) => {
    const number = asNumber(value);
    if (Number.isInteger(number) && number >= low && number <= high) return number;
    complain(`${name} ${shown(value)}: a whole number from ${low} to ${high} was wanted; ${advice}`);
    return undefined;
  };
}

/** Number of zones to force. */
export const readZones = wholeNumber(1, OPTION_LIMITS.zones, 'leave the option out to let the data choose.');

/** Repeats of bootstraps and simulations. */
export const readSimulations = wholeNumber(1, OPTION_LIMITS.simulations, '999 is the default.');

/** Seed of the random numbers. */
export const readSeed = wholeNumber(0, OPTION_LIMITS.seed, '1 is the default.');

/** Level of the tests: beyond these ends a test says always yes, or never. */
export const readAlpha: OptionReader<number> = (name, value, complain) => {
  const number = asNumber(value);
  if (number >= OPTION_LIMITS.alpha.from && number < OPTION_LIMITS.alpha.below) return number;
  complain(`${name} ${shown(value)}: a probability from 0.000001 to below 0.5 was wanted, such as 0.05.`);
  return undefined;
};

/** A name that is not empty. */
export const readName: OptionReader<string> = (name, value, complain) => {
  if (typeof value === 'string' && value.trim() !== '') return value.trim();
  if (typeof value === 'number') return String(value);
  complain(`${name}: a name was wanted, ${shown(value)} came.`);
  return undefined;
};

/** One of a few words, whatever their case. */
export function readWord<T extends string>(words: readonly T[]): OptionReader<T> {
  return (name, value, complain) => {
    const found = words.find((word) => word.toLowerCase() === String(value).trim().toLowerCase());
    if (found === undefined) complain(`${name} ${shown(value)}: one of ${words.join(', ')} was wanted.`);
    return found;
  };
}

/** yes or no. */
export const readFlag: OptionReader<boolean> = (name, value, complain) => {
  if (typeof value === 'boolean') return value;
  complain(`${name} ${shown(value)}: true or false was wanted.`);
  return undefined;
};

/** `Ile`, `Asx,Glx`, a list of codes, or `all`; names as laboratories write them are understood. */
export const readAminoAcids: OptionReader<NonNullable<RunOptions['amino_acid']>> = (name, value, complain) => {
  const codes = (Array.isArray(value) ? value : String(value).split(',')).map((code) => String(code).trim());
  if (codes.length === 1 && codes[0].toLowerCase() === 'all') return 'all';
  const known: AminoAcid[] = [];
  for (const code of codes) {
    const found = aminoAcidOf(code);
    if (found === null) complain(unknownAminoAcid(name, code));
    else if (!known.includes(found)) known.push(found);
  }
  return known.length > 0 ? known : undefined;
};

function unknownAminoAcid(name: string, code: string): string {
  const near = nearestName(code, AMINO_ACIDS);
  const advice = near ? `Did you mean ${near}?` : `Known are ${AMINO_ACIDS.join(', ')}, or all.`;
  return `${name} ${shown(code)}: this amino acid is not known. ${advice}`;
}

function asNumber(value: unknown): number {
  if (typeof value === 'number') return value;
  return typeof value === 'string' && value.trim() !== '' ? Number(value) : Number.NaN;
}

function shown(value: unknown): string {
  return typeof value === 'string' || typeof value === 'number' ? String(value) : JSON.stringify(value);
}
