import { type ClockSet, clockData, testingDf } from './beds/index.js';
import {
  fitGradient,
  type GradientFit,
  type LaboratoryOffset,
  type Staircase,
  staircaseRelations,
  withLaboratoryErrors,
} from './coast/index.js';
import type { Clock, ClockData, PublishedSummary, RelationRecord, RunOptions, Shell } from './model/index.js';
import type { PlacedBed } from './order/index.js';
import { sectionRelations } from './order/index.js';
import type { Random } from './statistics/index.js';
import { checkRelations, type RelationCheck } from './superposition/relation-checks.js';
import { findZones, type ModelChoice, type Zoning } from './zones/index.js';

/** What is the same for every clock of a run. */
export interface RunContext {
  readonly shells: readonly Shell[];
  readonly summaries: readonly PublishedSummary[];
  /** Beds of the survey by key `section/bed`, with their places. */
  readonly placed: ReadonlyMap<string, PlacedBed>;
  /** Relations of the table. */
  readonly relations: readonly RelationRecord[];
  /** Superposition of all beds of the survey, measured or not: what lies on what. */
  readonly stacking: readonly RelationRecord[];
  /** Elevation of each bed by key, for staircase relations. */
  readonly elevations: ReadonlyMap<string, number>;
  /** Offsets that were taken out of the ratios, whose errors the beds carry. */
  readonly offsets: readonly LaboratoryOffset[];
  /** Value of the gradient column by bed; null without `--gradient`. */
  readonly gradient: ReadonlyMap<string, number> | null;
  readonly options: RunOptions;
}

/** One pass over one clock: means, zones and relation checks with the present shells set aside. */
export interface Pass {
  readonly data: ClockData;
  readonly zoning: Zoning | null;
  readonly relations: readonly RelationRecord[];
  readonly checks: readonly RelationCheck[];
  /** The slope along the gradient asked for; null without one, or where the column does not vary. */
  readonly gradient: SlopeOfPass | null;
}

/** The slope of one clock, where it is centred, and each bed's distance from there. */
export interface SlopeOfPass extends GradientFit {
  readonly centre: number;
  readonly values: ReadonlyMap<string, number>;
}

/** What a pass leaves out of the means, and beds it treats with care. */
export interface LeftOut {
  /** Indices of shells of the run. */
  readonly setAside: ReadonlySet<number>;
  /** Keys of beds whose shells scatter beyond one age. */
  readonly wide: ReadonlySet<string>;
  /** Keys of those among them that hold two groups. */
  readonly mixed: ReadonlySet<string>;
}

/** Nothing left out: the first pass. */
export const NOTHING: LeftOut = { setAside: new Set(), wide: new Set(), mixed: new Set() };

/**
 * One pass of design 7.1 to 7.7 over one clock.
 * @param before the pass before, whose zones are near
 */
export function runPass(
  context: RunContext,
  clock: Clock,
  set: ClockSet,
  left: LeftOut,
  random: Random,
  before?: Pass,
): Pass {
  const pass = passMeans(context, clock, set, left, before);
  return zonePass(context, pass, left, random, { before: before?.zoning?.choice });
}

/** A pass whose zones are still to be found. */
export type PassToZone = Pick<Pass, 'data' | 'gradient' | 'relations'>;

/** Bed means of one pass over one clock, and what is known of their order (design 7.1 and 7.2). */
export function passMeans(context: RunContext, clock: Clock, set: ClockSet, left: LeftOut, before?: Pass): PassToZone {
  const { shells, summaries } = context;
  const imputation = clock.amino_acids.length > 1 ? set.index?.imputation : undefined;
  const input = {
    clock,
    shells,
    summaries,
    setAside: left.setAside,
    wide: left.wide,
    imputation,
    before: before?.data,
  };
  return withoutSlope(context, withLaboratoryErrors(clockData(input), shells, summaries, context.offsets), left);
}

/** Design 7.3 to 7.7 over bed means that still hold any slope along the gradient. */
export function passOver(context: RunContext, plain: ClockData, left: LeftOut, random: Random): Pass {
  return zonePass(context, withoutSlope(context, plain, left), left, random);
}

