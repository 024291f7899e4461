import type { Analysis, BedRecord, Survey } from '../../src/model/index.js';
import type { CoastOptions } from './coast-options.js';
import { drawShell, type TrueShell } from './draw-shells.js';
import { type PlannedBed, pickOdd, pickUpsideDown, planBeds, rankRange, shuffled, stream } from './plan-coast.js';

export { writeCoastCsv } from './coast-csv.js';
export type { CoastOptions } from './coast-options.js';
export type { TrueShell } from './draw-shells.js';
export type { ShellKind } from './odd-shells.js';

/** What is true of one bed. */
export interface TrueBed {
  /** `section/bed`. */
  readonly key: string;
  readonly section: string;
  /** 1 is the youngest; 0 on a continuum. */
  readonly zone: number;
  /** Log ratio that age alone gives the main amino acid of the first taxon: equal within a zone. */
  readonly extent: number;
  /** Expected log ratio of the main amino acid: extent with spread, section effect and gradient. */
  readonly x: number;
  /** Lowest and highest rank this bed can take (1 is the oldest): beds of one age in different sections are tied. */
  readonly rankLow: number;
  readonly rankHigh: number;
  /** Value of the gradient's column; 0 without a gradient. */
  readonly gradient: number;
}

/** Two neighbouring beds as they were logged, the wrong way round: `lower` is in truth the younger. */
export interface UpsideDownPair {
  readonly section: string;
  readonly lower: string;
  readonly upper: string;
  /** By how much the log ratio of `upper` exceeds that of `lower`. */
  readonly difference: number;
}

/** A survey and the truth behind it. */
export interface SimulatedCoast {
  readonly survey: Survey;
  readonly truth: {
    readonly beds: ReadonlyMap<string, TrueBed>;
    readonly shells: ReadonlyMap<string, TrueShell>;
    readonly upsideDown: readonly UpsideDownPair[];
    readonly gradientSlope: number;
  };
}
/**
 * A survey with a known truth: sections of beds in superposition along a straight coast, shells with log-normal scatter.
 * Pure: the same options give the same survey. Beds are named B1, B2 … upwards in true superposition; where two were
 * logged upside down their names stay and their places are swapped.
 *
 * @throws when the options leave no room for the odd shells, swapped pairs or zones asked for.
 */
export function simulateCoast(given: CoastOptions = {}): SimulatedCoast {
  const options = {
    ...given,
    seed: given.seed ?? 1,
    sections: given.sections ?? 10,
    beds: given.beds ?? 30,
    zones: given.zones ?? 4,
    spacing: given.spacing ?? Math.log(1.3),
    youngest: given.youngest ?? Math.log(0.12),
    scatter: given.scatter ?? 0.05,
  };
  const planned = planBeds(options);
  const swapped = pickUpsideDown(planned, options);
  const centre = planned.reduce((sum, bed) => sum + bed.gradient, 0) / planned.length;
  const slope = given.gradient?.slope ?? 0;
  const atExtent = (bed: PlannedBed, extent: number) => extent + bed.deviation + slope * (bed.gradient - centre);
  const { analyses, shells } = drawShells(planned, options, atExtent);
  const trueBeds = planned.map((bed): [string, TrueBed] => {
    const [rankLow, rankHigh] = rankRange(bed, planned);
    const { key, section, zone, extent, gradient } = bed;
    return [key, { key, section, zone, extent, x: atExtent(bed, extent), rankLow, rankHigh, gradient }];
  });
  return {
    survey: {
      inputs: [{ role: 'shells', file: 'shells.csv', sha256: '0'.repeat(64), rows: analyses.length }],
      analyses,
      beds: logBeds(planned, swapped, options),
      relations: [],
      standards: [],
      problems: [],
    },
    truth: {
      beds: new Map(trueBeds),
      shells,
      upsideDown: swapped.map(([older, younger]) => ({
        section: older.section,
        lower: younger.key,
        upper: older.key,
        difference: atExtent(older, older.extent) - atExtent(younger, younger.extent),
      })),
      gradientSlope: slope,
    },
  };
}

