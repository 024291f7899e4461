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
});
