import { describe, expect, it } from 'vitest';
import { conflictsOfItsOwn } from '../../src/superposition/conflicts-of-its-own.js';
import {
  bedsAbove,
  conflictThreshold,
  costOfShell,
  findShellConflicts,
  listConflicts,
} from '../../src/superposition/index.js';

describe('conflictThreshold', () => {
  it('shares alpha out over all pairs, one at least', () => {
    // R: qnorm(0.95), qnorm(1 - 0.05/20), qt(0.95, 10) (from memory of the tables: 1.645, 2.807, 1.812)
    expect(conflictThreshold(1)).toBeCloseTo(1.6448536, 6);
    expect(conflictThreshold(0)).toBe(conflictThreshold(1));
    expect(conflictThreshold(20)).toBeCloseTo(2.8070338, 6);
    expect(conflictThreshold(2, 0.1)).toBe(conflictThreshold(1));
    expect(conflictThreshold(1, 0.05, 10)).toBeCloseTo(1.8124611, 6);
    expect(conflictThreshold(4, 0.2, 10)).toBeCloseTo(1.8124611, 6);
  });

  it('refuses in words', () => {
    const alpha = 'conflictThreshold: alpha must lie between 0 and 1, got';
    expect(() => conflictThreshold(1, 0)).toThrow(new RangeError(`${alpha} 0`));
    expect(() => conflictThreshold(1, 1)).toThrow(new RangeError(`${alpha} 1`));
    expect(() => conflictThreshold(1, Number.NaN)).toThrow(new RangeError(`${alpha} NaN`));
    expect(() => conflictThreshold(1, 0.05, 0)).toThrow(new RangeError('conflictThreshold: df must be above 0, got 0'));
  });
});

// bed 0 lies below bed 1 in one section, and below bed 2 of another
const beds = [
  { section: 'A', above: [1, 2] },
  { section: 'A', above: [] },
  { section: 'B', above: [] },
];
const shells = [
  { bed: 0, x: -1 },
  { bed: 1, x: -0.4 },
  { bed: 1, x: -0.9 },
  { bed: 2, x: -0.4 },
  { bed: 0, x: -0.7 },
  { bed: 1, x: Number.NaN },
];

describe('findShellConflicts', () => {
  it('takes a difference of exactly the limit for none, also without scatter', () => {
    const exact = findShellConflicts(
      [
        { bed: 0, x: -1 },
        { bed: 1, x: -1 },
        { bed: 1, x: -0.99 },
      ],
      beds,
      { scatter: 0 },
    );
    expect(exact).toMatchObject({ pairs: 2, count: 1, asLower: [1, 0, 0], asUpper: [0, 0, 1] });
    expect(() => findShellConflicts(shells, beds, { scatter: -0.1 })).toThrow(
      new RangeError('findShellConflicts: scatter must not be negative, got -0.1'),
    );
  });

  it('counts the spread between sections only, and passes over unknown ratios', () => {
    // z for 6 pairs 2.394: 0.0677 z √2 within, and twice the variance between
    const found = findShellConflicts(shells, beds, { scatter: 0.08, spread: 0.14 });
    expect(found.pairs).toBe(6);
    expect(found.z).toBeCloseTo(conflictThreshold(6), 12);
    // within: 0.27, between: 0.55; −0.4 is 0.6 above −1 and 0.3 above −0.7
    expect(found.count).toBe(3);
    expect(found.asLower).toEqual([2, 0, 0, 0, 1, 0]);
    expect(found.asUpper).toEqual([0, 2, 0, 1, 0, 0]);
  });
});

describe('listConflicts', () => {
  const found = findShellConflicts(shells, beds, { scatter: 0.01 });
  const pairs = (most?: number) =>
    listConflicts(found, shells, most).map(({ lower, upper, shortfall }) => [
      lower,
      upper,
      Number(shortfall.toFixed(6)),
    ]);

  it('lists every pair, the widest first and equals in the order of the shells', () => {
    expect(pairs()).toEqual([
      [0, 1, 0.6],
      [0, 3, 0.6],
      [4, 1, 0.3],
      [4, 3, 0.3],
      [0, 2, 0.1],
    ]);
    expect(pairs(2)).toEqual(pairs().slice(0, 2));
    const twins = [
      { bed: 0, x: -1 },
      { bed: 0, x: -1 },
      { bed: 1, x: -0.5 },
    ];
    expect(listConflicts(findShellConflicts(twins, beds, { scatter: 0.01 }), twins).map(({ lower }) => lower)).toEqual([
      0, 1,
    ]);
  });
});

