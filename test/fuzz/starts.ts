import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT } from '../commands/program.js';
import { utf8 } from '../input/survey-of.js';
import type { Start } from './survey-files.js';

const example = (path: string) => new Uint8Array(readFileSync(join(ROOT, 'examples', path)));

/** Two taxa, two laboratories, injections, both fractions, summary rows, yields and every further table. */
const SHELLS = `section,bed,taxon,shell,preparation,injection,lab,method,fraction,depth_m,D/L Asx,D/L Glx,D/L Ile,[Asx],L-Ser/L-Asp,n,D/L Ile sd
${[0, 1, 2, 3]
  .flatMap((s) =>
    [0, 1, 2].flatMap((b) =>
      ['Patellina', 'Arcula'].flatMap((taxon, t) =>
        [0, 1, 2].map((k) => {
          const x = 0.12 * 1.7 ** b * (1 + 0.03 * k) * (t === 0 ? 1 : 1.15);
          const [asx, glx, ile] = [x * 1.5, x * 0.9, x].map((value) => Math.min(value, 1.1).toFixed(3));
          const lab = s % 2 === 0 ? 'North' : 'South';
          const fraction = k === 2 && s === 0 ? 'FAA' : 'THAA';
          return `Sec ${s},b${b},${taxon},${k},1,${1 + (k % 2)},${lab},RP,${fraction},${b + 0.5},${asx},${glx},${ile},${900 + 30 * k},0.4,,`;
        }),
      ),
    ),
  )
  .join('\n')}
Sec 9,low,Patellina,,,,North,RP,THAA,2,,,0.31,,,8,0.02
Sec 9,high,Patellina,,,,North,RP,THAA,1,,,0.14,,,6,0.01
`;

const BEDS = `section,bed,depth_m,elevation_m,latitude,longitude,coast_km,cmat_c,burial_m,note,salt
${[0, 1, 2, 3]
  .flatMap((s) =>
    [0, 1, 2].map(
      (b) => `Sec ${s},b${b},${b + 0.5},${20 + s},${40 + s / 4},${-70 - s / 4},${10 * s},${11 + s / 2},${3 - b},,${s}`,
    ),
  )
  .join('\n')}
`;

const MANY: Start = {
  name: 'every table',
  files: {
    shells: utf8(SHELLS),
    beds: utf8(BEDS),
    relations: utf8(
      'lower,upper,basis,kind,certainty\nSec 0/b2,Sec 1/b0,inset,older,certain\nSec 2/b1,Sec 3/b1,marker,same,probable\n' +
        'Sec 1/b0,Sec 2/b2,inclusion,older,probable\nSec 9/low,Sec 0/b2,marker,same,certain\n',
    ),
    standards: utf8(
      'lab,standard,amino_acid,dl\nNorth,A,Ile,0.31\nSouth,A,Ile,0.33\nNorth,B,Ile,0.52\nSouth,B,Ile,0.55\nNorth,A,Asx,0.4\nSouth,A,Asx,0.41\n',
    ),
    aliases: utf8('name,taxon\nArcula,Arcula\nPatelina,Patellina\n'),
    dates: utf8(
      'section,bed,age_ka,error_ka,limit,method\nSec 0,b2,210,12,equal,U-series\nSec 1,b0,40,3,older,radiocarbon\nSec 9,low,90,9,equal,OSL\n',
    ),
    settings: utf8(
      'alpha: 0.05\nreference-taxon: Patellina\nstaircase: section\nscreening:\n  serine_ratio: 0.8\n  shells_a_bed: 3\n',
    ),
  },
};

/** Amino acids a row, decimal commas, and names that look like numbers. */
const LONG: Start = {
  name: 'one row an amino acid',
  files: {
    shells: utf8(
      `Section;Bed;Taxon;Shell;Level;amino_acid;dl\n${[1, 2, 3]
        .flatMap((s) =>
          [1, 2].flatMap((b) =>
            [1, 2, 3, 4].flatMap((k) =>
              ['Asx', 'Val'].map(
                (code, a) =>
                  `${s};${b};Mya;${k};${b};${code};${String((0.5 - 0.2 * b + 0.01 * k) / (1 + a))
                    .slice(0, 6)
                    .replace('.', ',')}`,
              ),
            ),
          ),
        )
        .join('\n')}\n`,
    ),
    settings: utf8('amino_acid: [Asx, Val]\nzones: 2\n'),
  },
};

/** What tries start from: the example surveys, and two made so that every reader and every room has work. */
export const STARTS: readonly Start[] = [
  {
    name: 'coast',
    files: {
      shells: example('coast/shells.csv'),
      beds: example('coast/beds.csv'),
      relations: example('coast/relations.csv'),
      dates: example('coast/dates.csv'),
      settings: utf8('seed: 2\n'),
    },
  },
  { name: 'summaries', files: { shells: example('summaries/shells.csv') } },
  {
    name: 'spreadsheet',
    files: { shells: example('spreadsheet/shells.csv'), aliases: example('spreadsheet/aliases.csv') },
  },
  {
    name: 'warming coast',
    files: {
      shells: example('warming-coast/shells.csv'),
      beds: example('warming-coast/beds.csv'),
      settings: utf8('gradient: cmat_c\n'),
    },
  },
  MANY,
  LONG,
];
