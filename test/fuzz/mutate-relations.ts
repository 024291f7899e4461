import type { Random } from '../../src/statistics/index.js';

/** A relations table over the beds of a shells table: chains, webs, circles, relations of a bed with itself. */
export function inventedRelations(shells: string, random: Random): string {
  const [header, ...lines] = shells.split(/\r\n|\r|\n/);
  const delimiter = header.includes(';') ? ';' : ',';
  const names = header.split(delimiter).map((cell) => cell.trim().toLowerCase());
  const [section, bed] = [names.indexOf('section'), names.indexOf('bed')];
  if (section < 0 || bed < 0) return 'lower,upper\n';
  const beds = [
    ...new Set(
      lines
        .map((line) => line.split(delimiter))
        .filter((cells) => cells[section] && cells[bed])
        .map((cells) => `${cells[section]}/${cells[bed]}`),
    ),
  ];
  if (beds.length === 0) return 'lower,upper\n';
  const any = () => beds[random.integer(beds.length)];
  const word = (words: readonly string[]) => words[random.integer(words.length)];
  const count = 1 + random.integer(2 * beds.length);
  // mostly without circles, so that the rooms behind the reader see the rest
  const forward = random.integer(5) > 0;
  const rows = Array.from({ length: count }, () => {
    let [a, b] = [random.integer(beds.length), random.integer(beds.length)];
    if (a > b) [a, b] = [b, a];
    const pair = forward ? `${beds[a]},${beds[b]}` : `${any()},${any()}`;
    const basis = word(['', 'superposition', 'cross-cutting', 'inset', 'staircase', 'inclusion', 'marker']);
    return `${pair},${basis},${word(['', 'older', 'older', 'older', 'older', 'same'])},${word(['', 'certain', 'probable'])}`;
  });
  return `lower,upper,basis,kind,certainty\n${rows.join('\n')}\n`;
}
