import { statSync } from 'node:fs';
import { setFlagsFromString } from 'node:v8';
import { Worker } from 'node:worker_threads';
import { placesOf } from '../output/folder/places.js';
import { type FolderHold, holdFolder, refuseForeign } from '../output/folder/replace-folder.js';
import { EXIT, type ExitStatus } from './exit-status.js';
import { onSignal } from './on-signal.js';
import { complain, print } from './print.js';
import { problemText } from './problem-text.js';
import { progressBar } from './progress.js';
import { tellRefusal } from './read-request.js';
import { setRoomForYoung } from './room-for-young.js';
import type { Job, JobNews, Told } from './run-job.js';
import type { RawOptions, RunRequest } from './run-request.js';
import { counted, styleFor, wantsColours } from './terminal.js';

/**
 * `bedorder run`: zones, orders and checks a survey, and writes the results folder. The work is done on a thread
 * (run-job.ts); this one holds the folder, shows progress and hears of signals.
 */
export async function run(shells: string, commandLine: RawOptions): Promise<ExitStatus> {
  const job = startJob({ shells, commandLine, colours: wantsColours(process.stdout) });
  let hold: FolderHold | undefined;
  const cleanUp = async () => {
    await job.end();
    hold?.release();
  };
  const forget = onSignal(cleanUp);
  // the figures want one: what it needs is read for all threads, and this one has nothing else to do
  setImmediate(() => new Intl.NumberFormat('en-US'));
  const bar = await progressBar(commandLine.quiet !== true);
  try {
    const asked = await job.next(bar.show);
    if (asked.news === 'refused') return tellRefusal(asked.refusal);
    const { request } = expected(asked, 'asked');
    // what stands in the way of the results is told before a long reading
    refuseForeign(placesOf(request.out));
    const read = await job.next(bar.show);
    if (read.news === 'refused') return tellRefusal(read.refusal);
    expected(read, 'read');
    hold = holdFolder(placesOf(request.out));
    const told = await written(job, hold, bar.show);
    bar.stop();
    tellWhatWasFound(told, request);
    return request.strict && told.reversed ? EXIT.reversed : EXIT.done;
  } finally {
    bar.stop();
    await cleanUp();
    forget();
  }
}

type Show = (step: string, fraction: number) => void;

interface RunningJob {
  /** The next news that is no progress. */
  readonly next: (show: Show) => Promise<JobNews>;
  readonly give: (folder: string) => void;
  readonly end: () => Promise<void>;
}

/**
 * Megabytes of room for young objects on the thread of the job. A run makes a few lasting objects a shell in one go; with
 * Node's usual 16 MB, grown from 1, they are moved about too often (an eighth of the time with 100,000 shells).
 */
const ROOM_FOR_YOUNG = 32;

/** Megabytes of heap under which a run on a large table is not looked through for what is no longer used. */
const ROOM_AT_FIRST = 400;

/** Bytes of a shells table from which that room pays. */
const LARGE_TABLE = 1_000_000;

/**
 * Bytes from which the heap is swept before it has doubled, and young objects have half that room: slower by a little, and a
 * third less memory.
 */
const VERY_LARGE_TABLE = 10_000_000;

function startJob(job: Job): RunningJob {
  const bytes = bytesOf(job.shells);
  if (bytes > LARGE_TABLE) {
    const veryLarge = bytes > VERY_LARGE_TABLE;
    // far from full, the heap of a large survey need not be swept at all
    setFlagsFromString(veryLarge ? '--heap-growing-percent=20' : `--initial-heap-size=${ROOM_AT_FIRST}`);
    const young = veryLarge ? ROOM_FOR_YOUNG / 2 : ROOM_FOR_YOUNG;
    setRoomForYoung(young, young);
  }
  const worker = new Worker(new URL('./run-job.js', import.meta.url), { workerData: job });
  const waiting: JobNews[] = [];
  let heard: () => void = () => {};
  let show: Show = () => {};
  const hear = (news: JobNews) => {
    if (news.news === 'progress') return show(news.step, news.fraction);
    waiting.push(news);
    heard();
  };
  worker.on('message', hear);
  worker.on('error', ({ message, stack }) => hear({ news: 'failed', message, stack }));
  worker.on('exit', () => hear({ news: 'failed', message: 'the working thread ended before it was done' }));
  return {
    next: async (showing) => {
      show = showing;
      while (waiting.length === 0) {
        await new Promise<void>((resolve) => {
          heard = resolve;
        });
      }
      const news = waiting.shift() as JobNews;
      if (news.news === 'failed') throw Object.assign(new Error(news.message), named(news));
      return news;
    },
    give: (folder) => worker.postMessage(folder),
    end: async () => void (await worker.terminate()),
  };
}

/** 0 where there is no such file: the job will say so. */
function bytesOf(file: string): number {
  try {
    return statSync(file).size;
  } catch {
    return 0;
  }
}

// errors lose what is not standard about them on their way between threads
function named({ stack, code, kind }: JobNews & { readonly news: 'failed' }) {
  return { stack, ...(code ? { code } : {}), ...(kind ? { kind, name: 'OutputError' } : {}) };
}

function expected<Kind extends JobNews['news']>(news: JobNews, kind: Kind): JobNews & { readonly news: Kind } {
  if (news.news !== kind) throw new Error(`"${kind}" was wanted from the working thread, "${news.news}" came`);
  return news as JobNews & { readonly news: Kind };
}

async function written(job: RunningJob, hold: FolderHold, show: Show): Promise<Told> {
  let told: Told | undefined;
  await hold.replace(async (folder) => {
    job.give(folder);
    told = expected(await job.next(show), 'written').told;
  });
  return told as unknown as Told;
}

/** Warnings shown by a run; all of them stand in problems.csv. */
const WARNINGS_SHOWN = 10;

function tellWhatWasFound({ summary, json, warnings }: Told, request: RunRequest): void {
  if (request.json) print(json);
  if (request.quiet) return;
  const style = styleFor(process.stderr);
  for (const problem of warnings.slice(0, WARNINGS_SHOWN)) complain(problemText(problem, style));
  const more = warnings.length - WARNINGS_SHOWN;
  if (more > 0) complain(`… and ${counted(more, 'more warning')}; all are in ${request.out}/problems.csv.`);
  if (!request.json) print(summary);
}
