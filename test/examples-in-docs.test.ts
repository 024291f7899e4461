import { spawnSync } from 'node:child_process';
import { cpSync, existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join, relative, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { describe, expect, it } from 'vitest';
import {
  difference,
  type Example,
  examplesOfPage,
  examplesOfSource,
  promisesOf,
  runExample,
  writtenNumber,
} from './house/examples.js';

const ROOT = fileURLToPath(new URL('..', import.meta.url));
const SRC = join(ROOT, 'src');
const PAGES = ['README.md', 'DEVELOPERS.md'];

const sources = readdirSync(SRC, { recursive: true, withFileTypes: true })
  .filter((entry) => entry.isFile() && entry.name.endsWith('.ts'))
  .map((entry) => join(entry.parentPath, entry.name))
  .sort();

/** Answers `import … from` inside an example that stands in `file`. */
const loader = (file: string) => async (from: string) => {
  if (from === 'bedorder') return import(join(SRC, 'index.ts'));
  if (from.startsWith('.')) return import(resolve(dirname(file), from.replace(/\.js$/, '.ts')));
  return import(from);
};

/** What an example may use: the exports of its own file, of its room, of model and of statistics. */
async function scope(file: string): Promise<Record<string, unknown>> {
  const names: Record<string, unknown> = {};
  const index = join(dirname(file), 'index.ts');
  const shared = [join(SRC, 'model/index.ts'), join(SRC, 'statistics/index.ts'), index].filter((path) =>
    existsSync(path),
  );
  for (const path of [...shared, file]) Object.assign(names, await import(path));
  return names;
}

describe('examples in docstrings', () => {
  const withExamples = sources
    // the program itself runs when it is loaded
    .filter((file) => relative(SRC, file) !== 'cli.ts')
    .map((file) => ({ file, examples: examplesOfSource(relative(ROOT, file), readFileSync(file, 'utf8')) }))
    .filter(({ examples }) => examples.length > 0);
  let compared = 0;

  it.each(withExamples.map(({ file, examples }) => [relative(ROOT, file), file, examples] as const))(
    '%s',
    async (_name, file, examples) => {
      const names = await scope(file);
      for (const example of examples) {
        const result = await runExample(example, names, loader(file));
        expect(result.differences).toEqual([]);
        compared += result.compared;
      }
    },
  );

  it('found examples to run, and values to compare', () => {
    expect(withExamples.length).toBeGreaterThan(30);
    expect(compared).toBeGreaterThan(40);
  });
});

describe('examples on pages', () => {
  const pages = PAGES.filter((page) => existsSync(join(ROOT, page))).map((page) => ({
    page,
    text: readFileSync(join(ROOT, page), 'utf8'),
  }));
  const code = pages.flatMap(({ page, text }) => examplesOfPage(page, text, 'ts'));
  const commands = pages.flatMap(({ page, text }) => examplesOfPage(page, text, 'sh'));

  it('are there', () => {
    expect(pages.map(({ page }) => page)).toEqual(PAGES);
    expect(code.length).toBeGreaterThan(0);
    expect(commands.length).toBeGreaterThan(0);
  });

  it.each(code.map((example) => [example.where, example] as const))('%s', async (_where, example) => {
    const result = await runExample(example, {}, loader(join(ROOT, 'README.md')));
    expect(result.differences).toEqual([]);
    expect(result.compared).toBeGreaterThan(0);
  });

  it.each(commands.map((example) => [example.where, example] as const))('%s', (_where, example) => {
    const program = join(ROOT, 'program/cli.js');
    expect(existsSync(program), 'program/cli.js: run `npm run build` first').toBe(true);
    const folder = mkdtempSync(join(tmpdir(), 'bedorder-page-'));
    try {
      cpSync(join(ROOT, 'examples'), join(folder, 'examples'), { recursive: true });
      const lines = example.code.split('\n').filter((line) => line.trim() !== '' && !line.startsWith('#'));
      for (const line of lines) {
        const words = [...line.matchAll(/"([^"]*)"|(\S+)/g)].map((match) => match[1] ?? match[2]);
        expect(words[0], `${example.where}: only bedorder commands are run`).toBe('bedorder');
        const done = spawnSync(process.execPath, [program, ...words.slice(1)], { cwd: folder, encoding: 'utf8' });
        expect(done.status, `${line}\n${done.stdout}${done.stderr}`).toBe(0);
      }
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  });

  it('link to files that exist', () => {
    const links = pages.flatMap(({ page, text }) =>
      [...text.matchAll(/\]\((?!https?:|#|mailto:)([^)#\s]+)(?:#[^)]*)?\)/g)].map((match) => ({
        page,
        target: match[1],
      })),
    );
    expect(links.length).toBeGreaterThan(0);
    expect(links.filter(({ target }) => !existsSync(new URL(target, pathToFileURL(`${ROOT}/`))))).toEqual([]);
  });
});

describe('the runner itself', () => {
  const example = (code: string): Example => ({ where: 'here:1', code });
  const run = (code: string) => runExample(example(code), { double: (x: number) => 2 * x }, loader(join(SRC, 'x.ts')));

  it('finds the block in a docstring and takes the stars off', () => {
    const text = '/**\n * What.\n *\n * @example\n * ```ts\n * double(2); // => 4\n * ```\n * @throws never\n */';
    expect(examplesOfSource('a.ts', text)).toEqual([{ where: 'a.ts:4', code: '\ndouble(2); // => 4' }]);
  });

  it('compares values, declared names, lists, objects and text', async () => {
    const good = await run(
      "double(2) // => 4\nconst a = double(\n  3,\n); // => 6\n[a, 1 / 3] // => [6, 0.333]\n({ b: 'x-1', c: null }) // => { b: 'x-1', c: null }\ndouble(1);\n// => 2",
    );
    expect(good).toEqual({ compared: 5, differences: [] });
  });

  it.each([
    ['double(2) // => 5', /value is 4, promised 5/],
    ['1 / 3 // => 0.334', /promised 0.334/],
    ['[1, 2] // => [1]', /2 items, promised 1/],
    ["'a' // => 'b'", /promised 'b'/],
    ['({ a: 1, b: 2 }) // => { a: 1 }', /value.b is 2/],
    ['NaN // => 0', /promised 0/],
    ['undefined // => null', /promised null/],
  ])('catches a wrong value: %s', async (code, message) => {
    const result = await run(code);
    expect(result.differences.join('\n')).toMatch(message);
  });

  it('refuses prose in the place of a value, and a promise without an expression', async () => {
    await expect(run('double(2) // => about four')).rejects.toThrow(/write the value itself/);
    expect(() => promisesOf(example('const // => 4'))).toThrow(/no expression/);
  });

  it('takes a number as every value that rounds to it', () => {
    expect(difference(0.12345, writtenNumber('0.123'))).toBeNull();
    expect(difference(0.1236, writtenNumber('0.123'))).not.toBeNull();
    expect(difference(0.1239, writtenNumber('0.123…'))).toBeNull();
    expect(difference(2.0001, writtenNumber('2'))).not.toBeNull();
    expect(difference(1.92874984796392e-22, writtenNumber('1.9287e-22'))).toBeNull();
  });
});
