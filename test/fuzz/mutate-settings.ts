import type { Random } from '../../src/statistics/index.js';
import { EDGE_NAMES, EDGE_NUMBERS } from './mutate-table.js';

const KEYS =
  'beds relations standards aliases out taxon amino_acid amino-acid fraction zones alpha gradient reference_taxon staircase staircase_certain simulations seed strict json quiet sheet screening'.split(
    ' ',
  );
const LIMITS = 'serine_ratio discordance replicates yield burial_m shells_a_bed'.split(' ');
const WORDS =
  'yes|no|true|false|null|~|all|THAA|FAA|Ile|Asx,Ile|[Asx, Val]|coast|section|cmat_c|coast_km|latitude|salt|elevation_m|Patellina|Mya|Glycymeris|1|2|7|50|0.5|0.999999|1e-9|.nan|.inf|-.inf|0x10|0o7|2001-01-01|"|\'|{|[|]|&a x|*a|!!binary aGk=|!!set {a}|!!js/function "x"|<<: 1|%TAG|---|? a|\t'.split(
    '|',
  );

/** Settings: sound ones, wild ones, deep ones. */
export function inventedSettings(random: Random): string {
  const pick = <T>(list: readonly T[]) => list[random.integer(list.length)];
  const value = () => pick([WORDS, WORDS, EDGE_NUMBERS, EDGE_NAMES][random.integer(4)]);
  switch (random.integer(8)) {
    case 0:
      return `screening:\n${'  '.repeat(1)}${'['.repeat(1 + random.integer(20_000))}`;
    case 1:
      return Array.from({ length: 1 + random.integer(300) }, (_, k) => `${' '.repeat(k)}a:`).join('\n');
    case 2:
      return `a0: &a0 [x, x]\n${Array.from({ length: 30 }, (_, k) => `a${k + 1}: &a${k + 1} [*a${k}, *a${k}]`).join('\n')}\n`;
    case 3:
      return `screening:\n${Array.from({ length: 1 + random.integer(6) }, () => `  ${pick(LIMITS)}: ${value()}`).join('\n')}\n`;
    case 4:
      return soundSettings(random);
    default:
      return `${Array.from({ length: 1 + random.integer(6) }, () => `${pick(KEYS)}: ${value()}`).join('\n')}\n`;
  }
}

/** Settings that are mostly allowed, so that the rooms behind the reader see unusual wishes. */
export function soundSettings(random: Random): string {
  const pick = (list: readonly string[]) => list[random.integer(list.length)];
  const choices: Readonly<Record<string, readonly string[]>> = {
    zones: ['1', '2', '3', '5', '9', '50'],
    alpha: ['0.000001', '0.0001', '0.05', '0.3', '0.4999999'],
    gradient: ['cmat_c', 'coast_km', 'latitude', 'salt', 'elevation_m', 'burial_m'],
    amino_acid: ['all', 'Ile', 'Asx', '[Asx, Ile]', '[Val, Ile]', '[Asx, Val]'],
    fraction: ['THAA', 'FAA'],
    taxon: ['Glycymeris', 'Patellina', 'Arcula', 'Mya', 'Patella'],
    reference_taxon: ['Glycymeris', 'Patellina', 'Arcula', 'Mya', 'Patella'],
    staircase: ['no', 'section', 'coast'],
    staircase_certain: ['true', 'false'],
    seed: ['0', '1', '4294967295'],
    simulations: ['1', '2', '99'],
  };
  const keys = Object.keys(choices).filter(() => random.integer(4) === 0);
  const screening = LIMITS.filter(() => random.integer(6) === 0).map(
    (key) => `  ${key}: ${pick(['1e-9', '0.5', '1', '1000000'])}`,
  );
  const limits = screening.length > 0 ? `screening:\n${screening.join('\n')}\n` : '';
  return `${keys.map((key) => `${key}: ${pick(choices[key])}`).join('\n')}\n${limits}`;
}
