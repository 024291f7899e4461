import type { AminoAcid, Analysis, BedRecord, Survey } from '../../src/model/index.js';
import { createRandom, type Random } from '../../src/statistics/random.js';
import type { CoastOptions, SimulatedAminoAcid } from './coast-options.js';
import { type ShellKind, spoil } from './odd-shells.js';

export type { CoastOptions } from './coast-options.js';
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

/** What is true of one shell. */
export interface TrueShell {
  /** `section/bed/shell`. */
  readonly key: string;
  readonly bed: string;
  readonly taxon: string;
  readonly shell: string;
  readonly kind: ShellKind;
  /** Zone and bed a reworked or intruded shell came from. */
  readonly sourceZone: number | null;
  readonly sourceBed: string | null;
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

/** Plausible D/L in a young Quaternary zone, for amino acids after the first. */
const YOUNG_RATIO: Readonly<Record<AminoAcid, number>> = {
  Asx: 0.25,
  Glx: 0.12,
  Ser: 0.4,
  Ala: 0.2,
  Val: 0.09,
  Phe: 0.16,
  Leu: 0.13,
  Ile: 0.12,
  Tyr: 0.16,
  Met: 0.2,
};

/** Typical total concentration, in pmol a milligram. */
const CONCENTRATION: Readonly<Record<AminoAcid, number>> = {
  Asx: 6000,
  Glx: 4200,
  Ser: 2200,
  Ala: 3600,
  Val: 1900,
  Phe: 1100,
  Leu: 1700,
  Ile: 1000,
  Tyr: 600,
  Met: 300,
};

/** A stream of its own for each purpose, so that one more draw for one purpose changes nothing in another. */
function stream(seed: number, ...labels: number[]): Random {
  let hash = Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b);
  for (const label of labels) {
    hash = Math.imul(hash ^ (hash >>> 15) ^ Math.imul(label + 1, 0xc2b2ae35), 0x27d4eb2f);
    hash ^= hash >>> 13;
  }
  return createRandom(hash >>> 0);
}

/** The values in an order drawn at random. */
function shuffled<T>(values: readonly T[], random: Random): T[] {
  const result = [...values];
  for (let i = result.length - 1; i > 0; i--) {
    const j = random.integer(i + 1);
    [result[i], result[j]] = [result[j], result[i]];
  }
  return result;
}

interface PlannedBed {
  readonly key: string;
  readonly section: string;
  readonly bed: string;
  /** Index of the section, and index in true superposition from the bottom. */
  readonly sectionIndex: number;
  readonly position: number;
  readonly zone: number;
  readonly extent: number;
  /** Deviation that is no age difference: spread and section effect. */
  readonly deviation: number;
  readonly gradient: number;
}

/** Sections with beds in true superposition: extents never grow upwards. */
function planBeds(
  options: Required<Pick<CoastOptions, 'seed' | 'sections' | 'beds' | 'zones' | 'spacing' | 'youngest'>> & CoastOptions,
): PlannedBed[] {
  const { seed, sections, beds, zones, spacing, youngest } = options;
  const range = options.continuumRange ?? 3 * spacing;
  const fewest = zones === 'continuum' ? 0 : Math.min(3, Math.floor(beds / (2 * zones)));
  for (let attempt = 0; attempt < 1000; attempt++) {
    const random = stream(seed, 1, attempt);
    const planned: PlannedBed[] = [];
    for (let i = 0; i < sections; i++) {
      const count = Math.floor(beds / sections) + (i < beds % sections ? 1 : 0);
      const section = `S${String(i + 1).padStart(2, '0')}`;
      const effect = (options.sectionEffect ?? 0) * random.normal();
      const jitter = random.uniform();
      const place = sections === 1 ? 0.5 : (i + 0.6 * (jitter - 0.5)) / (sections - 1);
      const drawn: { zone: number; extent: number; own: number }[] = [];
      for (let j = 0; j < count; j++) {
        const own = (options.spread ?? 0) * random.normal();
        if (zones === 'continuum') {
          drawn.push({ zone: 0, extent: youngest + range * random.uniform(), own });
        } else {
          // a second draw where the zone is in the section already: real sections seldom repeat one, and lack some
          let zone = 1 + random.integer(zones);
          if (drawn.some((bed) => bed.zone === zone)) zone = 1 + random.integer(zones);
          drawn.push({ zone, extent: youngest + (zone - 1) * spacing, own });
        }
      }
      drawn.sort((a, b) => b.extent - a.extent || b.own - a.own);
      drawn.forEach(({ zone, extent, own }, position) => {
        const bed = `B${position + 1}`;
        const gradient = options.gradient ? 10 + (options.gradient.range ?? 8) * place : 0;
        planned.push({
          key: `${section}/${bed}`,
          section,
          bed,
          sectionIndex: i,
          position,
          zone,
          extent,
          deviation: own + effect,
          gradient,
        });
      });
    }
    if (zones === 'continuum') return planned;
    const counts = Array.from({ length: zones }, (_, z) => planned.filter((bed) => bed.zone === z + 1).length);
    if (counts.every((count) => count >= fewest)) return planned;
  }
  throw new Error(`simulateCoast: ${beds} beds can't hold ${zones} zones; ask for more beds or fewer zones`);
}

