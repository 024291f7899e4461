import { isBareAminoAcid, measureOf } from './column-names.js';
import { ownValue } from './own-value.js';
import { squash } from './squash.js';

/** Squashed headers of the shells table's own columns. */
const NAMES: Readonly<Record<string, string>> = {
  section: 'section',
  sectionname: 'section',
  sectionid: 'section',
  bed: 'bed',
  bedname: 'bed',
  bedid: 'bed',
  taxon: 'taxon',
  shell: 'shell',
  shellid: 'shell',
  shellno: 'shell',
  shellnumber: 'shell',
  specimen: 'shell',
  specimenid: 'shell',
  preparation: 'preparation',
  prep: 'preparation',
  preparationid: 'preparation',
  injection: 'injection',
  injectionid: 'injection',
  labid: 'lab_id',
  labno: 'lab_id',
  labnumber: 'lab_id',
  labcode: 'lab_id',
  laboratoryid: 'lab_id',
  laboratorynumber: 'lab_id',
  lab: 'lab',
  laboratory: 'lab',
  method: 'method',
  fraction: 'fraction',
  n: 'n',
  nshells: 'n',
  numberofshells: 'n',
  aminoacid: 'amino_acid',
  concentration: 'concentration',
  conc: 'concentration',
  dl: 'dl',
  dlratio: 'dl',
  dlmean: 'dl',
  dlsd: 'dl_sd',
  sddl: 'dl_sd',
};

/** Headers of a bed's place, understood in every table that may give one. */
export const PLACE_NAMES: Readonly<Record<string, string>> = {
  level: 'level',
  heightm: 'height_m',
  heightmetres: 'height_m',
  heightmeters: 'height_m',
  heightinm: 'height_m',
  depthm: 'depth_m',
  depthmetres: 'depth_m',
  depthmeters: 'depth_m',
  depthinm: 'depth_m',
};

/** Columns that people give other names: a hint, not a guess. */
const HINTS: Readonly<Record<string, string>> = {
  site: 'if it names the exposure, call it section',
  locality: 'if it names the exposure, call it section',
  location: 'if it names the exposure, call it section',
  outcrop: 'if it names the exposure, call it section',
  core: 'if it names the core, call it section',
  unit: 'if it names the deposit, call it bed',
  layer: 'if it names the deposit, call it bed',
  stratum: 'if it names the deposit, call it bed',
  deposit: 'if it names the deposit, call it bed',
  species: 'if it names the taxon, call it taxon',
  genus: 'if it names the taxon, call it taxon',
  height: 'if it is in metres, call it height_m',
  depth: 'if it is in metres, call it depth_m',
  sample: 'if it names the specimen, call it shell',
  sampleid: 'if it names the specimen, call it shell',
  elevationm: 'belongs in the beds table',
  latitude: 'belongs in the beds table',
  longitude: 'belongs in the beds table',
  coastkm: 'belongs in the beds table',
  cmatc: 'belongs in the beds table',
  burialm: 'belongs in the beds table',
};

/** Names of the shells table's columns, for suggestions. */
export const SHELLS_COLUMNS: readonly string[] = [
  ...['section', 'bed', 'taxon', 'shell', 'preparation', 'injection', 'lab_id', 'lab', 'method', 'fraction'],
  ...['level', 'height_m', 'depth_m', 'n', 'amino_acid', 'dl_sd', 'D/L Asx', 'D/L Glx', 'D/L Ser', 'D/L Ala'],
  ...['D/L Val', 'D/L Phe', 'D/L Leu', 'D/L Ile', 'L-Ser/L-Asp'],
];

/**
 * The key of a shells column's header, or null when it is not known.
 *
 * @example
 * shellsKey('Lab ID') // => 'lab_id'
 * @example
 * shellsKey('D/L Aspartic') // => 'ratio Asx'
 */
export function shellsKey(header: string): string | null {
  const plain = squash(header);
  return ownValue(NAMES, plain) ?? ownValue(PLACE_NAMES, plain) ?? measureOf(header)?.key ?? null;
}

/** What a header that is not known may mean. */
export function shellsHint(header: string): string | null {
  const plain = squash(header);
  const hint = ownValue(HINTS, plain);
  if (hint !== null) return hint;
  if (isBareAminoAcid(header)) return `may be a ratio or a concentration: call it "D/L ${header}" or "[${header}]"`;
  if (
    /(se|sem|stderr|standarderror|2s|2sd|2sigma)$/.test(plain) &&
    measureOf(header.replace(/\W*\w+\W*$/, '')) !== null
  ) {
    return 'wanted is one standard deviation between shells, with the word sd';
  }
  return null;
}
