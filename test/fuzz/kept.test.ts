import { expect, it } from 'vitest';
import { KEPT } from './kept/index.js';
import { outcomeOf } from './outcome.js';
import { PATIENCE } from './try-many.js';

it.each(KEPT)('$name', async ({ files, refused }) => {
  const start = process.cpuUsage();
  const outcome = await outcomeOf(files);
  expect(outcome.kind).toBe(refused ? 'refused' : 'done');
  if (outcome.kind === 'refused') expect(outcome.messages.join('\n')).toMatch(refused!);
  const { user, system } = process.cpuUsage(start);
  expect((user + system) / 1000).toBeLessThan(PATIENCE);
});