function withoutSlope(context: RunContext, plain: ClockData, left: LeftOut): PassToZone {
  const gradient = context.gradient === null ? null : slopeOf(plain, context.gradient, left.mixed);
  const data = gradient === null ? plain : withSlope(plain, gradient);
  return { data, gradient, relations: relationsOf(context, data) };
}

/** Parameters of the slope, counted beside those of every model. */
export const slopeParameters = ({ gradient }: PassToZone): number => (gradient?.used ? 1 : 0);

/**
 * Zones of a pass, and its relations held against the ratios (design 7.3 to 7.7).
 * @param known the choice among models where it was made on the same beds, or one on nearly the same
 */
export function zonePass(
  { options }: RunContext,
  pass: PassToZone,
  left: LeftOut,
  random: Random,
  known: { readonly choice?: ModelChoice; readonly before?: ModelChoice } = {},
): Pass {
  const { data, gradient, relations } = pass;
  const zoning = findZones(data, {
    alpha: options.alpha,
    zones: data.clock.main ? options.zones : null,
    random: random.fork(1),
    extraParameters: slopeParameters(pass),
    simulations: options.simulations,
    leaveOut: left.mixed,
    ...known,
  });
  const checks = checkRelations(relations, data.beds, {
    alpha: options.alpha,
    df: testingDf(data.scatter),
    spread: zoning?.spread ?? 0,
  });
  return { data, zoning, relations, checks, gradient };
}

/** Fits the slope on beds that are of one age and have a value; beds without one stand at the mean. */
function slopeOf(data: ClockData, values: ReadonlyMap<string, number>, mixed: ReadonlySet<string>): SlopeOfPass | null {
  const beds = data.beds.filter((bed) => bed.n > 0 && values.has(bed.key));
  if (beds.length === 0) return null;
  const centre = beds.reduce((sum, bed) => sum + values.get(bed.key)!, 0) / beds.length;
  const sound = beds.filter((bed) => !mixed.has(bed.key));
  const sections = [...new Set(sound.map((bed) => bed.section))];
  const fit = fitGradient(
    sound.map((bed) => bed.mean),
    sound.map((bed) => bed.se),
    sound.map((bed) => values.get(bed.key)! - centre),
    sound.map((bed) => sections.indexOf(bed.section)),
  );
  if (fit === null) return null;
  return { ...fit, centre, values: new Map(beds.map((bed) => [bed.key, values.get(bed.key)! - centre])) };
}

/** Bed means with the slope taken out where it is used; each bed keeps its distance from the centre. */
function withSlope(plain: ClockData, { slope: fitted, used, values }: SlopeOfPass): ClockData {
  const slope = used ? fitted : 0;
  const beds = plain.beds.map((bed) => {
    const gradient = values.get(bed.key) ?? 0;
    return { ...bed, mean: bed.mean - slope * gradient, gradient };
  });
  return { ...plain, beds, slope };
}

/** Superposition among the clock's beds that have a mean, the relations of the table, then the staircase; a pair stands once. */
function relationsOf(context: RunContext, data: ClockData): RelationRecord[] {
  const { placed, relations } = context;
  const measured = data.beds.filter((bed) => bed.n > 0).flatMap((bed) => placed.get(bed.key) ?? []);
  const stated = new Set(relations.map((relation) => `${relation.lower}\u0001${relation.upper}`));
  const derived = sectionRelations(measured).filter(({ lower, upper }) => !stated.has(`${lower}\u0001${upper}`));
  return [...derived, ...relations, ...(staircaseOf(context, data)?.relations ?? [])];
}

/** The staircase among the clock's beds that have a mean; null where none is asked for. */
export function staircaseOf(context: RunContext, data: ClockData): Staircase | null {
  const { staircase, staircase_certain } = context.options;
  if (staircase === 'no') return null;
  const beds = data.beds
    .filter((bed) => bed.n > 0)
    .map(({ key, section }) => ({ key, section, elevation_m: context.elevations.get(key) ?? null }));
  const known = [...context.stacking, ...context.relations];
  return staircaseRelations(beds, known, { along: staircase, certain: staircase_certain });
}
