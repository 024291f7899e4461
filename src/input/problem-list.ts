import type { Problem } from '../model/index.js';
import { LIMITS } from './limits.js';

/** Where a problem stands and what it says; `line` and `column` default to null. */
export interface ProblemPlace {
  readonly file: string;
  readonly line?: number | null;
  readonly column?: string | null;
}

/**
 * Gathers problems while tables are read. Of one kind in one file the first {@link LIMITS.problemsOfOneKind} are listed,
 * the rest counted, so that a wrong column in a million rows does not bury everything else.
 */
export interface ProblemList {
  readonly error: (kind: string, place: ProblemPlace, message: string) => void;
  /** An error after which reading on makes no sense: it counts as {@link LIMITS.errors} and one more. */
  readonly stop: (kind: string, place: ProblemPlace, message: string) => void;
  readonly warning: (kind: string, place: ProblemPlace, message: string) => void;
  readonly hasErrors: () => boolean;
  /** Number of errors, those that are only counted included. */
  readonly errorCount: () => number;
  /** Every problem, by file, line and column; problems without a line come first in their file. */
  readonly list: () => Problem[];
}

/** Makes an empty {@link ProblemList}. */
export function createProblemList(): ProblemList {
  const groups = new Map<string, { problems: Problem[]; count: number }>();
  let errors = 0;

  const add = (severity: Problem['severity'], kind: string, place: ProblemPlace, message: string): void => {
    const key = `${severity}\u0000${place.file}\u0000${kind}`;
    let group = groups.get(key);
    if (group === undefined) {
      group = { problems: [], count: 0 };
      groups.set(key, group);
    }
    group.count += 1;
    if (severity === 'error') errors += 1;
    if (group.problems.length >= LIMITS.problemsOfOneKind) return;
    group.problems.push({
      file: place.file,
      line: place.line ?? null,
      column: place.column ?? null,
      severity,
      message,
    });
  };

  return {
    error: (kind, place, message) => add('error', kind, place, message),
    stop: (kind, place, message) => {
      add('error', kind, place, message);
      errors += LIMITS.errors;
    },
    warning: (kind, place, message) => add('warning', kind, place, message),
    hasErrors: () => errors > 0,
    errorCount: () => errors,
    list: () => {
      const all: Problem[] = [];
      for (const { problems, count } of groups.values()) {
        all.push(...problems);
        const last = problems[problems.length - 1];
        const more = count - problems.length;
        if (more > 0) {
          all.push({
            ...last,
            message: `${more} more ${more === 1 ? 'problem' : 'problems'} like the last ones, from this line on; mend these first and check again.`,
          });
        }
      }
      return all.sort(comparePlaces);
    },
  };
}

function comparePlaces(a: Problem, b: Problem): number {
  if (a.file !== b.file) return a.file < b.file ? -1 : 1;
  return (a.line ?? 0) - (b.line ?? 0);
}
