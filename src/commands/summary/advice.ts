import type { Findings, PlanRow } from '../../model/index.js';

/** The plan's best advice in at most two sentences: where to collect, and what to date. */
export function bestAdvice({ plan, plan_notes }: Findings): string[] {
  if (plan.length === 0) return plan_notes.slice(0, 1);
  const collect =
    plan.find(isWorthCollecting('check bed')) ??
    plan.find(isWorthCollecting('separate zones')) ??
    plan.find(({ kind, rank, total }) => kind === 'strengthen bed' && rank === 1 && total === 5) ??
    plan.find(isWorthCollecting('separate beds'));
  // one date brackets nothing; more than bracket anything new are no advice
  const date = plan.find(({ kind, beds_bracketed }) => kind === 'date beds' && (beds_bracketed ?? 0) > 0);
  return [collect, date].flatMap((row) => (row === undefined ? [] : [row === date ? firstSentence(row) : row.settles]));
}

const isWorthCollecting = (kind: PlanRow['kind']) => (row: PlanRow) => row.kind === kind && row.total !== null;

// names may hold full stops: a sentence of the plan ends where the next one begins with one of these words
const firstSentence = ({ settles }: PlanRow): string => settles.split(/(?<=\.) (?=No |That is |But )/)[0];
