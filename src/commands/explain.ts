import { readResults } from '../output/read-results.js';
import { EXIT, type ExitStatus } from './exit-status.js';
import { explanation } from './explain/index.js';
import { print } from './print.js';
import { styleFor } from './terminal.js';

/**
 * `bedorder explain`: all that is known of one bed, shell or relation, in sentences. Reads results.json only.
 *
 * @param names One name, or two beds.
 */
export async function explain(results: string, names: readonly string[]): Promise<ExitStatus> {
  print(explanation(readResults(results), names, styleFor(process.stdout)));
  return EXIT.done;
}
