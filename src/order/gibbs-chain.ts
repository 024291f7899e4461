import { type Random, sampleTruncatedNormal } from '../statistics/index.js';
import { depositMeans } from './deposit-means.js';
import { flatLists, groupLists } from './flat-lists.js';
import type { RelationGraph } from './relation-graph.js';
import { sectionMovers } from './section-movers.js';

/** Bed means and what bounds them; arrays have one entry a bed. */
export interface OrderModel {
  readonly means: readonly number[];
  readonly se: readonly number[];
  /** Number of each bed's section, 0 … sections − 1. */
  readonly section: readonly number[];
  readonly sections: number;
  readonly graph: RelationGraph;
  /** Standard deviation of the shift that the beds of one section share (the spread tau). */
  readonly tau: number;
  /** Degrees of freedom of the scatter behind `se`. */
  readonly scatterDf: number;
}

/** A running chain: each call of `next` makes one sweep and returns the deposits' true log ratios (one array, reused). */
export interface GibbsChain {
  next(): Float64Array;
}

/**
 * One Gibbs chain of the posterior of design 7.6 (Gelfand, Smith and Lee 1992, doi:10.1080/01621459.1992.10475235, for
 * order-restricted means): m_b = θ_b + u_section + e_b, θ flat on the cone of the relations, u ~ N(0, tau²), e ~ N(0, se_b²).
 *
 * A sweep draws the scatter from its own posterior (s²·df/χ²), each deposit's θ from its normal truncated between its
 * neighbours, each section's shift u, and then moves a section's deposits and its shift against each other, which the data
 * of the section cannot tell apart and which single draws would explore slowly.
 */
export function gibbsChain(model: OrderModel, random: Random): GibbsChain {
  const { sections, graph, tau, scatterDf } = model;
  const { nodes } = graph;
  const means = Float64Array.from(model.means);
  const section = Int32Array.from(model.section);
  const node = Int32Array.from(graph.node);
  const precision = Float64Array.from(model.se, (value) => 1 / Math.max(value * value, 1e-18));
  const members = groupLists(node, nodes);
  const bedsOf = groupLists(section, sections);
  const { start: youngerFrom, items: younger } = flatLists(graph.younger);
  const { start: olderFrom, items: older } = flatLists(graph.older);
  const sequence = Int32Array.from(graph.sequence);
  const movers = sectionMovers(model, members, bedsOf);
  const { weight: weightOf, mean: meanOf, section: sectionOf } = depositMeans(means, precision, section, members);
  const theta = new Float64Array(nodes);
  const shift = new Float64Array(sections);
  const df = Math.max(1, scatterDf);
  start();
  return { next: sweep };

  /** Scattered about the bed means, then brought into the cone from the oldest on. */
  function start(): void {
    for (const deposit of sequence) {
      let widest = 0;
      for (let at = members.start[deposit]; at < members.start[deposit + 1]; at++) {
        widest = Math.max(widest, model.se[members.items[at]]);
      }
      let value = meanOf[deposit] + 2 * widest * random.normal();
      for (let at = olderFrom[deposit]; at < olderFrom[deposit + 1]; at++) {
        value = Math.min(value, theta[older[at]] - 1e-6);
      }
      theta[deposit] = value;
    }
  }

  function sweep(): Float64Array {
    const scale = random.gamma(df / 2) / (df / 2);
    drawDeposits(scale);
    if (tau > 0) {
      drawShifts(scale);
      moveSections(scale);
    }
    return theta;
  }

  function drawDeposits(scale: number): void {
    const back = random.uniform() < 0.5;
    for (let step = 0; step < nodes; step++) {
      const deposit = sequence[back ? nodes - 1 - step : step];
      const own = sectionOf[deposit];
      const mean = own >= 0 ? meanOf[deposit] - shift[own] : meanOverSections(deposit);
      let low = Number.NEGATIVE_INFINITY;
      let high = Number.POSITIVE_INFINITY;
      for (let at = youngerFrom[deposit]; at < youngerFrom[deposit + 1]; at++) {
        const bound = theta[younger[at]];
        if (bound > low) low = bound;
      }
      for (let at = olderFrom[deposit]; at < olderFrom[deposit + 1]; at++) {
        const bound = theta[older[at]];
        if (bound < high) high = bound;
      }
      const sd = 1 / Math.sqrt(weightOf[deposit] * scale);
      theta[deposit] =
        low === Number.NEGATIVE_INFINITY && high === Number.POSITIVE_INFINITY
          ? mean + sd * random.normal()
          : sampleTruncatedNormal(random, mean, sd, low, high);
    }
  }

  /** Mean of a deposit's beds, each without the shift of its own section. */
  function meanOverSections(deposit: number): number {
    let sum = 0;
    for (let at = members.start[deposit]; at < members.start[deposit + 1]; at++) {
      const bed = members.items[at];
      sum += precision[bed] * (means[bed] - shift[section[bed]]);
    }
    return sum / weightOf[deposit];
  }

  function drawShifts(scale: number): void {
    for (let own = 0; own < sections; own++) {
      let weight = 1 / (tau * tau);
      let sum = 0;
      for (let at = bedsOf.start[own]; at < bedsOf.start[own + 1]; at++) {
        const bed = bedsOf.items[at];
        const p = precision[bed] * scale;
        weight += p;
        sum += p * (means[bed] - theta[node[bed]]);
      }
      shift[own] = sum / weight + random.normal() / Math.sqrt(weight);
    }
  }

  /** Adds delta to the section's own deposits and takes it from its shift; delta from its exact conditional. */
  function moveSections(scale: number): void {
    for (let own = 0; own < sections; own++) {
      const { inside, tied, bounds } = movers[own];
      if (inside.length === 0) continue;
      let low = Number.NEGATIVE_INFINITY;
      let high = Number.POSITIVE_INFINITY;
      for (const { deposit, above, below } of bounds) {
        for (const other of above) low = Math.max(low, theta[other] - theta[deposit]);
        for (const other of below) high = Math.min(high, theta[other] - theta[deposit]);
      }
      let weight = 1 / (tau * tau);
      let sum = shift[own] / (tau * tau);
      for (const bed of tied) {
        const p = precision[bed] * scale;
        weight += p;
        sum += p * (theta[node[bed]] + shift[own] - means[bed]);
      }
      const delta = sampleTruncatedNormal(random, sum / weight, 1 / Math.sqrt(weight), low, high);
      for (const deposit of inside) theta[deposit] += delta;
      shift[own] -= delta;
    }
  }
}
