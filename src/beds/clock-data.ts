import type { Clock, ClockBed, ClockData, ClockShell, PublishedSummary, Shell } from '../model/index.js';
import { clockLogRatio, type Imputation } from './log-ratios.js';
import { logSummary } from './log-summary.js';
import { type PublishedScatter, pooledScatter } from './scatter.js';

/** What the beds of a clock are made from. */
export interface ClockDataInput {
  readonly clock: Clock;
  readonly shells: readonly Shell[];
  readonly summaries: readonly PublishedSummary[];
  /** Indices into `shells` of those left out of the means. Default none. */
  readonly setAside?: ReadonlySet<number>;
  readonly imputation?: Imputation;
  /** Slope of x along a column, and that column's value less its mean for each bed by key `section/bed`. */
  readonly gradient?: { readonly slope: number; readonly values: ReadonlyMap<string, number> };
  /** Keys of beds whose shells scatter beyond one age: their errors rest on their own scatter, and they leave the pool. */
  readonly wide?: ReadonlySet<string>;
  /** The same clock with other shells set aside: log ratios are taken from there. */
  readonly before?: ClockData;
}

/** Name of a bed in tables. */
export const bedKey = (section: string, bed: string): string => `${section}/${bed}`;

/**
 * Bed means of log ratios with their standard errors from the pooled scatter (design 7.1): m = mean of the shells' x,
 * se² = s²/n, s pooled over all beds of the clock. Shells set aside stay in the lists and are left out of the means.
 * Beds appear in order of their first shell, those with published summaries only after them.
 */
export function clockData(input: ClockDataInput): ClockData {
  const { clock, shells, summaries, setAside = new Set<number>(), imputation, gradient } = input;
  const beds = new Map<string, DraftBed>();
  const clockShells: ClockShell[] = [];
  let last: DraftBed | null = null;
  const take = (index: number, x: number, known?: ClockShell) => {
    const shell = shells[index];
    // shells of one bed mostly stand together in the table
    const bed = isOf(last, shell) ? last : draftBed(beds, shell.section, shell.bed);
    last = bed;
    bed.shells.push(clockShells.length);
    const aside = setAside.has(index);
    clockShells.push(known?.setAside === aside ? known : { shell: index, bed: bed.index, x, setAside: aside });
  };
  if (input.before !== undefined) {
    for (const known of input.before.shells) take(known.shell, known.x, known);
  } else {
    shells.forEach((shell, index) => {
      if (shell.taxon !== clock.taxon || shell.fraction !== clock.fraction) return;
      const x = clockLogRatio(shell.ratios, clock, imputation);
      if (x !== null) take(index, x);
    });
  }
  const published = addSummaries(beds, clock, summaries, imputation);
  const drafts = [...beds.values()];
  const kept = drafts.map((bed) => {
    const values: number[] = [];
    for (const at of bed.shells) if (!clockShells[at].setAside) values.push(clockShells[at].x);
    return values;
  });
  const wide = drafts.map((bed) => input.wide?.has(bedKey(bed.section, bed.bed)) ?? false);
  const scatter = pooledScatter(
    kept.filter((_, at) => !wide[at]),
    published,
  );
  return {
    clock,
    shells: clockShells,
    beds: drafts.map((bed, index) =>
      finishBed(bed, kept[index], wide[index] ? ownScatter(kept[index], scatter.s) : scatter.s, gradient),
    ),
    scatter,
    slope: gradient?.slope ?? 0,
  };
}

/** Standard deviation of one bed's shells, not below the pooled one. */
function ownScatter(values: readonly number[], pooled: number): number {
  if (values.length < 2) return pooled;
  const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
  const squares = values.reduce((sum, x) => sum + (x - mean) ** 2, 0);
  return Math.max(pooled, Math.sqrt(squares / (values.length - 1)));
}

interface DraftBed {
  readonly index: number;
  readonly section: string;
  readonly bed: string;
  readonly shells: number[];
  readonly published: { readonly mean: number; readonly n: number }[];
}

function isOf(draft: DraftBed | null, { section, bed }: Shell): draft is DraftBed {
  return draft !== null && draft.bed === bed && draft.section === section;
}

function draftBed(beds: Map<string, DraftBed>, section: string, bed: string): DraftBed {
  const key = bedKey(section, bed);
  let draft = beds.get(key);
  if (draft === undefined) {
    draft = { index: beds.size, section, bed, shells: [], published: [] };
    beds.set(key, draft);
  }
  return draft;
}

/** Joins the amino acids of each published summary: an index needs them together. */
function addSummaries(
  beds: Map<string, DraftBed>,
  clock: Clock,
  summaries: readonly PublishedSummary[],
  imputation: Imputation | undefined,
): PublishedScatter[] {
  // in the long form the amino acids of one summary stand on rows of their own: the k-th of each belong together
  const groups = new Map<string, PublishedSummary[]>();
  const seen = new Map<string, number>();
  for (const summary of summaries) {
    if (summary.taxon !== clock.taxon || summary.fraction !== clock.fraction) continue;
    if (!clock.amino_acids.includes(summary.amino_acid)) continue;
    const key = bedKey(summary.section, summary.bed);
    const occurrence = seen.get(`${key}\u0001${summary.amino_acid}`) ?? 0;
    seen.set(`${key}\u0001${summary.amino_acid}`, occurrence + 1);
    const group = `${key}\u0001${occurrence}`;
    groups.set(group, [...(groups.get(group) ?? []), summary]);
  }
  const scatters: PublishedScatter[] = [];
  for (const rows of groups.values()) {
    const logs = rows.map((row) => ({ code: row.amino_acid, ...logSummary(row.mean, row.sd) }));
    const ratios = Object.fromEntries(logs.map(({ code, mean }) => [code, Math.exp(mean)]));
    const mean = clockLogRatio(ratios, clock, imputation);
    if (mean === null) continue;
    const n = Math.max(...rows.map((row) => row.n));
    draftBed(beds, rows[0].section, rows[0].bed).published.push({ mean, n });
    // a published sd of each amino acid does not say how they vary together: only a single one can join the scatter
    if (clock.amino_acids.length === 1 && logs[0].sd !== null) scatters.push({ sd: logs[0].sd, n });
  }
  return scatters;
}

function finishBed(
  draft: DraftBed,
  kept: readonly number[],
  s: number,
  gradient: ClockDataInput['gradient'],
): ClockBed {
  const key = bedKey(draft.section, draft.bed);
  let sum = kept.reduce((total, x) => total + x, 0);
  let n = kept.length;
  for (const published of draft.published) {
    sum += published.n * published.mean;
    n += published.n;
  }
  const at = gradient?.values.get(key) ?? 0;
  return {
    key,
    section: draft.section,
    bed: draft.bed,
    shells: draft.shells,
    n,
    mean: n === 0 ? Number.NaN : sum / n - (gradient?.slope ?? 0) * at,
    se: n === 0 ? Number.NaN : s / Math.sqrt(n),
    gradient: at,
  };
}
