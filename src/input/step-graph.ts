/** One step of a graph of beds: an older bed to a younger one, or a bed to one as old, and where it is stated. */
export interface Step {
  readonly from: string;
  readonly to: string;
  /** `>`: is older than; `=`: is as old as. */
  readonly sign: '>' | '=';
  readonly row: { readonly file: string; readonly line: number } | null;
}

/** The steps that leave each bed. */
export type StepsOut = ReadonlyMap<string, readonly Step[]>;

/** Number of the strongly connected component of each bed (Tarjan 1972, doi:10.1137/0201010), without recursion. */
export function stronglyConnected(out: StepsOut): Map<string, number> {
  const index = new Map<string, number>();
  const low = new Map<string, number>();
  const component = new Map<string, number>();
  const stack: string[] = [];
  let components = 0;
  for (const root of out.keys()) {
    if (index.has(root)) continue;
    const work: { bed: string; next: number }[] = [{ bed: root, next: 0 }];
    index.set(root, index.size);
    low.set(root, index.get(root)!);
    stack.push(root);
    while (work.length > 0) {
      const top = work[work.length - 1];
      const step = out.get(top.bed)?.[top.next];
      if (step !== undefined) {
        top.next += 1;
        if (!index.has(step.to)) {
          index.set(step.to, index.size);
          low.set(step.to, index.get(step.to)!);
          stack.push(step.to);
          work.push({ bed: step.to, next: 0 });
        } else if (!component.has(step.to)) low.set(top.bed, Math.min(low.get(top.bed)!, index.get(step.to)!));
        continue;
      }
      work.pop();
      if (work.length > 0) {
        const above = work[work.length - 1].bed;
        low.set(above, Math.min(low.get(above)!, low.get(top.bed)!));
      }
      if (low.get(top.bed) === index.get(top.bed)) {
        for (let bed = stack.pop()!; ; bed = stack.pop()!) {
          component.set(bed, components);
          if (bed === top.bed) break;
        }
        components += 1;
      }
    }
  }
  return component;
}

/** The shortest way from one bed to another through beds that `within` allows; empty where there is none. */
export function shortestPath(from: string, to: string, out: StepsOut, within: (bed: string) => boolean): Step[] {
  const by = new Map<string, Step | null>([[from, null]]);
  const queue = [from];
  for (let i = 0; i < queue.length && !by.has(to); i += 1) {
    for (const step of out.get(queue[i]) ?? []) {
      if (by.has(step.to) || !within(step.to)) continue;
      by.set(step.to, step);
      queue.push(step.to);
    }
  }
  const path: Step[] = [];
  for (let step = by.get(to); step !== null && step !== undefined; step = by.get(step.from)) path.unshift(step);
  return path;
}
