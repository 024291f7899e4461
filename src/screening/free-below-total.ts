import { AMINO_ACIDS, type ScreeningLimits, type ScreeningMark, type Shell } from '../model/index.js';
import { shown } from './rule.js';

/** Two analyses of one shell differ by this share without cause: twice 3 % (Glu in Kaufman and Manley 1998, below). */
const TOLERANCE = 0.06;

/**
 * Marks shells whose free amino acids are less racemized than the total of the same shell. Free amino acids come from
 * the most degraded protein and are always ahead; the reverse is a sign of contamination or of a mix-up. Both rows of
 * the shell are marked, because the ratios alone do not say which of the two is wrong. A shortfall of up to 6 % is
 * left to the error of the two analyses (reproducibility of Glu 3 %: Kaufman and Manley 1998, Quaternary Science
 * Reviews 17, 987–1000, 10.1016/S0277-3791(97)00086-3). Shells are paired by section, bed, taxon and shell.
 */
export function freeBelowTotal(shells: readonly Shell[], _limits: ScreeningLimits): ScreeningMark[] {
  // in most surveys one fraction alone was measured
  if (!(shells.some(({ fraction }) => fraction === 'FAA') && shells.some(({ fraction }) => fraction === 'THAA')))
    return [];
  const pairs = new Map<string, { THAA?: number; FAA?: number }>();
  shells.forEach((shell, index) => {
    const key = JSON.stringify([shell.section, shell.bed, shell.taxon, shell.shell]);
    const pair = pairs.get(key) ?? {};
    pair[shell.fraction] = index;
    pairs.set(key, pair);
  });
  const marks: ScreeningMark[] = [];
  for (const { THAA, FAA } of pairs.values()) {
    if (THAA === undefined || FAA === undefined) continue;
    const [total, free] = [shells[THAA].ratios, shells[FAA].ratios];
    const below = AMINO_ACIDS.filter(
      (code) => Math.log((free[code] ?? Number.NaN) / (total[code] ?? Number.NaN)) < -TOLERANCE,
    );
    if (below.length === 0) continue;
    const parts = below.map(
      (code) => `${code} ${shown(free[code] ?? 0)} free against ${shown(total[code] ?? 0)} total`,
    );
    const evidence = `free amino acids are less racemized than the total: ${parts.join(', ')}`;
    for (const shell of [THAA, FAA]) marks.push({ shell, mark: 'free below total', evidence });
  }
  return marks.sort((a, b) => a.shell - b.shell);
}
