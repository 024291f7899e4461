import { expect, it } from 'vitest';
import { cases } from '../house/effort.js';
import { tryMany } from './try-many.js';

/*
 * A bounded number of tries, always the same ones. FUZZ_FIRST and FUZZ_COUNT try others: thousands by hand after a change of
 * the readers or the engine; what breaks is cut down and kept in kept/.
 */

const first = Number(process.env.FUZZ_FIRST ?? 1);
const count = Number(process.env.FUZZ_COUNT ?? cases(24, 300));

it(`tries ${first} to ${first + count - 1}: a result or a message, in time, within memory`, {
  timeout: 10_000 * count,
}, async () => {
  const { breaks, done, refused, slowest } = await tryMany(first, count);
  const told = breaks.map(({ number, changes, why }) => `${number}: ${changes.join(' | ')}\n${why}`).join('\n\n');
  expect(told, `slowest ${slowest.number}`).toBe('');
  // both roads are taken
  expect(done).toBeGreaterThan(count / 10);
  expect(refused).toBeGreaterThan(count / 10);
});
