import { describe, expect, it } from 'vitest';
import { cases } from '../house/effort.js';
import type { CoastOptions } from '../simulation/coast.js';
import { type ReadShell, readCoast } from './read-coast.js';

const COAST: CoastOptions = {
  sections: 12,
  beds: 48,
  zones: 4,
  spacing: Math.log(1.3),
  shells: [6, 9],
  aminoAcids: [{ code: 'Asx' }, { code: 'Glx' }, { code: 'Ala' }, { code: 'Val' }],
  correlation: 0.4,
};
// of each kind 8 shells a coast or more: dozens to judge by
const RUNS = cases(6, 12);

/** Reads coasts of seeds that no other test or measurement uses. */
function readMany(
  options: Partial<CoastOptions>,
  runs = RUNS,
): { shells: ReadShell[]; cleanRuns: number; most: number } {
  const shells: ReadShell[] = [];
  let cleanRuns = 0;
  let most = 0;
  for (let run = 0; run < runs; run++) {
    const coast = readCoast({ ...COAST, ...options, seed: 7100 + run });
    shells.push(...coast.shells);
    most = Math.max(most, coast.passes);
    if (!coast.shells.some(({ kind, finding }) => kind === 'clean' && finding.status === 'set aside')) cleanRuns++;
  }
  return { shells, cleanRuns, most };
}

const share = (shells: readonly ReadShell[], holds: (shell: ReadShell) => boolean) =>
  shells.filter(holds).length / shells.length;

const RIGHT = {
  reworked: 'reworked from an older deposit',
  intruded: 'intruded from a younger deposit',
  contaminated: 'contaminated by younger amino acids',
  altered: 'altered',
  clean: 'none',
};

describe('odd shells on simulated coasts', () => {
  it.each([
    ['scatter 5 %', {}],
    ['scatter 7 %, shared errors, spread between beds', { scatter: 0.07, correlation: 0.6, spread: 0.03 }],
  ] as const)('are found and read: %s', (_, options) => {
    const { shells, most } = readMany({ ...options, odd: { reworked: 8, intruded: 8, contaminated: 8 } });
    const odd = shells.filter(({ kind }) => kind !== 'clean');
    const clean = shells.filter(({ kind }) => kind === 'clean');
    expect(share(odd, ({ finding }) => finding.status !== 'kept')).toBeGreaterThanOrEqual(0.93);
    expect(share(odd, ({ kind, finding }) => finding.reading === RIGHT[kind])).toBeGreaterThanOrEqual(0.85);
    expect(share(clean, ({ finding }) => finding.status === 'set aside')).toBeLessThanOrEqual(0.01);
    expect(most).toBeLessThanOrEqual(5);
    for (const { finding } of odd) {
      if (finding.reading === 'none') continue;
      expect(finding.confidence).not.toBeNull();
      expect(finding.sentences.length).toBeGreaterThan(1);
    }
  });

  it('are none on clean coasts', () => {
    const runs = cases(20, 60);
    const { shells, cleanRuns } = readMany({}, runs);
    expect(cleanRuns / runs).toBeGreaterThanOrEqual(0.95);
    expect(share(shells, ({ finding }) => finding.status === 'kept')).toBeGreaterThan(0.98);
  });

  it('altered ones are not called reworked', () => {
    const { shells } = readMany({ odd: { altered: 12 } });
    const altered = shells.filter(({ kind }) => kind === 'altered');
    expect(share(altered, ({ finding }) => !finding.reading.startsWith('reworked from'))).toBeGreaterThanOrEqual(0.8);
    expect(share(altered, ({ finding }) => finding.status !== 'kept')).toBeGreaterThanOrEqual(0.93);
  });

  it('with one amino acid leave reworking and alteration open, and say so', () => {
    const { shells } = readMany({ aminoAcids: [{ code: 'Ile' }], odd: { reworked: 8, intruded: 8 } });
    const found = shells.filter(({ kind, finding }) => kind !== 'clean' && finding.status !== 'kept');
    expect(found.length).toBeGreaterThan(8 * RUNS);
    for (const { kind, finding } of found) {
      const [reading, words] =
        kind === 'reworked'
          ? ['reworked or altered', 'reworking and alteration']
          : ['intruded or contaminated', 'intrusion and contamination'];
      expect(finding.reading).toBe(reading);
      expect(finding.sentences.join(' ')).toContain(`With one amino acid measured, ${words} can't be told apart.`);
      expect(finding.confidence).not.toBe('high');
    }
  });

  it('beds logged upside down do not cost sound shells', () => {
    const runs = cases(16, 40);
    const { cleanRuns } = readMany({ upsideDown: 4 }, runs);
    expect(cleanRuns / runs).toBeGreaterThanOrEqual(0.9);
  });
});
