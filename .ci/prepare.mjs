// Makes a fresh clone ready: installs what package-lock.json pins where that was not done yet, and builds.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';

const installed = 'node_modules/.package-lock.json';

function newest(folder) {
  let latest = 0;
  for (const entry of readdirSync(folder, { withFileTypes: true })) {
    const path = join(folder, entry.name);
    latest = Math.max(latest, entry.isDirectory() ? newest(path) : statSync(path).mtimeMs);
  }
  return latest;
}

function run(command, args) {
  // npm is a script file on Windows, which only a shell can start
  const { status } = spawnSync(command, args, { stdio: ['ignore', 2, 2], shell: process.platform === 'win32' });
  if (status !== 0) {
    console.error(`${command} ${args.join(' ')} failed`);
    process.exit(1);
  }
}

if (!existsSync(installed) || statSync(installed).mtimeMs < statSync('package-lock.json').mtimeMs) {
  console.error('Installing the packages that package-lock.json pins (once) …');
  run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
}

const stamp = 'program/cli.js';
if (!existsSync(stamp) || statSync(stamp).mtimeMs < Math.max(newest('src'), statSync('package.json').mtimeMs)) {
  console.error('Building …');
  for (const folder of ['dist', 'program']) rmSync(folder, { recursive: true, force: true });
  run('npm', ['run', '--silent', 'build']);
}
