import { writeSync } from 'node:fs';

/** Writes to standard output. */
export function print(text: string): void {
  process.stdout.write(text.endsWith('\n') ? text : `${text}\n`);
}

/** Writes to standard error. */
export function complain(text: string): void {
  process.stderr.write(text.endsWith('\n') ? text : `${text}\n`);
}

/** Writes to standard error at once, for moments after which nothing else happens. */
export function complainNow(text: string): void {
  try {
    writeSync(2, `${text}\n`);
  } catch {
    // nobody listens any more
  }
}

/** A reader that went away (such as `| head`) is no fault: the program ends quietly. */
export function endQuietlyWithoutReader(): void {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on('error', (error: NodeJS.ErrnoException) => {
      if (error.code === 'EPIPE') process.exit();
      throw error;
    });
  }
}
