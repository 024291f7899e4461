import { availableParallelism } from 'node:os';
import type { Host, Progress, Task, TasksUnderWay } from '../model/index.js';
import { createThreadPool } from './thread-pool.js';

/** A host on Node: tasks on worker threads. */
export interface WorkerHost extends Host {
  readonly begin: (tasks: readonly Task[], onDone?: (done: number) => void) => TasksUnderWay;
  /** Starts the threads, so that they are there when work comes. */
  readonly warm: () => void;
  /** Ends the threads. */
  readonly close: () => Promise<void>;
}

/** Milliseconds of work left from which threads are worth their start. */
const WORTH_THREADS = 400;

/**
 * Runs the engine's tasks here and on worker threads, and gives the results in the order of the tasks. The first tasks are
 * done here, to see how long one takes; threads are started only where the rest is worth it, and this thread goes on with
 * its share while they start. Heavy tasks that are begun ahead of their need go to the threads at once. Tasks are pure
 * functions, so the results do not depend on who does them.
 *
 * @param progress Told how far the run is.
 * @param workers Number of threads, this one among them; default one a core, or BEDORDER_WORKERS. 1 does everything here.
 */
export function createWorkerHost(progress: Progress, workers = wantedWorkers()): WorkerHost {
  const pool = createThreadPool(workers - 1);
  const begin = (tasks: readonly Task[], onDone: (done: number) => void = () => {}): TasksUnderWay => {
    const batch = pool.batch(tasks, onDone);
    let shared = tasks[0]?.heavy === true && batch.share(tasks.length);
    return async () => {
      const { runTask } = await import('../tasks.js');
      const started = performance.now();
      let own = 0;
      for (let next = batch.take(); next !== null; next = batch.take()) {
        try {
          batch.answer(next, runTask(tasks[next]));
        } catch (error) {
          batch.fail(error as Error);
        }
        const perTask = (performance.now() - started) / ++own;
        if (!shared && batch.left() > 1 && batch.left() * perTask > WORTH_THREADS) shared = batch.share(batch.left());
        // a signal, or the answer of a thread, is heard between tasks
        if (shared || perTask > 5) await new Promise(setImmediate);
      }
      return batch.results();
    };
  };
  return { begin, map: (tasks, onDone) => begin(tasks, onDone)(), progress, warm: pool.warm, close: pool.close };
}

function wantedWorkers(): number {
  const asked = Number(process.env.BEDORDER_WORKERS);
  return Number.isInteger(asked) && asked >= 1 ? Math.min(asked, 256) : availableParallelism();
}
