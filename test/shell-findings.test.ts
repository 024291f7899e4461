import { expect, it } from 'vitest';
import type { Shell } from '../src/model/index.js';
import type { Settled } from '../src/passes.js';
import { MOST_SHELLS_SPOKEN_OF, shellEvidence } from '../src/shell-findings.js';

/** Shells of one bed, each with a sentence; the first set aside, the second read as reworked, the third marked. */
function spokenOf(count: number): string[] {
  const shells = Array.from({ length: count }, (_, at) => ({ section: 'Cove', bed: 'low', shell: `${at}` }));
  const settled = {
    last: { data: { clock: { name: 'Mya THAA Ile' }, shells: shells.map((_, shell) => ({ shell })) } },
    readings: {
      shells: shells.map((_, at) => ({
        status: at === 0 ? 'set aside' : 'kept',
        reading: at === 1 ? 'reworked' : 'none',
        sentences: at === 5 ? [] : ['One.'],
      })),
    },
    marks: shells.map((_, at) => (at === 2 ? [{ mark: 'low yield' }] : [])),
  };
  const evidence = shellEvidence(settled as unknown as Settled, shells as unknown as Shell[]);
  expect(new Set(evidence.map(({ clock, about }) => `${clock} ${about}`))).toEqual(new Set(['Mya THAA Ile shell']));
  return evidence.map(({ name }) => name);
}

it('speaks of every shell that has a sentence, up to 20,000 shells', () => {
  expect(spokenOf(7)).toEqual([0, 1, 2, 3, 4, 6].map((at) => `Cove/low/${at}`));
  expect(spokenOf(MOST_SHELLS_SPOKEN_OF)).toHaveLength(MOST_SHELLS_SPOKEN_OF - 1);
});

it('leaves out kept shells that are cleared above that, and no others', () => {
  expect(spokenOf(MOST_SHELLS_SPOKEN_OF + 1)).toEqual(['Cove/low/0', 'Cove/low/1', 'Cove/low/2']);
});
