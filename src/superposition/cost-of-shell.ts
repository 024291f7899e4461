/**
 * What it costs to set a shell aside in `shellsToSetAside`: 1 for a shell against which nothing else speaks. Less
 * where its own bed speaks against it: falling from 1 at a two-sided leave-one-out p of 0.2 to 0.4 at p = 0, so that
 * two odd shells are given up rather than one that fits its bed. A screening mark takes a quarter off. The numbers are
 * a convention.
 *
 * @param p Two-sided probability of the shell's residual in its own bed; null where it has no neighbours.
 * @param marked Whether screening marked the shell.
 * @example
 * costOfShell(0.5, false) // => 1
 * costOfShell(0, true) // => 0.3
 */
export function costOfShell(p: number | null, marked: boolean): number {
  const own = p === null || !(p < 0.2) ? 1 : 0.4 + 3 * p;
  return marked ? 0.75 * own : own;
}
