import type { ClockData, Task } from '../model/index.js';
import { chooseModel, type ModelChoice } from './model-choice.js';

/** Argument of {@link chooseModelApart}: plain data, so that it can go to a worker. */
export interface ChoiceArgument {
  readonly values: readonly number[];
  readonly errors: readonly number[];
  readonly extraParameters: number;
}

/** Beds from which the choice is worth a thread: some tenths of a second. */
const HEAVY = 1000;

/** The choice among models for all beds of a clock that have a mean, for the host to run; null without any. */
export function choiceTask({ beds }: ClockData, extraParameters: number): Task | null {
  const measured = beds.filter((bed) => bed.n > 0);
  if (measured.length === 0) return null;
  const argument: ChoiceArgument = {
    values: measured.map((bed) => bed.mean),
    errors: measured.map((bed) => bed.se),
    extraParameters,
  };
  return { name: 'chooseModelApart', argument, heavy: measured.length > HEAVY };
}

/** {@link chooseModel} as a task for the host: pure, from plain data to plain data. */
export const chooseModelApart = ({ values, errors, extraParameters }: ChoiceArgument): ModelChoice =>
  chooseModel(values, errors, extraParameters);
