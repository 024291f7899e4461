import type { RunContext } from './clock-run.js';
import type { BedMark, BedSite, ClockBed, Evidence } from './model/index.js';
import type { Settled } from './passes.js';
import { screenBeds } from './screening/index.js';
import { isNearEquilibrium, type Zoning } from './zones/index.js';

/** Marks of each bed by key. */
export function bedMarks(
  { last: { data }, left }: Settled,
  sites: ReadonlyMap<string, BedSite>,
  { options, relations }: RunContext,
  zoning: Zoning | null,
): Map<string, BedMark[]> {
  const { beds } = data;
  const related = new Set(
    relations
      .filter(({ lower, upper }) => sites.get(lower)?.section === sites.get(upper)?.section)
      .flatMap(({ lower, upper }) => [lower, upper]),
  );
  const marks = new Map<string, BedMark[]>(beds.map((bed) => [bed.key, []]));
  for (const { bed, mark } of screenedBeds(beds, sites, options)) marks.get(beds[bed].key)!.push(mark);
  const inSection = new Map<string, number>();
  for (const bed of beds) inSection.set(bed.section, (inSection.get(bed.section) ?? 0) + 1);
  for (const bed of beds) {
    const own = marks.get(bed.key)!;
    const placed = sites.get(bed.key)?.place != null || related.has(bed.key);
    if (!placed && inSection.get(bed.section)! > 1) own.push('no place in section');
    if (data.scatter.assumed) own.push('assumed scatter');
    if (left.mixed.has(bed.key)) own.push('mixed age');
    if (zoning !== null && bed.n > 0 && isNearEquilibrium(data.clock, bed.mean)) own.push('near equilibrium');
  }
  return marks;
}

/** What is held for or against each bed, in sentences. */
export function bedEvidence(
  { last: { data }, ages }: Settled,
  marks: ReadonlyMap<string, readonly BedMark[]>,
  sites: ReadonlyMap<string, BedSite>,
  options: RunContext['options'],
): Evidence[] {
  const screened = data.beds.map((): string[] => []);
  for (const { bed, evidence } of screenedBeds(data.beds, sites, options)) screened[bed].push(sentence(evidence));
  return data.beds.flatMap((bed, at) => {
    const sentences = [...ages[at].sentences, ...screened[at]];
    if (marks.get(bed.key)?.includes('near equilibrium')) {
      sentences.push('Its ratio is near equilibrium, where older and younger beds come to look alike.');
    }
    return sentences.length === 0 ? [] : [{ clock: data.clock.name, about: 'bed' as const, name: bed.key, sentences }];
  });
}

const screenedBeds = (
  beds: readonly ClockBed[],
  sites: ReadonlyMap<string, BedSite>,
  { screening }: RunContext['options'],
) =>
  screenBeds(
    beds.map((bed) => ({ burial_m: sites.get(bed.key)?.burial_m ?? null, shells: bed.n })),
    screening,
  );

const sentence = (text: string): string =>
  `${text.charAt(0).toUpperCase()}${text.slice(1)}${text.endsWith('.') ? '' : '.'}`;