/** Pairs of neighbouring beds, of different age and sharing no bed, to be logged the wrong way round. */
function pickUpsideDown(
  planned: readonly PlannedBed[],
  options: CoastOptions & { seed: number; spacing: number },
): [PlannedBed, PlannedBed][] {
  const wanted = options.upsideDown ?? 0;
  const pairs = planned.flatMap((older): [PlannedBed, PlannedBed][] => {
    const younger = planned.find((bed) => bed.section === older.section && bed.position === older.position + 1);
    return younger && older.extent - younger.extent >= 0.99 * options.spacing ? [[older, younger]] : [];
  });
  const used = new Set<PlannedBed>();
  const picked: [PlannedBed, PlannedBed][] = [];
  for (const pair of shuffled(pairs, stream(options.seed, 2))) {
    if (picked.length === wanted) break;
    if (pair.some((bed) => used.has(bed))) continue;
    for (const bed of pair) used.add(bed);
    picked.push(pair);
  }
  if (picked.length < wanted) {
    throw new Error(
      `simulateCoast: wanted ${wanted} pairs logged upside down, found room for ${picked.length}; ask for fewer`,
    );
  }
  return picked;
}

/** Which shell of which bed is odd, and where it came from. */
function pickOdd(planned: readonly PlannedBed[], options: CoastOptions & { seed: number; spacing: number }) {
  const random = stream(options.seed, 3);
  const picked = new Map<string, { kind: ShellKind; source: PlannedBed | null }>();
  const order = shuffled(planned, random);
  for (const kind of ['reworked', 'intruded', 'contaminated', 'altered'] as const) {
    let left = options.odd?.[kind] ?? 0;
    for (const bed of order) {
      if (left === 0) break;
      if (picked.has(bed.key)) continue;
      const sign = kind === 'reworked' ? 1 : -1;
      const sources = shuffled(planned, random).filter(
        (other) => sign * (other.extent - bed.extent) >= 0.99 * options.spacing,
      );
      const moved = kind === 'reworked' || kind === 'intruded';
      if (moved && sources.length === 0) continue;
      picked.set(bed.key, { kind, source: moved ? sources[0] : null });
      left -= 1;
    }
    if (left > 0) throw new Error(`simulateCoast: no bed left for ${left} ${kind} shells; ask for fewer`);
  }
  return picked;
}

/** Rank range of each bed: what is older for certain comes first, beds of one age in different sections are tied. */
function rankRange(bed: PlannedBed, planned: readonly PlannedBed[]): [number, number] {
  const older = planned.filter(
    (b) => b.extent > bed.extent || (b.extent === bed.extent && b.section === bed.section && b.position < bed.position),
  );
  const younger = planned.filter(
    (b) => b.extent < bed.extent || (b.extent === bed.extent && b.section === bed.section && b.position > bed.position),
  );
  return [older.length + 1, planned.length - younger.length];
}

