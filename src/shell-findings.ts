import type { ConflictRow, Evidence, Shell, ShellMark } from './model/index.js';
import type { Settled } from './passes.js';
import { listConflicts } from './superposition/index.js';
import type { ShellNotes } from './zones/index.js';

const NO_MARKS: readonly ShellMark[] = [];

/** What was read of one shell of the clock, for its row. */
export function notesOnShell({ readings, marks }: Settled, at: number): ShellNotes {
  const { status, reading, confidence } = readings.shells[at];
  const own = marks[at];
  return { status, reading, confidence, marks: own.length === 0 ? NO_MARKS : own.map(({ mark }) => mark) };
}

const shellName = ({ section, bed, shell }: Shell): string => `${section}/${bed}/${shell}`;

/** What is held for or against each shell, in sentences. */
export function shellEvidence({ last: { data }, readings }: Settled, shells: readonly Shell[]): Evidence[] {
  return data.shells.flatMap(({ shell }, at) => {
    const { sentences } = readings.shells[at];
    if (sentences.length === 0) return [];
    return [{ clock: data.clock.name, about: 'shell' as const, name: shellName(shells[shell]), sentences }];
  });
}

/** The widest conflicts of single shells with superposition. */
export function conflictRows({ last: { data }, readings }: Settled, shells: readonly Shell[]): ConflictRow[] {
  const placed = data.shells.map(({ bed, x }) => ({ bed, x: x - data.slope * data.beds[bed].gradient }));
  return listConflicts(readings.conflicts, placed).map(({ lower, upper, shortfall }) => ({
    clock: data.clock.name,
    lower: shellName(shells[data.shells[lower].shell]),
    upper: shellName(shells[data.shells[upper].shell]),
    shortfall,
  }));
}
