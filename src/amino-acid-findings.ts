import { aminoAcidShares, type ClockSet } from './beds/index.js';
import type { Pass, RunContext } from './clock-run.js';
import type { AminoAcidShare, AminoAcidVotes, Remark } from './model/index.js';
import type { Random } from './statistics/index.js';
import { aminoAcidVotes, kmeansCheck } from './zones/index.js';

/** What the amino acids of one main clock say beside its zones. */
export interface AminoAcidFindings {
  readonly votes: readonly AminoAcidVotes[];
  readonly shares: readonly AminoAcidShare[];
  readonly remarks: readonly Remark[];
}

/** Beds above which votes and k-means are not asked: they look at every pair of beds. */
const MOST_BEDS = 400;

/** Votes of single amino acids, their shares in the index, and k-means as the independent check of the zones (design 7.10). */
export function aminoAcidFindings(
  { shells, options }: RunContext,
  set: ClockSet,
  last: Pass,
  singles: readonly Pass[],
  random: Random,
): AminoAcidFindings {
  const clock = last.data.clock.name;
  if (set.index === null || last.data.beds.length > MOST_BEDS) {
    return { votes: [], shares: set.index === null ? [] : aminoAcidShares(set.index, clock), remarks: [] };
  }
  const votes = aminoAcidVotes(
    singles
      .filter((pass) => last.data.clock.amino_acids.includes(pass.data.clock.amino_acids[0]))
      .map((pass) => ({
        aminoAcid: pass.data.clock.amino_acids[0],
        data: pass.data,
        spread: pass.zoning?.spread ?? 0,
      })),
    { clock, alpha: options.alpha },
  );
  const shares = aminoAcidShares(set.index, clock);
  return { votes, shares, remarks: checkRemarks() };

  function checkRemarks(): Remark[] {
    const { data, zoning } = last;
    if (zoning === null || zoning.fit.k < 2) return [];
    // each amino acid has its own slope along a gradient, which would else look like zones
    const slopes = data.clock.amino_acids.map(
      (code) => singles.find((pass) => pass.data.clock.amino_acids[0] === code)?.data.slope ?? data.slope,
    );
    const means = zoning.beds.map((at) =>
      data.clock.amino_acids.map((code, k) => {
        const ratios = data.beds[at].shells
          .filter((shell) => !data.shells[shell].setAside)
          .map((shell) => shells[data.shells[shell].shell].ratios[code])
          .filter((ratio) => ratio !== undefined);
        return (
          ratios.reduce((sum, ratio) => sum + Math.log(ratio), 0) / ratios.length - slopes[k] * data.beds[at].gradient
        );
      }),
    );
    const check = kmeansCheck({
      means,
      within: set.index!.within,
      labels: zoning.labels,
      seed: random.integer(1e6),
    });
    if (check === null) return [];
    const rand = check.rand.toFixed(2);
    const level = check.rand < 0.8 ? 'caution' : 'finding';
    const said = check.rand < 0.8 ? 'does not bear out the zones' : 'bears out the zones';
    return [
      { clock, level, text: `Grouping the beds by k-means on all amino acids ${said} (adjusted Rand index ${rand}).` },
    ];
  }
}
