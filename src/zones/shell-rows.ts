import type { ClockData, Confidence, Shell, ShellMark, ShellReading, ShellRow, ShellStatus } from '../model/index.js';
import { type Assignment, zoneAssigner } from './assignment.js';
import { zoneName } from './zone-rows.js';
import type { Zoning } from './zoning.js';

/** What a shell's row says beyond its ratio and zone. */
export interface ShellNotes {
  readonly status: ShellStatus;
  readonly marks: readonly ShellMark[];
  readonly reading: ShellReading;
  readonly confidence: Confidence | null;
}

/**
 * Rows of shells.csv for one clock. The zone is the shell's own, from its log ratio (gradient taken out) and the scatter;
 * the residual is against the mean of its bed's other kept shells.
 * @param notes by index into ClockData.shells
 * @param assign zone of a log ratio with its error; default from the zones of the fit alone
 */
export function shellRows(
  data: ClockData,
  zoning: Zoning | null,
  shells: readonly Shell[],
  notes: (at: number) => ShellNotes,
  assign?: (x: number, error: number) => Assignment,
): ShellRow[] {
  const zoneOf = zoning === null ? null : (assign ?? zoneAssigner(zoning.priors));
  return data.shells.map((clockShell, at) => {
    const shell = shells[clockShell.shell];
    const x = clockShell.x - data.slope * data.beds[clockShell.bed].gradient;
    const assignment = zoneOf === null ? null : zoneOf(x, data.scatter.s);
    const { status, marks, reading, confidence } = notes(at);
    return {
      clock: data.clock.name,
      section: shell.section,
      bed: shell.bed,
      taxon: shell.taxon,
      shell: shell.shell,
      lab_id: shell.lab_ids,
      preparations: shell.preparations,
      dl: Math.exp(clockShell.x),
      log_ratio: clockShell.x,
      residual: leaveOneOutResidual(data, at),
      status,
      zone: assignment === null ? null : zoneName(assignment.zone),
      zone_probability: assignment?.probability ?? null,
      marks,
      reading,
      confidence,
    };
  });
}

/** x minus the mean of the other kept shells of its bed (published ones too); null where there are none. */
export function leaveOneOutResidual(data: ClockData, at: number): number | null {
  const { x, bed: bedIndex, setAside } = data.shells[at];
  const bed = data.beds[bedIndex];
  const own = x - data.slope * bed.gradient;
  if (setAside) return bed.n === 0 ? null : own - bed.mean;
  if (bed.n < 2) return null;
  return own - (bed.n * bed.mean - own) / (bed.n - 1);
}
