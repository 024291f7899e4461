/**
 * Root of an increasing function by Newton's steps, kept inside a bracket that is found by doubling and halved whenever
 * a step leaves it.
 *
 * @param value the function and its derivative at u
 * @param start first guess
 * @returns u where the function is 0, to the last few bits
 * @throws RangeError when no root is found within 1e6 of the start
 * @example
 * ```ts
 * solveIncreasing((u) => ({ value: u * u * u - 8, slope: 3 * u * u }), 1); // => 2
 * ```
 */
export function solveIncreasing(value: (u: number) => { value: number; slope: number }, start: number): number {
  let low = start;
  let high = start;
  for (let step = 1; value(low).value > 0; step *= 2) low = descend(low, step);
  for (let step = 1; value(high).value < 0; step *= 2) high = descend(high, -step);
  let u = Math.min(Math.max(start, low), high);
  for (let i = 0; i < 200; i++) {
    const at = value(u);
    if (at.value === 0) return u;
    if (at.value < 0) low = u;
    else high = u;
    const newton = u - at.value / at.slope;
    const next = newton > low && newton < high ? newton : 0.5 * (low + high);
    if (Math.abs(next - u) <= 4e-16 * Math.max(Math.abs(u), 1e-3) || next === low || next === high) return next;
    u = next;
  }
  return u;
}

function descend(from: number, step: number): number {
  if (!(Math.abs(step) < 1e6)) throw new RangeError(`solveIncreasing found no root within 1e6 of its start`);
  return from - step;
}
