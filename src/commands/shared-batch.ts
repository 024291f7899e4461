import type { Task } from '../model/index.js';

/** What a thread is sent: it takes tasks by adding to `taken`, which all who take part share. */
export interface SharedBatch {
  readonly batch: number;
  readonly tasks: readonly Task[];
  readonly taken: Int32Array;
}

/** What a thread answers. */
export interface Answer {
  readonly batch: number;
  readonly index: number;
  readonly result?: unknown;
  readonly error?: Error;
}

/** The next task of a batch that nobody has; at or above their number, none is left. */
export const takeNext = (taken: Int32Array): number => Atomics.add(taken, 0, 1);

/** Leaves no task of a batch to be taken. */
export const takeRest = (taken: Int32Array, tasks: number): void => void Atomics.add(taken, 0, tasks);