/** Shells of every bed, of one taxon or two. */
function drawShells(
  planned: readonly PlannedBed[],
  options: CoastOptions & { seed: number; spacing: number; youngest: number; scatter: number },
  atExtent: (bed: PlannedBed, extent: number) => number,
): { analyses: Analysis[]; shells: Map<string, TrueShell> } {
  const [fewest, most] = options.shells ?? [4, 8];
  const odd = pickOdd(planned, options);
  const second = options.secondTaxon;
  const dealt = shuffled(planned, stream(options.seed, 4));
  const paired = new Set(second ? dealt.slice(0, second.paired ?? 8) : []);
  const alone = new Set(second ? dealt.slice(paired.size, paired.size + (second.alone ?? 0)) : []);

  const analyses: Analysis[] = [];
  const shells = new Map<string, TrueShell>();
  for (const bed of planned) {
    const count = fewest + stream(options.seed, 5, bed.index).integer(most - fewest + 1);
    const oddOne = odd.get(bed.key);
    const oddIndex = stream(options.seed, 6, bed.index).integer(count);
    const taxa = [...(alone.has(bed) ? [] : [0]), ...(paired.has(bed) || alone.has(bed) ? [1] : [])];
    for (const which of taxa) {
      const taxon = which === 0 ? (options.taxon ?? 'Invenus') : (second?.name ?? 'Altera');
      for (let i = 0; i < count; i++) {
        const kind = oddOne && i === oddIndex && which === taxa[0] ? oddOne.kind : 'clean';
        const source = kind === 'clean' ? null : oddOne!.source;
        const x = atExtent(bed, source ? source.extent : bed.extent);
        const own = which === 0 ? x : (second?.offset ?? 0.2) + (second?.slope ?? 1) * x;
        const shell = `${which === 0 ? '' : 'A'}${i + 1}`;
        const random = stream(options.seed, 7, bed.index, which, i);
        analyses.push(...drawShell({ bed, taxon, shell, x: own, kind }, options, random, analyses.length + 2));
        const key = `${bed.key}/${shell}`;
        const [sourceZone, sourceBed] = source ? [source.zone, source.key] : [null, null];
        shells.set(key, { key, bed: bed.key, taxon, shell, kind, sourceZone, sourceBed });
      }
    }
  }
  return { analyses, shells };
}

/** The beds table as the field notes have it: places of swapped pairs are the wrong way round. */
function logBeds(
  planned: readonly PlannedBed[],
  swapped: readonly (readonly [PlannedBed, PlannedBed])[],
  options: CoastOptions,
): BedRecord[] {
  const position = new Map(planned.map((bed) => [bed, bed.position]));
  for (const [older, younger] of swapped) {
    position.set(older, younger.position);
    position.set(younger, older.position);
  }
  const kind = options.place ?? 'level';
  const column = options.gradient?.column ?? 'cmat_c';
  return planned.map((bed): BedRecord => {
    const level = position.get(bed)! + 1;
    const inSection = planned.filter((b) => b.section === bed.section).length;
    const value = kind === 'level' ? level : kind === 'height_m' ? 1.5 * level : 1.5 * (inSection - level + 1);
    const coast_km = 10 * bed.sectionIndex;
    return {
      section: bed.section,
      bed: bed.bed,
      place: { kind, value },
      elevation_m: null,
      // far out in the South Pacific, so that no real coast is meant
      latitude: -48 - 0.05 * bed.sectionIndex,
      longitude: -123 + 0.1 * bed.sectionIndex,
      coast_km,
      cmat_c: options.gradient && column === 'cmat_c' ? bed.gradient : null,
      burial_m: null,
      note: null,
      columns: { coast_km, ...(options.gradient ? { [column]: bed.gradient } : {}) },
    };
  });
}
