import type { Findings } from '../model/index.js';
import { type PlanOptions, plan } from './plan.js';

/** Most beds on one clock for which a run makes its plan: with more it would take as long as the run itself. */
export const MOST_BEDS_PLANNED = 400;

/**
 * The parts of the findings that a run's own plan fills. With more than {@link MOST_BEDS_PLANNED} beds on a clock no line
 * is made, and a note says how to have it made.
 *
 * @param findings all that was found; what stands in its plan is not looked at
 */
export function planOfRun(
  findings: Findings,
  options: PlanOptions = {},
): Pick<Findings, 'plan' | 'plan_criterion' | 'plan_notes'> {
  const most = Math.max(0, ...findings.clocks.filter((row) => row.main).map((row) => row.beds));
  if (most > MOST_BEDS_PLANNED) {
    const note =
      `A clock has ${most} beds. With more than ${MOST_BEDS_PLANNED} a run makes no plan, which would take it long; ` +
      '`bedorder plan` makes it from the results folder.';
    return { plan: [], plan_criterion: '', plan_notes: [note] };
  }
  const { rows, criterion, notes } = plan(findings, options);
  return { plan: rows, plan_criterion: criterion, plan_notes: notes };
}
