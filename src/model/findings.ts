import type { AminoAcid, ByAminoAcid, Fraction } from './amino-acid.js';
import type { BedMark, Confidence, ShellMark, ShellReading, ShellStatus } from './mark.js';
import type { RunOptions } from './options.js';
import type { PlanRow } from './plan.js';
import type { Problem } from './problem.js';
import type { BedPlace, InputFile, RelationBasis } from './survey.js';

/*
 * Rows of the results tables. Field names are the column names of the published tables (design, section 6), to the
 * letter, so that tables, results.json and code share one vocabulary. null is an unknown value (an empty cell).
 * D/L values are on the D/L scale; `log_*`, `scatter`, `spread`, `difference`, `residual` are in log ratios (no unit).
 */

/** What the data of a clock support: several zones, one, a continuum without zones, or nothing for want of beds. */
export type ClockVerdict = 'zones' | 'one zone' | 'continuum' | 'too few beds';

/** One clock: what was zoned, and what was found of it (clocks.csv). */
export interface ClockRow {
  readonly clock: string;
  readonly taxon: string;
  readonly fraction: Fraction;
  readonly amino_acids: readonly AminoAcid[];
  readonly main: boolean;
  readonly shells: number;
  readonly beds: number;
  readonly scatter: number;
  readonly spread: number | null;
  /** Number of zones in use (1 where none are supported). */
  readonly zones: number;
  /** What the data support, also when --zones forces another number. */
  readonly verdict: ClockVerdict;
  readonly slope: number | null;
  readonly slope_low: number | null;
  readonly slope_high: number | null;
  /** Adjusted Rand index of this clock's zoning with the main clock's, over shared beds. */
  readonly rand_with_main: number | null;
}

/** One aminozone of a clock (zones.csv). */
export interface ZoneRow {
  readonly clock: string;
  /** Z1 is the youngest. */
  readonly zone: string;
  readonly beds: number;
  readonly shells: number;
  /** exp of the zone's mean log ratio, with the 95 % interval of that mean. */
  readonly dl_mean: number;
  readonly dl_low: number;
  readonly dl_high: number;
  /** exp(mean log ratio ± 1 standard deviation of shells). */
  readonly shell_low: number;
  readonly shell_high: number;
  /** Mean Jaccard similarity over bootstraps (Hennig 2007), 0 to 1. */
  readonly stability: number | null;
}

/** One model of the number of zones with its criteria (zone_counts.csv). */
export interface ZoneCountRow {
  readonly clock: string;
  /** `1` … `K`, or `continuum`. */
  readonly model: string;
  readonly log_likelihood: number;
  readonly bic: number;
  readonly gap: number | null;
  readonly gap_se: number | null;
  readonly silhouette: number | null;
  readonly chosen: boolean;
}

/** Whether two neighbouring zones are distinct; `not resolved` where too few shells or beds can tell. */
export type AdjacentVerdict = 'distinct' | 'not distinct' | 'not resolved';

/** Two neighbouring zones held against each other (adjacent_zones.csv). */
export interface AdjacentZonesRow {
  readonly clock: string;
  readonly older: string;
  readonly younger: string;
  readonly difference: number;
  readonly p_difference: number | null;
  readonly mann_whitney_u: number | null;
  readonly p_mann_whitney: number | null;
  readonly overlap: number;
  readonly overlap_low: number | null;
  readonly overlap_high: number | null;
  /** Whether the ±1 standard deviation ranges of the two zones' shells overlap. */
  readonly one_sigma_overlap: boolean;
  readonly verdict: AdjacentVerdict;
}

/** One bed on one main clock (beds.csv). */
export interface BedRow {
  readonly clock: string;
  readonly section: string;
  readonly bed: string;
  /** Place as written: level, height_m or depth_m; the kind stands in BedSite. */
  readonly place: number | null;
  readonly taxon: string;
  /** Shells behind the mean. */
  readonly shells: number;
  readonly set_aside: number;
  /** Arithmetic mean, standard deviation and standard error of D/L of the shells kept, as measured: no gradient taken out. */
  readonly dl_mean: number | null;
  readonly dl_sd: number | null;
  readonly dl_se: number | null;
  /** Mean log ratio with any gradient that is used taken out, and its standard error. */
  readonly log_mean: number | null;
  readonly log_se: number | null;
  readonly zone: string | null;
  readonly zone_probability: number | null;
  readonly second_zone: string | null;
  readonly second_probability: number | null;
  readonly straddles: boolean;
  readonly marks: readonly BedMark[];
  readonly reading: string;
}