describe('conflictsOfItsOwn', () => {
  const s = 0.1;
  /** Bed 0 of four shells below bed 1 of four, the first shell of each in conflict with the other. */
  const alone = (given: {
    lowerOthers?: number | null;
    upperOthers?: number | null;
    lowerMean?: number;
    upperMean?: number;
  }) => {
    const { lowerOthers = -1, upperOthers = -1, lowerMean = -1, upperMean = -1 } = given;
    const placed = Array.from({ length: 8 }, (_, at) => ({ bed: at < 4 ? 0 : 1, x: at < 4 ? -1.5 : -0.5 }));
    const residual = (x: number, others: number | null) => ({
      residual: others === null ? null : x - others,
      t: 0,
      others: 3,
      p: 0,
      adjusted: 0,
      odd: false,
    });
    const own = placed.map(({ x }, at) => residual(x, at < 4 ? lowerOthers : upperOthers));
    const residuals = {
      of: (at: number) => own[at],
      shells: own,
      residual: Float64Array.from(own, (shell) => shell.residual ?? Number.NaN),
      others: Int32Array.from(own, (shell) => shell.others),
      p: () => 0,
      apart: () => true,
      odd: () => false,
      s,
      df: 20,
      means: [lowerMean, upperMean],
      tested: 8,
      robust: true,
    };
    const conflicts = {
      sorted: [
        [0, 1, 2, 3],
        [7, 6, 5, 4],
      ],
      conflicts: [{ lower: 0, bed: 1, from: 3 }],
      pairs: 16,
      count: 1,
      z: 3,
      asLower: [],
      asUpper: [],
    };
    return conflictsOfItsOwn(conflicts, placed, residuals).flatMap((one, at) => (one ? [at] : []));
  };
  // 95 % one-sided: 1.645 s √(1/3 + 1/4) for the mean of three others against a mean of four
  const limit = 1.645 * s * Math.sqrt(1 / 3 + 1 / 4);

  it('holds what is left of the bed of each against the bed of the other', () => {
    expect(alone({})).toEqual([0, 4]);
    expect(alone({ upperMean: -1 + limit + 1e-9 })).toEqual([4]);
    expect(alone({ upperMean: -1 + limit - 1e-9 })).toEqual([0, 4]);
    expect(alone({ lowerOthers: -1 - limit - 1e-9 })).toEqual([4]);
    expect(alone({ lowerOthers: -1 - limit + 1e-9 })).toEqual([0, 4]);
    expect(alone({ upperOthers: -1 + limit + 1e-9 })).toEqual([0]);
    expect(alone({ upperOthers: -1 + limit - 1e-9 })).toEqual([0, 4]);
    expect(alone({ lowerMean: -1 - limit - 1e-9 })).toEqual([0]);
    expect(alone({ upperMean: 0, lowerMean: -2 })).toEqual([]);
  });

  it('knows no reversal of beds where nothing is left of one', () => {
    expect(alone({ upperMean: 0, lowerMean: -2, lowerOthers: null })).toEqual([0]);
    expect(alone({ upperMean: 0, lowerMean: -2, upperOthers: null })).toEqual([4]);
    expect(alone({ upperMean: Number.NaN, lowerMean: -2 })).toEqual([0]);
    expect(alone({ upperMean: 0, lowerMean: Number.NaN })).toEqual([4]);
  });
});

describe('costOfShell and bedsAbove', () => {
  it('costs all from p = 0.2 on', () => {
    expect(costOfShell(0, false)).toBe(0.4);
    expect(costOfShell(0.2, false)).toBe(1);
    expect(costOfShell(0.1999, false)).toBeCloseTo(0.9997, 10);
    expect(costOfShell(null, true)).toBe(0.75);
  });

  it('lists beds by their number, however deposits are numbered', () => {
    const graph = { node: [3, 0, 2, 1, 0], nodes: 4, younger: [[], [0], [1], [2]], sequence: [3, 2, 1, 0] };
    expect(bedsAbove(graph)).toEqual([[1, 2, 3, 4], [], [1, 3, 4], [1, 4], []]);
  });
});
