import type { Task } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';
import { runTask } from '../../src/tasks.js';

export function beds(means: readonly number[], each: number, seed: number, error = 0.02, tau = 0) {
  const random = createRandom(seed);
  const values = means.flatMap((mean) =>
    Array.from({ length: each }, () => mean + Math.hypot(error, tau) * random.normal()),
  );
  return { values, errors: values.map(() => error) };
}

/** A host without workers, which counts the repeats it was asked for. */
export function inPlace() {
  const count = { repeats: 0 };
  const map = async (tasks: readonly Task[]) =>
    tasks.map(({ name, argument }) => {
      const own = structuredClone(argument) as { readonly repeats: number };
      count.repeats += own.repeats;
      return runTask({ name, argument: own });
    });
  return { map, count };
}
