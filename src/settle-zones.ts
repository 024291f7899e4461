import { type RunContext, zonePass } from './clock-run.js';
import type { Host } from './model/index.js';
import type { Settled } from './passes.js';
import type { Random } from './statistics/index.js';
import { bedScatters, type ModelChoice, type SettledChoice, settleChoice } from './zones/index.js';

/** The passes over a clock with their number of zones settled. */
export interface SettledZones {
  readonly settled: Settled;
  /** How the number was chosen; null where no bed has a mean. */
  readonly choice: {
    /** By BIC alone. */
    readonly byBic: ModelChoice;
    /** After the bootstraps where BIC was close. */
    readonly chosen: ModelChoice;
    readonly comparisons: SettledChoice['comparisons'];
  } | null;
}

/** Settles the number of zones where BIC is close by a parametric bootstrap of the likelihood ratio (design 7.3). */
export async function settleZones(
  context: RunContext,
  settled: Settled,
  random: Random,
  host: Host,
): Promise<SettledZones> {
  const { options } = context;
  const { zoning, data } = settled.last;
  if (zoning === null) return { settled, choice: null };
  host.progress(`number of zones of ${data.clock.name}`, 0);
  const byBic = zoning.choice;
  const values = zoning.beds.map((bed) => data.beds[bed].mean);
  const errors = zoning.beds.map((bed) => data.beds[bed].se);
  const { choice: chosen, comparisons } = await settleChoice(byBic, values, errors, {
    alpha: options.alpha,
    seed: random.fork(1).integer(2 ** 31),
    simulations: options.simulations,
    map: host.map,
    scatters: bedScatters(data, zoning.beds),
  });
  const choice = { byBic, chosen, comparisons };
  if (chosen.bestZones === byBic.bestZones && chosen.verdict === byBic.verdict) return { settled, choice };
  const last = zonePass(context, settled.last, settled.left, random.fork(2), { choice: chosen });
  return { settled: { ...settled, last }, choice };
}
