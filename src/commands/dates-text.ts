import type { DateLimit, DatePairRow, DatesJudgement } from '../model/index.js';
import { counted, type Style, safe, textTable, wrap } from './terminal.js';

/** Pairs that the terminal shows; the table holds them all. */
const SHOWN = 20;

/**
 * The dates against the order for a terminal of 80 columns: the sentences, then the pairs, contradictions first.
 *
 * @param path The file that holds every pair.
 */
export function datesText({ pairs, remarks }: DatesJudgement, path: string, style: Style): string {
  const parts = [remarks.map((remark) => wrap(safe(remark))).join('\n')];
  if (pairs.length > 0) {
    const rows = pairs.slice(0, SHOWN);
    const lines = textTable(
      [
        ['should be older', 'ka', 'than', 'ka', 'z', 'verdict'],
        ...rows.map((row) => [
          short(row.older),
          age(row.older_age_ka, row.older_error_ka, row.older_limit),
          `${row.relation === 'older' ? '' : '= '}${short(row.younger)}`,
          age(row.younger_age_ka, row.younger_error_ka, row.younger_limit),
          row.z === null ? '' : row.z.toFixed(1),
          row.verdict,
        ]),
      ],
      [false, true, false, true, true, false],
      0,
    );
    const dressed = lines.map((line, at) => (at === 0 ? style.bold(line) : dress(line, rows[at - 1], style)));
    const rest = pairs.length - rows.length;
    parts.push([...dressed, ...(rest > 0 ? [`… and ${counted(rest, 'more pair')}`] : [])].join('\n'));
    if (rows.some((row) => row.relation !== 'older')) {
      parts.push(wrap('=: of one bed, of beds stated to be as old, or of one zone.'));
    }
  }
  parts.push(
    wrap('Ages are those of the dates table; ratios are never turned into ages.'),
    wrap(`Every pair in full: ${safe(path)}`),
  );
  return parts.join('\n\n');
}

function dress(line: string, row: DatePairRow, style: Style): string {
  return row.verdict === 'contradicts' ? style.red(line) : row.verdict === 'differs' ? style.yellow(line) : line;
}

function age(value: number, error: number, limit: DateLimit): string {
  const sign = limit === 'equal' ? '' : limit === 'older' ? '>' : '<';
  return `${sign}${figures(value)} ± ${figures(error)}`;
}

const figures = (value: number): string => String(Number(value.toPrecision(3)));

function short(name: string): string {
  const shown = safe(name);
  return shown.length > 18 ? `${shown.slice(0, 17)}…` : shown;
}
