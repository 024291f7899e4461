import type {
  AminoAcid,
  ClockData,
  Confidence,
  ScreeningMark,
  ShellMark,
  ShellReading,
  ShellStatus,
} from '../model/index.js';
import { screenedOut } from '../screening/index.js';
import { type Agreement, aminoAcidAgreement } from './amino-acid-agreement.js';
import { conflictsOfItsOwn } from './conflicts-of-its-own.js';
import { costOfShell } from './cost-of-shell.js';
import { type OwnBedResiduals, ownBedResiduals } from './own-bed-residuals.js';
import { readingOfShell } from './reading-of-shell.js';
import { findShellConflicts, type ShellConflicts, type ShellInOrder } from './shell-conflicts.js';
import { type ShellCase, shellEvidence } from './shell-evidence.js';
import { confidenceOfReading, statusOfShell } from './shell-status.js';
import { type ShellsToSetAside, shellsToSetAside } from './shells-to-set-aside.js';
import { matchZone, type ZoneToMatch } from './zone-match.js';

/** What the readings of one clock are made from. */
export interface ReadingInput {
  readonly data: ClockData;
  /** Amino acids measured on this taxon and fraction, also those that are not part of the clock. */
  readonly aminoAcids: readonly AminoAcid[];
  /** Log ratios of each clock shell, same order as `data.shells`; one column an amino acid, NaN where not measured. */
  readonly logs: readonly (readonly number[])[];
  /** Screening marks of each clock shell, same order. */
  readonly marks: readonly (readonly ScreeningMark[])[];
  /** For each clock bed, indices of all beds above it by certain relations, directly or through others. */
  readonly above: readonly (readonly number[])[];
  /** Zones of the clock; empty where there are none. */
  readonly zones: readonly ZoneToMatch[];
  /** Spread tau between beds of one zone. Default 0. */
  readonly spread?: number;
  /** Default 0.05. */
  readonly alpha?: number;
}

/** The reading of one clock shell. */
export interface ShellFinding {
  readonly status: ShellStatus;
  readonly reading: ShellReading;
  readonly confidence: Confidence | null;
  /** Evidence in sentences; empty where nothing speaks against the shell. */
  readonly sentences: readonly string[];
}

/** Readings of all shells of one clock and what they rest on. */
export interface ShellReadings extends ReadingsAhead {
  /** Same order as `data.shells`. */
  readonly shells: readonly ShellFinding[];
  readonly residuals: OwnBedResiduals;
}

/** What readings rest on where no zone is known yet. */
export interface ReadingsAhead {
  /** What does not hang on zones and relations. */
  readonly grounds: ShellGrounds;
  readonly conflicts: ShellConflicts;
  readonly toSetAside: ShellsToSetAside;
}

/** What readings rest on that zones and relations do not change: from one pass to the next it mostly stays. */
export interface ShellGrounds {
  /** Slope taken out, and the scatter that was at hand where the shells gave none. */
  readonly slope: number;
  readonly fallback: { readonly s: number; readonly df: number };
  /** Log ratios of the shells, gradient taken out, by themselves and with their beds. */
  readonly xs: readonly number[];
  readonly placed: readonly ShellInOrder[];
  readonly marks: readonly (readonly ShellMark[])[];
  /** Shells that screening sets aside. */
  readonly excluded: ReadonlySet<number>;
  readonly residuals: OwnBedResiduals;
  readonly agreements: readonly (Agreement | null)[];
}

const NO_MARKS: readonly ShellMark[] = [];

/** Shells above which nothing is said of those in a conflict that others are to blame for: tens of thousands of texts. */
export const MOST_SHELLS_SPOKEN_OF = 20_000;

/** Amino acids of a sound shell disagree so far once in a hundred. */
const DISAGREE = 0.01;

/**
 * Reads every shell of a clock (design 7.9): how it stands to its own bed, whether its amino acids agree, what
 * screening says, which zone or bed its ratio fits, and with which shells it contradicts superposition. Statuses are
 * worked out anew from all shells; those that came in are not looked at, so the same beds, zones and relations give
 * the same answer.
 *
 * @param before Readings of the same shells from an earlier pass, or ahead: what can't have changed is taken from them.
 * @throws RangeError when logs, marks or above do not match the clock's shells and beds.
 */
