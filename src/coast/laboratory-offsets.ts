import type { AminoAcid, Analysis, ByAminoAcid, StandardRecord } from '../model/index.js';
import { AMINO_ACIDS } from '../model/index.js';

/** Relative error of one D/L measurement where standards are too few to show it (Kaufman and Manley 1998: 7 % on average). */
export const ASSUMED_REPRODUCIBILITY = 0.07;

/** Degrees of freedom under which the disagreement of standards is assumed, not estimated. */
const FEWEST_DEGREES_OF_FREEDOM = 4;

/** What one laboratory reads above another in one amino acid. */
export interface LaboratoryOffset {
  readonly lab: string;
  /** The laboratory with most shells, whose scale all ratios are put on. */
  readonly reference: string;
  readonly amino_acid: AminoAcid;
  /** Mean log ratio of the laboratory less that of the reference, over the standards both measured. */
  readonly offset: number;
  readonly se: number;
  /** Number of shared standards. */
  readonly standards: number;
  /** Whether the error rests on an assumed reproducibility. */
  readonly assumed: boolean;
}

/** Rows of the shells table of each laboratory; those that name none are left out. */
export function rowsByLaboratory(analyses: readonly Analysis[]): Map<string, number> {
  const rows = new Map<string, number>();
  for (const { lab, summary } of analyses) {
    if (lab !== null) rows.set(lab, (rows.get(lab) ?? 0) + (summary?.n ?? 1));
  }
  return rows;
}

/**
 * Offsets of every laboratory against the one with most shells, from the standards that both measured (design 7.12): the mean
 * difference of log ratios over shared standards, for each amino acid by itself. Its error is the standard deviation of
 * these differences between standards, pooled over laboratories, over the root of their number. Where an amino acid has
 * fewer than 4 degrees of freedom the pool of all amino acids serves; where that has too few, 7 % for each measurement is
 * assumed (the average reproducibility of Kaufman and Manley 1998, Quaternary Science Reviews 17, 987–1000).
 * @param standards rows of the standards table; repeated measurements are averaged on the log scale
 * @param analyses rows of the shells table, whose laboratories need offsets
 * @returns one offset a laboratory and amino acid that shares a standard with the reference; none of the reference itself
 * @example
 * laboratoryOffsets([], []).length // => 0
 */
export function laboratoryOffsets(
  standards: readonly StandardRecord[],
  analyses: readonly Analysis[],
): LaboratoryOffset[] {
  const rows = rowsByLaboratory(analyses);
  const reference = [...rows].reduce<[string, number] | null>(
    (most, one) => (most && most[1] >= one[1] ? most : one),
    null,
  )?.[0];
  if (reference === undefined || standards.length === 0) return [];
  const logs = meanLogs(standards);
  const drafts = [...rows.keys()]
    .filter((lab) => lab !== reference)
    .flatMap((lab) =>
      AMINO_ACIDS.flatMap((code) => {
        const differences = [...(logs.get(`${reference}\u0001${code}`) ?? [])].flatMap(([standard, there]) => {
          const here = logs.get(`${lab}\u0001${code}`)?.get(standard);
          return here === undefined ? [] : [here - there];
        });
        return differences.length === 0 ? [] : [{ lab, code, differences }];
      }),
    );
  const pools = new Map<AminoAcid | 'all', { squares: number; df: number }>();
  for (const { code, differences } of drafts) {
    const mean = meanOf(differences);
    const squares = differences.reduce((sum, d) => sum + (d - mean) ** 2, 0);
    for (const name of [code, 'all'] as const) {
      const pool = pools.get(name) ?? { squares: 0, df: 0 };
      pools.set(name, { squares: pool.squares + squares, df: pool.df + differences.length - 1 });
    }
  }
  return drafts.map(({ lab, code, differences }) => {
    const pool = [pools.get(code)!, pools.get('all')!].find(({ df }) => df >= FEWEST_DEGREES_OF_FREEDOM);
    const sd = pool === undefined ? ASSUMED_REPRODUCIBILITY * Math.SQRT2 : Math.sqrt(pool.squares / pool.df);
    return {
      lab,
      reference,
      amino_acid: code,
      offset: meanOf(differences),
      se: sd / Math.sqrt(differences.length),
      standards: differences.length,
      assumed: pool === undefined,
    };
  });
}

const meanOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

/** Mean log ratio by laboratory and amino acid, then by standard. */
function meanLogs(standards: readonly StandardRecord[]): Map<string, Map<string, number>> {
  const lists = new Map<string, Map<string, number[]>>();
  for (const { lab, standard, amino_acid, dl } of standards) {
    const key = `${lab}\u0001${amino_acid}`;
    const own = lists.get(key) ?? new Map<string, number[]>();
    lists.set(key, own);
    own.set(standard, [...(own.get(standard) ?? []), Math.log(dl)]);
  }
  return new Map(
    [...lists].map(([key, own]) => [key, new Map([...own].map(([name, values]) => [name, meanOf(values)]))]),
  );
}

/**
 * Puts every analysis on the scale of the reference laboratory: D/L and the published standard deviation over
 * exp(offset). Analyses of a laboratory without an offset stay as they are.
 */
export function correctAnalyses(analyses: readonly Analysis[], offsets: readonly LaboratoryOffset[]): Analysis[] {
  const byLab = new Map<string, Map<AminoAcid, number>>();
  for (const { lab, amino_acid, offset } of offsets) {
    const own = byLab.get(lab) ?? new Map<AminoAcid, number>();
    byLab.set(lab, own.set(amino_acid, Math.exp(-offset)));
  }
  return analyses.map((row) => {
    const factors = row.lab === null ? undefined : byLab.get(row.lab);
    if (factors === undefined) return row;
    const scaled = (ratios: ByAminoAcid): ByAminoAcid =>
      Object.fromEntries(
        AMINO_ACIDS.flatMap((code) =>
          ratios[code] === undefined ? [] : [[code, ratios[code] * (factors.get(code) ?? 1)]],
        ),
      );
    const summary = row.summary === null ? null : { ...row.summary, sd: scaled(row.summary.sd) };
    return { ...row, ratios: scaled(row.ratios), summary };
  });
}
