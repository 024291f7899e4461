import type { PlanKind, PlanRow } from '../model/index.js';

/** What every part of the plan needs to know. */
export interface PlanSettings {
  readonly alpha: number;
  readonly power: number;
  /** Most shells of one bed. */
  readonly most: number;
}

/** A line of the plan with nothing in it yet. */
export function blankRow(clock: string | null, kind: PlanKind): PlanRow {
  return {
    clock,
    kind,
    rank: 1,
    beds: [],
    shells: [],
    total: null,
    gap: null,
    gap_error: null,
    power: null,
    chance: null,
    pairs_gained: null,
    beds_bracketed: null,
    proven_best: null,
    settles: '',
  };
}
