import type { ClockSet } from './beds/index.js';
import type { ClockResult } from './clock-findings.js';
import { type LeftOut, type Pass, passOver, type RunContext } from './clock-run.js';
import {
  type BedOfTaxon,
  type CombinedTaxa,
  combineTaxa,
  type TaxonConversion,
  taxonConversion,
  withoutSlope,
} from './coast/index.js';
import type { BedRow, Clock, ConversionFinding, Evidence, Fraction } from './model/index.js';
import type { Settled } from './passes.js';
import type { Random } from './statistics/index.js';
import { readShells } from './superposition/index.js';

/** A main clock once its passes have settled. */
export interface SettledClock {
  readonly set: ClockSet;
  readonly settled: Settled;
}

/** All taxa of one fraction on the scale of the reference taxon. */
export interface CombinedRun extends SettledClock {
  readonly combined: CombinedTaxa;
  /** Mean log ratio of each bed before any slope is taken out, by key. */
  readonly uncorrected: ReadonlyMap<string, number>;
  /** Shells set aside on the clocks behind it, by bed. */
  readonly setAside: ReadonlyMap<string, number>;
  readonly conversions: ReadonlyMap<string, TaxonConversion>;
}

/** What comes of `--reference-taxon` in one fraction. */
export interface CombinedOutcome {
  /** null where no taxon could be converted. */
  readonly run: CombinedRun | null;
  readonly findings: readonly ConversionFinding[];
}

/** Puts every taxon on the scale of the reference where the beds that hold both allow it, fraction by fraction (7.12). */
export function combineClocks(
  context: RunContext,
  clocks: readonly SettledClock[],
  reference: string,
  random: Random,
): CombinedOutcome[] {
  const fractions = [...new Set(clocks.map(({ set }) => set.main.fraction))];
  return fractions.map((fraction, at) => {
    const own = clocks.filter(({ set }) => set.main.fraction === fraction);
    return combineFraction(context, own, reference, fraction, random.fork(at));
  });
}

function combineFraction(
  context: RunContext,
  clocks: readonly SettledClock[],
  reference: string,
  fraction: Fraction,
  random: Random,
): CombinedOutcome {
  const base = clocks.find(({ set }) => set.main.taxon === reference);
  const others = clocks.filter((one) => one !== base);
  if (others.length === 0) return { run: null, findings: [] };
  if (base === undefined) {
    const reason = `${reference} has no ratio in ${fraction}`;
    return { run: null, findings: others.map((one) => findingOf(one, null, reference, null, reason, 0)) };
  }
  const judged = others.map((one) => ({ ...one, conversion: conversionOf(base, one) }));
  const converted = judged.filter(({ conversion }) => conversion.refusal === null);
  const clock: Clock = { ...base.set.main, name: `all taxa as ${reference} ${fraction}` };
  const finding = (one: (typeof judged)[number]): ConversionFinding =>
    findingOf(
      one,
      base,
      reference,
      converted.length > 0 ? clock.name : null,
      one.conversion.refusal ?? '',
      one.settled.last.data.beds.filter((bed) => bed.n > 0).length,
      one.conversion,
    );
  const findings = judged.map(finding);
  if (converted.length === 0) return { run: null, findings };
  const join = (of: (settled: Settled) => Pass): CombinedTaxa =>
    combineTaxa(
      clock,
      withoutSlope(of(base.settled).data),
      converted.map(({ settled, conversion }) => ({ data: withoutSlope(of(settled).data), conversion })),
    );
  const parts = [base, ...converted];
  const left: LeftOut = {
    setAside: new Set(),
    wide: unionOf(parts.map(({ settled }) => settled.left.wide)),
    mixed: unionOf(parts.map(({ settled }) => settled.left.mixed)),
  };
  const combined = join((settled) => settled.last);
  const first = passOver(context, join((settled) => settled.first).data, left, random);
  const last = passOver(context, combined.data, left, random);
  return {
    findings,
    run: {
      set: { main: clock, index: null, singles: [] },
      settled: settledWithoutShells(first, last, left, parts),
      combined,
      uncorrected: new Map(combined.data.beds.map((bed) => [bed.key, bed.mean])),
      setAside: setAsideByBed(parts),
      conversions: new Map(converted.map(({ set, conversion }) => [set.main.taxon, conversion])),
    },
  };
}

/** The line through the beds that hold both taxa, without those of mixed age. */
function conversionOf(base: SettledClock, other: SettledClock): TaxonConversion {
  const mixed = unionOf([base.settled.left.mixed, other.settled.left.mixed]);
  const own = withoutSlope(base.settled.last.data).beds.filter((bed) => !mixed.has(bed.key));
  const beds: BedOfTaxon[] = withoutSlope(other.settled.last.data).beds.filter((bed) => !mixed.has(bed.key));
  const codes = ({ set }: SettledClock): string => [...set.main.amino_acids].sort().join();
  return taxonConversion(own, beds, codes(base) === codes(other));
}

