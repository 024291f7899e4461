import type {
  AminoAcidShare,
  AminoAcidVotes,
  BedSite,
  ConflictRow,
  ConversionFinding,
  Evidence,
  Findings,
  GradientFinding,
  InputFile,
  OrderDiagnostics,
  Remark,
  RunOptions,
  ScreeningLimits,
  ShellRatios,
} from '../model/index.js';
import { AMINO_ACID_NAMES, INPUT_ROLES } from './choices.js';
import type { AnyFields, FieldsOf } from './shape.js';
import { beds, shells } from './tables/beds.js';
import * as c from './tables/columns.js';
import { correlation, order, pairs } from './tables/order.js';
import { plan } from './tables/plan.js';
import { problems, relations, sections } from './tables/relations.js';
import { adjacent_zones, clocks, zone_counts, zones } from './tables/zones.js';

const rows = <Fields>(fields: Fields, description: string) =>
  ({ type: 'list', description, items: { type: 'object', description, fields } }) as const;

const screening = {
  serine_ratio: c.plain('L-Ser/L-Asp at or above which a shell is marked'),
  discordance: c.plain('distance from the line of two amino acids, in robust standard deviations'),
  replicates: c.plain('difference of replicates, in standard deviations within shells'),
  yield: c.plain('share of the median concentration below which a shell is marked'),
  burial_m: { type: 'number', unit: 'm', description: 'cover below which a bed is marked' },
  shells_a_bed: c.plain('shells below which a bed is provisional'),
} satisfies FieldsOf<ScreeningLimits>;

const options = {
  taxon: c.textOrNone('only taxon analysed'),
  amino_acid: {
    type: 'either',
    nullable: true,
    description: 'amino acids of the main clock',
    of: [
      c.list(c.aminoAcid, 'amino acids'),
      { type: 'choice', values: { all: 'the index of all' }, description: 'the index of all' },
    ],
  },
  fraction: { ...c.fraction, nullable: true },
  zones: { type: 'integer', nullable: true, minimum: 1, description: 'number of zones forced' },
  alpha: c.share('level of every test'),
  gradient: c.textOrNone('column of the beds table along which ratios may slope'),
  reference_taxon: c.textOrNone('taxon to which the others are converted'),
  staircase: {
    type: 'choice',
    description: 'where staircase relations are derived from elevation',
    values: { no: 'nowhere', section: 'within each section', coast: 'along the whole coast' },
  },
  staircase_certain: c.yes('whether derived staircase relations bind the order'),
  simulations: c.count('repeats of bootstraps and simulations'),
  seed: { type: 'integer', description: 'seed of the random numbers' },
  screening: { type: 'object', fields: screening, description: 'limits of the screening rules' },
} satisfies FieldsOf<RunOptions>;

const inputs = {
  role: { type: 'choice', values: INPUT_ROLES, description: 'part of the file' },
  file: c.text('name of the file, without folders'),
  sha256: c.text('SHA-256 of its bytes, hexadecimal'),
  rows: c.count('rows read'),
} satisfies FieldsOf<InputFile>;

const place = { type: 'object', nullable: true, description: 'place in the section' } as const;
const sites = {
  section: c.section,
  bed: c.bed,
  place: {
    ...place,
    fields: {
      kind: {
        type: 'choice',
        description: 'how the place is given',
        values: { level: 'counts upwards', height_m: 'height of the base', depth_m: 'depth below the surface' },
      },
      value: c.plain('level, or metres'),
    },
  },
  elevation_m: c.measureOrNone('m', 'elevation above present sea level'),
  latitude: c.measureOrNone('degree', 'latitude, WGS 84'),
  longitude: c.measureOrNone('degree', 'longitude, WGS 84'),
  coast_km: c.measureOrNone('km', 'distance along the coast'),
  cmat_c: c.measureOrNone('degree Celsius', 'current mean annual temperature'),
  burial_m: c.measureOrNone('m', 'cover above the sampled shells'),
  note: c.textOrNone('note of the beds table'),
  gradient: c.plainOrNone('value of the gradient column in use'),
} satisfies FieldsOf<BedSite>;

const shell_ratios = {
  section: c.section,
  bed: c.bed,
  taxon: c.taxon,
  fraction: c.fraction,
  shell: c.text('specimen'),
  ratios: {
    type: 'object',
    description: 'D/L of each amino acid measured',
    fields: Object.fromEntries(
      Object.entries(AMINO_ACID_NAMES).map(([name, meaning]) => [name, { ...c.ratio(meaning), optional: true }]),
    ) as unknown as FieldsOf<ShellRatios['ratios']>,
  },
} satisfies FieldsOf<ShellRatios>;

const evidence = {
  clock: c.clock,
  about: {
    type: 'choice',
    description: 'what the sentences are about',
    values: { shell: 'a shell', bed: 'a bed', relation: 'a relation', clock: 'a clock' },
  },
  name: c.text('section/bed/shell, section/bed, lower > upper, or the clock'),
  sentences: c.list(c.text('sentence'), 'what is held for or against it'),
} satisfies FieldsOf<Evidence>;

const conflicts = {
  clock: c.clock,
  lower: c.text('shell that lies lower and has the smaller ratio, as section/bed/shell'),
  upper: c.text('shell that lies higher, as section/bed/shell'),
  shortfall: c.logRatio('how far the lower falls short'),
} satisfies FieldsOf<ConflictRow>;

