import { type SpawnOptionsWithoutStdio, spawn } from 'node:child_process';
import { cpSync, existsSync, mkdirSync, readdirSync, rmSync, statSync, symlinkSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

/** The top of the repository. */
export const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/** What a run of the program gave. */
export interface Outcome {
  readonly status: number | null;
  readonly signal: NodeJS.Signals | null;
  readonly stdout: string;
  readonly stderr: string;
}

/**
 * The folder of the built program: dist where it is not older than the sources, else a fresh build of its own, file by
 * file as dist is, so that worker threads and lazy imports are tried as they are shipped.
 */
export async function builtProgram(): Promise<string> {
  const dist = join(ROOT, 'dist');
  const isFresh = (stamp: string) => existsSync(stamp) && newest(join(ROOT, 'src')) <= statSync(stamp).mtimeMs;
  if (isFresh(join(dist, 'cli.js'))) return dist;
  return freshBuild('program');
}

/** Builds the program anew into a folder of its own; gives its dist. */
export async function freshBuild(name: string): Promise<string> {
  const home = join(ROOT, 'node_modules/.cache/bedorder-test', `${name}-${process.pid}`);
  const entries = readdirSync(join(ROOT, 'src'), { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.ts'))
    .map((name) => join(ROOT, 'src', name));
  mkdirSync(home, { recursive: true });
  process.once('exit', () => rmSync(home, { recursive: true, force: true }));
  await build({
    entryPoints: entries,
    outdir: join(home, 'dist'),
    outbase: join(ROOT, 'src'),
    format: 'esm',
    logLevel: 'error',
  });
  cpSync(join(ROOT, 'package.json'), join(home, 'package.json'));
  if (!existsSync(join(home, 'examples'))) symlinkSync(join(ROOT, 'examples'), join(home, 'examples'));
  return join(home, 'dist');
}

function newest(folder: string): number {
  return Math.max(
    ...readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => statSync(join(folder, name)).mtimeMs),
  );
}

/** Runs the program to its end. */
export async function bedorder(args: readonly string[], options: SpawnOptionsWithoutStdio = {}): Promise<Outcome> {
  const dist = await builtOnce();
  return runNode([join(dist, 'cli.js'), ...args], options);
}

let once: Promise<string> | undefined;

/** {@link builtProgram}, once a test file. */
export function builtOnce(): Promise<string> {
  once ??= builtProgram();
  return once;
}

/** Runs Node with these arguments to its end. */
export function runNode(args: readonly string[], options: SpawnOptionsWithoutStdio = {}): Promise<Outcome> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, args, {
      ...options,
      // with both set, Node warns on standard error
      env: { ...process.env, FORCE_COLOR: undefined, ...options.env },
    });
    let stdout = '';
    let stderr = '';
    child.stdout.setEncoding('utf8').on('data', (text: string) => {
      stdout += text;
    });
    child.stderr.setEncoding('utf8').on('data', (text: string) => {
      stderr += text;
    });
    child.on('error', reject);
    child.on('close', (status, signal) => resolve({ status, signal, stdout, stderr }));
  });
}
