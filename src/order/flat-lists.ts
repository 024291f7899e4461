/** Lists of numbers end to end: list i runs from start[i] to start[i + 1] − 1. */
export interface Lists {
  readonly start: Int32Array;
  readonly items: Int32Array;
}

/** Lists put end to end. */
export function flatLists(lists: readonly (readonly number[])[]): Lists {
  const start = new Int32Array(lists.length + 1);
  lists.forEach((list, at) => {
    start[at + 1] = start[at] + list.length;
  });
  const items = new Int32Array(start[lists.length]);
  lists.forEach((list, at) => {
    items.set(list, start[at]);
  });
  return { start, items };
}

/** Positions by the group they belong to. */
export function groupLists(group: Int32Array, groups: number): Lists {
  const start = new Int32Array(groups + 1);
  for (const own of group) start[own + 1]++;
  for (let at = 0; at < groups; at++) start[at + 1] += start[at];
  const fill = start.slice(0, groups);
  const items = new Int32Array(group.length);
  group.forEach((own, at) => {
    items[fill[own]++] = at;
  });
  return { start, items };
}
