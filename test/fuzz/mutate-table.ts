import type { Random } from '../../src/statistics/index.js';

/** Rows of cells, the header first. */
export type Cells = string[][];
type Change = (cells: Cells, random: Random) => Cells;

const pick = <T>(list: readonly T[], random: Random): T => list[random.integer(list.length)];

/** Numbers at the edges of floating point and of what a ratio may be, and texts that look like numbers. */
export const EDGE_NUMBERS =
  '0 -0 5e-324 2.2250738585072014e-308 1e-300 1e-12 1e-7 1e-6 0.0001 0.9 1 1.1 1.1999999999999999 1.2 1.2000000001 1.3 1.5 1.50001 1e2 1e6 999999.5 1e21 1e300 1.7976931348623157e308 1e309 -1 -1e-9 .5 5. +0.4 0,4 1,234.5 1.234,5 4e-1 0x1F 1_0 ٣ ½ 0.3% <0.1 0.1±0.01 1/3 0.30000000000000004 9007199254740993 4294967296 1e-400 00.3 - -- e 1e inf'.split(
    ' ',
  );

/** Names that have tripped programs. */
export const EDGE_NAMES = [
  '__proto__',
  'constructor',
  'toString',
  'hasOwnProperty',
  'length',
  '=1+1',
  '@sum(a1)',
  '+1',
  '-2',
  '1',
  '01',
  '1.0',
  'true',
  'null',
  ' ',
  '\u00a0',
  '\u200b',
  'a/b',
  '/',
  'a > b',
  '..',
  'zone',
  'clock',
  '<b>&amp;"\'',
  '$1 $& $$',
  '%s%n',
  '\u202eabc',
  'e\u0301',
  '\u00e9',
  '\ud83d\udc1a',
  'I\u0307',
  'x'.repeat(300),
  '\u6d77'.repeat(80),
  'a;b',
  'line\\nbreak',
];

const HEADERS =
  'section,bed,taxon,shell,preparation,injection,lab_id,lab,method,fraction,level,height_m,depth_m,n,note,A/I,D/L Asx,D/L Ile,D/L Ile sd,[Asx],[Ser],L-Ser/L-Asp,amino_acid,dl,dl_sd,lower,upper,basis,kind,certainty,name,standard,age_ka,error_ka,limit,coast_km,latitude,longitude,cmat_c,elevation_m,burial_m'.split(
    ',',
  );

const column = (cells: Cells, random: Random) => random.integer(Math.max(1, cells[0]?.length ?? 1));
const row = (cells: Cells, random: Random) =>
  Math.min(cells.length - 1, 1 + random.integer(Math.max(1, cells.length - 1)));
const eachRow = (cells: Cells, at: number, value: (old: string, line: number) => string): Cells =>
  cells.map((line, i) => (i === 0 ? line : line.map((cell, k) => (k === at ? value(cell, i) : cell))));
const someRows = (cells: Cells, keep: (line: number) => boolean) => cells.filter((_, i) => i === 0 || keep(i));
const scaled = (cell: string, by: (x: number) => number) =>
  cell.trim() !== '' && Number.isFinite(Number(cell)) ? String(by(Number(cell))) : cell;