/** D/L of each amino acid for a shell at log ratio x (main amino acid, first taxon), with its errors. */
function drawRatios(
  aminoAcids: readonly Required<SimulatedAminoAcid>[],
  x: number,
  origin: number,
  correlation: number,
  random: Random,
): number[] {
  const shared = random.normal();
  return aminoAcids.map((aminoAcid) => {
    const error = aminoAcid.scatter * (Math.sqrt(correlation) * shared + Math.sqrt(1 - correlation) * random.normal());
    const signal = aminoAcid.noise ? 0 : aminoAcid.slope * (x - origin);
    return Math.exp(Math.log(aminoAcid.youngest) + signal + error);
  });
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
    taxon: given.taxon ?? 'Invenus',
  };
  const [fewest, most] = given.shells ?? [4, 8];
  const correlation = given.correlation ?? 0;
  const aminoAcids = (given.aminoAcids ?? [{ code: 'Ile' as const }]).map((aminoAcid, i) => ({
    code: aminoAcid.code,
    slope: aminoAcid.slope ?? 1,
    scatter: aminoAcid.scatter ?? options.scatter,
    youngest: aminoAcid.youngest ?? (i === 0 ? Math.exp(options.youngest) : YOUNG_RATIO[aminoAcid.code]),
    noise: aminoAcid.noise ?? false,
  }));

  const planned = planBeds(options);
  const swapped = pickUpsideDown(planned, options);
  const odd = pickOdd(planned, options);
  const centre = planned.reduce((sum, bed) => sum + bed.gradient, 0) / planned.length;
  const slope = given.gradient?.slope ?? 0;
  const trueX = (bed: PlannedBed) => bed.extent + bed.deviation + slope * (bed.gradient - centre);

  const position = new Map(planned.map((bed) => [bed, bed.position]));
  for (const [older, younger] of swapped) {
    position.set(older, younger.position);
    position.set(younger, older.position);
  }

  const second = given.secondTaxon;
  const dealt = shuffled(planned, stream(options.seed, 4));
  const paired = new Set(second ? dealt.slice(0, second.paired ?? 8) : []);
  const alone = new Set(second ? dealt.slice(paired.size, paired.size + (second.alone ?? 0)) : []);

  const analyses: Analysis[] = [];
  const shells = new Map<string, TrueShell>();
  let line = 1;
  planned.forEach((bed, b) => {
    const count = fewest + stream(options.seed, 5, b).integer(most - fewest + 1);
    const oddOne = odd.get(bed.key);
    const oddShell = stream(options.seed, 6, b).integer(count);
    const taxa = [...(alone.has(bed) ? [] : [0]), ...(paired.has(bed) || alone.has(bed) ? [1] : [])];
    for (const which of taxa) {
      const taxon = which === 0 ? options.taxon : (second?.name ?? 'Altera');
      for (let i = 0; i < count; i++) {
        const isOdd = oddOne !== undefined && i === oddShell && which === taxa[0];
        const source = isOdd ? oddOne.source : null;
        const x = source ? source.extent + bed.deviation + slope * (bed.gradient - centre) : trueX(bed);
        const own = which === 0 ? x : (second?.offset ?? 0.2) + (second?.slope ?? 1) * x;
        const random = stream(options.seed, 7, b, which, i);
        let ratios = drawRatios(aminoAcids, own, options.youngest, correlation, random);
        let serine = Math.min(0.7, 0.36 * Math.exp(0.15 * random.normal()));
        const strength = Math.exp(0.25 * random.normal());
        const amounts = aminoAcids.map((a) => CONCENTRATION[a.code] * strength * Math.exp(0.08 * random.normal()));
        const serineRatio = Math.exp(Math.log(0.45) + 0.08 * random.normal());
        if (isOdd) {
          const spoilt = spoil(oddOne.kind, ratios, serine, stream(options.seed, 8, b));
          ratios = spoilt.ratios;
          serine = spoilt.serine;
        }
        const name = `${which === 0 ? '' : 'A'}${i + 1}`;
        shells.set(`${bed.key}/${name}`, {
          key: `${bed.key}/${name}`,
          bed: bed.key,
          taxon,
          shell: name,
          kind: isOdd ? oddOne.kind : 'clean',
          sourceZone: source ? source.zone : null,
          sourceBed: source ? source.key : null,
        });
        for (let p = 0; p < (given.preparations ?? 1); p++) {
          const inner = ratios.map((ratio) => ratio * Math.exp((given.withinShell ?? 0) * random.normal()));
          const byCode: Partial<Record<AminoAcid, number>> = {};
          const concentrations: Partial<Record<AminoAcid, number>> = {};
          aminoAcids.forEach(({ code }, k) => {
            byCode[code] = inner[k];
            concentrations[code] = amounts[k];
          });
          if (given.serine === 'concentrations') {
            const asx = byCode.Asx;
            if (asx === undefined)
              throw new Error("simulateCoast: serine 'concentrations' needs Asx among the amino acids");
            byCode.Ser = serineRatio;
            concentrations.Ser = ((serine * concentrations.Asx!) / (1 + asx)) * (1 + serineRatio);
          }
          line += 1;
          analyses.push({
            file: 'shells.csv',
            line,
            section: bed.section,
            bed: bed.bed,
            taxon,
            fraction: 'THAA',
            shell: name,
            preparation: (given.preparations ?? 1) > 1 ? String(p + 1) : null,
            injection: null,
            lab_id: `L${String(line).padStart(5, '0')}`,
            lab: null,
            method: null,
            ratios: byCode,
            concentrations,
            serine_ratio: given.serine === 'concentrations' ? null : serine,
            summary: null,
          });
        }
      }
    }
  });

  const kind = given.place ?? 'level';
  const column = given.gradient?.column ?? 'cmat_c';
  const beds = planned.map((bed): BedRecord => {
    const level = position.get(bed)! + 1;
    const inSection = planned.filter((b) => b.section === bed.section).length;
    const value = kind === 'level' ? level : kind === 'height_m' ? 1.5 * level : 1.5 * (inSection - level + 1);
    return {
      section: bed.section,
      bed: bed.bed,
      place: { kind, value },
      elevation_m: null,
      // far out in the South Pacific, so that no real coast is meant
      latitude: -48 - 0.05 * bed.sectionIndex,
      longitude: -123 + 0.1 * bed.sectionIndex,
      coast_km: 10 * bed.sectionIndex,
      cmat_c: given.gradient && column === 'cmat_c' ? bed.gradient : null,
      burial_m: null,
      note: null,
      columns: { coast_km: 10 * bed.sectionIndex, ...(given.gradient ? { [column]: bed.gradient } : {}) },
    };
  });

  const trueBeds = planned.map((bed): [string, TrueBed] => {
    const [rankLow, rankHigh] = rankRange(bed, planned);
    const { key, section, zone, extent, gradient } = bed;
    return [key, { key, section, zone, extent, x: trueX(bed), rankLow, rankHigh, gradient }];
  });
  return {
    survey: {
      inputs: [{ role: 'shells', file: 'shells.csv', sha256: '0'.repeat(64), rows: analyses.length }],
      analyses,
      beds,
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
        difference: trueX(older) - trueX(younger),
      })),
      gradientSlope: slope,
    },
  };
}

