// usage: node .ci/bundle.mjs [folder]
// Builds the program into a folder, program/ by default: few files instead of some four hundred, which start in a third of the time. The library
// stays as it is in dist/, file by file, so that a browser's own tools can take from it what they need.
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { build } from 'esbuild';

const OUT = process.argv[2] ?? 'program';
rmSync(OUT, { recursive: true, force: true });

const { metafile } = await build({
  entryPoints: ['src/cli.ts', 'src/commands/run-job.ts', 'src/commands/worker.ts'],
  outbase: 'src',
  outdir: OUT,
  // next to the entries of the threads, which are found by their place
  chunkNames: 'commands/[name]-[hash]',
  bundle: true,
  // large, and loaded in few runs
  external: ['zod', 'yaml', 'read-excel-file', 'cli-progress'],
  splitting: true,
  format: 'esm',
  platform: 'node',
  target: 'node20',
  minifyWhitespace: true,
  minifySyntax: true,
  legalComments: 'none',
  logLevel: 'warning',
  metafile: true,
  // some packages are still CommonJS and ask for modules of Node that way
  banner: {
    js: "import { createRequire as requireFrom } from 'node:module'; const require = requireFrom(import.meta.url);",
  },
});

writeFileSync(join(OUT, 'THIRD-PARTY.txt'), notices(Object.keys(metafile.inputs)));

/** The licences of the packages that went into the program, as they ask for. */
function notices(inputs) {
  const folders = new Set(inputs.flatMap((path) => /^(?:.*\/)?node_modules\/(?:@[^/]+\/)?[^/]+/.exec(path)?.[0] ?? []));
  const parts = [...folders].sort().map((folder) => {
    const { name, version, license } = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'));
    const file = readdirSync(folder).find((entry) => /^licen[cs]e/i.test(entry));
    const text = file ? readFileSync(join(folder, file), 'utf8').trim() : `Licence: ${license}`;
    return `${name} ${version} (${license})\n\n${text}\n`;
  });
  if (parts.length === 0 || !existsSync(join(OUT, 'cli.js')))
    throw new Error('the bundle holds no program, or no packages');
  return `The program holds code of these packages.\n\n${parts.join(`\n${'-'.repeat(100)}\n\n`)}`;
}
