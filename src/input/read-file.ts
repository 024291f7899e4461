import { readFile, stat } from 'node:fs/promises';
import { basename } from 'node:path';
import { LIMITS } from './limits.js';
import type { ProblemList } from './problem-list.js';
import type { FileBytes } from './read-table.js';

const REASONS: Readonly<Record<string, string>> = {
  ENOENT: 'There is no such file. Check the name and the folder.',
  ENOTDIR: 'There is no such file. Check the name and the folder.',
  EACCES: 'The file may not be read. Change its permissions, or copy it.',
  EPERM: 'The file may not be read. Change its permissions, or copy it.',
  EISDIR: 'This is a folder. Name a file.',
  ELOOP: 'The file is a link that leads nowhere. Name the file itself.',
  ENAMETOOLONG: 'The name of the file is too long.',
};

/** Reads a file into memory; null, with the reason among the problems, when it can't be read. */
export async function readFileBytes(
  path: string,
  problems: ProblemList,
  limit: number = LIMITS.fileBytes,
): Promise<FileBytes | null> {
  const file = basename(path) || path;
  try {
    const facts = await stat(path);
    if (facts.isDirectory()) return refuse('This is a folder. Name a file.');
    if (!facts.isFile()) return refuse('This is no ordinary file. Save the table as a file and name that.');
    if (facts.size > limit) {
      return refuse(
        `The file has ${describeSize(facts.size)}; at most ${describeSize(limit)} are read. Leave out columns that are not needed, or split the survey by taxon or by coast.`,
      );
    }
    return { file, bytes: await readFile(path) };
  } catch (error) {
    const code = error instanceof Error && 'code' in error ? String(error.code) : '';
    return refuse(
      Object.hasOwn(REASONS, code) ? REASONS[code] : `The file can't be read${code === '' ? '' : ` (${code})`}.`,
    );
  }

  function refuse(message: string): null {
    problems.error('file', { file }, message);
    return null;
  }
}

function describeSize(bytes: number): string {
  return bytes >= 1_048_576 ? `${Math.ceil(bytes / 1_048_576)} MB` : `${Math.ceil(bytes / 1024)} kB`;
}