/** The coast as the text of a shells and a beds table. */
export function writeCoastCsv(coast: SimulatedCoast): { shells: string; beds: string } {
  const { analyses, beds } = coast.survey;
  const codes = Object.keys(analyses[0].ratios) as AminoAcid[];
  const place = beds[0].place?.kind ?? 'level';
  const table = (rows: (string | number | null)[][]) =>
    `${rows.map((row) => row.map((cell) => cell ?? '').join(',')).join('\n')}\n`;
  return {
    shells: table([
      [
        'section',
        'bed',
        'taxon',
        'shell',
        'preparation',
        'lab_id',
        ...codes.map((code) => `D/L ${code}`),
        ...codes.map((code) => `[${code}]`),
        'L-Ser/L-Asp',
      ],
      ...analyses.map((a) => [
        a.section,
        a.bed,
        a.taxon,
        a.shell,
        a.preparation,
        a.lab_id,
        ...codes.map((code) => a.ratios[code] ?? null),
        ...codes.map((code) => a.concentrations[code] ?? null),
        a.serine_ratio,
      ]),
    ]),
    beds: table([
      ['section', 'bed', place, 'latitude', 'longitude', 'coast_km', 'cmat_c'],
      ...beds.map((bed) => [
        bed.section,
        bed.bed,
        bed.place?.value ?? null,
        bed.latitude,
        bed.longitude,
        bed.coast_km,
        bed.cmat_c,
      ]),
    ]),
  };
}
