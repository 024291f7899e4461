import { complainNow } from './print.js';

const SIGNALS = { SIGINT: 2, SIGTERM: 15, SIGHUP: 1 } as const;

/**
 * Cleans up when the user or the system ends the program, then ends with 128 + the signal's number, as shells expect.
 *
 * @returns A function that takes the care back.
 */
export function onSignal(cleanUp: () => Promise<void>): () => void {
  const names = Object.keys(SIGNALS) as (keyof typeof SIGNALS)[];
  const listeners = names.map((name) => {
    const listener = async () => {
      try {
        await cleanUp();
      } finally {
        complainNow('Stopped.');
        process.exit(128 + SIGNALS[name]);
      }
    };
    process.on(name, listener);
    return () => process.off(name, listener);
  });
  return () => {
    for (const remove of listeners) remove();
  };
}
