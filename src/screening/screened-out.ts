import type { ShellMark } from '../model/index.js';

/**
 * Whether marks set a shell aside by themselves (design 7.2): high serine does, and so do two marks of different rules.
 *
 * @param marks Marks of one shell.
 * @example
 * screenedOut(['discordant ratios']) // => false
 * screenedOut(['discordant ratios', 'low yield']) // => true
 */
export function screenedOut(marks: readonly ShellMark[]): boolean {
  return marks.length > 0 && (marks.includes('high serine') || new Set(marks).size >= 2);
}
