import type { Pass, RunContext } from './clock-run.js';
import { beginTasks } from './model/begin-tasks.js';
import type { ClockBed, ClockData, Host, Task } from './model/index.js';
import type { SettledZones } from './settle-zones.js';
import type { Random } from './statistics/index.js';
import {
  type Assignment,
  assignerOverDraws,
  type BootstrapZones,
  bestLabels,
  type CountCriteria,
  choiceSentence,
  findZones,
  gapFromReferences,
  gapTasks,
  groupsByGap,
  meanSilhouette,
  stabilityOf,
  stabilityTasks,
  type Zoning,
  zoneAssigner,
  zoneMeanErrors,
} from './zones/index.js';

/** What stands behind the zones of one clock beyond their fit. */
export interface ZoneSupport {
  /** Gap statistic and silhouette by number of zones. */
  readonly criteria: ReadonlyMap<number, CountCriteria>;
  /** Zones found again from drawn beds and shells; empty with one zone. */
  readonly bootstraps: readonly BootstrapZones[];
  readonly stability: readonly (number | null)[];
  /** Standard errors of the zone means, the doubt about the zones themselves counted in. */
  readonly meanErrors: readonly number[];
  /** How the number was chosen and which criteria agree. */
  readonly sentence: string;
  /** Zone of a log ratio with its error, the doubt about the zones counted in where that is affordable. */
  readonly assign: (x: number, error: number) => Assignment;
}

/** Beds above which zones are so well known that fewer bootstraps do, and beds and shells take the fit's own zones. */
const MANY_BEDS = 400;

/** Beds above which one drawn sample is so like another that ten tell how they vary. */
const VERY_MANY_BEDS = 1000;

/** Beds a zone under which drawn samples miss it too often to say what is known of it. */
const FEWEST_BEDS_TO_DRAW = 3;

const smallestZone = ({ fit, labels }: Zoning): number =>
  Math.min(...fit.means.map((_, zone) => labels.filter((label) => label === zone).length));

/** Support that is being worked out. */
export interface SupportUnderWay {
  /** As in {@link ZoneSupport}, ahead of the rest. */
  readonly assign: ZoneSupport['assign'];
  /** Everything; called once. */
  readonly whole: () => Promise<ZoneSupport>;
}

/**
 * Begins to measure what the zones of a clock rest on: gap statistic, silhouette, stability under drawn beds and shells
 * (design 7.4 and 7.5); null where no bed has a mean.
 */
export async function beginSupport(
  context: RunContext,
  { settled: { last }, choice }: SettledZones,
  random: Random,
  host: Host,
): Promise<SupportUnderWay | null> {
  const { zoning } = last;
  if (zoning === null || choice === null) return null;
  const { options } = context;
  const name = last.data.clock.name;
  const beds: BedMeans = {
    errors: zoning.beds.map((bed) => last.data.beds[bed].se),
    values: zoning.beds.map((bed) => last.data.beds[bed].mean),
  };
  const counting = beginCounting(beds, zoning, random.fork(3).integer(2 ** 31), host);
  const drawing = beginTasks(host, drawingTasks(last, options.simulations, random.fork(4).integer(2 ** 31)));
  const fitsOwn = beds.values.length > MANY_BEDS || zoning.fit.k < 2 || smallestZone(zoning) < FEWEST_BEDS_TO_DRAW;
  const drawn = async () => {
    host.progress(`stability of ${name}`, 0);
    return ((await drawing()) as BootstrapZones[][]).flat();
  };
  const draws = fitsOwn ? null : await drawn();
  const assign: ZoneSupport['assign'] = draws?.length ? assignerOverDraws(draws) : zoneAssigner(zoning.priors);
  const whole = async (): Promise<ZoneSupport> => {
    const criteria = await counting();
    const bootstraps = draws ?? (await drawn());
    return {
      criteria,
      bootstraps,
      stability: stabilityOf(bootstraps),
      meanErrors: zoneMeanErrors(zoning.priors.se, bootstraps),
      sentence: choiceSentence({
        verdict: zoning.verdict,
        zones: unforced(last, zoning, context, random),
        forced: options.zones,
        ...beforeSettling(choice),
        byGap: groupsByGap(zoning.choice.mixtures.map(({ k }) => gapOfCount(criteria, k))),
        bySilhouette: groupsBySilhouette(criteria),
        comparisons: choice.comparisons,
      }),
      assign,
    };
  };
  return { assign, whole };
}

