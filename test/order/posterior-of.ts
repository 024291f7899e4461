import type { ClockBed } from '../../src/model/index.js';
import type { OrderPosterior } from '../../src/order/index.js';

export const bed = (section: string, name: string): ClockBed => ({
  key: `${section}/${name}`,
  section,
  bed: name,
  shells: [],
  n: 5,
  mean: -1,
  se: 0.1,
  gradient: 0,
});

/** A posterior from the ranks of each bed, draw by draw. */
export function posteriorOf(ranks: readonly (readonly number[])[]): OrderPosterior {
  return {
    beds: ranks.length,
    draws: ranks[0].length,
    ranks: Uint32Array.from(ranks.flat()),
    chains: 1,
    essMin: 400,
    rhatMax: 1,
    converged: true,
  };
}