/** One shell on its main clock (shells.csv). */
export interface ShellRow {
  readonly clock: string;
  readonly section: string;
  readonly bed: string;
  readonly taxon: string;
  readonly shell: string;
  readonly lab_id: readonly string[];
  readonly preparations: number;
  readonly dl: number;
  readonly log_ratio: number;
  /** x minus the leave-one-out mean of its bed's other kept shells. */
  readonly residual: number | null;
  readonly status: ShellStatus;
  readonly zone: string | null;
  readonly zone_probability: number | null;
  readonly marks: readonly ShellMark[];
  readonly reading: ShellReading;
  readonly confidence: Confidence | null;
}

/** One bed in the order of its clock (order.csv). */
export interface OrderRow {
  readonly clock: string;
  /** 1 is the oldest. */
  readonly rank: number;
  readonly section: string;
  readonly bed: string;
  readonly zone: string | null;
  /** 95 % interval of the rank. */
  readonly rank_low: number;
  readonly rank_high: number;
  readonly p_older_than_next: number | null;
  /** p_older_than_next is at least 1 - alpha. */
  readonly resolved: boolean | null;
}

/** Two beds and the probability of their order (pairs.csv). */
export interface PairRow {
  readonly clock: string;
  /** `section/bed`. */
  readonly bed_a: string;
  readonly bed_b: string;
  readonly p_a_older: number;
  readonly p_same_zone: number | null;
}

/** What the ratios say of a field relation. */
export type RelationVerdict = 'agrees' | 'tied' | 'reversed' | 'not tested';

/** One field relation against the ratios of one clock (relations.csv). */
export interface RelationRow {
  readonly clock: string;
  readonly lower: string;
  readonly upper: string;
  readonly basis: RelationBasis;
  readonly kind: 'older' | 'same';
  readonly certainty: 'certain' | 'probable';
  /** Mean log ratio of lower minus upper; positive when the lower bed has the higher ratio. */
  readonly difference: number | null;
  readonly z: number | null;
  readonly p_reversed: number | null;
  /** Verdict on all shells, before any was set aside. */
  readonly verdict: RelationVerdict;
  /** Verdict after setting aside. */
  readonly verdict_after: RelationVerdict;
  readonly reading: string;
}

/** One section against its own superposition (sections.csv). */
export interface SectionRow {
  readonly clock: string;
  readonly section: string;
  readonly beds: number;
  readonly relations: number;
  readonly statistic: number | null;
  readonly p_order: number | null;
  readonly verdict: 'consistent' | 'inconsistent' | 'not tested';
}

/** One zone of one clock; `sections` holds one entry a section, in coast order: the beds of that zone there. */
export interface CorrelationRow {
  readonly clock: string;
  readonly zone: string;
  readonly sections: Readonly<Record<string, readonly string[]>>;
}

/* Beyond the tables. */

/** Where a bed stands; one a bed of the survey, in section and place order (lowest first), sections in coast order. */
export interface BedSite {
  readonly section: string;
  readonly bed: string;
  readonly place: BedPlace | null;
  readonly elevation_m: number | null;
  readonly latitude: number | null;
  readonly longitude: number | null;
  readonly coast_km: number | null;
  readonly cmat_c: number | null;
  readonly burial_m: number | null;
  readonly note: string | null;
  /** Value of the gradient column in use. */
  readonly gradient: number | null;
}

/** D/L of one shell an amino acid: for figures of amino acid against amino acid. Same order as the run's shells. */
export interface ShellRatios {
  readonly section: string;
  readonly bed: string;
  readonly taxon: string;
  readonly fraction: Fraction;
  readonly shell: string;
  readonly ratios: ByAminoAcid;
}

/** What the tool holds against (or for) one shell, bed or relation, in sentences. */
export interface Evidence {
  readonly clock: string;
  readonly about: 'shell' | 'bed' | 'relation' | 'clock';
  /** `section/bed/shell`, `section/bed`, `lower > upper`, or the clock's name. */
  readonly name: string;
  readonly sentences: readonly string[];
}

/** Two shells whose ratios contradict superposition. */
export interface ConflictRow {
  readonly clock: string;
  /** `section/bed/shell` of the shell that lies lower and has the smaller ratio. */
  readonly lower: string;
  readonly upper: string;
  /** How far the lower falls short, in log ratios. */
  readonly shortfall: number;
}

/** How well the order was sampled. */
export interface OrderDiagnostics {
  readonly clock: string;
  readonly chains: number;
  readonly draws: number;
  /** Smallest effective sample size and largest split R-hat over beds. */
  readonly ess_min: number;
  readonly rhat_max: number;
  readonly converged: boolean;
  /** Relations that bound the order, and those left out because they are reversed or only probable. */
  readonly relations_kept: number;
  readonly relations_left_out: number;
}

