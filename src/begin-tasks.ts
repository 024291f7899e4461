import type { Host, Task, TasksUnderWay } from './model/index.js';

/** Begins with tasks where the host can, and leaves them to be done when their results are asked for where it can't. */
export const beginTasks = (host: Host, tasks: readonly Task[]): TasksUnderWay =>
  host.begin?.(tasks) ?? (() => host.map(tasks));
