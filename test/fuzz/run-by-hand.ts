import { tryMany } from './try-many.js';

/*
 * Thousands of tries by hand: npx esbuild test/fuzz/run-by-hand.ts --bundle --platform=node --format=esm --packages=external \
 *   --outfile=node_modules/.cache/fuzz.mjs && node node_modules/.cache/fuzz.mjs FIRST COUNT
 */

const [first, count] = process.argv.slice(2).map(Number);
const tally = await tryMany(first, count);
for (const { number, changes, why } of tally.breaks) {
  console.log(`${number}: ${changes.join(' | ')}\n  ${why.split('\n').slice(0, 6).join('\n  ')}`);
}
const { number, ms } = tally.slowest;
console.log(
  `${tally.done} done, ${tally.refused} refused, ${tally.breaks.length} broke; slowest ${number}: ${Math.round(ms)} ms`,
);
