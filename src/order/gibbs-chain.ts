import { type Random, sampleTruncatedNormal } from '../statistics/index.js';
import type { RelationGraph } from './relation-graph.js';

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
  const { means, se, section, sections, graph, tau, scatterDf } = model;
  const { nodes, older, younger, sequence } = graph;
  const members: number[][] = Array.from({ length: nodes }, () => []);
  graph.node.forEach((node, bed) => {
    members[node].push(bed);
  });
  const bedsOf: number[][] = Array.from({ length: sections }, () => []);
  section.forEach((at, bed) => {
    bedsOf[at].push(bed);
  });
  // deposits of one section only move with it; those tied to another by `same` stay
  const movers = bedsOf.map((beds, at) => {
    const own = [...new Set(beds.map((bed) => graph.node[bed]))];
    return own.filter((node) => members[node].every((bed) => section[bed] === at));
  });
  const theta = new Float64Array(nodes);
  const shift = new Float64Array(sections);
  const precision = se.map((value) => 1 / Math.max(value * value, 1e-18));
  const df = Math.max(1, scatterDf);
  start();
  return { next: sweep };

  /** Scattered about the bed means, then brought into the cone from the oldest on. */
  function start(): void {
    for (const node of sequence) {
      let sum = 0;
      let weight = 0;
      let widest = 0;
      for (const bed of members[node]) {
        sum += precision[bed] * means[bed];
        weight += precision[bed];
        widest = Math.max(widest, se[bed]);
      }
      let value = sum / weight + 2 * widest * random.normal();
      for (const other of older[node]) value = Math.min(value, theta[other] - 1e-6);
      theta[node] = value;
    }
  }

  function sweep(): Float64Array {
    const scale = random.gamma(df / 2) / (df / 2);
    drawDeposits(scale, sequence);
    if (tau > 0) {
      drawShifts(scale);
      moveSections(scale);
    }
    return theta;
  }

  function drawDeposits(scale: number, path: readonly number[]): void {
    const back = random.uniform() < 0.5;
    for (let at = 0; at < path.length; at++) {
      const node = path[back ? path.length - 1 - at : at];
      let weight = 0;
      let sum = 0;
      for (const bed of members[node]) {
        weight += precision[bed];
        sum += precision[bed] * (means[bed] - shift[section[bed]]);
      }
      let low = Number.NEGATIVE_INFINITY;
      let high = Number.POSITIVE_INFINITY;
      for (const other of younger[node]) if (theta[other] > low) low = theta[other];
      for (const other of older[node]) if (theta[other] < high) high = theta[other];
      const sd = 1 / Math.sqrt(weight * scale);
      theta[node] =
        low === Number.NEGATIVE_INFINITY && high === Number.POSITIVE_INFINITY
          ? sum / weight + sd * random.normal()
          : sampleTruncatedNormal(random, sum / weight, sd, low, high);
    }
  }

  function drawShifts(scale: number): void {
    for (let at = 0; at < sections; at++) {
      let weight = 1 / (tau * tau);
      let sum = 0;
      for (const bed of bedsOf[at]) {
        const p = precision[bed] * scale;
        weight += p;
        sum += p * (means[bed] - theta[graph.node[bed]]);
      }
      shift[at] = sum / weight + random.normal() / Math.sqrt(weight);
    }
  }

  /** Adds delta to the section's own deposits and takes it from its shift; delta from its exact conditional. */
  function moveSections(scale: number): void {
    for (let at = 0; at < sections; at++) {
      const own = movers[at];
      if (own.length === 0) continue;
      const inside = new Set(own);
      let low = Number.NEGATIVE_INFINITY;
      let high = Number.POSITIVE_INFINITY;
      for (const node of own) {
        for (const other of younger[node]) if (!inside.has(other)) low = Math.max(low, theta[other] - theta[node]);
        for (const other of older[node]) if (!inside.has(other)) high = Math.min(high, theta[other] - theta[node]);
      }
      let weight = 1 / (tau * tau);
      let sum = shift[at] / (tau * tau);
      for (const bed of bedsOf[at]) {
        if (inside.has(graph.node[bed])) continue;
        const p = precision[bed] * scale;
        weight += p;
        sum += p * (theta[graph.node[bed]] + shift[at] - means[bed]);
      }
      const delta = sampleTruncatedNormal(random, sum / weight, 1 / Math.sqrt(weight), low, high);
      for (const node of own) theta[node] += delta;
      shift[at] -= delta;
    }
  }
}
