// One step of the benchmark in a process of its own: node test/bench/step.mjs STEP SHELLS. Prints {ms, mb}: the time of the
// step alone, and the most memory the process held, what the step needs before it included.
import { readFileSync } from 'node:fs';
import { averageAnalyses, bedKey, chooseClocks } from '../../dist/beds/index.js';
import { beginOrder } from '../../dist/clock-order.js';
import { NOTHING, runPass } from '../../dist/clock-run.js';
import { createWorkerHost } from '../../dist/commands/worker-host.js';
import { drawFigures } from '../../dist/figures/index.js';
import { analyse, DEFAULT_OPTIONS, surveyFromBytes } from '../../dist/index.js';
import { relationGraph, sectionRelations } from '../../dist/order/index.js';
import { renderReport } from '../../dist/report/index.js';
import { createRandom } from '../../dist/statistics/index.js';
import { bedsAbove, findShellConflicts, shellsToSetAside } from '../../dist/superposition/index.js';

const [step, path] = process.argv.slice(2);
const host = createWorkerHost(() => {});
let ms = 0;

async function timed(name, work) {
  const start = performance.now();
  const result = await work();
  if (name === step) ms = performance.now() - start;
  return result;
}

const { survey } = await timed('reading', () =>
  surveyFromBytes({ shells: { file: 'shells.csv', bytes: readFileSync(path) } }),
);

/** The main clock after one pass. */
async function onePass() {
  const { shells, summaries } = averageAnalyses(survey.analyses);
  const [set] = chooseClocks(shells, summaries, DEFAULT_OPTIONS);
  const placed = survey.beds.map(({ section, bed, place }) => ({ key: bedKey(section, bed), section, place }));
  const context = {
    shells,
    summaries,
    placed: new Map(placed.map((bed) => [bed.key, bed])),
    relations: [],
    stacking: sectionRelations(placed),
    elevations: new Map(),
    offsets: [],
    gradient: null,
    options: DEFAULT_OPTIONS,
  };
  return runPass(context, set.main, set, NOTHING, createRandom(1));
}

function cut({ data, relations }) {
  const graph = relationGraph(
    data.beds.map((bed) => bed.key),
    relations,
  );
  const above = bedsAbove(graph);
  const conflicts = findShellConflicts(
    data.shells,
    data.beds.map(({ section }, at) => ({ section, above: above[at] })),
    { scatter: data.scatter.s, df: data.scatter.df },
  );
  return shellsToSetAside(
    conflicts,
    data.shells.map(() => 1),
  );
}

if (step === 'zoning' || step === 'order' || step === 'cut') {
  const pass = await timed('zoning', onePass);
  if (step === 'order') await timed('order', () => beginOrder(pass, 0.05, createRandom(2), host)());
  if (step === 'cut') await timed('cut', () => cut(pass));
}
if (step === 'analysis' || step === 'report') {
  const findings = await timed('analysis', () => analyse(survey, DEFAULT_OPTIONS, host));
  if (step === 'report') await timed('report', () => renderReport(findings, drawFigures(findings)));
}
await host.close();
process.stdout.write(JSON.stringify({ ms, mb: process.resourceUsage().maxRSS / 1024 }));
