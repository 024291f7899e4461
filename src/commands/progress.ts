import type { Progress } from '../model/index.js';

/** Shows how far the run is, and takes the bar away again. */
export interface ProgressBar {
  readonly show: Progress;
  readonly stop: () => void;
}

/** A bar on standard error where that is a terminal, else nothing at all. */
export async function progressBar(wanted: boolean): Promise<ProgressBar> {
  if (!wanted || !process.stderr.isTTY) return { show: () => {}, stop: () => {} };
  const { default: cliProgress } = await import('cli-progress');
  const bar = new cliProgress.SingleBar({
    format: '{bar} {percentage} % {step}',
    stream: process.stderr,
    clearOnComplete: true,
    hideCursor: true,
    barsize: 24,
    barCompleteChar: '#',
    barIncompleteChar: '-',
    linewrap: false,
  });
  let started = false;
  return {
    show: (step, fraction) => {
      const done = Math.round(100 * Math.min(1, Math.max(0, fraction)));
      if (started) bar.update(done, { step });
      else bar.start(100, done, { step });
      started = true;
    },
    stop: () => {
      if (started) bar.stop();
    },
  };
}