/** Changes that keep a table a table. */
export const TABLE_CHANGES: Readonly<Record<string, Change>> = {
  'an edge number in a cell': (cells, random) => {
    const [at, k] = [row(cells, random), column(cells, random)];
    return cells.map((line, i) =>
      i === at ? line.map((cell, j) => (j === k ? pick(EDGE_NUMBERS, random) : cell)) : line,
    );
  },
  'an edge name in a cell': (cells, random) => {
    const [at, k] = [row(cells, random), column(cells, random)];
    return cells.map((line, i) =>
      i === at ? line.map((cell, j) => (j === k ? pick(EDGE_NAMES, random) : cell)) : line,
    );
  },
  'one name for another everywhere': (cells, random) => {
    const old = cells[row(cells, random)]?.[random.integer(Math.min(4, cells[0].length))];
    const fresh = pick(EDGE_NAMES, random);
    return cells.map((line) => line.map((cell) => (cell === old ? fresh : cell)));
  },
  'one value down a column': (cells, random) => {
    const value = pick(random.integer(2) ? EDGE_NUMBERS : EDGE_NAMES, random);
    return eachRow(cells, column(cells, random), () => value);
  },
  'edge numbers down a column': (cells, random) => {
    const few = Array.from({ length: 1 + random.integer(4) }, () => pick(EDGE_NUMBERS, random));
    return eachRow(cells, column(cells, random), (old) => (random.integer(3) ? old : pick(few, random)));
  },
  'a column scaled': (cells, random) => {
    const factor = pick([0, 1e-300, 1e-9, 1e-3, 0.1, 2, 10, 1e9, -1], random);
    return eachRow(cells, column(cells, random), (old) => scaled(old, (x) => x * factor));
  },
  'a column scaled a little': (cells, random) => {
    const factor = 0.1 + random.uniform();
    return eachRow(cells, column(cells, random), (old) => (old.includes('.') ? scaled(old, (x) => x * factor) : old));
  },
  'ratios rounded': (cells, random) => {
    const digits = 1 + random.integer(3);
    return cells.map((line, i) =>
      i === 0
        ? line
        : line.map((cell) => (cell.startsWith('0.') ? scaled(cell, (x) => Number(x.toPrecision(digits))) : cell)),
    );
  },
  'numbers drawn together': (cells, random) => {
    const grain = pick([1e-9, 1e-6, 0.001, 0.1, 1], random);
    const first = 1 + random.integer(6);
    return cells.map((line, i) =>
      i === 0
        ? line
        : line.map((cell, k) =>
            k < first ? cell : scaled(cell, (x) => (x > 0 && x < 1.2 ? 0.3 + Math.round(x / grain) * grain * 1e-3 : x)),
          ),
    );
  },
  'cells emptied': (cells, random) => {
    const at = column(cells, random);
    return eachRow(cells, at, (old) => (random.integer(2) ? '' : old));
  },
  'a column taken out': (cells, random) => {
    const at = column(cells, random);
    return cells.map((line) => line.filter((_, k) => k !== at));
  },
  'a column twice': (cells, random) => {
    const at = column(cells, random);
    return cells.map((line) => [...line, line[at] ?? '']);
  },
  'columns turned about': (cells, random) => {
    const [a, b] = [column(cells, random), column(cells, random)];
    return cells.map((line, i) =>
      i === 0 ? line : line.map((cell, k) => (k === a ? (line[b] ?? '') : k === b ? (line[a] ?? '') : cell)),
    );
  },
  'another header': (cells, random) => {
    const at = column(cells, random);
    return cells.map((line, i) => (i === 0 ? line.map((cell, k) => (k === at ? pick(HEADERS, random) : cell)) : line));
  },
  'rows taken out': (cells, random) => {
    const chance = random.uniform();
    return someRows(cells, () => random.uniform() < chance);
  },
  'few rows left': (cells, random) => {
    const kept = new Set(Array.from({ length: 1 + random.integer(3) }, () => row(cells, random)));
    return someRows(cells, (i) => kept.has(i));
  },
  'rows written many times': (cells, random) => {
    const [at, times] = [row(cells, random), 1 + random.integer(60)];
    return cells.flatMap((line, i) => (i === at ? Array.from({ length: times }, () => line) : [line]));
  },
  'rows in another order': (cells, random) => {
    const [header, ...rest] = cells;
    return [
      header ?? [],
      ...rest
        .map((line) => ({ line, key: random.uniform() }))
        .sort((a, b) => a.key - b.key)
        .map(({ line }) => line),
    ];
  },
  'a cell moved to another row': (cells, random) => {
    const [from, to, k] = [row(cells, random), row(cells, random), column(cells, random)];
    return cells.map((line, i) =>
      i === to ? line.map((cell, j) => (j === k ? (cells[from]?.[k] ?? '') : cell)) : line,
    );
  },
  'ragged rows': (cells, random) => {
    const at = row(cells, random);
    return cells.map((line, i) => (i === at ? (random.integer(2) ? line.slice(0, -1) : [...line, 'x', '']) : line));
  },
  'many columns': (cells, random) => {
    const count = pick([50, 400, 1100], random);
    return cells.map((line, i) => [...line, ...Array.from({ length: count }, (_, k) => (i === 0 ? `c${k}` : '1'))]);
  },
  'rows of two names': (cells, random) => {
    const at = column(cells, random);
    const names = [cells[row(cells, random)]?.[at] ?? '', pick(EDGE_NAMES, random)];
    return eachRow(cells, at, () => pick(names, random));
  },
  'every row a name of its own': (cells, random) => eachRow(cells, column(cells, random), (_, i) => `u${i}`),
};
