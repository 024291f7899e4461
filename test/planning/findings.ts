import type { BedRow, Findings, OrderRow, PairRow, RelationRow } from '../../src/model/index.js';
import { DEFAULT_OPTIONS } from '../../src/model/index.js';
import { normalCdf } from '../../src/statistics/index.js';

/** One bed of made-up findings. */
export interface MadeBed {
  readonly section: string;
  readonly bed: string;
  readonly mean: number;
  readonly shells: number;
  readonly zone?: string | null;
  readonly zoneProbability?: number;
  readonly marks?: BedRow['marks'];
  readonly reading?: string;
}

/** Findings of one clock worked out from the bed means alone, for tests of planning that need no whole run. */
export function madeFindings(
  beds: readonly MadeBed[],
  given: {
    readonly scatter?: number;
    readonly spread?: number;
    readonly alpha?: number;
    readonly relations?: readonly Partial<RelationRow>[];
    readonly pairs?: boolean;
    readonly rest?: Partial<Findings>;
  } = {},
): Findings {
  const { scatter = 0.07, spread = 0, alpha = 0.05 } = given;
  const clock = 'Invenus THAA Ile';
  const errorOf = (bed: MadeBed) => scatter / Math.sqrt(bed.shells);
  const older = (a: MadeBed, b: MadeBed) =>
    normalCdf(
      (a.mean - b.mean) /
        Math.sqrt(errorOf(a) ** 2 + errorOf(b) ** 2 + (a.section === b.section ? 0 : 2 * spread ** 2)),
    );
  const sorted = [...beds].sort((a, b) => b.mean - a.mean);
  const zones = [...new Set(beds.map((bed) => bed.zone ?? null).filter((zone) => zone !== null))];
  const key = (bed: MadeBed) => `${bed.section}/${bed.bed}`;
  return {
    program: 'bedorder',
    version: '1.0.0',
    options: { ...DEFAULT_OPTIONS, alpha },
    inputs: [],
    clocks: [
      {
        clock,
        taxon: 'Invenus',
        fraction: 'THAA',
        amino_acids: ['Ile'],
        main: true,
        shells: beds.reduce((sum, bed) => sum + bed.shells, 0),
        beds: beds.length,
        scatter,
        spread,
        zones: Math.max(1, zones.length),
        verdict: zones.length > 1 ? 'zones' : 'one zone',
        slope: null,
        slope_low: null,
        slope_high: null,
        rand_with_main: null,
      },
    ],
    zones: [],
    zone_counts: [],
    adjacent_zones: [],
    beds: beds.map((bed) => ({
      clock,
      section: bed.section,
      bed: bed.bed,
      place: null,
      taxon: 'Invenus',
      shells: bed.shells,
      set_aside: 0,
      dl_mean: Math.exp(bed.mean),
      dl_sd: null,
      dl_se: null,
      log_mean: bed.mean,
      log_se: errorOf(bed),
      zone: bed.zone ?? null,
      zone_probability: bed.zone ? (bed.zoneProbability ?? 0.999) : null,
      second_zone: null,
      second_probability: null,
      straddles: (bed.zoneProbability ?? 1) < 0.9,
      marks: bed.marks ?? [],
      reading: bed.reading ?? '',
    })),
    shells: [],
    order: sorted.map((bed, at): OrderRow => {
      const next = sorted[at + 1];
      const p = next ? older(bed, next) : null;
      return {
        clock,
        rank: at + 1,
        section: bed.section,
        bed: bed.bed,
        zone: bed.zone ?? null,
        rank_low: at + 1,
        rank_high: at + 1,
        p_older_than_next: p,
        resolved: p === null ? null : p >= 1 - alpha,
      };
    }),
    pairs:
      given.pairs === false
        ? []
        : beds.flatMap((a, i) =>
            beds.slice(i + 1).map(
              (b): PairRow => ({
                clock,
                bed_a: key(a),
                bed_b: key(b),
                p_a_older: older(a, b),
                p_same_zone: a.zone && a.zone === b.zone ? 0.99 : 0.01,
              }),
            ),
          ),
    relations: (given.relations ?? []).map((relation) => ({
      clock,
      lower: '',
      upper: '',
      basis: 'superposition',
      kind: 'older',
      certainty: 'certain',
      difference: null,
      z: null,
      p_reversed: null,
      verdict: 'agrees',
      verdict_after: 'agrees',
      reading: '',
      ...relation,
    })),
    sections: [],
    correlation: [],
    problems: [],
    sites: [],
    section_order: [...new Set(beds.map((bed) => bed.section))],
    shell_ratios: [],
    evidence: [],
    conflicts: [],
    diagnostics: [],
    gradients: [],
    conversions: [],
    votes: [],
    shares: [],
    remarks: [],
    ...given.rest,
  } as Findings;
}
