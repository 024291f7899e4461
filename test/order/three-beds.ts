import type { RelationRecord } from '../../src/model/index.js';
import { relationGraph } from '../../src/order/index.js';
import { runTask } from '../../src/tasks.js';

export const map = async (tasks: readonly Parameters<typeof runTask>[0][]) => tasks.map(runTask);

export function model(
  beds: { key: string; mean: number; se: number; section: number }[],
  relations: RelationRecord[],
  tau = 0,
) {
  return {
    means: beds.map((bed) => bed.mean),
    se: beds.map((bed) => bed.se),
    section: beds.map((bed) => bed.section),
    sections: Math.max(...beds.map((bed) => bed.section)) + 1,
    graph: relationGraph(
      beds.map((bed) => bed.key),
      relations,
    ),
    tau,
    scatterDf: 1e6,
  };
}

export const beds = [
  { key: 'A/1', mean: -1.0, se: 0.1, section: 0 },
  { key: 'A/2', mean: -0.95, se: 0.05, section: 0 },
  { key: 'B/1', mean: -0.9, se: 0.08, section: 1 },
];
