import type { ProblemList } from './problem-list.js';
import { type DecimalSign, tidyNumber } from './read-number.js';
import type { Table } from './table.js';

/** A comma that can only stand before decimals: not one that may part thousands (`1,234`). */
const SURE_COMMA = /^[+-]?(?:0?,\d+|\d+,(?:\d{1,2}|\d{4,})|0,\d*)(?:[eE][+-]?\d+)?$/;
const ANY_COMMA = /^[+-]?\d*,\d+(?:[eE][+-]?\d+)?$/;
const POINT = /^[+-]?\d*\.\d+(?:[eE][+-]?\d+)?$/;

/**
 * Settles once for the whole table whether decimals follow a point or a comma, from all cells of its numeric columns.
 * A table that holds both is refused with the places of the rarer sign; so is one in which every comma may as well part
 * thousands. Without any decimals the answer is a point.
 */
export function settleDecimal(table: Table, columns: readonly number[], problems: ProblemList): DecimalSign {
  if (!table.mayHoldCommas) return 'point';
  const commas = { count: 0, sure: 0, places: [] as (readonly [number, number])[] };
  const points = { count: 0, places: [] as (readonly [number, number])[] };
  for (let row = 0; row < table.length; row += 1) {
    const cells = table.cells(row);
    for (const column of columns) {
      const cell = cells[column];
      if (typeof cell !== 'string' || cell === '') continue;
      const text = tidyNumber(cell);
      if (POINT.test(text)) {
        points.count += 1;
        if (points.places.length < 20) points.places.push([row, column]);
      } else if (ANY_COMMA.test(text)) {
        commas.count += 1;
        if (SURE_COMMA.test(text)) commas.sure += 1;
        if (commas.places.length < 20) commas.places.push([row, column]);
      }
    }
  }
  if (commas.count === 0) return 'point';
  const at = (place: readonly [number, number]) => ({
    file: table.file,
    line: table.line(place[0]),
    column: table.header[place[1]],
  });
  const written = (place: readonly [number, number]) => String(table.cells(place[0])[place[1]]).trim();
  if (points.count > 0) {
    const sign: DecimalSign = commas.count > points.count ? 'comma' : 'point';
    const [rare, many] = sign === 'comma' ? [points, commas] : [commas, points];
    const example = many.places[0];
    for (const place of rare.places) {
      problems.error(
        'mixed decimals',
        at(place),
        `"${written(place)}" has a decimal ${sign === 'comma' ? 'point' : 'comma'}, but ${many.count} other cells have a decimal ${sign} ` +
          `(such as "${written(example)}" on line ${table.line(example[0])}). Use one decimal sign in the whole file.`,
      );
    }
    return sign;
  }
  if (commas.sure === 0) {
    problems.error(
      'ambiguous commas',
      at(commas.places[0]),
      `"${written(commas.places[0])}" may be a decimal comma or a comma between thousands, and no other cell of the file tells. ` +
        'Write the numbers with a decimal point and without signs between thousands.',
    );
  }
  return 'comma';
}
