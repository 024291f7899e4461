import type { RelationRecord } from '../model/index.js';

/**
 * The relations that bound the order (design 7.6): certain ones that the ratios don't contradict. Where a contradicted
 * relation a > b is left out, what it carried over stays: the beds under a are still older than b and those over b younger
 * than a, as far as the ratios don't contradict these too; else the next ones further off.
 * @param relations relations to keep from
 * @param reversed whether each is called reversed, same order
 * @param contradicts whether the ratios speak against `lower` being older than `upper`
 */
export function keptRelations(
  relations: readonly RelationRecord[],
  reversed: readonly boolean[],
  contradicts: (lower: string, upper: string) => boolean,
): RelationRecord[] {
  const certain = relations.filter((relation) => relation.certainty === 'certain');
  const kept = relations.filter((relation, at) => relation.certainty === 'certain' && !reversed[at]);
  const dropped = relations.filter(
    (relation, at) => relation.certainty === 'certain' && reversed[at] && relation.kind === 'older',
  );
  if (dropped.length === 0) return kept;
  const above = neighbours(certain, 'lower', 'upper');
  const below = neighbours(certain, 'upper', 'lower');
  const bridges = new Map<string, RelationRecord>();
  const bridge = (lower: string, upper: string): boolean => {
    if (contradicts(lower, upper)) return false;
    const record: RelationRecord = {
      lower,
      upper,
      basis: 'superposition',
      kind: 'older',
      certainty: 'certain',
      row: null,
    };
    bridges.set(`${lower}\u0001${upper}`, record);
    return true;
  };
  for (const { lower, upper } of dropped) {
    reach(upper, above, (bed) => bridge(lower, bed));
    reach(lower, below, (bed) => bridge(bed, upper));
  }
  return [...kept, ...bridges.values()];
}

function neighbours(relations: readonly RelationRecord[], from: 'lower' | 'upper', to: 'lower' | 'upper') {
  const map = new Map<string, string[]>();
  for (const relation of relations) {
    if (relation.kind !== 'older') continue;
    const list = map.get(relation[from]);
    if (list === undefined) map.set(relation[from], [relation[to]]);
    else list.push(relation[to]);
  }
  return map;
}

/** Walks outwards from a bed, not beyond those that `visit` accepts. */
function reach(start: string, next: ReadonlyMap<string, readonly string[]>, visit: (bed: string) => boolean): void {
  const seen = new Set([start]);
  const waiting = [...(next.get(start) ?? [])];
  while (waiting.length > 0) {
    const bed = waiting.shift()!;
    if (seen.has(bed)) continue;
    seen.add(bed);
    if (!visit(bed)) waiting.push(...(next.get(bed) ?? []));
  }
}
