import { parentPort, workerData } from 'node:worker_threads';
import type { Findings, Problem, Survey } from '../model/index.js';
import { isOutputError } from '../output/folder/output-error.js';
import { type Refusal, readRequest } from './read-request.js';
import type { RawOptions, RunRequest } from './run-request.js';
import { styleOf } from './terminal.js';
import { createWorkerHost } from './worker-host.js';

/*
 * The work of `run`, on a thread of its own: reading, the whole analysis, drawing, and writing into the folder that the
 * main thread gives. So the main thread hears of Ctrl-C at any time, and its progress bar moves.
 */

/** What the main thread asks for. */
export interface Job {
  readonly shells: string;
  readonly commandLine: RawOptions;
  /** Whether the summary is shown in colour. */
  readonly colours: boolean;
}

/** What the main thread is told. */
export type JobNews =
  | { readonly news: 'progress'; readonly step: string; readonly fraction: number }
  /** The input can't be used; the job ends. */
  | { readonly news: 'refused'; readonly refusal: Refusal }
  /** Options are sound: where the results would go may be looked at. */
  | { readonly news: 'asked'; readonly request: RunRequest }
  /** The survey was read: the job waits for the folder to write into. */
  | { readonly news: 'read' }
  | { readonly news: 'written'; readonly told: Told }
  | {
      readonly news: 'failed';
      readonly message: string;
      readonly stack?: string;
      readonly code?: string;
      readonly kind?: string;
    };

/** What is left to be told when the results are in place. */
export interface Told {
  readonly summary: string;
  readonly json: string;
  readonly warnings: readonly Problem[];
  readonly reversed: boolean;
}

const { shells, commandLine, colours } = (workerData ?? {}) as Job;
const tell = (news: JobNews) => parentPort?.postMessage(news);

async function work(): Promise<void> {
  const read = await readRequest(shells, commandLine, (request) => tell({ news: 'asked', request }));
  if (!('survey' in read)) return tell({ news: 'refused', refusal: read });
  const folder = new Promise<string>((resolve) => parentPort?.once('message', resolve));
  tell({ news: 'read' });
  return written(analysed(read.survey, read.request), read.request, folder);
}

/** The rest of the work, from where the survey is no longer held. */
async function written(analysing: Promise<Findings>, request: RunRequest, folder: Promise<string>): Promise<void> {
  const findings = await analysing;
  const drawings = await drawn(findings);
  progress('writing', 1);
  const { writeResults } = await import('../output/write-results.js');
  await writeResults(findings, drawings, await folder);
  tell({ news: 'written', told: await words(findings, request) });
}

/** Analyses from which other threads are sure to have work. */
const LARGE_SURVEY = 5000;

async function analysed(survey: Survey, request: RunRequest): Promise<Findings> {
  const { analyse } = await import('../pipeline.js');
  const host = createWorkerHost(progress);
  if (survey.analyses.length > LARGE_SURVEY) host.warm();
  return analyse(survey, request.options, host).finally(host.close);
}

async function drawn(findings: Findings) {
  progress('drawing', 1);
  const { drawFigures } = await import('../figures/index.js');
  const { renderReport } = await import('../report/index.js');
  const figures = drawFigures(findings);
  return { report: renderReport(findings, figures), figures };
}

async function words(findings: Findings, { out, json }: RunRequest): Promise<Told> {
  const { summaryJson, summaryText } = await import('./summary/index.js');
  return {
    summary: json ? '' : summaryText(findings, out, styleOf(colours)),
    json: json ? summaryJson(findings, out) : '',
    warnings: findings.problems,
    reversed: findings.relations.some(({ verdict_after }) => verdict_after === 'reversed'),
  };
}

let last = 0;

// a bar needs no more than some twenty pictures a second
function progress(step: string, fraction: number): void {
  const now = performance.now();
  if (now - last < 50 && fraction > 0 && fraction < 1) return;
  last = now;
  tell({ news: 'progress', step, fraction });
}

if (parentPort && workerData) {
  work().catch((error: Error & { code?: string }) => {
    const kind = isOutputError(error) ? error.kind : undefined;
    tell({ news: 'failed', message: error.message, stack: error.stack, code: error.code, kind });
  });
}