export function readShells(input: ReadingInput, before?: ReadingsAhead): ShellReadings {
  const { data, logs, marks, above, zones, alpha = 0.05 } = input;
  if (logs.length !== data.shells.length || marks.length !== data.shells.length || above.length !== data.beds.length) {
    throw new RangeError(
      `readShells: wanted logs and marks for ${data.shells.length} shells and relations for ${data.beds.length} beds, got ${logs.length}, ${marks.length} and ${above.length}`,
    );
  }
  const grounds = groundsOf(input, before?.grounds);
  const { xs, placed, marks: names, excluded, residuals, agreements } = grounds;
  const { conflicts, toSetAside } = conflictsOf(input, grounds, before);
  const inAll = new Set(toSetAside.inAll);
  const inSome = new Set(toSetAside.inSome);
  const ofBed = bedCounts(data, residuals, excluded, new Set([...inAll, ...inSome]));
  const alone = conflictsOfItsOwn(conflicts, placed, residuals);
  const below = above.map((): number[] => []);
  above.forEach((uppers, lower) => {
    for (const upper of uppers) below[upper].push(lower);
  });

  const many = data.shells.length > MOST_SHELLS_SPOKEN_OF;
  const shells = data.shells.map(({ bed }, i): ShellFinding => {
    const conflicting = conflicts.asLower[i] + conflicts.asUpper[i] > 0;
    if (names[i].length === 0 && !conflicting && !residuals.apart(i)) return PLAIN;
    const own = residuals.of(i);
    const cut = inAll.has(i) ? 'all' : inSome.has(i) ? 'some' : 'none';
    const wholeBed = ofBed[bed].inCut * 2 >= ofBed[bed].sound || !alone[i];
    const crowded = ofBed[bed].odd > Math.max(1, Math.floor(ofBed[bed].sound / 3));
    const [asLower, asUpper] = [conflicts.asLower[i], conflicts.asUpper[i]];
    const pulled = cut !== 'none' && !wholeBed ? Math.sign(asUpper - asLower) : 0;
    const direction = directionOf(own.t, own.p, pulled, alpha);
    const agree = agreements[i] === null ? null : agreements[i].p >= DISAGREE;
    const reading = readingOfShell(direction, agree, names[i]);
    const spokenOf = direction !== 'within' || reading !== 'none';
    const match = spokenOf ? matchZone(xs[i], residuals.s, zones) : null;
    const ownZone = spokenOf
      ? matchZone(residuals.means[bed], residuals.s / Math.sqrt(Math.max(1, own.others)), zones)
      : null;
    const sourceBed =
      direction === 'within' ? null : sourceOf(direction === 'high' ? below[bed] : above[bed], xs[i], residuals, data);
    const decided: ShellCase = {
      ratio: Math.exp(data.shells[i].x),
      own,
      tested: residuals.tested,
      direction,
      reading,
      agreement: agreements[i],
      agree,
      aminoAcids: input.aminoAcids,
      marks: marks[i],
      match,
      zoned: zones.length > 1,
      ownZone: ownZone?.zone.name ?? null,
      sourceBed,
      asLower,
      asUpper,
      cut,
      wholeBed,
      crowded,
    };
    const status = statusOfShell({ own, marks: names[i], reading, cut, wholeBed, crowded, alpha });
    const confidence = confidenceOfReading({
      own,
      status,
      reading,
      agreementP: agreements[i]?.p ?? null,
      marks: names[i],
      sourceFits: sourceBed !== null || (match !== null && ownZone !== null && match.zone.name !== ownZone.zone.name),
      inConflict: asLower + asUpper > 0,
    });
    const cleared = status === 'kept' && reading === 'none' && confidence === null && names[i].length === 0;
    if (many && cleared) return PLAIN;
    return {
      status,
      reading,
      confidence,
      // most are never read: of all passes those of the last, and then only what is printed
      get sentences() {
        return shellEvidence(decided);
      },
    };
  });
  return { shells, residuals, conflicts, toSetAside, grounds };
}

/** What {@link readShells} rests on, for it to go on from once zones are known; undefined where it would not stay. */
export function readAhead(input: ReadingInput): ReadingsAhead | undefined {
  if (input.data.slope !== 0 || !withinSections(input)) return undefined;
  const grounds = groundsOf(input);
  return { grounds, ...conflictsOf(input, grounds) };
}

