import type { BedMark, BedPlace, BedRow, ClockBed, ClockData, PublishedSummary, Shell } from '../model/index.js';
import { type Assignment, zoneAssigner } from './assignment.js';
import { zoneName } from './zone-rows.js';
import type { Zoning } from './zoning.js';

/** What a bed's row says beyond its means and zone. */
export interface BedNotes {
  readonly place: BedPlace | null;
  readonly marks: readonly BedMark[];
  readonly reading: string;
}

/** What the rows of beds.csv are made from. */
export interface BedRowInput {
  readonly data: ClockData;
  readonly zoning: Zoning | null;
  readonly shells: readonly Shell[];
  readonly summaries: readonly PublishedSummary[];
  readonly notes: (bed: ClockBed) => BedNotes;
  /** Zone of a log ratio with its error. Default: from the zones of the fit alone. */
  readonly assign?: (x: number, error: number) => Assignment;
}

/** Rows of beds.csv for one clock, in the order of ClockData. D/L statistics are of the shells kept, on the D/L scale. */
export function bedRows(input: BedRowInput): BedRow[] {
  const { data, zoning, notes } = input;
  const published = new Map<string, PublishedSummary[]>();
  for (const summary of input.summaries) {
    if (summary.taxon !== data.clock.taxon || summary.fraction !== data.clock.fraction) continue;
    if (!data.clock.amino_acids.includes(summary.amino_acid)) continue;
    const key = `${summary.section}/${summary.bed}`;
    published.set(key, [...(published.get(key) ?? []), summary]);
  }
  const zoneOf = zoning === null ? null : (input.assign ?? zoneAssigner(zoning.priors));
  return data.beds.map((bed) => {
    const { place, marks, reading } = notes(bed);
    const assignment = zoneOf === null || bed.n === 0 ? null : zoneOf(bed.mean, bed.se);
    return {
      clock: data.clock.name,
      section: bed.section,
      bed: bed.bed,
      place: place?.value ?? null,
      taxon: data.clock.taxon,
      shells: bed.n,
      ...ratioStatistics(bed, data, published.get(bed.key) ?? NONE),
      log_mean: bed.n > 0 ? bed.mean : null,
      log_se: bed.n > 0 ? bed.se : null,
      zone: assignment === null ? null : zoneName(assignment.zone),
      zone_probability: assignment?.probability ?? null,
      second_zone: assignment === null || assignment.second === null ? null : zoneName(assignment.second),
      second_probability: assignment?.secondProbability ?? null,
      straddles: assignment?.straddles ?? false,
      marks,
      reading,
    };
  });
}

const NONE: readonly PublishedSummary[] = [];

/**
 * Shells set aside, and of the others mean, standard deviation between shells and standard error of D/L; a published summary
 * joins with its own sd and n.
 */
function ratioStatistics(bed: ClockBed, data: ClockData, published: readonly PublishedSummary[]) {
  const values: number[] = [];
  for (const at of bed.shells) if (!data.shells[at].setAside) values.push(Math.exp(data.shells[at].x));
  const set_aside = bed.shells.length - values.length;
  const single = data.clock.amino_acids.length === 1;
  const groups = single ? published.map(({ mean, sd, n }) => ({ mean, sd, n })) : [];
  // an index has no published mean of its own: its bed mean stands in
  if (!single && published.length > 0) groups.push({ mean: Math.exp(bed.mean), sd: null, n: bed.n - values.length });
  const n = values.length + groups.reduce((sum, group) => sum + group.n, 0);
  if (n === 0) return { set_aside, dl_mean: null, dl_sd: null, dl_se: null };
  const total = values.reduce((sum, value) => sum + value, 0) + groups.reduce((sum, g) => sum + g.n * g.mean, 0);
  const mean = total / n;
  let squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  for (const group of groups) squares += group.n * (group.mean - mean) ** 2 + (group.n - 1) * (group.sd ?? 0) ** 2;
  const known = n > 1 && groups.every((group) => group.sd !== null || group.n === 1);
  const sd = known ? Math.sqrt(squares / (n - 1)) : null;
  return { set_aside, dl_mean: mean, dl_sd: sd, dl_se: sd === null ? null : sd / Math.sqrt(n) };
}
