import type { ClockData, PublishedSummary, Shell } from '../model/index.js';
import type { LaboratoryOffset } from './laboratory-offsets.js';

/**
 * Carries the error of laboratory offsets into the beds: a share p of a bed's shells corrected by an offset of error e adds
 * (p·e)² to the variance of its mean. All amino acids of an index are taken to err together, which never flatters. The
 * error is one for all beds of a laboratory; it is given to each of them by itself, so it widens comparisons of two such
 * beds more than it need.
 */
export function withLaboratoryErrors(
  data: ClockData,
  shells: readonly Shell[],
  summaries: readonly PublishedSummary[],
  offsets: readonly LaboratoryOffset[],
): ClockData {
  if (offsets.length === 0) return data;
  const { clock } = data;
  const errors = new Map<string, number>();
  for (const { lab, amino_acid, se } of offsets) {
    const at = clock.amino_acids.indexOf(amino_acid);
    if (at >= 0) errors.set(lab, (errors.get(lab) ?? 0) + Math.abs(clock.weights[at]) * se);
  }
  if (errors.size === 0) return data;
  const published = new Map<string, PublishedSummary[]>();
  for (const summary of summaries) {
    if (summary.taxon !== clock.taxon || summary.fraction !== clock.fraction) continue;
    if (summary.amino_acid !== clock.amino_acids[0]) continue;
    const key = `${summary.section}/${summary.bed}`;
    published.set(key, [...(published.get(key) ?? []), summary]);
  }
  const beds = data.beds.map((bed) => {
    if (bed.n === 0) return bed;
    const weights = new Map<string, number>();
    const count = (labs: readonly string[], n: number): void => {
      for (const lab of labs) weights.set(lab, (weights.get(lab) ?? 0) + n / labs.length);
    };
    for (const at of bed.shells) if (!data.shells[at].setAside) count(shells[data.shells[at].shell].labs, 1);
    for (const summary of published.get(bed.key) ?? []) count(summary.labs, summary.n);
    let variance = 0;
    for (const [lab, weight] of weights) variance += ((weight / bed.n) * (errors.get(lab) ?? 0)) ** 2;
    return variance > 0 ? { ...bed, se: Math.hypot(bed.se, Math.sqrt(variance)) } : bed;
  });
  return { ...data, beds };
}
