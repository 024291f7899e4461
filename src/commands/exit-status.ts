/** Exit statuses of the program. */
export const EXIT = {
  /** Done. */
  done: 0,
  /** A fault of the program, or a machine that would not let it write. */
  fault: 1,
  /** The input or the options can't be used; nothing was written. */
  unusable: 2,
  /** With --strict: a reversed relation is left. */
  reversed: 3,
} as const;

/** What a command ends with. */
export type ExitStatus = (typeof EXIT)[keyof typeof EXIT];
