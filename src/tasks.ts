import type { Task } from './model/index.js';
import { chainDraws } from './order/index.js';
import {
  bootstrapLead,
  bootstrapLikelihoodRatio,
  bootstrapZones,
  chooseModelApart,
  gapReferences,
} from './zones/index.js';

/** The pure functions that a host may run on workers, by name. */
const TASKS: Readonly<Record<string, (argument: never) => unknown>> = {
  bootstrapLead,
  bootstrapLikelihoodRatio,
  bootstrapZones,
  chainDraws,
  chooseModelApart,
  gapReferences,
};

/**
 * Runs one task: what a worker thread, or a host without any, calls.
 * @throws Error when no function of that name is registered
 */
export function runTask({ name, argument }: Task): unknown {
  const task = TASKS[name];
  if (task === undefined) throw new Error(`no task is named ${name}`);
  return task(argument as never);
}
