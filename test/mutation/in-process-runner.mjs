// A test runner for Stryker that starts nothing per mutant: it bundles the tests of a room once, and evaluates the bundle
// afresh for each mutant, so that no module keeps anything from the mutant before. Vitest itself takes half a second a
// mutant for starting a worker and importing; this takes what the tests take. It knows describe, it, it.each and
// Vitest's expect, which is all that the tests of these rooms use. @stryker-mutator/api comes with Stryker, which is not
// among the dependencies (DEVELOPERS.md); chai and @vitest/expect come with Vitest.
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { Script } from 'node:vm';
import { declareClassPlugin, PluginKind } from '@stryker-mutator/api/plugin';
import {
  DryRunStatus,
  determineHitLimitReached,
  TestStatus,
  toMutantRunResult,
} from '@stryker-mutator/api/test-runner';
import { JestAsymmetricMatchers, JestChaiExpect, JestExtend } from '@vitest/expect';
import * as chai from 'chai';
import { build } from 'esbuild';

/** How long each test took in the first run, so that later runs begin with the quick ones; lies in Stryker's sandbox. */
const DURATIONS = 'durations.json';
chai.use(JestExtend);
chai.use(JestChaiExpect);
chai.use(JestAsymmetricMatchers);
const expect = Object.assign((value, message) => chai.expect(value, message), chai.expect);

const namespace = () => {
  globalThis.__stryker__ ??= {};
  return globalThis.__stryker__;
};

/** Tests of a bundle in the order in which they are told, each with a name of its own. */
function collect(evaluate) {
  const tests = [];
  const path = [];
  const counts = new Map();
  const add = (name, body) => {
    const full = [...path, name].join(' > ');
    const count = counts.get(full) ?? 0;
    counts.set(full, count + 1);
    tests.push({ id: count === 0 ? full : `${full} #${count + 1}`, body });
  };
  const it = (name, body) => add(name, body);
  it.each = (rows) => (name, body) => {
    for (const row of rows) add(name, () => (Array.isArray(row) ? body(...row) : body(row)));
  };
  const describe = (name, body) => {
    path.push(name);
    body();
    path.pop();
  };
  evaluate({ describe, it, test: it, expect }, path);
  return tests;
}

const folder = (path) => readdirSync(path, { recursive: true }).map((name) => `${path}/${name}`);

class InProcessRunner {
  static inject = [];
  durations = {};
  timed = false;

  capabilities() {
    return { reloadEnvironment: true };
  }

  async init() {
    const room = process.env.ROOM ?? 'statistics';
    const files = [...folder(`test/${room}`), ...folder('test/external').filter((file) => file.includes(`/${room}`))]
      .filter((file) => file.endsWith('.test.ts') && !/\.(simulation|speed|solver)\.test\.ts$/.test(file))
      .sort();
    const imports = files.map((file) => `path.push(${JSON.stringify(file)});\nrequire('./${file}');\npath.pop();`);
    const bundle = await build({
      stdin: {
        contents: `const path = globalThis.__path__;\n${imports.join('\n')}`,
        resolveDir: process.cwd(),
        loader: 'js',
      },
      bundle: true,
      write: false,
      format: 'cjs',
      platform: 'node',
      external: ['vitest', 'fast-check', 'highs', 'ml-matrix', 'ml-kmeans'],
      logLevel: 'error',
    });
    const text = bundle.outputFiles[0].text;
    this.script = new Script(`(function (require) {${text}\n})`, { filename: 'bundle.cjs' });
    const own = createRequire(join(process.cwd(), 'package.json'));
    this.evaluate = (vitest, path) => {
      globalThis.__path__ = path;
      this.script.runInThisContext()((name) => (name === 'vitest' ? vitest : own(name)));
    };
  }

  async run(chosen, bail) {
    const ns = namespace();
    const results = [];
    const all = collect(this.evaluate);
    const wanted = chosen ? all.filter(({ id }) => chosen.has(id)) : all;
    for (const { id, body } of wanted.sort((a, b) => (this.durations[a.id] ?? 0) - (this.durations[b.id] ?? 0))) {
      ns.currentTestId = id;
      // time of the processor: what else runs on the machine must not make a test look slow
      const start = process.cpuUsage();
      const result = { id, name: id, timeSpentMs: 0, status: TestStatus.Success };
      try {
        await body();
      } catch (error) {
        result.status = TestStatus.Failed;
        result.failureMessage = String(error?.message ?? error);
      }
      ns.currentTestId = undefined;
      const { user, system } = process.cpuUsage(start);
      result.timeSpentMs = (user + system) / 1000;
      results.push(result);
      if (bail && result.status === TestStatus.Failed) break;
    }
    return results;
  }

  async dryRun() {
    const ns = namespace();
    ns.activeMutant = undefined;
    ns.mutantCoverage = { static: {}, perTest: {} };
    const tests = await this.run(undefined, false);
    writeFileSync(DURATIONS, JSON.stringify(Object.fromEntries(tests.map(({ id, timeSpentMs }) => [id, timeSpentMs]))));
    return { status: DryRunStatus.Complete, tests, mutantCoverage: ns.mutantCoverage };
  }

  async mutantRun({ testFilter, hitLimit, activeMutant, disableBail }) {
    if (!this.timed && existsSync(DURATIONS)) this.durations = JSON.parse(readFileSync(DURATIONS, 'utf8'));
    this.timed = true;
    const ns = namespace();
    ns.mutantCoverage = undefined;
    ns.hitCount = hitLimit === undefined ? undefined : 0;
    ns.hitLimit = hitLimit;
    ns.activeMutant = activeMutant.id;
    let tests;
    try {
      tests = await this.run(testFilter && new Set(testFilter), !disableBail);
    } catch (error) {
      // told while the bundle was evaluated: a mutant that breaks a constant
      tests = [
        { id: 'import', name: 'import', timeSpentMs: 0, status: TestStatus.Failed, failureMessage: String(error) },
      ];
    }
    return toMutantRunResult(
      determineHitLimitReached(ns.hitCount, hitLimit) ?? { status: DryRunStatus.Complete, tests },
    );
  }
}

export const strykerPlugins = [declareClassPlugin(PluginKind.TestRunner, 'in-process', InProcessRunner)];
