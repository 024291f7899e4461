import type { Host, Task, TasksUnderWay } from './host.js';

/** Begins with tasks where the host can, and leaves them to be done when their results are asked for where it can't. */
export const beginTasks = (
  host: Pick<Host, 'map' | 'begin'>,
  tasks: readonly Task[],
  onDone?: (done: number) => void,
): TasksUnderWay => host.begin?.(tasks, onDone) ?? (() => host.map(tasks, onDone));
