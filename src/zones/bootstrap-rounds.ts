import type { Task, TaskMapper } from '../model/index.js';
import { sharedOut } from './shared-out.js';

/** A bootstrap p-value and the number of simulations behind it. */
export interface BootstrapP {
  readonly p: number;
  readonly repeats: number;
}

/** What a bootstrap in rounds needs. */
export interface RoundsInput {
  /** Statistic of the data. */
  readonly observed: number;
  /** The level that p is held against. */
  readonly level: number;
  /** Most repeats. */
  readonly simulations: number;
  /** The task that draws the statistic for `repeats` samples, the first of them number `first`. */
  readonly task: (first: number, repeats: number) => Task;
  readonly map: TaskMapper;
}

/** Repeats a task: enough to be worth handing over, few enough to share out. */
const REPEATS_A_TASK = 50;

/** Repeats between looks at whether the answer is plain already: few at first, since most answers are. */
const FIRST_ROUND = 100;
const LATER_ROUND = 200;

/**
 * Draws a statistic under the simpler model, in rounds, until p is plainly on one side of the level: three standard errors of
 * a share at the level away. The rounds do not depend on the number of workers, nor does what is drawn.
 */
export async function bootstrapInRounds({ observed, level, simulations, task, map }: RoundsInput): Promise<BootstrapP> {
  const drawn: number[] = [];
  while (drawn.length < simulations) {
    const round = Math.min(drawn.length === 0 ? FIRST_ROUND : LATER_ROUND, simulations - drawn.length);
    const tasks = sharedOut(round, REPEATS_A_TASK).map(({ first, repeats }) => task(drawn.length + first, repeats));
    drawn.push(...((await map(tasks)) as number[][]).flat());
    const distance = Math.abs(bootstrapP(observed, drawn) - level);
    if (distance > 3 * Math.sqrt((level * (1 - level)) / drawn.length)) break;
  }
  return { p: bootstrapP(observed, drawn), repeats: drawn.length };
}

/**
 * Share of the drawn values at or above that of the data, the data counted in: never 0.
 * @example
 * bootstrapP(5, [1, 2, 6, 0]) // => 0.4
 */
export function bootstrapP(observed: number, drawn: readonly number[]): number {
  return (1 + drawn.filter((value) => value >= observed).length) / (drawn.length + 1);
}
