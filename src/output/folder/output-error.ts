/**
 * An error whose message is for the user as it stands. `refused`: what was asked can't be done (exit status 2);
 * `failed`: the machine would not let it be done (exit status 1).
 */
export interface OutputError extends Error {
  readonly kind: 'refused' | 'failed';
}

/** What was asked can't be done; the message says why and what to do. */
export function refused(message: string): OutputError {
  return Object.assign(new Error(message), { name: 'OutputError', kind: 'refused' as const });
}

/** The machine would not let it be done; the message says why and what to do. */
export function failed(message: string): OutputError {
  return Object.assign(new Error(message), { name: 'OutputError', kind: 'failed' as const });
}

/** Whether an error carries a message for the user. */
export function isOutputError(error: unknown): error is OutputError {
  return error instanceof Error && error.name === 'OutputError';
}

/** The system's code of an error, such as ENOENT; an empty text where there is none. */
export function codeOf(error: unknown): string {
  return String((error as NodeJS.ErrnoException | null)?.code ?? '');
}

/** Turns a system error met while writing into words; other errors are given back as they are. */
export function inWords(error: unknown, folder: string): unknown {
  switch (codeOf(error)) {
    case 'ENOSPC':
    case 'EDQUOT':
      return failed(`The disk is full: the results could not be written to ${folder}. Free some space and run again.`);
    case 'EACCES':
    case 'EPERM':
    case 'EROFS':
      return refused(`There is no permission to write ${folder}. Give a folder you may write to with --out.`);
    case 'EBUSY':
    case 'EXDEV':
      return refused(`${folder} can't be replaced (is it a mounted disk?). Give a folder inside it with --out.`);
    case 'ENOTDIR':
      return refused(`A part of the path ${folder} is a file, not a folder. Give another folder with --out.`);
    case 'ENAMETOOLONG':
      return refused(`The path ${folder} is too long for this system. Give a shorter one with --out.`);
    case 'ENOENT':
      return failed(`${folder} went away while the results were being written. Run again.`);
    case 'EIO':
    case 'EMFILE':
    case 'ENFILE':
    case 'EFBIG':
      return failed(`The system could not write to ${folder} (${codeOf(error)}). Check the disk and run again.`);
    default:
      return error;
  }
}
