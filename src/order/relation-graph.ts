import type { RelationRecord } from '../model/index.js';

/** Beds joined by `same` relations into deposits, and the `older` relations between them without the implied ones. */
export interface RelationGraph {
  /** Deposit of each bed, by the bed's index. */
  readonly node: readonly number[];
  /** Number of deposits. */
  readonly nodes: number;
  /** Deposits directly younger than each deposit. */
  readonly younger: readonly (readonly number[])[];
  /** Deposits directly older than each deposit. */
  readonly older: readonly (readonly number[])[];
  /** Deposits from the oldest on, every deposit after all that are older than it. */
  readonly sequence: readonly number[];
}

/**
 * The graph of relations that bound the order: `same` relations merge beds into one deposit, `older` ones become arrows,
 * and arrows that follow from others are dropped (transitive reduction, Aho, Garey and Ullman 1972, doi:10.1137/0201008).
 * @param beds keys `section/bed`
 * @param relations relations that are kept; those that name a bed not in `beds` are followed through it
 * @throws Error when the relations run in a circle
 */
export function relationGraph(beds: readonly string[], relations: readonly RelationRecord[]): RelationGraph {
  const index = new Map(beds.map((key, at) => [key, at]));
  // beds outside the clock still pass relations on: a > b > c holds for a and c when b has no ratio
  for (const { lower, upper } of relations) {
    for (const key of [lower, upper]) if (!index.has(key)) index.set(key, index.size);
  }
  const parent = Array.from({ length: index.size }, (_, at) => at);
  const find = (at: number): number => {
    let root = at;
    while (parent[root] !== root) root = parent[root];
    parent[at] = root;
    return root;
  };
  for (const { kind, lower, upper } of relations) {
    if (kind === 'same') parent[find(index.get(upper)!)] = find(index.get(lower)!);
  }
  const arrows = new Map<number, Set<number>>();
  for (const { kind, lower, upper } of relations) {
    if (kind === 'same') continue;
    const [from, to] = [find(index.get(lower)!), find(index.get(upper)!)];
    if (from === to) throw new Error(`relations contradict: ${lower} is both as old as ${upper} and older than it`);
    const targets = arrows.get(from);
    if (targets === undefined) arrows.set(from, new Set([to]));
    else targets.add(to);
  }
  const known = new Set(beds.map((_, at) => find(at)));
  passThroughUnknown(arrows, known);
  const numbers = new Map([...known].map((root, at) => [root, at]));
  const younger: number[][] = Array.from({ length: known.size }, () => []);
  for (const [from, targets] of arrows) {
    if (known.has(from)) younger[numbers.get(from)!] = [...targets].map((to) => numbers.get(to)!).sort((a, b) => a - b);
  }
  const sequence = sortTopologically(younger);
  const reduced = reduce(younger, sequence);
  const older: number[][] = younger.map(() => []);
  reduced.forEach((targets, from) => {
    for (const to of targets) older[to].push(from);
  });
  return { node: beds.map((_, at) => numbers.get(find(at))!), nodes: known.size, younger: reduced, older, sequence };
}

/** Takes out every deposit that is not known, tying those older than it to those younger. */
function passThroughUnknown(arrows: Map<number, Set<number>>, known: ReadonlySet<number>): void {
  for (const [middle, targets] of [...arrows]) {
    if (known.has(middle)) continue;
    arrows.delete(middle);
    for (const sources of arrows.values()) {
      if (!sources.delete(middle)) continue;
      for (const target of targets) sources.add(target);
    }
  }
  for (const targets of arrows.values()) {
    for (const target of targets) if (!known.has(target)) targets.delete(target);
  }
}

function sortTopologically(younger: readonly (readonly number[])[]): number[] {
  const waiting = new Array<number>(younger.length).fill(0);
  for (const targets of younger) for (const to of targets) waiting[to]++;
  const sequence = waiting.flatMap((count, node) => (count === 0 ? [node] : []));
  for (let at = 0; at < sequence.length; at++) {
    for (const to of younger[sequence[at]]) if (--waiting[to] === 0) sequence.push(to);
  }
  if (sequence.length < younger.length) {
    throw new Error('relations run in a circle; bedorder check prints it');
  }
  return sequence;
}

/** Drops arrows to deposits that another arrow's target already reaches. */
function reduce(younger: readonly (readonly number[])[], sequence: readonly number[]): number[][] {
  const position = new Array<number>(younger.length);
  sequence.forEach((node, at) => {
    position[node] = at;
  });
  return younger.map((targets) => {
    if (targets.length < 2) return [...targets];
    const furthest = Math.max(...targets.map((to) => position[to]));
    const direct = new Set(targets);
    const seen = new Set<number>();
    for (const target of targets) {
      const stack = [...younger[target]];
      while (stack.length > 0) {
        const node = stack.pop()!;
        if (seen.has(node) || position[node] > furthest) continue;
        seen.add(node);
        direct.delete(node);
        stack.push(...younger[node]);
      }
    }
    return [...direct];
  });
}
