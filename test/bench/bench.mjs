// npm run bench [ROWS …]: time and memory of each step, of the whole run, and of the yardstick, measured one after the other
// in one run. Whole run and yardstick are measured by turns, and the middle one of each is told: the speed of a machine drifts
// by a tenth from one to the next. Ratios are to the yardstick (test/bench/baseline.py: averages, mixtures, k-means, tests and three tables by
// pandas, SciPy and scikit-learn) at the same number of rows; growth is against the step a tenth as large.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { makeSurvey } from './make-survey.mjs';

const here = (name) => fileURLToPath(new URL(name, import.meta.url));
const sizes = process.argv.slice(2).map(Number);
if (sizes.length === 0) sizes.push(10_000, 100_000, 1_000_000);
/** Times that whole run and yardstick are measured, by turns; once where they are long. */
const TURNS = 5;
const STEPS = ['reading', 'zoning', 'order', 'cut', 'analysis', 'report'];
const home = mkdtempSync(join(tmpdir(), 'bedorder-bench-'));

/** Runs a command: its wall time and, where GNU time is there to write it down, the most memory it held. */
function measured(command, args) {
  const peak = join(home, 'peak');
  const timer = existsSync('/usr/bin/time') ? ['/usr/bin/time', '-f', '%M', '-o', peak] : [];
  const [first, ...rest] = [...timer, command, ...args];
  const start = performance.now();
  const run = spawnSync(first, rest, { stdio: ['ignore', 'ignore', 'pipe'] });
  const ms = performance.now() - start;
  if (run.status !== 0) return failed(run);
  return { ms, mb: timer.length > 0 ? Number(readFileSync(peak, 'utf8').trim()) / 1024 : Number.NaN };
}

function failed(run) {
  const lines = String(run.stderr).trim().split('\n');
  return { ms: Number.NaN, mb: Number.NaN, failed: lines.find((line) => /Error|fault/.test(line)) ?? lines.at(-1) };
}

function stepOf(name, shells) {
  const run = spawnSync(process.execPath, ['--max-old-space-size=6000', here('step.mjs'), name, shells], {
    maxBuffer: 1e8,
  });
  if (run.status !== 0) return failed(run);
  return JSON.parse(String(run.stdout));
}

const python = ['/usr/bin/python3', 'python3'].find(
  (one) => spawnSync(one, ['-c', 'import numpy, pandas, scipy, sklearn'], { stdio: 'ignore' }).status === 0,
);
const middle = (all) => all.find(({ failed: why }) => why) ?? [...all].sort((a, b) => a.ms - b.ms)[all.length >> 1];
const seconds = (ms) => (Number.isFinite(ms) ? `${(ms / 1000).toFixed(2)} s` : '–').padStart(10);
const memory = (mb) => (Number.isFinite(mb) ? `${Math.round(mb)} MB` : '–').padStart(9);
const times = (ratio) => (Number.isFinite(ratio) ? `${ratio.toFixed(2)}×` : '–').padStart(10);
const line = (name, { ms, mb, failed: why }, base, before) =>
  `  ${name.padEnd(12)}${seconds(ms)}${memory(mb)}${times(ms / base)}${times(ms / before)}${why ? `  ${why}` : ''}`;

console.log(`Node ${process.version}, ${cpus().length} cores (${cpus()[0]?.model.trim() ?? 'unknown'})`);
if (!python)
  console.log('No Python with pandas, SciPy and scikit-learn here: the yardstick and the ratios to it are left out.');
const earlier = new Map();
try {
  for (const rows of sizes) {
    const shells = join(home, `shells-${rows}.csv`);
    makeSurvey(rows, shells);
    console.log(`\n${rows.toLocaleString('en')} rows, ${(statSync(shells).size / 1e6).toFixed(1)} MB`);
    console.log(
      `  ${'step'.padEnd(12)}${'time'.padStart(10)}${'memory'.padStart(9)}${'÷ yard'.padStart(10)}${'growth'.padStart(10)}`,
    );
    const cli = here('../../program/cli.js');
    const results = join(home, `results-${rows}`);
    const [yardsticks, runs] = [[], []];
    for (let turn = 0; turn < (rows > 100_000 ? 1 : TURNS); turn++) {
      if (python) yardsticks.push(measured(python, [here('baseline.py'), shells, join(home, 'baseline')]));
      runs.push(measured(process.execPath, [cli, 'run', shells, '--out', results, '--quiet']));
    }
    const baseline = python ? middle(yardsticks) : { ms: Number.NaN, mb: Number.NaN };
    const tell = (name, result) => {
      const before = earlier.get(name)?.rows * 10 === rows ? earlier.get(name).ms : Number.NaN;
      console.log(line(name, result, baseline.ms, before));
      earlier.set(name, { rows, ms: result.ms });
    };
    tell('yardstick', baseline);
    for (const step of STEPS) tell(step, stepOf(step, shells));
    tell('whole run', middle(runs));
  }
} finally {
  rmSync(home, { recursive: true, force: true });
}
