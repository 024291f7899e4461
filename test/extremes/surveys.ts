import { createRandom } from '../../src/statistics/index.js';

/** A shells table from rows of section, bed, level, shell and A/I. */
export function shellsTable(
  rows: readonly (readonly [string, string, number | '', number | string, number])[],
): string {
  const lines = rows.map(([section, bed, level, shell, ratio]) => `${section},${bed},Mya,${shell},${level},${ratio}\n`);
  return `section,bed,taxon,shell,level,A/I\n${lines.join('')}`;
}

/** `count` shells about a ratio, 5 % apart; the same seed gives the same shells. */
export function aboutRatio(seed: number) {
  const random = createRandom(seed);
  return (ratio: number) => Math.min(1.49, Number((ratio * Math.exp(0.05 * random.normal())).toPrecision(6)));
}

/** One section of so many beds, three shells each, the lowest the oldest. */
export function oneSection(beds: number): string {
  const about = aboutRatio(beds);
  return shellsTable(
    Array.from({ length: beds }, (_, b) =>
      [0, 1, 2].map((shell) => ['Cliff', `b${b}`, b + 1, shell, about(0.8 * Math.exp((-2 * b) / beds))] as const),
    ).flat(),
  );
}

/** So many sections of one bed each, and the relations that put one over the next. */
export function chainOfSections(beds: number): { readonly shells: string; readonly relations: string } {
  const about = aboutRatio(beds);
  const rows = Array.from({ length: beds }, (_, b) =>
    [0, 1, 2].map((shell) => [`S${b}`, 'b', '', shell, about(0.8 * Math.exp((-2 * b) / beds))] as const),
  ).flat();
  const links = Array.from({ length: beds - 1 }, (_, b) => `S${b}/b,S${b + 1}/b,inset\n`);
  return { shells: shellsTable(rows), relations: `lower,upper,basis\n${links.join('')}` };
}

/** So many beds in sections of four, whose levels are of four ages. */
export function foursOfBeds(beds: number, shells = 3): string {
  const about = aboutRatio(beds);
  return shellsTable(
    Array.from({ length: beds }, (_, b) =>
      Array.from(
        { length: shells },
        (_, shell) => [`S${b >> 2}`, `b${b % 4}`, (b % 4) + 1, shell, about(0.1 * 1.5 ** (3 - (b % 4)))] as const,
      ),
    ).flat(),
  );
}
