import { describe, expect, it } from 'vitest';
import type { ScreeningMark } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';
import { MOST_SHELLS_SPOKEN_OF, type ReadingInput, readShells } from '../../src/superposition/index.js';
import { type OddShell, smallCoast } from './small-coast.js';

const MARKS = ['high serine', 'low yield', 'discordant ratios', 'rate order'] as const;
const READINGS = new Map([
  ['none', '.'],
  ['reworked from an older deposit', 'r'],
  ['reworked or altered', 'o'],
  ['altered', 'a'],
  ['intruded from a younger deposit', 'i'],
  ['intruded or contaminated', 'u'],
  ['contaminated by younger amino acids', 'c'],
]);

/** A coast of odd shells at random, some beds against superposition, and now and then no zones or a known scatter. */
function drawCoast(seed: number): ReadingInput {
  const random = createRandom(seed);
  const off = () => 0.7 * (random.uniform() - 0.5);
  const odd = Array.from({ length: 4 + random.integer(8) }, (): OddShell => {
    const name = MARKS[random.integer(12)];
    const marks = name === undefined ? [] : [{ shell: 0, mark: name, evidence: name } as unknown as ScreeningMark];
    return { bed: random.integer(5), off: off(), val: random.integer(3) === 0 ? off() : 0, marks };
  });
  const plain = smallCoast(odd);
  // B/1 lies above, below or beside section A, and now and then A/3 is moved as a whole
  const above = [
    plain.above,
    [[1, 2, 3, 4], [2, 3, 4], [3, 4], [4], []],
    [[1, 2, 3], [2, 3], [3], [], [0, 1, 2, 3]],
    [[1, 2, 3, 4], [2, 3], [3], [], []],
  ][random.integer(4)];
  const moved = random.integer(3) === 0 ? 0.25 * (random.integer(5) - 2) : 0;
  // beds from which many shells were lost tell little
  const lost = random.integer(3) === 0 ? random.integer(4) : -1;
  const shells = plain.data.shells.map((shell, at) => {
    if (shell.bed === lost && at % 6 > 1) return { ...shell, x: Number.NaN };
    return shell.bed === 2 ? { ...shell, x: shell.x + moved } : shell;
  });
  return {
    ...plain,
    above,
    data: { ...plain.data, shells, scatter: { s: 0.03, df: 20, assumed: random.integer(2) === 0 } },
    zones: random.integer(4) === 0 ? [] : plain.zones,
    spread: random.integer(2) === 0 ? 0.05 : undefined,
    alpha: random.integer(4) === 0 ? 0.2 : undefined,
  };
}

/** A letter for reading, status and confidence of each shell against which something speaks, by its number. */
function told(input: ReadingInput): string {
  return readShells(input)
    .shells.flatMap(({ reading, status, confidence }, at) =>
      status === 'kept' && reading === 'none'
        ? []
        : [`${at}${READINGS.get(reading)}${status[0]}${confidence === null ? '-' : confidence[0]}`],
    )
    .join(' ');
}

