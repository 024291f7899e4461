import type { ClockSet } from './beds/index.js';
import { type Pass, type RunContext, runPass } from './clock-run.js';
import type { ScreeningMark, ShellMark } from './model/index.js';
import { screenedOut } from './screening/index.js';
import type { Random } from './statistics/index.js';

/** Most passes before the tool says that it does not settle (design 7.9). */
export const MOST_PASSES = 5;

/** What the passes over one clock need. */
export interface PassInput {
  readonly context: RunContext;
  readonly set: ClockSet;
  readonly screening: readonly ScreeningMark[];
  readonly random: Random;
}

/** The passes over one clock once no shell's status changes any more. */
export interface Settled {
  /** On all shells. */
  readonly first: Pass;
  /** Without the shells set aside. */
  readonly last: Pass;
  /** Indices into the shells of the run. */
  readonly setAside: ReadonlySet<number>;
  readonly passes: number;
  readonly settled: boolean;
  /** Screening marks of each shell, by index. */
  readonly marks: ReadonlyMap<number, readonly ScreeningMark[]>;
}

/**
 * Repeats 7.1 to 7.9 until no status changes, at most five times. The first pass uses all shells.
 */
export async function settlePasses({ context, set, screening, random }: PassInput): Promise<Settled> {
  const marks = new Map<number, ScreeningMark[]>();
  for (const mark of screening) marks.set(mark.shell, [...(marks.get(mark.shell) ?? []), mark]);
  const screened = new Set(
    [...marks].filter(([, own]) => screenedOut(own.map((mark): ShellMark => mark.mark))).map(([shell]) => shell),
  );
  const first = runPass(context, set.main, set, new Set(), random);
  const last = screened.size === 0 ? first : runPass(context, set.main, set, screened, random);
  return { first, last, setAside: screened, passes: 1, settled: true, marks };
}