/** Everything known of the slope along a gradient on one clock. */
export interface GradientFinding {
  readonly clock: string;
  readonly column: string;
  /** Mean of the column over beds: the value at which corrected ratios hold. */
  readonly centre: number;
  readonly slope: number;
  readonly slope_low: number;
  readonly slope_high: number;
  /** BIC of the best model with and without the slope. */
  readonly bic_with: number;
  readonly bic_without: number;
  /** Whether the slope was taken out of the ratios. */
  readonly used: boolean;
}

/** How the ratios of one taxon were put on the scale of the reference taxon, or why they were not. */
export interface ConversionFinding {
  /** The combined clock; null where no taxon could be converted to its reference. */
  readonly clock: string | null;
  readonly taxon: string;
  readonly reference: string;
  readonly fraction: Fraction;
  /** The two main clocks between which the line runs; null where the taxon or the reference has none in this fraction. */
  readonly from_clock: string | null;
  readonly to_clock: string | null;
  /** Beds that hold both taxa, as `section/bed`. */
  readonly paired_beds: readonly string[];
  /** x_reference = intercept + slope · x on log ratios; null where there are too few pairs for a line. */
  readonly slope: number | null;
  readonly slope_se: number | null;
  /** Fixed at 1 under five pairs. */
  readonly slope_fixed: boolean | null;
  readonly intercept: number | null;
  readonly intercept_se: number | null;
  /** Standard deviation of the pairs about the line beyond their errors, carried into every converted bed. */
  readonly extra_scatter: number | null;
  readonly chi_squared: number | null;
  readonly df: number | null;
  /** Beds whose mean on the combined clock rests on this conversion. */
  readonly converted_beds: number;
  readonly verdict: 'converted' | 'refused';
  /** Why it was refused, or what to beware of; empty where there is nothing to say. */
  readonly reason: string;
}

/** Two beds whose amino acids disagree on which is the older. */
export interface AminoAcidVotes {
  readonly clock: string;
  readonly bed_a: string;
  readonly bed_b: string;
  readonly votes: readonly { readonly amino_acid: AminoAcid; readonly older: string; readonly p: number }[];
}

/** What one amino acid brings to an index. */
export interface AminoAcidShare {
  readonly clock: string;
  readonly amino_acid: AminoAcid;
  readonly weight: number;
  /** Variance between beds over variance of a shell within its bed, on log ratios. */
  readonly resolution: number;
  readonly verdict: 'carries the resolution' | 'helps' | 'adds noise';
}

/** A sentence for the reader that belongs to the run or to one clock, most important first. */
export interface Remark {
  readonly clock: string | null;
  readonly level: 'finding' | 'caution';
  readonly text: string;
}

/** Everything that was found: what results.json holds, and what figures, report, explain, plan and dates read. */
export interface Findings {
  readonly program: 'bedorder';
  /** Version of the program; results of another major version are refused by explain, plan and dates. */
  readonly version: string;
  readonly options: RunOptions;
  readonly inputs: readonly InputFile[];
  readonly clocks: readonly ClockRow[];
  readonly zones: readonly ZoneRow[];
  readonly zone_counts: readonly ZoneCountRow[];
  readonly adjacent_zones: readonly AdjacentZonesRow[];
  readonly beds: readonly BedRow[];
  readonly shells: readonly ShellRow[];
  readonly order: readonly OrderRow[];
  readonly pairs: readonly PairRow[];
  readonly relations: readonly RelationRow[];
  readonly sections: readonly SectionRow[];
  readonly correlation: readonly CorrelationRow[];
  readonly problems: readonly Problem[];
  readonly sites: readonly BedSite[];
  /** Sections in coast order (coast_km, else along the main direction of the coordinates, else as given). */
  readonly section_order: readonly string[];
  readonly shell_ratios: readonly ShellRatios[];
  readonly evidence: readonly Evidence[];
  readonly conflicts: readonly ConflictRow[];
  readonly diagnostics: readonly OrderDiagnostics[];
  readonly gradients: readonly GradientFinding[];
  readonly conversions: readonly ConversionFinding[];
  readonly votes: readonly AminoAcidVotes[];
  readonly shares: readonly AminoAcidShare[];
  readonly remarks: readonly Remark[];
  /** What to collect or date next; empty where it was left out, as plan_notes then say. */
  readonly plan: readonly PlanRow[];
  /** When a pair counts as resolved, and with what power the numbers of shells are worked out. */
  readonly plan_criterion: string;
  /** What the reader must know to use the plan, most important first. */
  readonly plan_notes: readonly string[];
}
