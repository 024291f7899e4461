import { isOutputError } from '../output/folder/output-error.js';
import { VERSION } from '../version.js';
import { EXIT, type ExitStatus } from './exit-status.js';
import { complain } from './print.js';
import { safe } from './terminal.js';

/**
 * Runs a command and sets the exit status. Errors meant for the user are printed as they stand; anything else is a
 * fault of the program: a short message, and the stack only with BEDORDER_DEBUG=1.
 */
export async function ending(command: () => Promise<ExitStatus>): Promise<void> {
  try {
    process.exitCode = await command();
  } catch (error) {
    process.exitCode = tell(error);
  }
}

/** Faults that no command catches, such as one on a worker thread, end the program in the same way. */
export function endShortlyOnFaults(): void {
  process.on('uncaughtException', (error) => process.exit(tell(error)));
}

/** Prints an error and says with which status to end. */
export function tell(error: unknown): ExitStatus {
  if (isOutputError(error)) {
    complain(safe(error.message));
    return error.kind === 'refused' ? EXIT.unusable : EXIT.fault;
  }
  const message = error instanceof Error ? error.message : String(error);
  complain(`bedorder ${VERSION} met a fault of its own: ${safe(message)}`);
  if (process.env.BEDORDER_DEBUG === '1' && error instanceof Error) complain(error.stack ?? '');
  else complain('Run again with BEDORDER_DEBUG=1 to see where it happened, and report it with your command line.');
  return EXIT.fault;
}
