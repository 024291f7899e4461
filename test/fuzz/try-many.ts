import { appendFileSync } from 'node:fs';
import { createRandom } from '../../src/statistics/index.js';
import { type Mutant, mutate } from './mutate.js';
import { outcomeOf } from './outcome.js';
import { STARTS } from './starts.js';

/** A try that broke the program. */
export interface Break {
  readonly number: number;
  readonly changes: readonly string[];
  readonly why: string;
}

export interface Tally {
  readonly done: number;
  readonly refused: number;
  readonly breaks: readonly Break[];
  /** The longest try, in ms of the processor. */
  readonly slowest: { readonly number: number; readonly ms: number };
}

/** The longest a try may take, in ms of the processor, so that a busy machine fails no test. */
export const PATIENCE = 10_000;
/** The most memory the program may hold, in bytes. */
export const ROOM = 1.5 * 1024 ** 3;

/** The mutant of this number, always the same. */
export function mutantOf(number: number): Mutant {
  return mutate(STARTS[number % STARTS.length], createRandom(number));
}

/** Tries the mutants from one number on. FUZZ_LOG names a file that is told of each try before it starts. */
export async function tryMany(first: number, count: number): Promise<Tally> {
  const breaks: Break[] = [];
  let [done, refused] = [0, 0];
  // other test files may have left something in this process
  const before = process.memoryUsage().rss;
  let slowest = { number: first, ms: 0 };
  for (let number = first; number < first + count; number++) {
    const { files, changes } = mutantOf(number);
    if (process.env.FUZZ_LOG) appendFileSync(process.env.FUZZ_LOG, `${number} ${changes.join(' | ')}\n`);
    const start = process.cpuUsage();
    try {
      const { kind } = await outcomeOf(files);
      if (kind === 'done') done++;
      else refused++;
      const { user, system } = process.cpuUsage(start);
      const ms = (user + system) / 1000;
      if (ms > slowest.ms) slowest = { number, ms };
      if (ms > PATIENCE) breaks.push({ number, changes, why: `took ${Math.round(ms)} ms` });
      const { rss } = process.memoryUsage();
      if (rss - before > ROOM) breaks.push({ number, changes, why: `holds ${Math.round(rss / 1024 ** 2)} MB` });
    } catch (error) {
      breaks.push({ number, changes, why: (error as Error).stack ?? String(error) });
    }
  }
  return { done, refused, breaks, slowest };
}
