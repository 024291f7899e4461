import type { AminoAcid, ClockData, ScreeningMark } from '../../src/model/index.js';
import type { ReadingInput } from '../../src/superposition/index.js';

const CODES: readonly AminoAcid[] = ['Asx', 'Glx', 'Val'];

/** Offsets of the sound shells of a bed, and of the errors of each amino acid, that repeat without a pattern. */
const OFF = [0, 0.03, -0.025, 0.012, -0.04, 0.021];
const wobble = (at: number, code: number) => 0.01 * Math.sin(7 * at + 3 * code + at * code);

/** Extra or odd shells: where, how far off the bed's level, and by how much Val alone is off. */
export interface OddShell {
  readonly bed: number;
  readonly off: number;
  readonly val?: number;
  readonly marks?: readonly ScreeningMark[];
}

const LEVELS = [-1, -1.25, -1.5, -1.75];

/** Section A of four beds, A/1 the lowest, and section B of one bed beside it; six sound shells a bed, and the odd ones. */
export function smallCoast(odd: readonly OddShell[], own: Partial<ReadingInput> = {}): ReadingInput {
  const list = [...LEVELS.flatMap((_, bed) => OFF.map((off): OddShell => ({ bed, off }))), { bed: 4, off: 0 }, ...odd];
  const level = (bed: number) => LEVELS[bed] ?? -1.4;
  const x = list.map(({ bed, off }) => level(bed) + off);
  const names = ['A/1', 'A/2', 'A/3', 'A/4', 'B/1'];
  const data: ClockData = {
    clock: {
      name: 'Invenus THAA index',
      taxon: 'Invenus',
      fraction: 'THAA',
      amino_acids: CODES,
      weights: [0.5, 0.3, 0.2],
      main: true,
    },
    shells: list.map(({ bed }, at) => ({ shell: at, bed, x: x[at], setAside: false })),
    beds: names.map((key, bed) => {
      const shells = list.flatMap((shell, at) => (shell.bed === bed ? [at] : []));
      const mean = shells.reduce((sum, at) => sum + x[at], 0) / shells.length;
      const [section, name] = key.split('/');
      return {
        key,
        section,
        bed: name,
        shells,
        n: shells.length,
        mean,
        se: 0.03 / Math.sqrt(shells.length),
        gradient: 0,
      };
    }),
    scatter: { s: 0.03, df: 20, assumed: false },
    slope: 0,
  };
  const logs = list.map(({ val = 0 }, at) => [
    1.1 * x[at] + wobble(at, 0),
    0.8 * x[at] - 0.2 + wobble(at, 1),
    1.05 * x[at] + 0.1 + wobble(at, 2) + val,
  ]);
  const zones = LEVELS.map((mean, at) => ({ name: `Z${4 - at}`, mean, sd: 0.01, weight: 0.25 })).reverse();
  return {
    data,
    aminoAcids: CODES,
    logs,
    marks: list.map(({ marks = [] }) => marks),
    above: [[1, 2, 3], [2, 3], [3], [], []],
    zones,
    ...own,
  };
}
