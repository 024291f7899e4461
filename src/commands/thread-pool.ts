import { Worker } from 'node:worker_threads';
import type { Task } from '../model/index.js';
import { setRoomForYoung } from './room-for-young.js';
import { type Answer, type SharedBatch, takeNext, takeRest } from './shared-batch.js';

/** Tasks that this thread and others take from, each the next that nobody has. */
export interface Batch {
  /** The next task for this thread; null when none is left, or one has failed. */
  readonly take: () => number | null;
  readonly answer: (index: number, result: unknown) => void;
  /** Ends the batch: no more tasks are taken, and `results` throws this. */
  readonly fail: (error: Error) => void;
  /** Lets the threads of the pool take part, so many as are wanted at least; false where there are none. */
  readonly share: (wanted: number) => boolean;
  /** Tasks that nobody has taken. */
  readonly left: () => number;
  /** All results in order, once they are there. Throws what a task on a thread threw. */
  readonly results: () => Promise<unknown[]>;
}

/** Threads that do tasks of the engine. */
export interface ThreadPool {
  readonly batch: (tasks: readonly Task[], onDone: (done: number) => void) => Batch;
  readonly warm: () => void;
  readonly close: () => Promise<void>;
}

/** Threads are started when they are first wanted, `most` at most, and do the batches in the order in which they came. */
export function createThreadPool(most: number): ThreadPool {
  const threads: Worker[] = [];
  const open = new Map<number, { readonly hear: (answer: Answer) => void; readonly fail: (error: Error) => void }>();
  let batches = 0;
  const start = (wanted: number) => {
    // what Node gives by itself: the room that a large survey asks of its own thread (run.ts) is more than tasks need
    if (threads.length < wanted) setRoomForYoung(1, 16);
    while (threads.length < wanted) {
      const thread = new Worker(new URL('./worker.js', import.meta.url));
      thread.unref();
      thread.on('message', (answer: Answer) => open.get(answer.batch)?.hear(answer));
      thread.on('error', (error) => {
        for (const batch of open.values()) batch.fail(error);
      });
      threads.push(thread);
    }
  };
  const batch = (tasks: readonly Task[], onDone: (done: number) => void): Batch => {
    const id = batches++;
    const taken = new Int32Array(new SharedArrayBuffer(4));
    const results: unknown[] = new Array(tasks.length);
    let done = 0;
    let failure: Error | null = null;
    let settled: () => void = () => {};
    const fail = (error: Error) => {
      failure ??= error;
      takeRest(taken, tasks.length);
      settled();
    };
    const answer = (index: number, result: unknown) => {
      results[index] = result;
      onDone(++done);
      if (done === tasks.length) settled();
    };
    const hear = ({ index, result, error }: Answer) => (error ? fail(error) : answer(index, result));
    return {
      take: () => {
        const next = takeNext(taken);
        return next < tasks.length && failure === null ? next : null;
      },
      answer,
      fail,
      share: (wanted) => {
        start(Math.min(most, wanted));
        if (threads.length === 0) return false;
        open.set(id, { hear, fail });
        const shared: SharedBatch = { batch: id, tasks, taken };
        for (const thread of threads) thread.postMessage(shared);
        return true;
      },
      left: () => Math.max(0, tasks.length - Atomics.load(taken, 0)),
      results: async () => {
        // the program must not end while it waits
        for (const thread of threads) thread.ref();
        try {
          if (done < tasks.length && failure === null) {
            await new Promise<void>((resolve) => {
              settled = resolve;
            });
          }
          if (failure !== null) throw failure;
          return results;
        } finally {
          open.delete(id);
          if (open.size === 0) for (const thread of threads) thread.unref();
        }
      },
    };
  };
  return {
    batch,
    warm: () => start(most),
    close: async () => void (await Promise.all(threads.splice(0).map((thread) => thread.terminate()))),
  };
}
