import type { BedRecord } from '../model/index.js';

/**
 * Sections in coast order: by mean coast_km where every section has one, else along the main direction of the
 * coordinates (first principal axis, longitudes shortened by the cosine of the mean latitude, the end nearer to the first
 * section of the table first), else as given.
 * @example
 * sectionOrder([]) // => []
 */
export function sectionOrder(beds: readonly BedRecord[]): string[] {
  const sections = [...new Set(beds.map((bed) => bed.section))];
  const kilometres = meanBySection(sections, beds, (bed) => bed.coast_km);
  if (kilometres.every((value) => value !== null)) return sortBy(sections, kilometres as number[]);
  const latitudes = meanBySection(sections, beds, (bed) => bed.latitude);
  const longitudes = meanBySection(sections, beds, (bed) => bed.longitude);
  if (latitudes.some((value) => value === null) || longitudes.some((value) => value === null)) return sections;
  return sortBy(sections, alongMainAxis(latitudes as number[], longitudes as number[]));
}

function meanBySection(
  sections: readonly string[],
  beds: readonly BedRecord[],
  value: (bed: BedRecord) => number | null,
): (number | null)[] {
  const sums = new Map(sections.map((section) => [section, { sum: 0, count: 0 }]));
  for (const bed of beds) {
    const own = value(bed);
    if (own === null) continue;
    const entry = sums.get(bed.section)!;
    entry.sum += own;
    entry.count++;
  }
  return sections.map((section) => {
    const { sum, count } = sums.get(section)!;
    return count > 0 ? sum / count : null;
  });
}

function sortBy(sections: readonly string[], values: readonly number[]): string[] {
  const order = sections.map((_, at) => at).sort((a, b) => values[a] - values[b] || a - b);
  return order.map((at) => sections[at]);
}

function alongMainAxis(latitudes: readonly number[], longitudes: readonly number[]): number[] {
  const n = latitudes.length;
  const north = latitudes.reduce((sum, value) => sum + value, 0) / n;
  const east = longitudes.reduce((sum, value) => sum + value, 0) / n;
  const shorten = Math.cos((north * Math.PI) / 180);
  const ys = latitudes.map((value) => value - north);
  const xs = longitudes.map((value) => (value - east) * shorten);
  const dot = (a: readonly number[], b: readonly number[]) => a.reduce((sum, value, at) => sum + value * b[at], 0);
  const angle = 0.5 * Math.atan2(2 * dot(xs, ys), dot(xs, xs) - dot(ys, ys));
  const along = xs.map((x, at) => x * Math.cos(angle) + ys[at] * Math.sin(angle));
  return along[0] <= 0 ? along : along.map((value) => -value);
}
