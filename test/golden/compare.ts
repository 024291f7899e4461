import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, extname } from 'node:path';

/**
 * Holds a text against its golden file. With GOLDEN=write the file is written anew; otherwise a difference leaves what came
 * beside it, in a file that ends in `-changed`, so that the two can be looked at as a diff.
 * @throws Error with the first line that differs, and what to do
 */
export function holdAgainstGolden(path: string, text: string): void {
  const ending = extname(path);
  const changed = `${path.slice(0, path.length - ending.length)}-changed${ending}`;
  if (process.env.GOLDEN === 'write') {
    mkdirSync(dirname(path), { recursive: true });
    writeFileSync(path, text);
    rmSync(changed, { force: true });
    return;
  }
  const golden = existsSync(path) ? readFileSync(path, 'utf8') : '';
  if (golden === text) {
    rmSync(changed, { force: true });
    return;
  }
  mkdirSync(dirname(changed), { recursive: true });
  writeFileSync(changed, text);
  const [was, is] = [golden.split('\n'), text.split('\n')];
  const at = is.findIndex((line, i) => line !== was[i]);
  const line = at < 0 ? is.length : at;
  throw new Error(
    `${path} differs from line ${line + 1} on:\n- ${was[line] ?? '(its end)'}\n+ ${is[line] ?? '(its end)'}\n` +
      `What came stands in ${changed}. If the change is meant: npm run golden, and read the diff.`,
  );
}
