import { describe, expect, it } from 'vitest';
import { findName } from '../../src/commands/explain/find-name.js';
import { explanation } from '../../src/commands/explain/index.js';
import { PLAIN } from '../../src/commands/terminal.js';
import { FINDINGS } from '../output/fixture.js';

const cliff = 'Low cliff, "north"';
const told = (...names: string[]) => explanation(FINDINGS, names, PLAIN).replace(/\n {4}/g, ' ');

describe('names', () => {
  it.each<[string[], object]>([
    [[`${cliff}/A`], { kind: 'bed', bed: `${cliff}/A` }],
    [[`LOW CLIFF, "NORTH" / a`], { kind: 'bed', bed: `${cliff}/A` }],
    [['A'], { kind: 'bed', bed: `${cliff}/A` }],
    [[`${cliff}/A/3`], { kind: 'shell', shell: `${cliff}/A/3` }],
    [['3'], { kind: 'shell', shell: `${cliff}/A/3` }],
    [['Low', 'cliff,', '"north"/A'], { kind: 'bed', bed: `${cliff}/A` }],
    [[`${cliff}/A > zone/@1+1`], { kind: 'relation', a: `${cliff}/A`, b: 'zone/@1+1' }],
    [[`${cliff}/A<zone/@1+1`], { kind: 'relation', a: 'zone/@1+1', b: `${cliff}/A` }],
    [[`${cliff}/A`, 'zone/@1+1'], { kind: 'relation', a: `${cliff}/A`, b: 'zone/@1+1' }],
    [['A', '<', '=B'], { kind: 'relation', a: `${cliff}/=B`, b: `${cliff}/A` }],
  ])('%j', (names, expected) => {
    expect(findName(FINDINGS, names)).toEqual(expected);
  });

  it.each<[string[], RegExp]>([
    [[`Low clif, "north"/A`], /Did you mean Low cliff, "north"\/A/],
    [[`${cliff}/A/33`], /Did you mean Low cliff, "north"\/A\/3/],
    [[cliff], /may mean several.*\/A.*\/=B/s],
    [['Nowhere at all/Q'], /know no Nowhere at all\/Q\. Beds are named section\/bed/],
    [['A', 'A'], /named twice/],
    [['A > A > A'], /know no/],
  ])('%j is answered with what may be meant', (names, message) => {
    expect(() => findName(FINDINGS, names)).toThrow(message);
  });

  it('lists the choices of a name that several beds have', () => {
    const beds = [...FINDINGS.sites, { ...FINDINGS.sites[0], section: 'zone' }];
    expect(() => findName({ ...FINDINGS, sites: beds }, ['A'])).toThrow(/may mean several.*north.*zone\/A/s);
  });
});

describe('what is told', () => {
  it('of a bed: the lines of the plan that ask for its shells, or to date it', () => {
    expect(told('A')).toContain('In the plan\n  =3 more shells; which of two is older');
    expect(told('=B')).toContain('To date\n  one date brackets none');
    expect(told('=B')).not.toContain('In the plan');
  });

  it('last, that errors rest on a scatter that was assumed', () => {
    const beds = FINDINGS.beds.map((bed) => ({ ...bed, marks: ['assumed scatter' as const] }));
    const text = explanation({ ...FINDINGS, beds }, ['A/3'], PLAIN).replace(/\s+/g, ' ');
    expect(text).toContain('On Mya THAA Ile a scatter of 0.0612345678 between shells of one bed is assumed');
    expect(told('A/3')).not.toContain('is assumed');
  });

  it('of a bed: values, zone, rank, marks, relations, shells, and what would change', () => {
    const text = told('A');
    for (const words of [
      'at level 1 of its section',
      'Mean D/L 0.200 (standard error 0.0070)',
      '2 shells, and 1 shell set aside',
      'Zone Z1, with probability 0.98. Second best is Z2, with 0.02',
      'Rank 3 of 3 from the oldest (95 % interval 2 to 3)',
      'zone/@1+1 is older than Low cliff, "north"/A with probability 0.53, which is not resolved',
      'Shallow burial: covered by less than the limit',
      '(superposition): reversed',
      '3: D/L 0.420, set aside (high serine; rate order; reworked or altered)',
      'Ile says zone/@1+1 (0.53), Val says Low cliff, "north"/A (0.70)',
      'A mean D/L beyond 0.283 would bring it nearer to Z2',
    ]) {
      expect(text).toContain(words);
    }
  });

  it('of a bed that straddles, what it straddles, and how many shells would tell it from the next', () => {
    const text = told('@1+1');
    expect(text).toContain('It straddles the two');
    const unplanned = explanation({ ...FINDINGS, plan: [] }, ['@1+1'], PLAIN).replace(/\n {4}/g, ' ');
    expect(unplanned).toMatch(/To tell it from the next bed, Low cliff, "north"\/A/);
  });

  it('of a shell: its ratios, residual, reading with confidence, evidence, conflicts, and what would settle it', () => {
    const text = told('3');
    for (const words of [
      'D/L Ile 0.420, Val 0.300',
      'laboratory number INV-1 and =INV-2',
      'It lies 0.74 in log ratio above the other kept shells of its bed, 12 times the scatter',
      'By itself it would belong to Z2, with probability 0.999, while its bed belongs to Z1',
      'Status: set aside',
      'Reading: reworked or altered, with moderate confidence',
      'p 0.0003 after Holm',
      'A second amino acid would tell the two apart',
    ]) {
      expect(text).toContain(words);
    }
    expect(told(`${cliff}/A/1`)).toContain(
      'It lies below Low cliff, "north"/=B/1, but its ratio is the smaller, by 0.69',
    );
  });

  it('of a relation: what the field says, the test, the verdicts, the reading, and what would turn it', () => {
    const text = told(`${cliff}/A > ${cliff}/=B`);
    for (const words of [
      'The field says that Low cliff, "north"/A is older than Low cliff, "north"/=B: superposition',
      'is 0.71 lower than that',
      'Verdict on all shells: reversed',
      'logged upside down',
      'would count as tied if',
    ]) {
      expect(text).toContain(words);
    }
  });

  it('of two beds without a relation, what the order says', () => {
    const text = told('A', '@1+1');
    expect(text).toContain('No field relation ties');
    expect(text).toContain('zone/@1+1 is the older of the two with probability 0.53');
  });

  it('fits in 80 columns', () => {
    for (const names of [['A'], ['3'], [`${cliff}/A > ${cliff}/=B`]]) {
      for (const line of explanation(FINDINGS, names, PLAIN).split('\n')) expect(line.length).toBeLessThanOrEqual(80);
    }
  });
});
