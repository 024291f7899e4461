import type { ScreeningLimits, ScreeningMark, Shell } from '../model/index.js';
import type { PairCurve } from './pair-curves.js';

/**
 * A screening rule: looks at all shells of a survey at once and marks the odd ones. A rule never drops a shell. Rules on
 * pairs of amino acids take the curves of the pairs as well, so that they are drawn once for all.
 */
export type ScreeningRule = (
  shells: readonly Shell[],
  limits: ScreeningLimits,
  curves?: readonly (readonly PairCurve[])[],
) => ScreeningMark[];

/** Fewest shells of one taxon and fraction from which a rule learns what is usual. */
export const FEWEST_SHELLS = 10;

/**
 * Indices of the shells of each taxon and fraction: what is usual differs between taxa and fractions, so rules that
 * learn from the survey learn within one group.
 */
export function groupsOfShells(shells: readonly Shell[]): number[][] {
  const groups: number[][] = [];
  const byTaxon = new Map<string, Map<string, number[]>>();
  shells.forEach(({ taxon, fraction }, index) => {
    const fractions = byTaxon.get(taxon) ?? new Map<string, number[]>();
    if (fractions.size === 0) byTaxon.set(taxon, fractions);
    const group = fractions.get(fraction);
    if (group !== undefined) {
      group.push(index);
      return;
    }
    const started = [index];
    fractions.set(fraction, started);
    groups.push(started);
  });
  return groups;
}

/** A number as evidence shows it: at most 3 significant digits. */
export const shown = (value: number): string => String(Number(value.toPrecision(3)));
