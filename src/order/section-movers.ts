import type { Lists } from './flat-lists.js';
import type { OrderModel } from './gibbs-chain.js';

/** The deposits that move with a section, its beds that do not, and the neighbours elsewhere that bound the move. */
export interface Mover {
  readonly inside: Int32Array;
  readonly tied: readonly number[];
  readonly bounds: readonly {
    readonly deposit: number;
    readonly above: readonly number[];
    readonly below: readonly number[];
  }[];
}

/**
 * What moves with each section when it is moved as a whole, and what holds it: deposits of other sections, and beds of its
 * own that stay.
 *
 * @param members beds of each deposit
 * @param bedsOf beds of each section
 */
export function sectionMovers({ section, sections, graph }: OrderModel, members: Lists, bedsOf: Lists): Mover[] {
  return Array.from({ length: sections }, (_, own) => {
    const beds = [...bedsOf.items.subarray(bedsOf.start[own], bedsOf.start[own + 1])];
    // deposits of one section only move with it; those tied to another by `same` stay
    const inside = [...new Set(beds.map((bed) => graph.node[bed]))].filter((deposit) =>
      members.items.subarray(members.start[deposit], members.start[deposit + 1]).every((bed) => section[bed] === own),
    );
    const moving = new Set(inside);
    const bounds = inside.map((deposit) => ({
      deposit,
      above: graph.younger[deposit].filter((other) => !moving.has(other)),
      below: graph.older[deposit].filter((other) => !moving.has(other)),
    }));
    return {
      inside: Int32Array.from(inside),
      tied: beds.filter((bed) => !moving.has(graph.node[bed])),
      bounds: bounds.filter(({ above, below }) => above.length + below.length > 0),
    };
  });
}
