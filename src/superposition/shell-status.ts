import type { Confidence, ShellMark, ShellReading, ShellStatus } from '../model/index.js';
import { screenedOut } from '../screening/index.js';
import type { OwnBedResidual } from './own-bed-residuals.js';

/** What decides the status of one shell. */
export interface StatusCase {
  readonly own: OwnBedResidual;
  readonly marks: readonly ShellMark[];
  readonly reading: ShellReading;
  readonly cut: 'all' | 'some' | 'none';
  readonly wholeBed: boolean;
  readonly crowded: boolean;
  readonly alpha: number;
}

/**
 * Whether a shell is kept, doubtful or set aside (design 7.9). It is set aside
 * - by screening: high serine, or two marks of different rules;
 * - by its own bed, when a reading fits: adjusted p at most alpha / 2, two sound neighbours or more, and no more than
 *   a third of the bed standing apart;
 * - by superposition, when its own bed bears it out: every least costly set holds it, and its residual is at p ≤ alpha.
 *
 * The two tests share alpha, so that a survey without odd shells sets none aside by them in all but about alpha of
 * cases. It is doubtful where its residual alone is at p ≤ alpha / 5, where it is in a least costly set, or where
 * screening marked it.
 */
export function statusOfShell({ own, marks, reading, cut, wholeBed, crowded, alpha }: StatusCase): ShellStatus {
  if (screenedOut(marks)) return 'set aside';
  const read = reading !== 'none' && !crowded;
  if (read && own.odd && own.adjusted !== null && own.adjusted <= alpha / 2) return 'set aside';
  const proposed = cut !== 'none' && !wholeBed;
  if (read && proposed && cut === 'all' && own.p !== null && own.p <= alpha) return 'set aside';
  if (own.p !== null && own.p <= alpha / 5) return 'doubtful';
  return proposed || marks.length > 0 ? 'doubtful' : 'kept';
}

/** What decides how sure a reading is. */
export interface ConfidenceCase {
  readonly own: OwnBedResidual;
  readonly status: ShellStatus;
  readonly reading: ShellReading;
  readonly agreementP: number | null;
  readonly marks: readonly ShellMark[];
  /** The ratio fits a zone or bed that the reading asks for. */
  readonly sourceFits: boolean;
  readonly inConflict: boolean;
}

/**
 * How sure a reading is; null without one. One point each for: an adjusted residual at p ≤ 0.01 (two), or at p ≤ 0.05
 * (one); four sound neighbours or more; amino acids that clearly agree (p ≥ 0.05) or clearly disagree (p ≤ 0.001), or
 * high serine for contamination (two); a zone or bed that it fits, for reworking and intrusion; a conflict with
 * superposition. High from 4 points, moderate from 3. A reading that leaves two explanations open, or of a shell that
 * is only doubtful, is never more than moderate. The points are a convention.
 */
export function confidenceOfReading(shell: ConfidenceCase): Confidence | null {
  const { own, reading, agreementP, marks } = shell;
  if (reading === 'none') return null;
  const moved = reading === 'reworked from an older deposit' || reading === 'intruded from a younger deposit';
  const open = reading === 'reworked or altered' || reading === 'intruded or contaminated';
  const adjusted = own.adjusted ?? 1;
  const serine = reading === 'contaminated by younger amino acids' && marks.includes('high serine');
  const decided = agreementP !== null && (moved ? agreementP >= 0.05 : agreementP <= 0.001);
  const points =
    (adjusted <= 0.01 ? 2 : adjusted <= 0.05 ? 1 : 0) +
    (own.others >= 4 ? 1 : 0) +
    (serine ? 2 : decided && !open ? 1 : 0) +
    (moved && shell.sourceFits ? 1 : 0) +
    (shell.inConflict ? 1 : 0);
  if (points >= 4) return open || shell.status !== 'set aside' ? 'moderate' : 'high';
  return points >= 3 ? 'moderate' : 'low';
}
