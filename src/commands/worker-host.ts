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
 * Runs the engine's tasks here and on worker threads, and gives the results in the order of the tasks. The first tasks are
 * done here, to see how long one takes; threads are started only where the rest is worth it, and this thread goes on with
 * its share while they start. Tasks are pure functions, so the results do not depend on who does them.
 *
 * @param progress Told how far the run is.
 * @param workers Number of threads, this one among them; default one a core, or BEDORDER_WORKERS. 1 does everything here.
 */
export function createWorkerHost(progress: Progress, workers = wantedWorkers()): WorkerHost {
  const pool: Worker[] = [];
  const map: TaskMapper = async (tasks, onDone = () => {}) => {
    const queue = createQueue(tasks, onDone);
    const enlist = (ahead: number) => {
      while (pool.length < Math.min(workers - 1, queue.left())) pool.push(createWorker());
      for (const worker of pool) queue.share(worker, ahead);
      return pool.length > 0;
    };
    // heavy ones are on their way at once, two a thread, so that the caller may do other things before it waits for them
    let shared = tasks.length > 1 && tasks[0].heavy === true && enlist(2);
    const { runTask } = await import('../tasks.js');
    const started = performance.now();
    try {
      for (let own = queue.take(); own !== null; own = queue.take()) {
        queue.answer(own, runTask(tasks[own]));
        const perTask = (performance.now() - started) / queue.done();
        if (!shared && queue.left() > 1 && queue.left() * perTask > WORTH_THREADS) shared = enlist(1);
        // a signal, or the answer of a thread, is heard between tasks
        if (shared || perTask > 5) await new Promise(setImmediate);
      }
      return await queue.results();
    } finally {
      queue.release();
    }
  };
  return { map, progress, close: async () => void (await Promise.all(pool.splice(0).map((one) => one.terminate()))) };
}

function wantedWorkers(): number {
  const asked = Number(process.env.BEDORDER_WORKERS);
  return Number.isInteger(asked) && asked >= 1 ? Math.min(asked, 256) : availableParallelism();
}

function createWorker(): Worker {
  const worker = new Worker(new URL('./worker.js', import.meta.url));
  worker.unref();
  worker.setMaxListeners(0);
  return worker;
}

/** Tasks that several threads take from. */
interface TaskQueue {
  /** The next task for this thread; null when none is left, or one has failed. */
  readonly take: () => number | null;
  readonly answer: (index: number, result: unknown) => void;
  /** Lets a thread take part: it gets so many tasks ahead, and after each answer the next. */
  readonly share: (worker: Worker, ahead: number) => void;
  readonly left: () => number;
  readonly done: () => number;
  /** All results in order, once they are there. Throws what a task on a thread threw. */
  readonly results: () => Promise<unknown[]>;
  readonly release: () => void;
}

function createQueue(tasks: readonly Task[], onDone: (done: number) => void): TaskQueue {
  const results: unknown[] = new Array(tasks.length);
  const listeners: (() => void)[] = [];
  let given = 0;
  let done = 0;
  let failure: Error | null = null;
  let settled: () => void = () => {};
  const answer = (index: number, result: unknown) => {
    results[index] = result;
    onDone(++done);
    if (done === tasks.length) settled();
  };
  const fail = (error: Error) => {
    failure ??= error;
    settled();
  };
  const give = (worker: Worker) => {
    if (given < tasks.length && failure === null) worker.postMessage({ index: given, task: tasks[given++] });
  };
  const share = (worker: Worker, ahead: number) => {
    let first = ahead < 2;
    const onMessage = ({ index, result, error }: Answer) => {
      if (error) return fail(error);
      // one more than it works on, so that it need not wait while this thread is busy
      if (first) give(worker);
      first = false;
      give(worker);
      answer(index, result);
    };
    worker.ref();
    worker.on('message', onMessage).on('error', fail);
    listeners.push(() => {
      worker.off('message', onMessage).off('error', fail);
      worker.unref();
    });
    for (let task = 0; task < ahead; task++) give(worker);
  };
  return {
    take: () => (given < tasks.length && failure === null ? given++ : null),
    answer,
    share,
    left: () => tasks.length - given,
    done: () => done,
    results: async () => {
      if (done < tasks.length && failure === null) {
        await new Promise<void>((resolve) => {
          settled = resolve;
        });
      }
      if (failure !== null) throw failure;
      return results;
    },
    release: () => {
      for (const remove of listeners) remove();
    },
  };
}
