import { AMINO_ACIDS, type AminoAcid, type Shell } from '../model/index.js';
import { countRatios } from './count-ratios.js';
import { type RobustCurve, robustCurve } from './robust-curve.js';
import { FEWEST_SHELLS, groupsOfShells } from './rule.js';

/** How two amino acids run together in one taxon and fraction. */
export interface PairCurve {
  readonly first: AminoAcid;
  readonly second: AminoAcid;
  /** ln first − ln second as a curve of their mean. */
  readonly curve: RobustCurve;
  readonly points: readonly PairPoint[];
}

/** One shell on the log–log line of two amino acids. */
export interface PairPoint {
  /** Index of the shell. */
  readonly shell: number;
  /** Difference of the log ratios, first minus second. */
  readonly difference: number;
  /** What the curve expects it to be. */
  readonly expected: number;
  /** Robust standard deviation there. */
  readonly sd: number;
}

/**
 * The taxon's own log–log line of every two amino acids that at least 10 of the shells have. Drawn as the difference of
 * the two log ratios against their mean, so that neither amino acid is held to be free of error and a pair of which
 * one nears equilibrium stays tame.
 *
 * @param shells All shells of the run.
 * @param members Indices of the shells of one taxon and fraction.
 */
export function pairCurves(shells: readonly Shell[], members: readonly number[]): PairCurve[] {
  const counts = countRatios(members.map((index) => shells[index]));
  const measured = AMINO_ACIDS.filter((code) => counts.get(code)! >= FEWEST_SHELLS);
  const curves: PairCurve[] = [];
  measured.forEach((first, place) => {
    for (const second of measured.slice(place + 1)) {
      const both = members.filter(
        (index) => shells[index].ratios[first] !== undefined && shells[index].ratios[second] !== undefined,
      );
      if (both.length < FEWEST_SHELLS) continue;
      const logs = both.map((index) => [
        Math.log(shells[index].ratios[first] ?? Number.NaN),
        Math.log(shells[index].ratios[second] ?? Number.NaN),
      ]);
      const means = logs.map(([a, b]) => (a + b) / 2);
      const differences = logs.map(([a, b]) => a - b);
      const curve = robustCurve(means, differences);
      const points = both.map((shell, i) => ({
        shell,
        difference: differences[i],
        expected: curve.at(means[i]),
        sd: curve.sdAt(means[i]),
      }));
      curves.push({ first, second, curve, points });
    }
  });
  return curves;
}

/**
 * The {@link pairCurves} of each taxon and fraction, those left out whose points all lie on the curve: with no scatter
 * there is no measure of being off it.
 */
export function pairCurvesByGroup(shells: readonly Shell[]): PairCurve[][] {
  return groupsOfShells(shells).map((members) => pairCurves(shells, members).filter((pair) => pair.curve.sd > 0));
}
