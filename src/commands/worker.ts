import { parentPort } from 'node:worker_threads';
import type { Task } from '../model/index.js';
import { runTask } from '../tasks.js';

/* A worker thread: does one task after the other, and answers with the task's number. */

parentPort?.on('message', ({ index, task }: { index: number; task: Task }) => {
  try {
    parentPort?.postMessage({ index, result: runTask(task) });
  } catch (error) {
    parentPort?.postMessage({ index, error: error instanceof Error ? error : new Error(String(error)) });
  }
});
