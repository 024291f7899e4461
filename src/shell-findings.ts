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

/** Shells above which nothing is said of those in a conflict that others are to blame for: tens of thousands of texts. */
export const MOST_SHELLS_SPOKEN_OF = 20_000;

/** What is held for or against each shell, in sentences. */
export function shellEvidence({ last: { data }, readings, marks }: Settled, shells: readonly Shell[]): Evidence[] {
  const evidence: Evidence[] = [];
  const many = data.shells.length > MOST_SHELLS_SPOKEN_OF;
  for (let at = 0; at < data.shells.length; at++) {
    const finding = readings.shells[at];
    const cleared = finding.status === 'kept' && finding.reading === 'none' && marks[at].length === 0;
    if (many && cleared) continue;
    const { sentences } = finding;
    if (sentences.length === 0) continue;
    const name = shellName(shells[data.shells[at].shell]);
    evidence.push({ clock: data.clock.name, about: 'shell', name, sentences });
  }
  return evidence;
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
