// A big survey for the benchmark: sections of ten beds, 25 shells a bed, five zones, 1 % of the shells odd.
// As a program: node test/bench/make-survey.mjs ROWS FILE
import { closeSync, openSync, writeSync } from 'node:fs';
import { pathToFileURL } from 'node:url';

const BEDS_A_SECTION = 10;
const SHELLS_A_BED = 25;
const ZONES = [0, 1, 2, 3, 4].map((zone) => Math.log(0.12) + 0.26 * zone);

/** Marsaglia's xorshift, seeded: the same rows give the same file. */
function uniforms(seed) {
  let state = seed | 0 || 1;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return ((state >>> 0) + 0.5) / 2 ** 32;
  };
}

/** Writes a table of about so many shells: section, bed, taxon, shell, level, A/I. */
export function makeSurvey(rows, path) {
  const uniform = uniforms(20_231);
  const normal = () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
  const sections = Math.max(1, Math.round(rows / (BEDS_A_SECTION * SHELLS_A_BED)));
  const file = openSync(path, 'w');
  writeSync(file, 'section,bed,taxon,shell,level,A/I\n');
  for (let section = 0; section < sections; section++) {
    const zones = Array.from({ length: BEDS_A_SECTION }, () => Math.floor(uniform() * ZONES.length)).sort(
      (a, b) => b - a,
    );
    const lines = zones.flatMap((zone, bed) => {
      const mean = ZONES[zone] + 0.02 * normal();
      return Array.from({ length: SHELLS_A_BED }, (_, shell) => {
        const odd = uniform() < 0.01 ? 0.5 * Math.sign(normal()) : 0;
        const ratio = Math.exp(mean + odd + 0.05 * normal()).toFixed(4);
        return `S${section},B${bed},Inventa,${shell},${bed + 1},${ratio}\n`;
      });
    });
    writeSync(file, lines.join(''));
  }
  closeSync(file);
}

if (import.meta.url === pathToFileURL(process.argv[1]).href) makeSurvey(Number(process.argv[2]), process.argv[3]);
