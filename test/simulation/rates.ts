/*
 * Measures the rates that the README shows and writes their table between its markers `<!-- rates -->` and
 * `<!-- /rates -->`; prints it where the README has none. Seeds run from 1 upwards, so the same code gives the same table.
 */
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import type { CoastOptions } from './coast-options.js';
import { calibration, coverage, falseZones, fourAminoAcids, indexGain, recovery } from './zone-rates.js';

const SEEDS = 60;
/** Beds near a border are few, so that more coasts are wanted where probabilities are judged. */
const SEEDS_FOR_PROBABILITIES = 80;
const step = (percent: number): number => Math.log(1 + percent / 100);
const percent = (share: number): string => `${(100 * share).toFixed(1)} %`;

interface Line {
  readonly coasts: string;
  readonly what: string;
  readonly measured: string;
  readonly promised: string;
}

async function measure(): Promise<Line[]> {
  const lines: Line[] = [];
  const add = (coasts: string, what: string, measured: string, promised = ''): void => {
    lines.push({ coasts, what, measured, promised });
  };
  const none: readonly (readonly [string, CoastOptions])[] = [
    ['a continuum', { zones: 'continuum' }],
    [
      'a continuum of 12 beds, its range 1.5 in ln D/L',
      { zones: 'continuum', continuumRange: 1.5, beds: 12, sections: 4 },
    ],
    ['a continuum of 20 beds, its range 0.4', { zones: 'continuum', continuumRange: 0.4, beds: 20, sections: 5 }],
    ['a continuum of 60 beds', { zones: 'continuum', beds: 60, sections: 20 }],
    ['one zone', { zones: 1 }],
    ['one zone, spread 0.04 between beds', { zones: 1, spread: 0.04 }],
    ['one zone sloping 2 % a degree over 8 degrees, no gradient asked for', { zones: 1, gradient: { slope: 0.02 } }],
    ['one zone sloping 5 % a degree over 8 degrees, no gradient asked for', { zones: 1, gradient: { slope: 0.05 } }],
  ];
  for (const [name, coast] of none) add(name, 'called zones', percent(await falseZones(SEEDS, coast)), '≤ 10 %');

  const there: readonly (readonly [string, CoastOptions & { zones: number }, boolean])[] = [
    ['4 zones 30 % apart', { zones: 4, spacing: step(30) }, true],
    ['3 zones 20 % apart', { zones: 3, spacing: step(20) }, true],
    ['3 zones 15 % apart', { zones: 3, spacing: step(15) }, false],
    ['3 zones 10 % apart', { zones: 3, spacing: step(10) }, false],
    ['3 zones 10 % apart, 60 beds', { zones: 3, spacing: step(10), beds: 60, sections: 20 }, false],
    ['3 zones 15 % apart, 2 or 3 shells a bed', { zones: 3, spacing: step(15), shells: [2, 3] }, false],
    ['3 zones 20 % apart, 12 beds', { zones: 3, spacing: step(20), beds: 12, sections: 4 }, false],
    ['4 zones 30 % apart, spread 0.02', { zones: 4, spacing: step(30), spread: 0.02 }, false],
    ['3 zones 20 % apart, spread 0.02', { zones: 3, spacing: step(20), spread: 0.02 }, false],
  ];
  for (const [name, coast, promised] of there) {
    const { rightNumber, rand } = await recovery(SEEDS, coast);
    add(name, 'right number of zones', percent(rightNumber), promised ? '≥ 90 %' : '');
    add(name, 'mean adjusted Rand index with the truth', rand.toFixed(3), promised ? '≥ 0.95' : '');
  }

  for (const spread of [0, 0.02]) {
    const { zones, covered } = await coverage(SEEDS, [
      { zones: 4, spacing: step(30), spread },
      { zones: 3, spacing: step(20), spread },
    ]);
    add(
      `4 zones 30 %, 3 zones 20 % apart, spread ${spread}`,
      `dl_low to dl_high holds the truth (${zones} zones)`,
      percent(covered),
      '93–97 %',
    );
  }

  const mixed = [
    { zones: 4, spacing: step(30), spread: 0.03 },
    { zones: 3, spacing: step(15), spread: 0.02 },
    { zones: 3, spacing: step(12) },
    { zones: 3, spacing: step(10) },
    { zones: 3, spacing: step(12), shells: [1, 6] as const, beds: 60 },
  ];
  for (const { from, beds, said, right } of await calibration(SEEDS_FOR_PROBABILITIES, mixed)) {
    if (beds < 50) continue;
    const name = `zones 10 to 30 % apart, spread 0 to 0.03: ${beds} beds given ${from.toFixed(1)} to ${(from + 0.1).toFixed(1)}`;
    add(name, `right, where ${percent(said)} was said`, percent(right), 'within 5 points');
  }

  for (const noise of [0, 3]) {
    const coast = { zones: 4, spacing: step(15), scatter: 0.06, aminoAcids: fourAminoAcids(noise) };
    const { index, bestSingle } = await indexGain(SEEDS / 4, coast);
    add(
      `4 zones 15 % apart, scatter 6 %, four amino acids${noise === 0 ? '' : `, ${noise} of them noise`}`,
      'mean Rand index of the index less that of the best single one',
      `${index.toFixed(3)} − ${bestSingle.toFixed(3)}`,
      noise === 0 ? '≥ +0.05' : '≥ −0.02',
    );
  }
  return lines;
}

const table = [
  `${SEEDS} simulated coasts a line (probabilities ${SEEDS_FOR_PROBABILITIES} a kind, index ${SEEDS / 4}), seeds from 1; 30 beds in 10 sections, 4 to 8 shells a bed and 5 % scatter where nothing else is said. Made by \`npm run rates\`.`,
  '',
  '| simulated coasts | rate | measured | promised |',
  '| --- | --- | --- | --- |',
  ...(await measure()).map(
    ({ coasts, what, measured, promised }) => `| ${coasts} | ${what} | ${measured} | ${promised} |`,
  ),
].join('\n');

const README = 'README.md';
const text = existsSync(README) ? readFileSync(README, 'utf8') : '';
const marked = /<!-- rates -->[\s\S]*?<!-- \/rates -->/;
if (marked.test(text))
  writeFileSync(
    README,
    text.replace(marked, () => `<!-- rates -->\n${table}\n<!-- /rates -->`),
  );
console.log(table);