/** Conflicts with superposition and what would end them; those of an earlier pass where nothing else can come out. */
function conflictsOf(
  { data, above, spread, alpha = 0.05 }: ReadingInput,
  grounds: ShellGrounds,
  before?: ReadingsAhead,
): Pick<ShellReadings, 'conflicts' | 'toSetAside'> {
  const { placed, excluded, residuals, marks } = grounds;
  if (before !== undefined && before.grounds === grounds && withinSections({ data, above })) return before;
  const conflicts = findShellConflicts(
    // Shells that screening sets aside settle their conflicts by themselves.
    excluded.size === 0 ? placed : placed.map((shell, i) => (excluded.has(i) ? { ...shell, x: Number.NaN } : shell)),
    data.beds.map(({ section }, b) => ({ section, above: above[b] })),
    { scatter: residuals.s, df: residuals.df, spread, alpha: alpha / 2 },
  );
  // only shells in conflict are weighed
  const costs = placed.map((_, i) => {
    if (conflicts.asLower[i] + conflicts.asUpper[i] === 0) return 1;
    const p = residuals.p(i);
    return costOfShell(Number.isNaN(p) ? null : p, marks[i].length > 0);
  });
  return { conflicts, toSetAside: shellsToSetAside(conflicts, costs) };
}

/** Whether no bed lies above one of another section: the spread counts between sections only. */
const withinSections = ({ data: { beds }, above }: Pick<ReadingInput, 'data' | 'above'>): boolean =>
  beds.every(({ section }, bed) => above[bed].every((upper) => beds[upper].section === section));

/** The finding of a shell against which nothing speaks, as of most. */
const PLAIN: ShellFinding = Object.freeze({ status: 'kept', reading: 'none', confidence: null, sentences: [] });

/** Worked out anew, or those of an earlier pass where nothing that they rest on has changed. */
function groundsOf({ data, logs, marks, aminoAcids, alpha }: ReadingInput, before?: ShellGrounds): ShellGrounds {
  const { s, df, assumed } = data.scatter;
  const fallback = { s, df: assumed ? Number.POSITIVE_INFINITY : Math.max(1, df) };
  if (before !== undefined && data.slope === 0 && before.slope === 0) {
    const same = before.fallback.s === fallback.s && before.fallback.df === fallback.df;
    if (same || before.residuals.robust) return before;
  }
  const names = marks.map((list) => (list.length === 0 ? NO_MARKS : list.map(({ mark }) => mark)));
  const excluded = new Set(names.flatMap((list, i) => (screenedOut(list) ? [i] : [])));
  // The gradient is one number a bed, so it changes no residual, but it does change what lies in other beds.
  const xs = data.shells.map(({ x, bed }) => x - data.slope * data.beds[bed].gradient);
  const placed = data.slope === 0 ? data.shells : data.shells.map(({ bed }, i) => ({ bed, x: xs[i] }));
  const agreements = aminoAcidAgreement(
    logs,
    data.shells.map(({ x }) => x),
    data.shells.map(({ bed }) => bed),
    aminoAcids.map((code) => {
      const at = data.clock.amino_acids.indexOf(code);
      return at < 0 ? 0 : data.clock.weights[at];
    }),
  );
  const residuals = ownBedResiduals(placed, excluded, { alpha, fallback });
  return { slope: data.slope, fallback, xs, placed, marks: names, excluded, residuals, agreements };
}

/**
 * High or low at the weaker level by its own bed, or at alpha where a least costly set speaks against it on the same
 * side.
 */
function directionOf(t: number | null, p: number | null, pulled: number, alpha: number): 'high' | 'low' | 'within' {
  if (t === null || p === null) return pulled === 0 ? 'within' : pulled > 0 ? 'high' : 'low';
  const level = Math.sign(t) === pulled ? alpha : alpha / 5;
  return p > level ? 'within' : t > 0 ? 'high' : 'low';
}

/** How many shells of each bed are not screened out, stand apart, or lie in a least costly set. */
function bedCounts(
  data: ClockData,
  residuals: OwnBedResiduals,
  excluded: ReadonlySet<number>,
  proposed: ReadonlySet<number>,
): { sound: number; odd: number; inCut: number }[] {
  const counts = data.beds.map(() => ({ sound: 0, odd: 0, inCut: 0 }));
  data.shells.forEach(({ bed }, i) => {
    if (excluded.has(i)) return;
    counts[bed].sound++;
    if (residuals.odd(i)) counts[bed].odd++;
    if (proposed.has(i)) counts[bed].inCut++;
  });
  return counts;
}

/** The bed among the candidates whose mean is nearest, if the ratio fits it within 2 standard deviations of a shell. */
function sourceOf(
  candidates: readonly number[],
  x: number,
  residuals: OwnBedResiduals,
  data: ClockData,
): string | null {
  let best: number | null = null;
  for (const bed of candidates) {
    const distance = Math.abs(x - residuals.means[bed]);
    if (distance <= 2 * residuals.s && (best === null || distance < Math.abs(x - residuals.means[best]))) best = bed;
  }
  return best === null ? null : data.beds[best].key;
}
