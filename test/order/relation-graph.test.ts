import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { RelationRecord } from '../../src/model/index.js';
import { relationGraph } from '../../src/order/index.js';

const relation = (lower: string, upper: string, kind: 'older' | 'same' = 'older'): RelationRecord => ({
  lower,
  upper,
  basis: 'superposition',
  kind,
  certainty: 'certain',
  row: null,
});

/** Every pair (older, younger) that arrows imply, by plain search. */
function closure(nodes: number, younger: readonly (readonly number[])[]): Set<string> {
  const pairs = new Set<string>();
  for (let from = 0; from < nodes; from++) {
    const waiting = [...younger[from]];
    while (waiting.length > 0) {
      const to = waiting.pop()!;
      if (pairs.has(`${from}>${to}`)) continue;
      pairs.add(`${from}>${to}`);
      waiting.push(...younger[to]);
    }
  }
  return pairs;
}

describe('relationGraph', () => {
  it('drops what other relations imply, and nothing else', () => {
    const arrows = fc.uniqueArray(fc.tuple(fc.nat(8), fc.nat(8)), { selector: ([a, b]) => `${a},${b}`, maxLength: 30 });
    fc.assert(
      fc.property(arrows, (pairs) => {
        const beds = Array.from({ length: 9 }, (_, at) => `S/${at}`);
        const forward = pairs.filter(([a, b]) => a < b);
        const graph = relationGraph(
          beds,
          forward.map(([a, b]) => relation(`S/${a}`, `S/${b}`)),
        );
        const given: number[][] = beds.map((_, at) => forward.filter(([a]) => a === at).map(([, b]) => b));
        const byBed = graph.younger.map(() => [] as number[]);
        graph.younger.forEach((targets, from) => {
          byBed[graph.node.indexOf(from)] = targets.map((to) => graph.node.indexOf(to));
        });
        expect(closure(9, byBed)).toEqual(closure(9, given));
        // minimal: taking any arrow away loses a pair
        byBed.forEach((targets, from) => {
          for (const to of targets) {
            const fewer = byBed.map((list, at) => (at === from ? list.filter((other) => other !== to) : list));
            expect(closure(9, fewer).has(`${from}>${to}`)).toBe(false);
          }
        });
        const position = new Map(graph.sequence.map((node, at) => [node, at]));
        graph.younger.forEach((targets, from) => {
          for (const to of targets) expect(position.get(from)!).toBeLessThan(position.get(to)!);
        });
      }),
      { numRuns: 200 },
    );
  });

  it('merges beds of one age and follows relations through beds without a ratio', () => {
    const graph = relationGraph(
      ['A/1', 'A/2', 'B/1'],
      [relation('A/1', 'A/x'), relation('A/x', 'A/2'), relation('A/2', 'B/1', 'same')],
    );
    expect(graph.nodes).toBe(2);
    expect(graph.node[1]).toBe(graph.node[2]);
    expect(graph.younger[graph.node[0]]).toEqual([graph.node[1]]);
    expect(graph.older[graph.node[2]]).toEqual([graph.node[0]]);
  });

  it('refuses circles, also through beds of one age', () => {
    expect(() => relationGraph(['A/1', 'A/2'], [relation('A/1', 'A/2'), relation('A/2', 'A/1')])).toThrow(/circle/);
    expect(() => relationGraph(['A/1', 'A/2'], [relation('A/1', 'A/2'), relation('A/1', 'A/2', 'same')])).toThrow(
      /contradict/,
    );
  });

  it('takes a chain of 5,000 beds in its stride', () => {
    const beds = Array.from({ length: 5000 }, (_, at) => `S/${at}`);
    const graph = relationGraph(
      beds,
      beds.slice(1).map((upper, at) => relation(beds[at], upper)),
    );
    expect(graph.sequence.map((node) => graph.node.indexOf(node)).slice(0, 3)).toEqual([0, 1, 2]);
  });

  it('names what contradicts', () => {
    expect(() => relationGraph(['A/1', 'A/2'], [relation('A/1', 'A/2', 'same'), relation('A/1', 'A/2')])).toThrow(
      new Error('relations contradict: A/1 is both as old as A/2 and older than it'),
    );
    expect(() => relationGraph(['A/1', 'A/2'], [relation('A/1', 'A/2'), relation('A/2', 'A/1')])).toThrow(
      new Error('relations run in a circle; bedorder check prints it'),
    );
  });

  it('goes through beds without a ratio, one after the other, and leaves out those that lead nowhere', () => {
    const graph = relationGraph(
      ['a', 'b', 'c', 'd'],
      [
        relation('a', 'x'),
        relation('x', 'y'),
        relation('y', 'd'),
        relation('y', 'c'),
        relation('b', 'y'),
        relation('x', 'end'),
        relation('start', 'b'),
        relation('b', 'end'),
      ],
    );
    expect(graph).toEqual({
      node: [0, 1, 2, 3],
      nodes: 4,
      younger: [[2, 3], [2, 3], [], []],
      older: [[], [], [0, 1], [0, 1]],
      sequence: [0, 1, 2, 3],
    });
  });

  it('merges beds of one age in any order they are told, also through beds without a ratio', () => {
    const graph = relationGraph(
      ['a', 'b', 'c', 'd', 'e'],
      [
        relation('d', 'x', 'same'),
        relation('b', 'x', 'same'),
        relation('e', 'c', 'same'),
        relation('c', 'b', 'same'),
        relation('a', 'x'),
      ],
    );
    expect(graph).toEqual({ node: [0, 1, 1, 1, 1], nodes: 2, younger: [[1], []], older: [[], [0]], sequence: [0, 1] });
  });

  it('puts deposits in one order whatever the order of the relations, and keeps the shortest steps', () => {
    const list = [
      relation('c', 'a'),
      relation('a', 'e'),
      relation('c', 'e'),
      relation('c', 'b'),
      relation('b', 'e'),
      relation('d', 'e'),
    ];
    const beds = ['a', 'b', 'c', 'd', 'e'];
    const graph = relationGraph(beds, list);
    expect(graph).toEqual({
      node: [0, 1, 2, 3, 4],
      nodes: 5,
      younger: [[4], [4], [0, 1], [4], []],
      older: [[2], [2], [], [], [0, 1, 3]],
      sequence: [2, 3, 0, 1, 4],
    });
    expect(relationGraph(beds, [...list].reverse())).toEqual(graph);
  });
});
