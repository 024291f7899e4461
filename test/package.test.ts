import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { ROOT } from './commands/program.js';

/* What would be published, and what it rests on. .ci/run installs the package in another folder and runs the demo there. */

const read = (path: string) => readFileSync(join(ROOT, path), 'utf8');
const manifest = JSON.parse(read('package.json'));
const lock: Record<string, { dev?: boolean; devOptional?: boolean; hasInstallScript?: boolean }> = JSON.parse(
  read('package-lock.json'),
).packages;

/** Licences under whose terms a package may be used by one under the MIT licence. */
const COMPATIBLE = [
  'MIT',
  'ISC',
  'BSD-2-Clause',
  'BSD-3-Clause',
  'BlueOak-1.0.0',
  'CC0-1.0',
  'Unlicense',
  'Apache-2.0',
];

describe('the package', () => {
  // dist stands already; building it anew would pull it from under other tests
  const [packed] = JSON.parse(
    execFileSync('npm', ['pack', '--dry-run', '--ignore-scripts', '--json', '--loglevel=error'], {
      cwd: ROOT,
      encoding: 'utf8',
      shell: process.platform === 'win32',
    }),
  );
  const paths: string[] = packed.files.map(({ path }: { path: string }) => path);

  it('has less than 1 MB', () => {
    expect(packed.size).toBeLessThan(1_000_000);
    expect(packed.unpackedSize).toBeLessThan(4_000_000);
  });

  it('holds the program, its types, the schema, the examples and the licence, and nothing of the house', () => {
    for (const path of [
      'program/cli.js',
      'program/commands/run-job.js',
      'program/commands/worker.js',
      'program/THIRD-PARTY.txt',
      'dist/index.js',
      'dist/index.d.ts',
      'LICENSE',
      'README.md',
    ]) {
      expect(paths).toContain(path);
    }
    expect(paths).toContain('src/output/results.schema.json');
    expect(paths).toContain('examples/coast/shells.csv');
    expect(paths.filter((path) => /^(test|\.ci|node_modules)|\.test\.|\.tgz$|tsconfig/.test(path))).toEqual([]);
  });

  it('starts by itself, and its entries lead to files that are in it', () => {
    for (const path of Object.values<string>(manifest.bin)) {
      expect(paths).toContain(path);
      expect(read(path).startsWith('#!/usr/bin/env node\n')).toBe(true);
    }
    const targets = Object.values<string | Record<string, string>>(manifest.exports).flatMap((entry) =>
      typeof entry === 'string' ? [entry] : Object.values(entry),
    );
    for (const target of targets) expect(paths).toContain(target.replace('./', ''));
  });

  it('needs no script when it is installed', () => {
    expect(Object.keys(manifest.scripts)).not.toEqual(expect.arrayContaining(['install']));
    for (const name of ['preinstall', 'install', 'postinstall', 'prepare'])
      expect(manifest.scripts[name]).toBeUndefined();
    const scripted = Object.entries(lock).filter(
      ([, { dev, devOptional, hasInstallScript }]) => !dev && !devOptional && hasInstallScript,
    );
    expect(scripted).toEqual([]);
  });
});

describe('what the package rests on', () => {
  const page = read('DEVELOPERS.md');
  const names = [...Object.keys(manifest.dependencies), ...Object.keys(manifest.devDependencies)];

  it.each(names)('%s is pinned, and has its reason in DEVELOPERS.md', (name) => {
    expect(manifest.dependencies[name] ?? manifest.devDependencies[name]).toMatch(/^\d+\.\d+\.\d+$/);
    expect(page.split('\n').some((line) => line.startsWith('|') && line.split('|')[1].includes(name))).toBe(true);
  });

  it('run-time packages, and theirs, have licences that fit MIT', () => {
    const licences = Object.entries(lock).flatMap(([path, { dev, devOptional }]) => {
      if (path === '' || dev || devOptional || !existsSync(join(ROOT, path))) return [];
      const { name, license } = JSON.parse(read(join(path, 'package.json')));
      return [{ name, license }];
    });
    expect(licences.length).toBeGreaterThan(10);
    expect(licences.filter(({ license }) => !COMPATIBLE.includes(license))).toEqual([]);
  });
});
