import type { Problem } from '../model/index.js';
import { counted, type Style, safe } from './terminal.js';

/**
 * One problem on one line, greppable: `file:line: severity: column: message`.
 *
 * @example
 * import { styleFor } from './terminal.js';
 * const problem = { file: 'a.csv', line: 3, column: 'n', severity: 'error', message: 'a number was wanted' };
 * problemText(problem, styleFor({})) // => 'a.csv:3: error: n: a number was wanted'
 */
export function problemText({ file, line, column, severity, message }: Problem, style: Style): string {
  const place = line === null ? file : `${file}:${line}`;
  const paint = severity === 'error' ? style.red : style.yellow;
  return `${safe(place)}: ${paint(severity)}: ${column === null ? '' : `${safe(column)}: `}${oneLine(message)}`;
}

/** How many errors and warnings, in words. */
export function problemCount(problems: readonly Problem[]): string {
  const errors = problems.filter(({ severity }) => severity === 'error').length;
  const warnings = problems.length - errors;
  const parts = [errors > 0 ? counted(errors, 'error') : '', warnings > 0 ? counted(warnings, 'warning') : ''];
  return parts.filter((part) => part !== '').join(' and ') || 'no problems';
}

function oneLine(message: string): string {
  return safe(message.replace(/\s*[\r\n]+\s*/g, ' '));
}