const beforeSettling = ({ byBic, chosen }: NonNullable<SettledZones['choice']>) => ({
  byBic: byBic.bestZones,
  continuumByBic: byBic.continuumBic < byBic.bics[byBic.bestZones - 1],
  beforeJoining: chosen.verdict === 'zones' ? chosen.bestZones : 1,
});

function groupsBySilhouette(criteria: ReadonlyMap<number, CountCriteria>): number | null {
  let best: { readonly k: number; readonly silhouette: number } | null = null;
  for (const [k, { silhouette }] of criteria) {
    if (silhouette !== null && (best === null || silhouette > best.silhouette)) best = { k, silhouette };
  }
  return best?.k ?? null;
}

/** Zones that the data support, whatever number was forced. */
function unforced({ data }: Pass, zoning: Zoning, { options }: RunContext, random: Random): number {
  if (!zoning.forced) return zoning.fit.k;
  const leaveOut = new Set(data.beds.filter((_, bed) => !zoning.beds.includes(bed)).map((bed) => bed.key));
  const free = findZones(data, { ...options, zones: null, random: random.fork(5), leaveOut, choice: zoning.choice });
  return free?.fit.k ?? 1;
}

const gapOfCount = (criteria: ReadonlyMap<number, CountCriteria>, k: number) => {
  const entry = criteria.get(k);
  return { gap: entry?.gap ?? null, se: entry?.gap_se ?? null };
};

/** Means of the beds that were zoned and their standard errors. */
interface BedMeans {
  readonly values: readonly number[];
  readonly errors: readonly number[];
}

function beginCounting({ values, errors }: BedMeans, zoning: Zoning, seed: number, host: Host) {
  const { mixtures } = zoning.choice;
  const weights = errors.map((se) => 1 / Math.max(se ** 2, 1e-12));
  const options = { seed, most: mixtures.length, references: values.length > VERY_MANY_BEDS ? 10 : 100 };
  const references = beginTasks(host, gapTasks(values, weights, options));
  return async (): Promise<Map<number, CountCriteria>> => {
    const gaps = gapFromReferences(values, weights, options, (await references()) as number[][][]);
    return new Map(
      mixtures.map((fit, at) => {
        const labels = bestLabels(fit, values.length);
        const used = new Set(labels).size === fit.k;
        const silhouette = fit.k > 1 && used ? meanSilhouette(values, labels) : null;
        return [fit.k, { gap: gaps[at]?.gap ?? null, gap_se: gaps[at]?.se ?? null, silhouette }];
      }),
    );
  };
}

function drawingTasks({ data, zoning }: Pass, simulations: number, seed: number): Task[] {
  if (zoning === null || zoning.fit.k < 2) return [];
  const beds = zoning.beds.map((bed) => data.beds[bed]);
  const repeats = Math.min(simulations, beds.length > VERY_MANY_BEDS ? 10 : beds.length > MANY_BEDS ? 20 : 200);
  const { means, weights, tau } = zoning.fit;
  return stabilityTasks(
    {
      values: beds.map((bed) => bed.mean),
      errors: beds.map((bed) => bed.se),
      shells: beds.map((bed) => bed.n),
      residuals: scaledResiduals(data, beds),
      fit: { means, weights, tau },
      labels: zoning.labels,
      seed,
    },
    repeats,
  );
}

/** Residuals of the kept shells about their beds, scaled to the pooled scatter; a plain list, since threads are sent it. */
function scaledResiduals({ shells }: ClockData, beds: readonly ClockBed[]): Float64Array {
  const residuals = new Float64Array(shells.length);
  let known = 0;
  for (const bed of beds) {
    let sum = 0;
    let count = 0;
    for (const at of bed.shells) {
      if (shells[at].setAside) continue;
      sum += shells[at].x;
      count++;
    }
    if (count < 2) continue;
    const mean = sum / count;
    const scale = Math.sqrt(count / (count - 1));
    for (const at of bed.shells) if (!shells[at].setAside) residuals[known++] = (shells[at].x - mean) * scale;
  }
  return residuals.subarray(0, known);
}
