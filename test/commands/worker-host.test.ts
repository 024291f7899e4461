import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, expect, it } from 'vitest';
import { builtByFile, runNode } from './program.js';

/* Threads load built files, so the host is tried in a build of its own, with tasks made for the trial. */

let script: string;
let ahead: string;

const TASKS = `
import { threadId } from 'node:worker_threads';
export function runTask({ name, argument }) {
  const end = performance.now() + 8;
  while (performance.now() < end);
  if (name === 'fail') throw new Error('the task failed on purpose');
  if (name === 'where') return threadId;
  return argument * argument;
}`;

const SCRIPT = `
import { createWorkerHost } from './commands/worker-host.js';
import { threadId } from 'node:worker_threads';
const [count, workers, failAt] = process.argv.slice(2).map(Number);
const host = createWorkerHost(() => {}, workers);
const tasks = Array.from({ length: count }, (_, i) => ({ name: i === failAt ? 'fail' : 'square', argument: i }));
let calls = 0, falls = 0, before = 0;
const onDone = (done) => { calls++; if (done !== before + 1) falls++; before = done; };
try {
  const first = await host.map(tasks, onDone);
  const second = await host.map(tasks.slice(0, 3));
  console.log(JSON.stringify({ first, second, calls, falls }));
} catch (error) {
  console.log(JSON.stringify({ error: error.message }));
}
await host.close();
`;

/** Begins with tasks ahead of their need, is busy for a while, and asks for the results only then. */
const AHEAD = `
import { createWorkerHost } from './commands/worker-host.js';
const [count, workers, failAt, warm, busy] = process.argv.slice(2).map(Number);
const host = createWorkerHost(() => {}, workers);
if (warm) host.warm();
const tasks = (name) => Array.from({ length: count }, (_, i) => ({ name: i === failAt ? 'fail' : name, argument: i, heavy: true }));
const where = host.begin(tasks('where'));
const squares = host.begin(tasks('square'));
const end = performance.now() + busy;
while (performance.now() < end);
try {
  console.log(JSON.stringify({ squares: await squares(), where: await where() }));
} catch (error) {
  console.log(JSON.stringify({ error: error.message }));
}
await host.close();
`;

beforeAll(async () => {
  const dist = await builtByFile('workers');
  writeFileSync(join(dist, 'tasks.js'), TASKS);
  script = join(dist, 'try-workers.js');
  writeFileSync(script, SCRIPT);
  ahead = join(dist, 'try-ahead.js');
  writeFileSync(ahead, AHEAD);
});

it.each([
  [0, 2],
  [1, 2],
  [3, 4],
  [60, 1],
  [60, 2],
  [61, 5],
])('%d tasks on %d workers come back in order, and progress counts up', async (count, workers) => {
  const { stdout, stderr, status } = await runNode([script, String(count), String(workers), '-1']);
  expect(stderr).toBe('');
  expect(status).toBe(0);
  const squares = Array.from({ length: count }, (_, i) => i * i);
  expect(JSON.parse(stdout)).toEqual({ first: squares, second: squares.slice(0, 3), calls: count, falls: 0 });
});

it.each([
  ['in place', 0],
  ['on a thread', 45],
])('a task that fails %s fails the whole, with its own words', async (_, failAt) => {
  const { stdout, status } = await runNode([script, '60', '2', String(failAt)]);
  expect(JSON.parse(stdout)).toEqual({ error: 'the task failed on purpose' });
  expect(status).toBe(0);
});

/** Where tasks begun ahead were done, 0 being the thread that began them. */
async function doneAhead(count: number, workers: number, warm: number, busy: number): Promise<number[]> {
  const { stdout, stderr, status } = await runNode([ahead, ...[count, workers, -1, warm, busy].map(String)]);
  expect(stderr).toBe('');
  expect(status).toBe(0);
  const { squares, where } = JSON.parse(stdout) as { squares: number[]; where: number[] };
  expect(squares).toEqual(Array.from({ length: count }, (_, i) => i * i));
  expect(where).toHaveLength(count);
  return where;
}

it.each([
  [8, 2, 1],
  [8, 2, 0],
  [9, 4, 1],
])('%d tasks begun ahead on %d workers (warm %d) are done by others while this thread is busy', async (...given) => {
  const byOthers = async (busy: number) => (await doneAhead(...given, busy)).some((thread) => thread > 0);
  // a thread may be long in starting where other work runs beside
  expect((await byOthers(500)) || (await byOthers(8000))).toBe(true);
});

it('tasks begun ahead without other threads are done when their results are asked for', async () => {
  expect(await doneAhead(8, 1, 1, 10)).toEqual(Array.from({ length: 8 }, () => 0));
});

it('a task begun ahead that fails is told of where its results are asked for', async () => {
  const { stdout, status } = await runNode([ahead, '8', '2', '3', '1', '300']);
  expect(JSON.parse(stdout)).toEqual({ error: 'the task failed on purpose' });
  expect(status).toBe(0);
});
