import { availableParallelism } from 'node:os';
import { Worker } from 'node:worker_threads';
import type { Host, Progress, Task, TaskMapper } from '../model/index.js';

/** A host on Node: tasks on worker threads. `close` ends the threads. */
export interface WorkerHost extends Host {
  readonly close: () => Promise<void>;
}

/** Milliseconds of work left from which threads are worth their start. */
const WORTH_THREADS = 400;

interface Answer {
  readonly index: number;
  readonly result?: unknown;
  readonly error?: Error;
}

/**
 * Runs the engine's tasks on worker threads, and gives the results in the order of the tasks. The first tasks are done
 * in place, to see how long one takes; threads are started only where the rest is worth it. Tasks are pure functions,
 * so the results do not depend on who does them.
 *
 * @param progress Told how far the run is.
 * @param workers Number of threads; default one a core, or BEDORDER_WORKERS. 1 does everything in place.
 */
export function createWorkerHost(progress: Progress, workers = wantedWorkers()): WorkerHost {
  const pool: Worker[] = [];
  const map: TaskMapper = async (tasks, onDone = () => {}) => {
    const results: unknown[] = new Array(tasks.length);
    const next = await runInPlace(tasks, results, onDone, workers);
    if (next === tasks.length) return results;
    while (pool.length < Math.min(workers, tasks.length - next)) pool.push(createWorker());
    await runOnThreads(pool, tasks, next, results, onDone);
    return results;
  };
  return { map, progress, close: async () => void (await Promise.all(pool.splice(0).map((one) => one.terminate()))) };
}

function wantedWorkers(): number {
  const asked = Number(process.env.BEDORDER_WORKERS);
  return Number.isInteger(asked) && asked >= 1 ? Math.min(asked, 256) : availableParallelism();
}

// Gives the number of tasks done; all of them where there is one worker, or too little work for threads.
async function runInPlace(
  tasks: readonly Task[],
  results: unknown[],
  onDone: (done: number) => void,
  workers: number,
): Promise<number> {
  if (tasks.length === 0 || (workers > 1 && tasks.length > 1 && tasks[0].heavy === true)) return 0;
  const { runTask } = await import('../tasks.js');
  const start = performance.now();
  for (let i = 0; i < tasks.length; i++) {
    results[i] = runTask(tasks[i]);
    onDone(i + 1);
    const left = tasks.length - i - 1;
    const perTask = (performance.now() - start) / (i + 1);
    if (workers > 1 && left > 1 && left * perTask > WORTH_THREADS) return i + 1;
    // a signal is heard between tasks
    if (perTask > 5) await new Promise(setImmediate);
  }
  return tasks.length;
}

function createWorker(): Worker {
  const worker = new Worker(new URL('./worker.js', import.meta.url));
  worker.unref();
  worker.setMaxListeners(0);
  return worker;
}

function runOnThreads(
  pool: readonly Worker[],
  tasks: readonly Task[],
  first: number,
  results: unknown[],
  onDone: (done: number) => void,
): Promise<void> {
  let given = first;
  let done = first;
  return new Promise((resolve, reject) => {
    const listeners: (() => void)[] = [];
    const settle = (end: () => void) => {
      for (const remove of listeners) remove();
      end();
    };
    const give = (worker: Worker) => {
      if (given < tasks.length) worker.postMessage({ index: given, task: tasks[given++] });
    };
    for (const worker of pool) {
      const onMessage = ({ index, result, error }: Answer) => {
        if (error) return settle(() => reject(error));
        results[index] = result;
        onDone(++done);
        if (done === tasks.length) settle(resolve);
        else give(worker);
      };
      const onError = (error: Error) => settle(() => reject(error));
      worker.ref();
      worker.on('message', onMessage).on('error', onError);
      listeners.push(() => {
        worker.off('message', onMessage).off('error', onError);
        worker.unref();
      });
      give(worker);
    }
  });
}
