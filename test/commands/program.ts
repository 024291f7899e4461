import { execFileSync, type SpawnOptionsWithoutStdio, spawn } from 'node:child_process';
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

/** The folder of the built program: program where it is not older than the sources, else a fresh build of its own. */
async function builtProgram(): Promise<string> {
  const built = join(ROOT, 'program');
  const stamp = join(built, 'cli.js');
  if (existsSync(stamp) && newest(join(ROOT, 'src')) <= statSync(stamp).mtimeMs) return built;
  return freshBuild('program');
}

/** Bundles the program into a folder of its own, as it is shipped; gives that folder. */
async function freshBuild(name: string): Promise<string> {
  const folder = join(homeFor(name), 'program');
  execFileSync(process.execPath, [join(ROOT, '.ci/bundle.mjs'), folder], { cwd: ROOT });
  return folder;
}

/** Builds the sources file by file into a folder of its own, for tests that put one of them to the test; gives that folder. */
export async function builtByFile(name: string): Promise<string> {
  const folder = join(homeFor(name), 'dist');
  const entries = readdirSync(join(ROOT, 'src'), { recursive: true, encoding: 'utf8' })
    .filter((entry) => entry.endsWith('.ts'))
    .map((entry) => join(ROOT, 'src', entry));
  await build({ entryPoints: entries, outdir: folder, outbase: join(ROOT, 'src'), format: 'esm', logLevel: 'error' });
  return folder;
}

/** A folder that looks like the top of the repository to a program in it, and goes when the tests end. */
function homeFor(name: string): string {
  const home = join(ROOT, 'node_modules/.cache/bedorder-test', `${name}-${process.pid}`);
  mkdirSync(home, { recursive: true });
  process.once('exit', () => rmSync(home, { recursive: true, force: true }));
  cpSync(join(ROOT, 'package.json'), join(home, 'package.json'));
  if (!existsSync(join(home, 'examples'))) symlinkSync(join(ROOT, 'examples'), join(home, 'examples'));
  return home;
}

function newest(folder: string): number {
  return Math.max(
    ...readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => statSync(join(folder, name)).mtimeMs),
  );
}

/** Runs the program to its end. */
export async function bedorder(args: readonly string[], options: SpawnOptionsWithoutStdio = {}): Promise<Outcome> {
  return runNode([join(await builtOnce(), 'cli.js'), ...args], options);
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
