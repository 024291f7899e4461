import { describe, expect, it } from 'vitest';
import { aminoAcidVotes } from '../../src/zones/index.js';
import { shellsOf, voting } from './voting-shells.js';

const CODES = ['Ile', 'Val', 'Glx'] as const;

describe('aminoAcidVotes', () => {
  it('stays rare where beds are of one age: under 5 % of coasts show a pair', () => {
    const same = Object.fromEntries(
      Array.from({ length: 10 }, (_, at) => [`B${at}`, { Ile: -2, Val: -2.2, Glx: -1.9 }]),
    );
    let coasts = 0;
    for (let seed = 1; seed <= 100; seed++) {
      const found = aminoAcidVotes(voting(shellsOf(same, seed), CODES), { clock: 'index', alpha: 0.05 });
      if (found.length > 0) coasts++;
    }
    expect(coasts).toBeLessThanOrEqual(5);
  });
});
