import { drawFigures } from '../../src/figures/index.js';
import { analyse, DEFAULT_OPTIONS, type Findings, type RunOptions, runTask } from '../../src/index.js';
import { plan } from '../../src/planning/index.js';
import { renderReport } from '../../src/report/index.js';
import { faultsOfFindings, faultsOfText } from '../fuzz/faults.js';
import { surveyOf, type Texts } from '../input/survey-of.js';

export interface Found {
  readonly findings: Findings;
  readonly report: string;
  /** Seconds of the processor for the analysis, the figures and the report. */
  readonly seconds: number;
}

/** Runs a survey to its report and its plan. @throws Error when there is a fault in what was found */
export async function found(texts: Texts, options: Partial<RunOptions> = {}): Promise<Found> {
  const survey = await surveyOf(texts);
  const start = process.cpuUsage();
  const host = {
    map: async (tasks: readonly Parameters<typeof runTask>[0][]) => tasks.map(runTask),
    progress: () => {},
  };
  const findings = await analyse(survey, { ...DEFAULT_OPTIONS, ...options }, host);
  const figures = drawFigures(findings);
  const report = renderReport(findings, figures);
  const { user, system } = process.cpuUsage(start);
  const faults = [
    ...faultsOfFindings(findings),
    ...figures.flatMap(({ name, svg }) => faultsOfText(name, svg)),
    ...faultsOfText('plan', JSON.stringify(plan(findings, { dates: 1 }))),
  ];
  if (faults.length > 0) throw new Error(faults.slice(0, 5).join('\n'));
  return { findings, report, seconds: (user + system) / 1e6 };
}

/** Everything that is said to the reader. */
export const said = (findings: Findings): string => findings.remarks.map((remark) => remark.text).join('\n');