// How often such readings are right is judged by the simulations. These were computed once they had passed, and say that
// the same shells are still read in the same way.
describe('readShells on many small coasts', () => {
  it.each([
    [1, '25.d- 26.d- 27asl 28.d- 29csl 30csl'],
    [2, '26ash 28rsh 29rsh 30.d- 31asm 32rsh'],
    [3, '25rsh 26rsh 27ism 30csm 31ash'],
    [4, '25csh 26rsh 27csm 28cdl 29ish'],
    [5, '30.d- 31.d- 34idm'],
    [6, '24ish 28csh 29ish 31ash 32.d-'],
    [7, '24ish 25osl 26rsh 27idm 28asl 29.d- 30adl 31ash'],
    [8, '25.d- 26ash 27csh 28csm'],
    [9, '25csm 27.d- 29csm 30osm 32.d-'],
    [10, '24idm 25ish 26csh 27.d- 29adm'],
    [11, '26cdl 27rsm 28.d- 29csm 31.d- 33.d-'],
    [12, '24ism 25rsm 26rsh 27csh 28asm'],
    [13, '27csm 28.d- 30.d- 31.d- 33idm'],
    [14, '25asm 26asm 27idl 28ism 30.d- 31csl 32rsh'],
    [15, '25rsh 26ish 27ish 28.d- 29ish 30.d- 31ish 32rsh 34ism 35csm'],
    [16, '25rsh 26.d- 30asl 31.d-'],
    [17, '28.d- 29.d-'],
    [18, '25asl 26csm 27.d- 28adm 29ash'],
    [19, '25osm 26.d-'],
    [20, '26osl 28csh 29csl 30ash'],
    [21, '27adl 30.d- 33.d-'],
    [22, '25ish 26.d- 27.d- 28ism'],
    [23, '25rsh 26rsh 29ash 30csm 31.d- 33ish'],
    [24, '25.d- 26rsh 28ash 29rsh 30ish 32.d- 35osm'],
    [25, '26.d- 30.d- 34.d-'],
    [26, '27.d- 28.d- 29rsh 30csh 31rsh 32csh'],
    [27, '24rdl 25asm 26.d- 27idl 28ash 30ash 31csm 32csm 34ash'],
    [28, '25.d- 26rsh 27csl 29csm 30ash'],
    [29, '24rdl 25.d- 26usm 28idm'],
    [30, '25rsh 26rsh 27csh 28csm'],
  ])('reads coast %d as it did: %s', (seed, wanted) => {
    expect(told(drawCoast(seed))).toBe(wanted);
  });

  it('says of every shell in a conflict what would end it', () => {
    const SAID = [
      /^Every least costly set/,
      /^Some, but not all/,
      /^No least costly set/,
      /^Its bed as a whole contradicts/,
    ];
    for (let seed = 1; seed <= 60; seed++) {
      const input = drawCoast(seed);
      const { shells, conflicts, toSetAside } = readShells(input);
      shells.forEach(({ sentences, status }, at) => {
        const inConflict = conflicts.asLower[at] + conflicts.asUpper[at] > 0;
        const said = SAID.map((pattern) => sentences.some((sentence) => pattern.test(sentence)));
        expect(said.filter(Boolean)).toHaveLength(inConflict ? 1 : 0);
        const [all, some, none] = [toSetAside.inAll.includes(at), toSetAside.inSome.includes(at), said[2]];
        if (inConflict) expect(none).toBe(!all && !some);
        if (said[0]) expect(all).toBe(true);
        if (said[1]) expect(some).toBe(true);
        if (status === 'doubtful' || status === 'set aside') expect(sentences.length).toBeGreaterThan(0);
      });
    }
  });
});

describe('readShells of very many shells', () => {
  /** The same coast in a survey of so many shells: those that are added are of a bed beside it, and nothing was measured on them. */
  const among = (input: ReadingInput, count: number): ReadingInput => {
    const { shells } = input.data;
    const blank = Array.from({ length: count - shells.length }, (_, at) => shells.length + at);
    return {
      ...input,
      data: {
        ...input.data,
        shells: [...shells, ...blank.map((shell) => ({ shell, bed: 5, x: Number.NaN, setAside: false }))],
        beds: [...input.data.beds, { ...input.data.beds[4], key: 'C/1', section: 'C', bed: '1' }],
      },
      logs: [...input.logs, ...blank.map(() => [Number.NaN, Number.NaN, Number.NaN])],
      marks: [...input.marks, ...blank.map(() => [])],
      above: [...input.above, []],
    };
  };

  it('speaks up to 20,000 of all that stand in a conflict, above that of those that are not cleared', () => {
    let cleared = 0;
    for (const seed of [1, 3, 9, 11, 27]) {
      const input = drawCoast(seed);
      const count = input.data.shells.length;
      const few = readShells(input).shells;
      expect(readShells(among(input, MOST_SHELLS_SPOKEN_OF)).shells.slice(0, count)).toEqual(few);
      const many = readShells(among(input, MOST_SHELLS_SPOKEN_OF + 1)).shells;
      few.forEach((shell, at) => {
        const isCleared = shell.status === 'kept' && shell.reading === 'none' && input.marks[at].length === 0;
        if (isCleared && shell.sentences.length > 0) cleared++;
        expect(many[at]).toEqual(isCleared ? { ...shell, sentences: [] } : shell);
      });
    }
    expect(cleared).toBeGreaterThan(5);
  });
});
