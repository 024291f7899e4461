import type { Clock, ClockBed, ClockData, ClockShell } from '../model/index.js';
import { convertLogRatio, type TaxonConversion } from './taxon-conversion.js';

/** One taxon that joins the reference: its beds, and how they are converted. */
export interface ConvertedTaxon {
  readonly data: ClockData;
  readonly conversion: TaxonConversion;
}

/** Beds of all taxa on the scale of the reference. */
export interface CombinedTaxa {
  readonly data: ClockData;
  /** Taxa behind each bed, in the order of `data.beds`, the reference first where it is one of them. */
  readonly taxa: readonly (readonly string[])[];
}

/** Means with any gradient put back: conversion is between shells that lay side by side, whatever the place. */
export function withoutSlope(data: ClockData): ClockData {
  const beds = data.beds.map((bed) => ({ ...bed, mean: bed.mean + data.slope * bed.gradient, gradient: 0 }));
  return { ...data, beds, slope: 0 };
}

/**
 * The beds of the reference taxon and of all converted taxa in one list (design 7.12). A bed that holds several counts
 * once, with the weighted mean of least variance of its own mean and the converted ones; since the line was drawn through
 * that very bed the two go together by its leverage, which the weights and the error take in. The line's error is one
 * for all beds of a taxon and is given to each of them by itself, so it widens comparisons of two converted beds more
 * than it need.
 * @param clock the combined clock
 * @param reference the reference taxon, gradient put back
 * @param others converted taxa, gradient put back; none that is refused
 */
export function combineTaxa(clock: Clock, reference: ClockData, others: readonly ConvertedTaxon[]): CombinedTaxa {
  const beds: ClockBed[] = reference.beds.map((bed) => ({ ...bed }));
  const taxa = reference.beds.map(() => [reference.clock.taxon]);
  const shells: ClockShell[] = [...reference.shells];
  const numbers = new Map(beds.map((bed, at) => [bed.key, at]));
  let squares = reference.scatter.assumed ? 0 : reference.scatter.df * reference.scatter.s ** 2;
  let df = reference.scatter.assumed ? 0 : reference.scatter.df;
  for (const { data, conversion } of others) {
    const line = conversion.line!;
    const leverage = new Map(conversion.pairs.map((key, at) => [key, conversion.leverages[at]]));
    const places = data.beds.map((bed) => {
      const converted = bed.n > 0 ? convertLogRatio(line, bed.mean, bed.se) : { mean: Number.NaN, se: Number.NaN };
      const known = numbers.get(bed.key);
      if (known === undefined) {
        numbers.set(bed.key, beds.length);
        taxa.push(bed.n > 0 ? [data.clock.taxon] : []);
        return beds.push({ ...bed, ...converted, shells: [] }) - 1;
      }
      if (bed.n > 0) {
        beds[known] = joined(beds[known], { ...bed, ...converted }, leverage.get(bed.key) ?? 0);
        taxa[known] = [...taxa[known], data.clock.taxon];
      }
      return known;
    });
    for (const { shell, bed, x, setAside } of data.shells) {
      const to = places[bed];
      beds[to] = { ...beds[to], shells: [...beds[to].shells, shells.length] };
      shells.push({ shell, bed: to, x: line.intercept + line.slope * x, setAside });
    }
    if (!data.scatter.assumed) {
      squares += data.scatter.df * (line.slope * data.scatter.s) ** 2;
      df += data.scatter.df;
    }
  }
  const scatter = df > 0 ? { s: Math.sqrt(squares / df), df, assumed: false } : reference.scatter;
  return { data: { clock, shells, beds, scatter, slope: 0 }, taxa };
}

/** The mean of least variance of a bed's reference mean and a converted one (covariance = leverage × variance). */
function joined(own: ClockBed, converted: ClockBed, leverage: number): ClockBed {
  const n = own.n + converted.n;
  if (own.n === 0) return { ...own, n, mean: converted.mean, se: converted.se };
  const [a, b] = [own.se ** 2, converted.se ** 2];
  const shared = Math.min(leverage * a, Math.sqrt(a * b));
  const spread = a + b - 2 * shared;
  const weight = spread > 0 ? Math.min(1, Math.max(0, (a - shared) / spread)) : 0;
  const variance = (1 - weight) ** 2 * a + weight ** 2 * b + 2 * weight * (1 - weight) * shared;
  return { ...own, n, mean: own.mean + weight * (converted.mean - own.mean), se: Math.sqrt(variance) };
}
