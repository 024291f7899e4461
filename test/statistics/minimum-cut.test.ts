import fc from 'fast-check';
import highsLoader from 'highs';
import { describe, expect, it } from 'vitest';
import { type Arcs, createRandom, maximumFlow, minimumCut } from '../../src/statistics/index.js';

function network(arcs: readonly (readonly [number, number, number])[]): Arcs {
  return Object.freeze({
    from: Object.freeze(arcs.map(([from]) => from)),
    to: Object.freeze(arcs.map(([, to]) => to)),
    capacity: Object.freeze(arcs.map(([, , capacity]) => capacity)),
  });
}

/** Value of the cut that has these nodes on the source side. */
const cost = ({ from, to, capacity }: Arcs, inside: ArrayLike<number>) => {
  let sum = 0;
  for (let e = 0; e < from.length; e++) if (inside[from[e]] && !inside[to[e]]) sum += capacity[e];
  return sum;
};

describe('minimumCut', () => {
  const nodes = 7;
  const node = fc.nat(nodes - 1);
  const whole = fc.array(fc.tuple(node, node, fc.nat(6)), { maxLength: 25 });

  it('is the least of all cuts, with the smallest and the largest side', () => {
    fc.assert(
      fc.property(whole, (list) => {
        const arcs = network(list);
        const found = minimumCut(nodes, arcs, 0, 1);
        let least = Infinity;
        let sides: number[][] = [];
        for (let bits = 0; bits < 2 ** (nodes - 2); bits++) {
          const inside = [1, 0, ...Array.from({ length: nodes - 2 }, (_, i) => (bits >> i) & 1)];
          const value = cost(arcs, inside);
          if (value < least) {
            least = value;
            sides = [];
          }
          if (value === least) sides.push(inside);
        }
        expect(found.value).toBe(least);
        const smallest = sides[0].map((_, v) => (sides.every((side) => side[v] === 1) ? 1 : 0));
        const largest = sides[0].map((_, v) => (sides.some((side) => side[v] === 1) ? 1 : 0));
        expect([...found.sourceSide]).toEqual(smallest);
        expect([...found.largestSourceSide]).toEqual(largest);
        expect(found.unique).toBe(sides.length === 1);
      }),
    );
  });

  it('works for real capacities: both sides are cuts of the flow’s value', () => {
    const realArcs = fc.array(fc.tuple(node, node, fc.double({ min: 0, max: 1, noNaN: true })), { maxLength: 30 });
    fc.assert(
      fc.property(realArcs, (list) => {
        const arcs = network(list);
        const found = minimumCut(nodes, arcs, 0, 1);
        expect(cost(arcs, found.sourceSide)).toBeCloseTo(found.value, 9);
        expect(cost(arcs, found.largestSourceSide)).toBeCloseTo(found.value, 9);
        found.sourceSide.forEach((inside, v) => {
          expect(inside).toBeLessThanOrEqual(found.largestSourceSide[v]);
        });
        const { flow, value } = maximumFlow(nodes, arcs, 0, 1);
        expect(value).toBe(found.value);
        const surplus = new Array<number>(nodes).fill(0);
        list.forEach(([from, to, capacity], e) => {
          expect(flow[e]).toBeGreaterThanOrEqual(-1e-12);
          expect(flow[e]).toBeLessThanOrEqual(capacity + 1e-12);
          surplus[from] -= flow[e];
          surplus[to] += flow[e];
        });
        expect(surplus[1]).toBeCloseTo(value, 9);
        for (const rest of surplus.slice(2)) expect(rest).toBeCloseTo(0, 9);
      }),
    );
  });

  it('agrees with an exact linear solver on larger networks', async () => {
    const highs = await (highsLoader as unknown as typeof highsLoader.default)();
    const random = createRandom(6);
    for (let round = 0; round < 8; round++) {
      const n = 30;
      const list = Array.from({ length: 150 }, () => {
        return [random.integer(n), random.integer(n), 1 + random.integer(9)] as const;
      }).filter(([from, to]) => from !== to);
      // the flow as a linear program: all that leaves node 0, kept at every other node but the last
      const term = (sign: string, e: number) => `${sign} f${e}`;
      const leaving = list.map(([from, to], e) => (from === 0 ? term('+', e) : to === 0 ? term('-', e) : ''));
      const balance = Array.from({ length: n - 2 }, (_, i) => {
        const at = list.map(([from, to], e) => (from === i + 1 ? term('+', e) : to === i + 1 ? term('-', e) : ''));
        return at.some((t) => t) ? `c${i}: ${at.filter((t) => t).join(' ')} = 0` : '';
      });
      const problem = [
        'Maximize',
        `obj: ${leaving.filter((t) => t).join(' ')}`,
        'Subject To',
        ...balance.filter((row) => row),
        'Bounds',
        ...list.map(([, , capacity], e) => `0 <= f${e} <= ${capacity}`),
        'End',
      ].join('\n');
      const solved = highs.solve(problem);
      expect(solved.Status).toBe('Optimal');
      expect(minimumCut(n, network(list), 0, n - 1).value).toBeCloseTo(solved.ObjectiveValue, 7);
    }
  });

  it('never cuts an arc without limit', () => {
    const cut = minimumCut(
      4,
      network([
        [0, 1, 2],
        [1, 2, Infinity],
        [2, 3, 5],
      ]),
      0,
      3,
    );
    expect(cut).toMatchObject({ value: 2, unique: true });
    expect([...cut.sourceSide]).toEqual([1, 0, 0, 0]);
    expect(() =>
      minimumCut(
        3,
        network([
          [0, 1, Infinity],
          [1, 2, Infinity],
        ]),
        0,
        2,
      ),
    ).toThrow(/without any limit/);
  });

  it('reports equal solutions', () => {
    const chain = minimumCut(
      3,
      network([
        [0, 1, 1],
        [1, 2, 1],
      ]),
      0,
      2,
    );
    expect(chain.unique).toBe(false);
    expect([...chain.sourceSide, ...chain.largestSourceSide]).toEqual([1, 0, 0, 1, 1, 0]);
    // thirds that do not sum exactly still tie
    const thirds = minimumCut(
      6,
      network([
        [0, 1, 0.1],
        [0, 2, 0.2],
        [1, 3, 1],
        [2, 3, 1],
        [3, 4, 0.3],
        [4, 5, 1],
      ]),
      0,
      5,
    );
    expect(thirds.unique).toBe(false);
  });

  it('does without arcs, and with loops and parallel arcs', () => {
    expect(minimumCut(2, network([]), 0, 1)).toMatchObject({ value: 0, unique: true });
    expect(
      minimumCut(
        2,
        network([
          [0, 0, 9],
          [0, 1, 1],
          [0, 1, 2],
          [1, 0, 7],
        ]),
        0,
        1,
      ).value,
    ).toBe(3);
  });

  it('refuses nodes and capacities out of range', () => {
    expect(() => minimumCut(2, network([[0, 2, 1]]), 0, 1)).toThrow(/arcs between its nodes, got 0, 2/);
    expect(() => minimumCut(2, network([[0, 1, -1]]), 0, 1)).toThrow(RangeError);
    expect(() => minimumCut(2, network([[0, 1, NaN]]), 0, 1)).toThrow(RangeError);
    expect(() => minimumCut(2, network([]), 1, 1)).toThrow(RangeError);
    expect(() => minimumCut(1, network([]), 0, 0)).toThrow(RangeError);
    expect(() => maximumFlow(2, { from: [0], to: [1], capacity: [] }, 0, 1)).toThrow(RangeError);
  });
});