const diagnostics = {
  clock: c.clock,
  chains: c.count('chains of the sampler'),
  draws: c.count('draws kept'),
  ess_min: c.plain('smallest effective sample size over beds'),
  rhat_max: c.plain('largest split R-hat over beds'),
  converged: c.yes('whether the order was sampled well enough'),
  relations_kept: c.count('relations that bound the order'),
  relations_left_out: c.count('relations left out as reversed or only probable'),
} satisfies FieldsOf<OrderDiagnostics>;

const gradients = {
  clock: c.clock,
  column: c.text('column of the beds table'),
  centre: c.plain('value of the column at which corrected ratios hold'),
  slope: c.plain('slope of the log ratio per unit of the column'),
  slope_low: c.plain('lower end of its 95 % interval'),
  slope_high: c.plain('upper end of its 95 % interval'),
  bic_with: c.plain('BIC of the best model with the slope'),
  bic_without: c.plain('BIC of the best model without it'),
  used: c.yes('whether the slope was taken out'),
} satisfies FieldsOf<GradientFinding>;

const conversions = {
  clock: c.textOrNone('combined clock; null where nothing was converted to this reference'),
  taxon: c.taxon,
  reference: c.text('taxon to whose scale the ratios are put'),
  fraction: c.fraction,
  from_clock: c.textOrNone('main clock of the taxon'),
  to_clock: c.textOrNone('main clock of the reference'),
  paired_beds: c.list(c.text('bed, as section/bed'), 'beds that hold both taxa'),
  slope: c.plainOrNone('slope of the line between log ratios'),
  slope_se: c.plainOrNone('its standard error'),
  slope_fixed: { type: 'boolean', nullable: true, description: 'whether the slope was fixed at 1' },
  intercept: c.logRatioOrNone('log ratio of the reference where that of the taxon is 0'),
  intercept_se: c.logRatioOrNone('its standard error'),
  extra_scatter: c.logRatioOrNone('standard deviation of the pairs about the line beyond their errors'),
  chi_squared: c.plainOrNone('of the pairs about the line'),
  df: c.plainOrNone('its degrees of freedom'),
  converted_beds: c.count('beds whose mean rests on this conversion'),
  verdict: {
    type: 'choice',
    description: 'whether the taxon was converted',
    values: { converted: 'its beds stand on the combined clock', refused: 'the paired beds cannot support it' },
  },
  reason: c.text('why it was refused, or what to beware of'),
} satisfies FieldsOf<ConversionFinding>;

const votes = {
  clock: c.clock,
  bed_a: c.text('bed, as section/bed'),
  bed_b: c.text('bed, as section/bed'),
  votes: rows(
    { amino_acid: c.aminoAcid, older: c.text('bed it calls older'), p: c.share('how surely') },
    'what each amino acid says',
  ),
} satisfies FieldsOf<AminoAcidVotes>;

const shares = {
  clock: c.clock,
  amino_acid: c.aminoAcid,
  weight: c.plain('weight in the index'),
  resolution: c.plain('variance between beds over variance of a shell within its bed'),
  verdict: {
    type: 'choice',
    description: 'what it brings',
    values: {
      'carries the resolution': 'most of what the index tells',
      helps: 'some of it',
      'adds noise': 'nothing',
    },
  },
} satisfies FieldsOf<AminoAcidShare>;

const remarks = {
  clock: c.textOrNone('clock it is about; null for the whole run'),
  level: {
    type: 'choice',
    description: 'finding or caution',
    values: { finding: 'what was found', caution: 'what to beware of' },
  },
  text: c.text('sentence'),
} satisfies FieldsOf<Remark>;

const described = {
  program: { type: 'choice', values: { bedorder: 'this program' }, description: 'program that wrote the file' },
  version: c.text('its version'),
  options: { type: 'object', fields: options, description: 'settings of the run' },
  inputs: rows(inputs, 'input files'),
  clocks: rows(clocks, 'what was zoned'),
  zones: rows(zones, 'aminozones'),
  zone_counts: rows(zone_counts, 'how the number of zones was chosen'),
  adjacent_zones: rows(adjacent_zones, 'whether neighbouring zones are distinct'),
  beds: rows(beds, 'beds of the main clocks'),
  shells: rows(shells, 'shells of the main clocks'),
  order: rows(order, 'deposits from oldest to youngest'),
  pairs: rows(pairs, 'which of two beds is older'),
  relations: rows(relations, 'field relations against the ratios'),
  sections: rows(sections, 'sections against their superposition'),
  correlation: rows(correlation, 'beds of each zone by section'),
  problems: rows(problems, 'warnings about the input'),
  sites: rows(sites, 'where each bed stands'),
  section_order: c.list(c.section, 'sections in coast order'),
  shell_ratios: rows(shell_ratios, 'ratios of every shell'),
  evidence: rows(evidence, 'evidence in sentences'),
  conflicts: rows(conflicts, 'pairs of shells that contradict superposition'),
  diagnostics: rows(diagnostics, 'how well the order was sampled'),
  gradients: rows(gradients, 'slope along a gradient'),
  conversions: rows(conversions, 'taxa put on the scale of the reference taxon'),
  votes: rows(votes, 'beds on whose order amino acids disagree'),
  shares: rows(shares, 'what each amino acid brings to an index'),
  remarks: rows(remarks, 'sentences for the reader'),
  plan: rows(plan, 'what to collect or date next'),
  plan_criterion: c.text('when a pair counts as resolved, and with what power shells are counted'),
  plan_notes: c.list(c.text('sentence'), 'what to know when using the plan'),
} satisfies FieldsOf<Findings>;

/** Every part of results.json, described; the order here is the order in the file. */
export const FINDINGS_FIELDS: AnyFields = described;
