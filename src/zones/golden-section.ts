/**
 * Place of the largest value of a function with one peak between two ends, by golden sections (Kiefer 1953,
 * doi:10.2307/2032161).
 * @param precision width of the last interval; its middle is given
 * @example
 * goldenSection((x) => -((x - 2) ** 2), 0, 5, 1e-6).toFixed(3) // => '2.000'
 */
export function goldenSection(f: (x: number) => number, from: number, to: number, precision: number): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [low, high] = [from, to];
  let [left, right] = [high - ratio * (high - low), low + ratio * (high - low)];
  let [fLeft, fRight] = [f(left), f(right)];
  while (high - low > precision) {
    if (fLeft >= fRight) {
      [high, right, fRight] = [right, left, fLeft];
      left = high - ratio * (high - low);
      fLeft = f(left);
    } else {
      [low, left, fLeft] = [left, right, fRight];
      right = low + ratio * (high - low);
      fRight = f(right);
    }
  }
  return (low + high) / 2;
}
