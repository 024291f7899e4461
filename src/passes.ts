import type { ClockSet } from './beds/index.js';
import {
  type LeftOut,
  NOTHING,
  type Pass,
  type PassToZone,
  passMeans,
  type RunContext,
  runPass,
  slopeParameters,
  zonePass,
} from './clock-run.js';
import { beginTasks } from './model/begin-tasks.js';
import type { AminoAcid, Host, ScreeningMark } from './model/index.js';
import { AMINO_ACIDS } from './model/index.js';
import { relationGraph } from './order/index.js';
import { countRatios } from './screening/index.js';
import type { Random } from './statistics/index.js';
import {
  bedsAbove,
  type MixedAge,
  mixedAgeBeds,
  type ReadingsAhead,
  readAhead,
  readShells,
  type ShellReadings,
  type ZoneToMatch,
} from './superposition/index.js';
import { choiceTask, type ModelChoice, zoneName } from './zones/index.js';

/** Most passes before the tool says that it does not settle (design 7.9). */
export const MOST_PASSES = 5;

const NO_MARKS: readonly ScreeningMark[] = [];
const NO_LOGS: readonly number[] = [];

/** What the passes over one clock need. */
export interface PassInput {
  readonly context: RunContext;
  readonly set: ClockSet;
  readonly screening: readonly ScreeningMark[];
  readonly random: Random;
  readonly host: Host;
}

/** The passes over one clock once no shell's status changes any more. */
export interface Settled {
  /** On all shells. */
  readonly first: Pass;
  /** Without the shells set aside. */
  readonly last: Pass;
  /** Readings of the clock's shells, from the last pass. */
  readonly readings: ShellReadings;
  /** Whether each bed's shells are of one age, in the order of ClockData.beds, from the last pass. */
  readonly ages: readonly MixedAge[];
  readonly left: LeftOut;
  readonly passes: number;
  /** False when a status still changed in the last pass allowed. */
  readonly settled: boolean;
  /** Screening marks of each clock shell, in the order of ClockData.shells. */
  readonly marks: readonly (readonly ScreeningMark[])[];
}

/**
 * Repeats 7.1 to 7.9 until no shell's status changes, at most five times. The first pass uses all shells; each later one
 * leaves out those that the readings of the pass before set aside, so zones are found without them.
 */
export async function settlePasses({ context, set, screening, random, host }: PassInput): Promise<Settled> {
  const byShell = new Map<number, ScreeningMark[]>();
  for (const mark of screening) {
    const own = byShell.get(mark.shell);
    if (own === undefined) byShell.set(mark.shell, [mark]);
    else own.push(mark);
  }
  const toZone = passMeans(context, set.main, set, NOTHING);
  // another thread may choose among models while this one reads what does not hang on zones
  const choosing = beginChoice(toZone, host);
  const marks = toZone.data.shells.map(({ shell }) => byShell.get(shell) ?? NO_MARKS);
  const fixed = fixedParts(context, toZone);
  const reading = { ...fixed, marks, alpha: context.options.alpha };
  let before: ReadingsAhead | undefined = readAhead({ data: toZone.data, zones: [], ...reading });
  const first = zonePass(context, toZone, NOTHING, random, { choice: await choosing() });
  let last = first;
  let left = NOTHING;
  let ages: MixedAge[] | null = null;
  let agesAssume: number | undefined;
  for (let passes = 1; ; passes++) {
    const zones = zonesToMatch(last);
    const { data } = last;
    const spread = last.zoning?.spread ?? 0;
    const readings = readShells({ data, zones, spread, ...reading }, before);
    before = readings;
    const setAside = new Set(
      data.shells.flatMap(({ shell }, at) => (readings.shells[at].status === 'set aside' ? [shell] : [])),
    );
    // what a bed's age hangs on stays where the same shells are set aside; only mixed beds name zones
    const assumed = data.scatter.assumed ? data.scatter.s : undefined;
    const known = ages !== null && data.slope === 0 && assumed === agesAssume && left.mixed.size === 0;
    if (ages === null || !known || !sameSet(setAside, left.setAside)) {
      ages = agesOfBeds(context, last, setAside, zones, random.fork(7));
      agesAssume = assumed;
    }
    const verdicts = ages.map(({ verdict }) => verdict);
    const keysOf = (wanted: readonly MixedAge['verdict'][]): Set<string> =>
      new Set(data.beds.flatMap((bed, at) => (wanted.includes(verdicts[at]) ? [bed.key] : [])));
    const next = { setAside, wide: keysOf(['mixed age', 'wide scatter']), mixed: keysOf(['mixed age']) };
    const settled =
      sameSet(next.setAside, left.setAside) && sameSet(next.wide, left.wide) && sameSet(next.mixed, left.mixed);
    if (settled || passes === MOST_PASSES) return { first, last, readings, ages, left, passes, settled, marks };
    left = next;
    last = runPass(context, set.main, set, left, random, last);
  }
}

/** Begins to choose among models for the beds of a pass; undefined where no bed has a mean. */
function beginChoice(pass: PassToZone, host: Host): () => Promise<ModelChoice | undefined> {
  const task = choiceTask(pass.data, slopeParameters(pass));
  if (task === null) return async () => undefined;
  const choosing = beginTasks(host, [task]);
  return async () => ((await choosing()) as ModelChoice[])[0];
}

function sameSet<T>(a: ReadonlySet<T>, b: ReadonlySet<T>): boolean {
  return a.size === b.size && [...a].every((item) => b.has(item));
}

function agesOfBeds(
  { options }: RunContext,
  { data }: Pass,
  setAside: ReadonlySet<number>,
  zones: readonly ZoneToMatch[],
  random: Random,
): MixedAge[] {
  const kept = data.beds.map((bed) =>
    bed.shells
      .map((at) => data.shells[at])
      .filter((shell) => !setAside.has(shell.shell))
      .map((shell) => shell.x - data.slope * bed.gradient),
  );
  const assumed = data.scatter.assumed ? data.scatter.s : undefined;
  return mixedAgeBeds(kept, random, { alpha: options.alpha, simulations: options.simulations, zones, assumed });
}

/** What no pass changes: log ratios of every amino acid, and which beds lie above which. */
interface FixedParts {
  readonly aminoAcids: readonly AminoAcid[];
  readonly logs: readonly (readonly number[])[];
  readonly above: readonly (readonly number[])[];
}

function fixedParts({ shells }: RunContext, { data, relations }: PassToZone): FixedParts {
  const counts = countRatios(data.shells.map(({ shell }) => shells[shell]));
  const aminoAcids = AMINO_ACIDS.filter((code) => counts.get(code)! > 0);
  // one amino acid has nothing to agree with
  const logs =
    aminoAcids.length < 2
      ? data.shells.map(() => NO_LOGS)
      : data.shells.map(({ shell }) => aminoAcids.map((code) => Math.log(shells[shell].ratios[code] ?? Number.NaN)));
  const certain = relations.filter((relation) => relation.certainty === 'certain');
  const graph = relationGraph(
    data.beds.map((bed) => bed.key),
    certain,
  );
  return { aminoAcids, logs, above: bedsAbove(graph) };
}

function zonesToMatch({ zoning }: Pass): ZoneToMatch[] {
  if (zoning === null || zoning.fit.k === 1) return [];
  const { means, se, weights, tau } = zoning.priors;
  return means.map((mean, zone) => ({
    name: zoneName(zone),
    mean,
    sd: Math.hypot(tau, se[zone]),
    weight: Math.max(weights[zone], 1e-12),
  }));
}
