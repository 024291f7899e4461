import type { ClockBed, ClockData, ClockShell } from '../../src/model/index.js';

/** A bed by its level and the offsets of its shells; those of `aside` are set aside. */
export interface SmallBed {
  readonly level: number;
  readonly offsets: readonly number[];
  readonly aside?: readonly number[];
  readonly section?: string;
  readonly gradient?: number;
}

/** A clock of one amino acid with scatter 0.05 and a slope along the gradient, the means taken as beds/means does. */
export function smallClock(beds: readonly SmallBed[], slope = 0): ClockData {
  const shells: ClockShell[] = [];
  const rows = beds.map(({ level, offsets, aside = [], section = 'S', gradient = 0 }, bed): ClockBed => {
    const own = [...offsets.map((off) => [off, false] as const), ...aside.map((off) => [off, true] as const)];
    const places = own.map(([off, setAside]) => {
      return shells.push({ shell: shells.length, bed, x: level + slope * gradient + off, setAside }) - 1;
    });
    const n = offsets.length;
    return {
      key: `${section}/${bed + 1}`,
      section,
      bed: String(bed + 1),
      shells: places,
      n,
      mean: n === 0 ? Number.NaN : level + offsets.reduce((sum, off) => sum + off, 0) / n,
      se: 0.05 / Math.sqrt(n),
      gradient,
    };
  });
  return {
    clock: {
      name: 'Invenus THAA Ile',
      taxon: 'Invenus',
      fraction: 'THAA',
      amino_acids: ['Ile'],
      weights: [1],
      main: true,
    },
    shells,
    beds: rows,
    scatter: { s: 0.05, df: 12, assumed: false },
    slope,
  };
}

const SHELLS = [0.05, -0.04, 0.02, -0.03, 0];

/** Eight beds of five shells in two zones about −2 and −1.5, the last two columns of a gradient of their own. */
export const twoZones = (slope = 0): ClockData =>
  smallClock(
    [-2.02, -1.99, -2, -1.97, -1.52, -1.5, -1.47, -1.51].map((level, at) => ({
      level,
      offsets: SHELLS,
      gradient: slope === 0 ? 0 : (at % 3) - 1,
      section: at % 2 === 0 ? 'North' : 'South',
    })),
    slope,
  );
