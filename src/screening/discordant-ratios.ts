import type { AminoAcid, ScreeningLimits, ScreeningMark, Shell } from '../model/index.js';
import { type PairCurve, pairCurvesByGroup } from './pair-curves.js';
import { shown } from './rule.js';
import { widenedLimit } from './widened-limit.js';

/** The worst pair of a shell so far. */
interface Worst {
  readonly distance: number;
  readonly pair: string;
  readonly limit: number;
  /** How far off each amino acid is over all its pairs, in standard deviations, signed: positive is too high. */
  readonly off: Map<AminoAcid, number>;
}

/**
 * Marks shells that lie off their taxon's robust log–log line between two amino acids (settings key
 * `screening.discordance`, default 3.5 robust standard deviations). The limit is widened for the number of pairs a
 * shell is looked at in and for few shells, so that a clean shell is marked as rarely as by a single pair at the
 * limit: 5 in 10,000. Needs 10 shells of the taxon and fraction with both amino acids.
 *
 * Source: Kosnik and Kaufman 2008, Quaternary Geochronology 3, 328–341, 10.1016/j.quageo.2008.03.001 (relation of Asp
 * to Glu D/L).
 *
 * @param curves Pairs of amino acids of each taxon and fraction; worked out from the shells when absent.
 */
export function discordantRatios(
  shells: readonly Shell[],
  limits: ScreeningLimits,
  curves: readonly (readonly PairCurve[])[] = pairCurvesByGroup(shells),
): ScreeningMark[] {
  const worst = new Map<number, Worst>();
  for (const pairs of curves) {
    for (const { first, second, curve, points } of pairs) {
      const limit = widenedLimit(limits.discordance, pairs.length, curve.df);
      for (const { shell, difference, expected, sd } of points) {
        const distance = (difference - expected) / sd;
        const known = worst.get(shell);
        const off = known?.off ?? new Map<AminoAcid, number>();
        off.set(first, (off.get(first) ?? 0) + distance);
        off.set(second, (off.get(second) ?? 0) - distance);
        const further = known === undefined || Math.abs(distance) / limit > known.distance / known.limit;
        const now = { distance: Math.abs(distance), pair: `${first} against ${second}`, limit, off };
        worst.set(shell, further ? now : { ...known, off });
      }
    }
  }
  return [...worst]
    .filter(([, { distance, limit }]) => distance >= limit)
    .sort(([a], [b]) => a - b)
    .map(([shell, { distance, pair, limit, off }]) => {
      const [code, sum] = [...off].sort((a, b) => Math.abs(b[1]) - Math.abs(a[1]))[0];
      const blame = off.size > 2 ? `; over all pairs ${code} stands out, too ${sum > 0 ? 'high' : 'low'}` : '';
      const evidence = `${pair} lies ${shown(distance)} robust standard deviations off the taxon's log–log line, limit ${shown(limit)}${blame}`;
      return { shell, mark: 'discordant ratios' as const, evidence };
    });
}
