/**
 * A task that can run anywhere: the name of a registered pure function and its plain-data argument.
 * The engine hands over lists of them; the host may run them in place or on worker threads.
 */
export interface Task {
  readonly name: string;
  readonly argument: unknown;
  /** Known to be long: worth a thread of its own without trying how long it takes. Default false. */
  readonly heavy?: boolean;
}

/** Runs every task and gives the results in the same order, whatever the number of workers. */
export type TaskMapper = (tasks: readonly Task[], onDone?: (done: number) => void) => Promise<unknown[]>;

/** Tasks that were begun: when called, once, does what is left of them and gives all results in the order of the tasks. */
export type TasksUnderWay = () => Promise<unknown[]>;

/** Told what is being done, and how far it is (0 to 1). */
export type Progress = (step: string, fraction: number) => void;

/** What the engine needs from outside. */
export interface Host {
  readonly map: TaskMapper;
  /**
   * Lets others begin with heavy tasks whose results are not needed yet, while the caller goes on. Without it, all is done
   * when the results are asked for.
   */
  readonly begin?: (tasks: readonly Task[], onDone?: (done: number) => void) => TasksUnderWay;
  readonly progress: Progress;
}
