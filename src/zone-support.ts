import { type Pass, type RunContext, rezonePass } from './clock-run.js';
import type { Host } from './model/index.js';
import type { Settled } from './passes.js';
import type { Random } from './statistics/index.js';
import {
  type Assignment,
  assignerOverDraws,
  assignZone,
  type BootstrapZones,
  bedScatters,
  bestLabels,
  type CountCriteria,
  choiceSentence,
  findZones,
  gapStatistic,
  groupsByGap,
  meanSilhouette,
  settleChoice,
  stabilityOf,
  stabilityTasks,
  type Zoning,
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

/** The passes of a clock with their number of zones settled by bootstraps, and what stands behind it. */
export interface SupportedClock {
  readonly settled: Settled;
  /** null where no bed has a mean. */
  readonly support: ZoneSupport | null;
}

/** Beds above which zones are so well known that fewer bootstraps do, and beds and shells take the fit's own zones. */
const MANY_BEDS = 400;

/** Beds a zone under which drawn samples miss it too often to say what is known of it. */
const FEWEST_BEDS_TO_DRAW = 3;

const smallestZone = ({ fit, labels }: Zoning): number =>
  Math.min(...fit.means.map((_, zone) => labels.filter((label) => label === zone).length));

/**
 * Settles the number of zones where BIC is close (parametric bootstrap of the likelihood ratio), then measures what the zones
 * rest on: gap statistic, silhouette, stability under drawn beds and shells (design 7.3 to 7.5).
 */
export async function supportZones(
  context: RunContext,
  settled: Settled,
  random: Random,
  host: Host,
): Promise<SupportedClock> {
  const { options } = context;
  const before = settled.last.zoning;
  if (before === null) return { settled, support: null };
  const { data } = settled.last;
  const name = data.clock.name;
  const errors = before.beds.map((bed) => data.beds[bed].se);
  const values = before.beds.map((bed) => data.beds[bed].mean);
  host.progress(`number of zones of ${name}`, 0);
  const { choice, comparisons } = await settleChoice(before.choice, values, errors, {
    alpha: options.alpha,
    seed: seedFrom(random.fork(1)),
    simulations: options.simulations,
    map: host.map,
    scatters: bedScatters(data, before.beds),
  });
  const changed = choice.bestZones !== before.choice.bestZones || choice.verdict !== before.choice.verdict;
  const last = changed ? rezonePass(context, settled.last, settled.left, random.fork(2), choice) : settled.last;
  const zoning = last.zoning!;
  const criteria = countCriteria(values, errors, zoning, random.fork(3));
  host.progress(`stability of ${name}`, 0);
  const bootstraps = await drawZones(last, options.simulations, seedFrom(random.fork(4)), host);
  const byGap = groupsByGap(zoning.choice.mixtures.map(({ k }) => gapOfCount(criteria, k)));
  const widest = [...criteria].filter(([, { silhouette }]) => silhouette !== null);
  const bySilhouette =
    widest.length === 0
      ? null
      : widest.reduce((best, next) => (next[1].silhouette! > best[1].silhouette! ? next : best))[0];
  const supported = unforced(last, zoning, context, random);
  return {
    settled: { ...settled, last },
    support: {
      criteria,
      bootstraps,
      stability: stabilityOf(bootstraps),
      meanErrors: zoneMeanErrors(zoning.priors.se, bootstraps),
      sentence: choiceSentence({
        verdict: zoning.verdict,
        zones: supported,
        forced: options.zones,
        byBic: before.choice.bestZones,
        continuumByBic: before.choice.continuumBic < before.choice.bics[before.choice.bestZones - 1],
        beforeJoining: choice.verdict === 'zones' ? choice.bestZones : 1,
        byGap,
        bySilhouette,
        comparisons,
      }),
      assign:
        bootstraps.length === 0 || values.length > MANY_BEDS || smallestZone(zoning) < FEWEST_BEDS_TO_DRAW
          ? (x, error) => assignZone(x, error, zoning.priors)
          : assignerOverDraws(bootstraps),
    },
  };
}

/** Zones that the data support, whatever number was forced. */
function unforced({ data }: Pass, zoning: Zoning, { options }: RunContext, random: Random): number {
  if (!zoning.forced) return zoning.fit.k;
  const leaveOut = new Set(data.beds.filter((_, bed) => !zoning.beds.includes(bed)).map((bed) => bed.key));
  const free = findZones(data, { ...options, zones: null, random: random.fork(5), leaveOut, choice: zoning.choice });
  return free?.fit.k ?? 1;
}

const seedFrom = (random: Random): number => random.integer(2 ** 31);

const gapOfCount = (criteria: ReadonlyMap<number, CountCriteria>, k: number) => {
  const entry = criteria.get(k);
  return { gap: entry?.gap ?? null, se: entry?.gap_se ?? null };
};

function countCriteria(
  values: readonly number[],
  errors: readonly number[],
  zoning: Zoning,
  random: Random,
): Map<number, CountCriteria> {
  const { mixtures } = zoning.choice;
  const weights = errors.map((se) => 1 / Math.max(se ** 2, 1e-12));
  const gaps = gapStatistic(values, weights, {
    random,
    most: mixtures.length,
    references: values.length > 1000 ? 20 : 100,
  });
  return new Map(
    mixtures.map((fit, at) => {
      const labels = bestLabels(fit, values.length);
      const used = new Set(labels).size === fit.k;
      const silhouette = fit.k > 1 && used ? meanSilhouette(values, labels) : null;
      return [fit.k, { gap: gaps[at]?.gap ?? null, gap_se: gaps[at]?.se ?? null, silhouette }];
    }),
  );
}

async function drawZones({ data, zoning }: Pass, simulations: number, seed: number, host: Host) {
  if (zoning === null || zoning.fit.k < 2) return [];
  const beds = zoning.beds.map((bed) => data.beds[bed]);
  const repeats = Math.min(simulations, beds.length > MANY_BEDS ? 20 : 200);
  const residuals = beds.flatMap((bed) => {
    const kept = bed.shells.map((at) => data.shells[at]).filter((shell) => !shell.setAside);
    if (kept.length < 2) return [];
    const mean = kept.reduce((sum, shell) => sum + shell.x, 0) / kept.length;
    return kept.map((shell) => (shell.x - mean) * Math.sqrt(kept.length / (kept.length - 1)));
  });
  const { means, weights, tau } = zoning.fit;
  const tasks = stabilityTasks(
    {
      values: beds.map((bed) => bed.mean),
      errors: beds.map((bed) => bed.se),
      shells: beds.map((bed) => bed.n),
      residuals,
      fit: { means, weights, tau },
      labels: zoning.labels,
      seed,
    },
    repeats,
  );
  return ((await host.map(tasks)) as BootstrapZones[][]).flat();
}
