/** A D/L ratio with three decimals. */
export const ratio = (value: number) => value.toFixed(3);

/** Three significant digits, with a true minus sign. */
export const short = (value: number) => String(Number(value.toPrecision(3))).replace('-', '−');

/** Ends of an axis a little beyond the values. */
export function padded(low: number, high: number): [number, number] {
  const pad = Math.max(0.05 * (high - low), 0.02);
  return [low - pad, high + pad];
}
