import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { breaches, type Code, importsOf, roomOf, withoutComments } from './house/rules.js';

const SRC = fileURLToPath(new URL('../src', import.meta.url));

/** Every TypeScript file under src, with its path as written from there. */
const files: Code[] = readdirSync(SRC, { recursive: true, withFileTypes: true })
  .filter((entry) => entry.isFile() && /\.[cm]?tsx?$/.test(entry.name))
  .map((entry) => join(entry.parentPath, entry.name))
  .map((path) => ({ path: relative(SRC, path).replaceAll('\\', '/'), text: readFileSync(path, 'utf8') }))
  .sort((a, b) => (a.path < b.path ? -1 : 1));

describe('the rooms of the house', () => {
  it('has something to look at: files in every engine room, and imports between them', () => {
    expect(files.length).toBeGreaterThan(40);
    const imports = files.flatMap((file) => importsOf(file));
    expect(imports.filter((path) => path.startsWith('.')).length).toBeGreaterThan(80);
    const rooms = new Set(files.map((file) => roomOf(file.path)));
    for (const room of ['model', 'statistics', 'beds', 'zones', 'order', 'superposition'])
      expect(rooms).toContain(room);
  });

  it('keeps to who may know whom, and leaves files, clock and terminal to their rooms', () => {
    expect(files.flatMap(breaches)).toEqual([]);
  });

  it('names files in kebab-case', () => {
    const odd = files.filter((file) => !/^([a-z0-9]+(-[a-z0-9]+)*\/)*[a-z0-9]+(-[a-z0-9]+)*\.ts$/.test(file.path));
    expect(odd.map((file) => file.path)).toEqual([]);
  });

  it('gives every room that has several files an index', () => {
    const rooms = new Set(files.filter((file) => file.path.includes('/')).map((file) => file.path.split('/')[0]));
    const bare = [...rooms].filter((room) => room !== 'commands' && !files.some((f) => f.path === `${room}/index.ts`));
    expect(bare).toEqual([]);
  });

  it('says of every export what it is', () => {
    const bare = files.flatMap(({ path, text }) => {
      const lines = text.split('\n');
      return lines.flatMap((line, at) =>
        /^export (async )?(function\*?|const|interface|class|type \w+\b(?! *\{))/.test(line) &&
        !lines[at - 1]?.trim().endsWith('*/')
          ? [`${path}:${at + 1} ${line}`]
          : [],
      );
    });
    expect(bare).toEqual([]);
  });

  it('lets no Node module be reached from the library', () => {
    const byPath = new Map(files.map((file) => [file.path, file]));
    const reached = new Set<string>();
    const outside = new Set<string>();
    const walk = (path: string) => {
      if (reached.has(path)) return;
      reached.add(path);
      const file = byPath.get(path);
      if (!file) throw new Error(`${path} is imported and does not exist`);
      for (const target of importsOf(file, 'values')) {
        if (target.startsWith('.')) walk(join(path, '..', target).replaceAll('\\', '/').replace(/\.js$/, '.ts'));
        else outside.add(target);
      }
    };
    walk('index.ts');
    expect(reached.size).toBeGreaterThan(20);
    expect([...outside].filter((name) => name.startsWith('node:'))).toEqual([]);
    for (const name of ['commander', 'cli-progress', 'picocolors']) expect(outside).not.toContain(name);
  });
});

describe('the rules themselves catch a planted breach', () => {
  const planted: [string, string, RegExp][] = [
    ['model/a.ts', "import { x } from '../statistics/x.js';", /model may not know statistics/],
    ['statistics/a.ts', "import type { x } from '../model/index.js';", /statistics may not know model/],
    ['zones/a.ts', "export { x } from '../order/x.js';", /zones may not know order/],
    ['zones/a.ts', "import type { x } from '../../test/x.js';", /outside src/],
    ['beds/a.ts', "const x = await import('../output/x.js');", /beds may not know output/],
    ['coast/a.ts', "import {\n  a,\n  b,\n} from '../report/index.js';", /coast may not know report/],
    ['pipeline.ts', "import { x } from './commands/run.js';", /may not know commands/],
    ['order/a.ts', "import { readFileSync } from 'node:fs';", /node:fs/],
    ['order/a.ts', "import 'fs';", /fs/],
    ['order/a.ts', "import { x } from './x';", /ends in \.js/],
    ['figures/a.ts', 'const t = new Date();', /Date/],
    ['zones/a.ts', 'const t = Math.random();', /Math\.random/],
    ['report/a.ts', 'if (process.env.X) x();', /process/],
    ['beds/a.ts', "console.log('x');", /console/],
    ['output/a.ts', 'names.sort((a, b) => a.localeCompare(b));', /localeCompare/],
    ['statistics/a.ts', "import { program } from 'commander';", /commander/],
  ];
  it.each(planted)('%s: %s', (path, text, message) => {
    expect(breaches({ path, text }).join('\n')).toMatch(message);
  });

  it('lets what is allowed pass, and reads no comments or words in strings', () => {
    const fine: Code[] = [
      { path: 'order/a.ts', text: "import { x } from '../zones/x.js';\nimport { y } from '../statistics/index.js';" },
      { path: 'output/a.ts', text: "import { writeFileSync } from 'node:fs';\nconst t = Date.now();" },
      {
        path: 'zones/a.ts',
        text: "// import x from 'node:fs'; Math.random()\n/** new Date() */\nconst a = 'console.log and new Date()';",
      },
      { path: 'report/a.ts', text: "import { x } from '../figures/index.js';" },
    ];
    expect(fine.flatMap(breaches)).toEqual([]);
    expect(withoutComments("const a = 'http://x'; // gone\n/* gone */ const b = 1;")).toContain("'http://x'");
  });
});
