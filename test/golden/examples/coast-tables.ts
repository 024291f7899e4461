import { createRandom, type Random } from '../../../src/statistics/random.js';
import {
  COAST_DATES,
  COAST_PLAN,
  COAST_RELATIONS,
  type PlanBed,
  type PlanSection,
  type Trouble,
} from './coast-plan.js';
import { fixed, tableText } from './table.js';

/** D/L in zone 1, growth of the log ratio from zone to zone, scatter between shells, amount in pmol a milligram. */
const AMINO_ACIDS = [
  { code: 'Asx', young: 0.34, step: 0.19, scatter: 0.035, amount: 6400 },
  { code: 'Glx', young: 0.155, step: 0.22, scatter: 0.045, amount: 4300 },
  { code: 'Val', young: 0.094, step: 0.29, scatter: 0.06, amount: 1900 },
  { code: 'Ile', young: 0.117, step: 0.3, scatter: 0.055, amount: 1050 },
] as const;

/** Share of a shell's error that all its amino acids have in common. */
const CORRELATION = 0.35;
/** Standard deviation between beds of one zone, in log ratios of Ile. */
const SPREAD = 0.012;
/** Standard deviation between preparations of one shell. */
const PREPARATION = 0.015;

interface DrawnShell {
  readonly ratios: number[];
  readonly serine: number;
  readonly amounts: number[];
}

/** A shell of the zone, before anything happened to it. */
function drawShell(zone: number, deviation: number, random: Random): DrawnShell {
  const shared = random.normal();
  const ratios = AMINO_ACIDS.map(({ young, step, scatter }) => {
    const error = scatter * (Math.sqrt(CORRELATION) * shared + Math.sqrt(1 - CORRELATION) * random.normal());
    return young * Math.exp(step * (zone - 1 + deviation / 0.3) + error);
  });
  const richness = Math.exp(0.2 * random.normal() - 0.08 * (zone - 1));
  return {
    ratios,
    serine: Math.min(0.6, 0.37 * Math.exp(0.17 * random.normal() - 0.05 * (zone - 1))),
    amounts: AMINO_ACIDS.map(({ amount }) => amount * richness * Math.exp(0.06 * random.normal())),
  };
}

/** What the troubles of contamination and heat do; written by hand, not drawn. */
function spoilt(shell: DrawnShell, trouble: Trouble | undefined): DrawnShell {
  const times = (factors: readonly number[]) => shell.ratios.map((ratio, k) => ratio * factors[k]);
  if (trouble?.kind === 'contaminated') return { ...shell, ratios: times([0.71, 0.83, 0.62, 0.66]), serine: 1.04 };
  if (trouble?.kind === 'altered') return { ...shell, ratios: times([1.36, 1.09, 1.52, 1.2]) };
  return shell;
}

function drawBed(section: PlanSection, bed: PlanBed, random: Random, rows: (string | number | null)[][]): void {
  const deviation = SPREAD * random.normal();
  for (let i = 1; i <= bed.shells; i++) {
    const trouble = bed.troubles?.[i];
    const own = bed.mixedWith !== undefined && i > bed.shells / 2 ? bed.mixedWith : bed.zone;
    const zone = trouble && 'from' in trouble ? trouble.from : own;
    const shell = spoilt(drawShell(zone, deviation, random.fork(i)), trouble);
    const inner = random.fork(1000 + i);
    // about one shell in eight was prepared twice
    const preparations = trouble?.kind === 'replicate off' || inner.uniform() < 0.12 ? 2 : 1;
    for (let p = 1; p <= preparations; p++) {
      const off = trouble?.kind === 'replicate off' && p === 2 ? 1.17 : 1;
      const ratios = shell.ratios.map((ratio) => ratio * off * Math.exp(PREPARATION * inner.normal()));
      rows.push([
        `INV-${1000 + rows.length}`,
        section.section,
        bed.bed,
        'Glycymeris',
        i,
        preparations === 1 ? 1 : p,
        ...ratios.map((ratio) => fixed(ratio, 3)),
        ...shell.amounts.map((amount) => fixed(amount * Math.exp(0.03 * inner.normal()), 0)),
        fixed(shell.serine * Math.exp(0.02 * inner.normal()), 2),
      ]);
    }
  }
}

/** The files of examples/coast, and the dates that belong to it. */
export function coastFiles(): Record<string, string> {
  const random = createRandom(2029);
  const shells: (string | number | null)[][] = [
    [
      'lab_id',
      'section',
      'bed',
      'taxon',
      'shell',
      'preparation',
      ...AMINO_ACIDS.map(({ code }) => `D/L ${code}`),
      ...AMINO_ACIDS.map(({ code }) => `[${code}]`),
      'L-Ser/L-Asp',
    ],
  ];
  const beds: (string | number | null)[][] = [
    [
      'section',
      'bed',
      'level',
      'height_m',
      'depth_m',
      'elevation_m',
      'latitude',
      'longitude',
      'coast_km',
      'cmat_c',
      'burial_m',
      'note',
    ],
  ];
  COAST_PLAN.forEach((section, s) => {
    const { kind, km } = section;
    // the shore runs south-south-east
    const [latitude, longitude] =
      section.coordinates === false
        ? ['', '']
        : [fixed(-48.31 - 0.0078 * km, 4), fixed(-123.84 + 0.0061 * km + 0.02 * Math.sin(km / 11), 4)];
    section.beds.forEach((bed, b) => {
      drawBed(section, bed, random.fork(100 * s + b), shells);
      const at = (wanted: PlanSection['kind']) => (kind === wanted ? bed.place : null);
      beds.push([
        section.section,
        bed.bed,
        at('level'),
        at('height_m'),
        at('depth_m'),
        bed.elevation,
        latitude,
        longitude,
        km,
        fixed(11.2 + 0.004 * km, 1),
        bed.burial,
        bed.note ?? null,
      ]);
    });
  });
  return {
    'coast/shells.csv': tableText(shells),
    'coast/beds.csv': tableText(beds),
    'coast/relations.csv': tableText([['lower', 'upper', 'basis', 'kind', 'certainty'], ...COAST_RELATIONS]),
    'coast/dates.csv': tableText([['section', 'bed', 'age_ka', 'error_ka', 'limit', 'method'], ...COAST_DATES]),
  };
}
