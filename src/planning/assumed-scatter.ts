import type { ClockRow, Findings } from '../model/index.js';

/** Main clocks whose scatter between shells was assumed, not measured. */
export function assumedScatter({ clocks, beds }: Findings): ClockRow[] {
  return clocks.filter(
    ({ clock, main }) => main && beds.some((bed) => bed.clock === clock && bed.marks.includes('assumed scatter')),
  );
}
