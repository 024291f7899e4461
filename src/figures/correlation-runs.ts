import type { SectionColumn } from './correlation-layout.js';

/** A stretch of neighbouring beds of one zone in a column. */
export interface Run {
  readonly zone: number;
  readonly top: number;
  readonly bottom: number;
}

/** Stretches of one zone in a column, from the lowest up, shift included. */
export function runsOf(column: SectionColumn): Run[] {
  const runs: Run[] = [];
  const loose = column.slices.every((slice) => !slice.placed);
  for (const slice of column.slices) {
    if (slice.bed.zone < 0 || !(slice.placed || loose)) continue;
    const last = runs[runs.length - 1];
    const [top, bottom] = [slice.top + column.shift, slice.bottom + column.shift];
    if (last !== undefined && last.zone === slice.bed.zone)
      runs[runs.length - 1] = { ...last, top: Math.min(last.top, top) };
    else runs.push({ zone: slice.bed.zone, top, bottom });
  }
  return runs;
}

/** Where a zone that a section lacks would lie in it. */
export interface Contact {
  readonly y: number;
  /** `between` beds of older and younger zones; else `above` or `below` all that is exposed. */
  readonly where: 'between' | 'above' | 'below';
}

/** Finds the contact of a missing zone: the cut with the fewest beds on the wrong side. */
export function contactOf(column: SectionColumn, zone: number): Contact | null {
  const runs = runsOf(column);
  if (runs.length === 0) return null;
  let best = 0;
  let fewest = Number.POSITIVE_INFINITY;
  for (let cut = 0; cut <= runs.length; cut++) {
    const wrong = runs.filter((run, i) => (i < cut ? run.zone < zone : run.zone > zone)).length;
    if (wrong < fewest) {
      fewest = wrong;
      best = cut;
    }
  }
  if (best === 0) return { y: runs[0].bottom, where: 'below' };
  if (best === runs.length) return { y: runs[runs.length - 1].top, where: 'above' };
  return { y: runs[best].bottom, where: 'between' };
}
