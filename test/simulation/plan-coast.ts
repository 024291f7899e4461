import { createRandom, type Random } from '../../src/statistics/random.js';
import type { CoastOptions } from './coast-options.js';
import type { ShellKind } from './odd-shells.js';

/** A stream of its own for each purpose, so that one more draw for one purpose changes nothing in another. */
export function stream(seed: number, ...labels: number[]): Random {
  return labels.reduce((random, label) => random.fork(label), createRandom(seed));
}

/** The values in an order drawn at random. */
export function shuffled<T>(values: readonly T[], random: Random): T[] {
  const result = [...values];
  for (let i = result.length - 1; i > 0; i--) {
    const j = random.integer(i + 1);
    [result[i], result[j]] = [result[j], result[i]];
  }
  return result;
}

export interface PlannedBed {
  readonly key: string;
  readonly section: string;
  readonly bed: string;
  /** Index among all beds. */
  readonly index: number;
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
export function planBeds(
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
      const place = sections === 1 ? 0.5 : Math.min(1, Math.max(0, (i + 0.6 * (jitter - 0.5)) / (sections - 1)));
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
          index: planned.length,
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
export function pickUpsideDown(
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
export function pickOdd(planned: readonly PlannedBed[], options: CoastOptions & { seed: number; spacing: number }) {
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
export function rankRange(bed: PlannedBed, planned: readonly PlannedBed[]): [number, number] {
  const older = planned.filter(
    (b) => b.extent > bed.extent || (b.extent === bed.extent && b.section === bed.section && b.position < bed.position),
  );
  const younger = planned.filter(
    (b) => b.extent < bed.extent || (b.extent === bed.extent && b.section === bed.section && b.position > bed.position),
  );
  return [older.length + 1, planned.length - younger.length];
}
