import { setPriority } from 'node:os';
import { parentPort } from 'node:worker_threads';
import { runTask } from '../tasks.js';
import { type Answer, type SharedBatch, takeNext, takeRest } from './shared-batch.js';

/* A worker thread: takes tasks of one batch after the other, and answers each with its number. */

// The thread that leads is waited for, and this one only helps: where cores are few it must not be held up. Elsewhere the
// whole process would be meant.
if (process.platform === 'linux') setPriority(10);

const tell = (answer: Answer) => parentPort?.postMessage(answer);

parentPort?.on('message', ({ batch, tasks, taken }: SharedBatch) => {
  for (let index = takeNext(taken); index < tasks.length; index = takeNext(taken)) {
    try {
      tell({ batch, index, result: runTask(tasks[index]) });
    } catch (error) {
      takeRest(taken, tasks.length);
      tell({ batch, index, error: error instanceof Error ? error : new Error(String(error)) });
    }
  }
});
