/**
 * Takes one field from a row. Each field gets a function of its own text, since one function that takes any field is slow on
 * rows of many shapes: with 100,000 shells, a quarter of the time that results.json takes to write.
 *
 * @param name A name from the descriptions of the tables, never from the input.
 */
export function fieldOf(name: string): (row: object) => unknown {
  let field = known.get(name);
  if (field === undefined) {
    field = new Function('row', `return row[${JSON.stringify(name)}]`) as (row: object) => unknown;
    known.set(name, field);
  }
  return field;
}

const known = new Map<string, (row: object) => unknown>();