const unionOf = (sets: readonly ReadonlySet<string>[]): Set<string> => new Set(sets.flatMap((set) => [...set]));

function setAsideByBed(parts: readonly SettledClock[]): Map<string, number> {
  const counts = new Map<string, number>();
  for (const { settled } of parts) {
    const { data } = settled.last;
    for (const bed of data.beds) {
      const own = bed.shells.filter((at) => data.shells[at].setAside).length;
      counts.set(bed.key, (counts.get(bed.key) ?? 0) + own);
    }
  }
  return counts;
}

/** Passes of the combined clock as findings need them: its shells are read, and have their rows, on their own clocks. */
function settledWithoutShells(first: Pass, last: Pass, left: LeftOut, parts: readonly SettledClock[]): Settled {
  const bare = (pass: Pass): Pass => ({
    ...pass,
    data: { ...pass.data, shells: [], beds: pass.data.beds.map((bed) => ({ ...bed, shells: [] })) },
  });
  const shown = bare(last);
  const readings = readShells({
    data: shown.data,
    aminoAcids: [],
    logs: [],
    marks: [],
    above: shown.data.beds.map(() => []),
    zones: [],
  });
  const ages = shown.data.beds.map(({ key }) => {
    const own = parts.flatMap(({ settled }) => {
      const at = settled.last.data.beds.findIndex((bed) => bed.key === key);
      return at < 0 || settled.ages[at].reading === '' ? [] : [settled.ages[at]];
    });
    return own[0] ?? { verdict: 'none' as const, p: null, adjusted: null, p_groups: null, reading: '', sentences: [] };
  });
  const settled = parts.every((part) => part.settled.settled);
  return { first: bare(first), last: shown, readings, ages, left, passes: 1, settled, marks: [] };
}

function findingOf(
  { set }: SettledClock,
  base: SettledClock | null,
  reference: string,
  clock: string | null,
  reason: string,
  beds: number,
  conversion?: TaxonConversion,
): ConversionFinding {
  const line = conversion?.line ?? null;
  const converted = reason === '';
  return {
    clock,
    taxon: set.main.taxon,
    reference,
    fraction: set.main.fraction,
    from_clock: set.main.name,
    to_clock: base?.set.main.name ?? null,
    paired_beds: conversion?.pairs ?? [],
    slope: line?.slope ?? null,
    slope_se: line?.slopeSe ?? null,
    slope_fixed: line?.slopeFixed ?? null,
    intercept: line?.intercept ?? null,
    intercept_se: line?.interceptSe ?? null,
    extra_scatter: line?.extra ?? null,
    chi_squared: line?.chiSquared ?? null,
    df: line?.df ?? null,
    converted_beds: converted ? beds : 0,
    verdict: converted ? 'converted' : 'refused',
    reason,
  };
}

/**
 * Rows of the combined clock with what only it knows: which taxa stand behind each bed, ratios on the reference's scale, and a
 * mark on every bed that a conversion has moved. It has no row a shell, so that each shell keeps one.
 */
export function combinedRows(result: ClockResult, run: CombinedRun, reference: string): ClockResult {
  const taxaOf = new Map(run.combined.data.beds.map((bed, at) => [bed.key, run.combined.taxa[at]]));
  const scale = run.set.main.name;
  const told: Evidence[] = [];
  const beds = result.beds.map((row): BedRow => {
    const key = `${row.section}/${row.bed}`;
    const taxa = taxaOf.get(key) ?? [];
    const moved = taxa.filter((taxon) => taxon !== reference);
    if (moved.length > 0)
      told.push({ clock: scale, about: 'bed', name: key, sentences: [sentenceOf(taxa, moved, reference)] });
    const mean = run.uncorrected.get(key);
    const dl_mean = mean === undefined || Number.isNaN(mean) ? null : Math.exp(mean);
    return {
      ...row,
      taxon: taxa.length === 0 ? row.taxon : taxa.join(' + '),
      set_aside: run.setAside.get(key) ?? 0,
      dl_mean,
      dl_sd: null,
      dl_se: dl_mean === null || row.log_se === null ? null : dl_mean * row.log_se,
      marks: moved.length > 0 ? [...row.marks, 'converted taxon'] : row.marks,
    };
  });
  return { ...result, beds, shells: [], evidence: [...told, ...result.evidence] };
}

function sentenceOf(taxa: readonly string[], moved: readonly string[], reference: string): string {
  const names = moved.join(' and ');
  return taxa.length > moved.length
    ? `Its mean is the weighted mean of ${reference} and of ${names} put on the scale of ${reference}; the error of the conversion is in it.`
    : `Its mean is that of ${names} put on the scale of ${reference}; the error of the conversion is in it.`;
}
