import { fUpperTail } from '../../src/statistics/index.js';

/** p of the usual one-way analysis of variance: do the groups' means differ beyond the scatter within them? */
export function oneWayP(groups: readonly (readonly number[])[]): number {
  const all = groups.flat();
  const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
  const grand = mean(all);
  const between = groups.reduce((sum, group) => sum + group.length * (mean(group) - grand) ** 2, 0);
  const within = groups.reduce((sum, group) => sum + group.reduce((s, x) => s + (x - mean(group)) ** 2, 0), 0);
  const [df1, df2] = [groups.length - 1, all.length - groups.length];
  return fUpperTail(between / df1 / (within / df2), df1, df2);
}
