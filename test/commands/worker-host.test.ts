import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, expect, it } from 'vitest';
import { builtByFile, runNode } from './program.js';

/* Threads load built files, so the host is tried in a build of its own, with tasks made for the trial. */

let script: string;

const TASKS = `
export function runTask({ name, argument }) {
  const end = performance.now() + 8;
  while (performance.now() < end);
  if (name === 'fail') throw new Error('the task failed on purpose');
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

beforeAll(async () => {
  const dist = await builtByFile('workers');
  writeFileSync(join(dist, 'tasks.js'), TASKS);
  script = join(dist, 'try-workers.js');
  writeFileSync(script, SCRIPT);
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
