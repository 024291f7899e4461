import { z } from 'zod';
import { AMINO_ACIDS, type AminoAcid, type ScreeningLimits } from '../model/index.js';
import { aminoAcidOf } from './column-names.js';

const name = z.union([z.string().trim().min(1), z.number().transform(String)], 'a name is wanted');
const flag = z.boolean('true or false is wanted');
const number = (what: string, holds: (value: number) => boolean) => z.number(what).refine(holds, what);
const whole = (low: number, high: number) =>
  number(`a whole number from ${low} to ${high} is wanted`, (v) => Number.isInteger(v) && v >= low && v <= high);
const aboveZero = number('a number above 0 is wanted', (v) => v > 0 && v <= 1e6);
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

/** Limits of screening in a settings file. */
export const SCREENING = z.strictObject(
  {
    serine_ratio: aboveZero.optional(),
    discordance: aboveZero.optional(),
    replicates: aboveZero.optional(),
    yield: number('a number from 0 to 1 is wanted', (v) => v >= 0 && v <= 1).optional(),
    burial_m: number('a number from 0 is wanted', (v) => v >= 0 && v <= 1e6).optional(),
    shells_a_bed: whole(1, 1_000_000).optional(),
  },
  { error: (issue) => (issue.code === 'invalid_type' ? 'limits are wanted, one a line below it' : undefined) },
);

/** The settings file, keys with `_`: each command-line option under its own name. */
export const SETTINGS = z.strictObject({
  beds: name.optional(),
  relations: name.optional(),
  standards: name.optional(),
  aliases: name.optional(),
  out: name.optional(),
  taxon: name.optional(),
  amino_acid: codes.optional(),
  fraction: word(['THAA', 'FAA']).optional(),
  zones: whole(1, 50).optional(),
  alpha: number('a number from 0.000001 to below 0.5 is wanted', (v) => v >= 1e-6 && v < 0.5).optional(),
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

/** Option names may be written with `-` as on the command line, or with `_`. */
export function plainKey(key: string): string {
  return key.trim().replaceAll('-', '_').toLowerCase();
}

/** An option's name as people write it: with `-` as on the command line; limits of screening keep their `_`. */
export function written(key: string): string {
  return key in SCREENING.shape ? key : key.replaceAll('_', '-');
}
