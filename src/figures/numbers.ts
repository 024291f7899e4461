/** A D/L ratio with three decimals. */
export const ratio = (value: number) => value.toFixed(3);

/** Three significant digits, with a true minus sign. */
export const short = (value: number) => String(Number(value.toPrecision(3))).replace('-', '−');

/**
 * Least and greatest value over the items, however many: Infinity and -Infinity for none, NaN where one is NaN.
 * @param lowest value of an item at its low end
 * @param highest value of an item at its high end, where that is another
 */
export function extent<Item>(
  items: readonly Item[],
  lowest: (item: Item) => number,
  highest: (item: Item) => number = lowest,
): [low: number, high: number] {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const item of items) {
    low = Math.min(low, lowest(item));
    high = Math.max(high, highest(item));
  }
  return [low, high];
}

/** Ends of an axis a little beyond the values. */
export function padded(low: number, high: number): [number, number] {
  const pad = Math.max(0.05 * (high - low), 0.02);
  return [low - pad, high + pad];
}
