import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as library from '../../src/index.js';
import { browserThere, startBrowser } from './browser.js';

const at = (path: string) => fileURLToPath(new URL(`../../${path}`, import.meta.url));
const EXAMPLE = {
  shells: readFileSync(at('examples/coast/shells.csv'), 'utf8'),
  beds: readFileSync(at('examples/coast/beds.csv'), 'utf8'),
  relations: readFileSync(at('examples/coast/relations.csv'), 'utf8'),
};

/** The whole of the library on plain data; it runs as it stands in Node and in a page. */
async function useLibrary({ lib, tables }: { lib: typeof library; tables: typeof EXAMPLE }) {
  const bytes = (file: string, text: string) => ({ file, bytes: new TextEncoder().encode(text) });
  const { survey, problems } = await lib.surveyFromBytes({
    shells: bytes('shells.csv', tables.shells),
    beds: bytes('beds.csv', tables.beds),
    relations: bytes('relations.csv', tables.relations),
  });
  const steps: string[] = [];
  const host = {
    progress: (step: string) => void steps.push(step),
    map: async (tasks: readonly library.Task[]) => tasks.map(lib.runTask),
  };
  const findings = await lib.analyse(survey!, { ...lib.DEFAULT_OPTIONS, simulations: 99 }, host);
  const dates = (['Withy Gut/A', 'Withy Gut/D'] as const).map((name, i) => ({
    file: 'dates.csv',
    line: i + 2,
    section: name.split('/')[0],
    bed: name.split('/')[1],
    age_ka: i === 0 ? 120 : 80,
    error_ka: 5,
    limit: 'equal' as const,
    method: null,
  }));
  return {
    version: lib.VERSION,
    problems,
    steps: steps.length,
    findings,
    plan: lib.plan(findings, { dates: 2 }),
    judged: lib.judgeDates(findings, dates),
    figures: lib.drawFigures(findings),
    report: lib.renderReport(findings),
  };
}

/** Where two plain values differ; numbers may by a millionth, since one engine rounds a logarithm otherwise than another. */
function apart(one: unknown, other: unknown, at = ''): string[] {
  if (typeof one === 'number' && typeof other === 'number')
    return Math.abs(one - other) <= 1e-9 + 1e-6 * Math.abs(one) ? [] : [`${at}: ${one} and ${other}`];
  if (one === null || other === null || typeof one !== 'object' || typeof other !== 'object')
    return one === other ? [] : [`${at}: ${one} and ${other}`];
  return [...new Set([...Object.keys(one), ...Object.keys(other)])].flatMap((key) =>
    apart((one as Record<string, unknown>)[key], (other as Record<string, unknown>)[key], `${at}.${key}`),
  );
}

/** A page in pieces short enough to compare by eye; its drawings, which a browser moves by half a point, by their words. */
const linesOf = (page: string) => page.replace(/<svg[\s\S]*?<\/svg>/g, wordsOf).split(/(?=<)/);

const wordsOf = (markup: string) => markup.replace(/<[^>]*>/g, ' ').replace(/\s+/g, ' ');

describe.skipIf(!browserThere)('the library in a browser', () => {
  let browser: Browser;
  let code: string;
  let inputs: string[];

  beforeAll(async () => {
    // for a browser, esbuild refuses every Node module that it meets
    const bundle = await build({
      entryPoints: [at('src/index.ts')],
      bundle: true,
      format: 'iife',
      globalName: 'bedorder',
      platform: 'browser',
      target: 'es2022',
      write: false,
      metafile: true,
      logLevel: 'silent',
    });
    expect(bundle.warnings).toEqual([]);
    code = bundle.outputFiles[0].text;
    inputs = Object.keys(bundle.metafile.inputs);
    browser = await startBrowser();
  });
  afterAll(() => browser?.close());

  it('has no Node module in it', async () => {
    expect(inputs.length).toBeGreaterThan(100);
    expect(inputs.filter((path) => path.startsWith('node:') || /(^|\/)src\/(commands|cli)/.test(path))).toEqual([]);
    await expect(
      build({
        stdin: { contents: "import { readFileSync } from 'node:fs'; readFileSync('x');", resolveDir: at('src') },
        bundle: true,
        platform: 'browser',
        write: false,
        logLevel: 'silent',
      }),
    ).rejects.toThrow(/node:fs/);
  });

  it('finds, plans, judges and draws there what it does in Node', async () => {
    const page = await browser.newPage();
    const messages: string[] = [];
    page.on('console', (message) => messages.push(message.text()));
    page.on('pageerror', (error) => messages.push(String(error)));
    await page.addScriptTag({ content: code });
    const there = await page.evaluate(
      async ({ run, tables }) => {
        const lib = (globalThis as unknown as { bedorder: unknown }).bedorder;
        const use = new Function(`return (${run})`)() as (given: object) => Promise<unknown>;
        return { node: typeof (globalThis as { process?: unknown }).process, result: await use({ lib, tables }) };
      },
      { run: useLibrary.toString(), tables: EXAMPLE },
    );
    expect(there.node).toBe('undefined');
    expect(messages).toEqual([]);
    const here = await useLibrary({ lib: library, tables: EXAMPLE });
    expect(here.findings.zones.length).toBeGreaterThan(1);
    expect(here.figures.length).toBeGreaterThan(5);
    expect(here.judged.pairs).toHaveLength(1);
    const result = there.result as typeof here;
    expect(result.figures.map((figure) => figure.name)).toEqual(here.figures.map((figure) => figure.name));
    // undefined is left behind on the way out of the page
    const plain = JSON.parse(JSON.stringify({ ...here, figures: [], report: '' }));
    expect(apart({ ...result, figures: [], report: '' }, plain)).toEqual([]);
    const own = linesOf(here.report);
    expect(linesOf(result.report).filter((line, i) => line !== own[i])).toEqual([]);
    expect(linesOf(result.report)).toHaveLength(own.length);
    expect(result.figures.map(({ svg }) => wordsOf(svg))).toEqual(here.figures.map(({ svg }) => wordsOf(svg)));
    expect(apart({ a: [1, { b: 2 }] }, { a: [1, { b: 2.1 }] })).toEqual(['.a.1.b: 2 and 2.1']);
    await page.close();
  });
});
