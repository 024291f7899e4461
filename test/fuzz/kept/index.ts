import { utf8 } from '../../input/survey-of.js';
import type { SurveyFiles } from '../survey-files.js';

/** A survey that once broke the program, cut down to what broke it, and what must come of it now. */
export interface KeptCase {
  readonly name: string;
  readonly files: SurveyFiles;
  /** A refusal that is wanted, or nothing where the survey is sound. */
  readonly refused?: RegExp;
}

const HEAD = 'section,bed,level,taxon,shell,D/L Asx,D/L Val\n';
const rows = (cells: readonly (readonly [string, number, string, string])[]) =>
  utf8(
    HEAD +
      cells
        .map(([bed, level, asx, val], k) => `${bed.split('/').join(',')},${level},Mya,${k},${asx},${val}\n`)
        .join(''),
  );

const beds = ['A/b', 'A/t', 'B/b', 'B/t', 'C/b', 'C/t'];
const each = <T>(make: (bed: string, at: number) => T[]): T[] => beds.flatMap(make);

/** Ratios of one bed: the lower of a section is the older. */
const ratio = (at: number, k: number) => (at % 2 === 0 ? 0.3 : 0.12) + 0.01 * k;

/** Surveys that the fuzzer found, in the order in which they were found. */
export const KEPT: readonly KeptCase[] = [
  {
    // an index of two amino acids that one bed alone has together: gaps were filled from a covariance divided by nothing
    name: 'two amino acids that hardly ever stand on one shell',
    files: {
      shells: rows(
        each((bed, at) =>
          [0, 1, 2].map((k) => [
            bed,
            1 + (at % 2),
            at === 5 || k % 2 ? ratio(at, k).toFixed(3) : '',
            at === 5 || k % 2 === 0 ? (ratio(at, k) / 2).toFixed(3) : '',
          ]),
        ),
      ),
      settings: utf8('amino_acid: Asx,Val\n'),
    },
  },
  {
    name: 'two amino acids that never stand on one shell',
    files: {
      shells: rows(
        each((bed, at) =>
          [0, 1, 2, 3].map((k) => [
            bed,
            1 + (at % 2),
            k % 2 ? ratio(at, k).toFixed(3) : '',
            k % 2 ? '' : (ratio(at, k) / 2).toFixed(3),
          ]),
        ),
      ),
      settings: utf8('amino_acid: all\n'),
    },
  },
  {
    // 1 − alpha is 1 in floating point: the plan then asked for the normal probability of NaN
    name: 'a level below what floating point can take from 1',
    files: {
      shells: rows(each((bed, at) => [0, 1, 2].map((k) => [bed, 1 + (at % 2), ratio(at, k).toFixed(3), '']))),
      settings: utf8('alpha: 1e-300\n'),
    },
    refused: /from 0\.000001 to below 0\.5/,
  },
  {
    // shortening a name in a figure took a time that grew with the square of its length: 15 s
    name: 'a name of ten thousand letters',
    files: {
      shells: utf8(
        `section,bed,taxon,shell,level,A/I\n${['x'.repeat(9_900), 'B']
          .flatMap((section) =>
            [0, 1].flatMap((bed) => [0, 1, 2].map((k) => `${section},b${bed},Mya,${k},${bed},${ratio(bed, k)}\n`)),
          )
          .join('')}`,
      ),
    },
  },
  {
    // a scatter of 0 made errors of 0, and slopes without end
    name: 'shells of one bed that are all equal',
    files: {
      shells: rows(each((bed, at) => [0, 1, 2].map(() => [bed, 1 + (at % 2), ratio(at, at % 3).toFixed(3), '']))),
      beds: utf8(`section,bed,coast_km\n${beds.map((bed, at) => `${bed.replace('/', ',')},${at >> 1}\n`).join('')}`),
      settings: utf8('gradient: coast_km\n'),
    },
  },
  {
    // probabilities of sharing a zone added up to a hair above 1
    name: 'probabilities that add up to 1',
    files: {
      shells: rows(each((bed, at) => [0, 1, 2, 3].map((k) => [bed, 1 + (at % 2), ratio(at, k).toFixed(3), '']))),
    },
  },
  {
    // a zone that no bed fell into had a mean without error
    name: 'more zones asked for than there are beds',
    files: {
      shells: rows(each((bed, at) => [0, 1, 2].map((k) => [bed, 1 + (at % 2), ratio(at, k).toFixed(3), '']))),
      settings: utf8('zones: 50\n'),
    },
  },
];
