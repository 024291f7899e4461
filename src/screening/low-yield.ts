import { AMINO_ACIDS, type ScreeningLimits, type ScreeningMark, type Shell } from '../model/index.js';
import { median } from '../statistics/index.js';
import { groupsOfShells, shown } from './rule.js';

/** Fewest shells with concentrations from which the usual yield is learned. */
const FEWEST_WITH_YIELD = 5;

/**
 * Marks shells whose total concentration is below a share of the median of their taxon and fraction (settings key
 * `screening.yield`, default 0.25). The total is over the amino acids that at least 80 % of the shells with
 * concentrations have; a shell without one of them is passed over, as its total would be low for no fault of its own.
 * Needs 5 shells. A median over all ages: shells lose amino acids with time, so in a survey of a long span the oldest
 * may be marked.
 *
 * Source of the rule: concentrations as a sign of leaching, Kosnik and Kaufman 2008, 10.1016/j.quageo.2008.03.001.
 */
export function lowYield(shells: readonly Shell[], limits: ScreeningLimits): ScreeningMark[] {
  const marks: ScreeningMark[] = [];
  for (const members of groupsOfShells(shells)) {
    const measured = members.filter((index) => Object.keys(shells[index].concentrations).length > 0);
    const codes = AMINO_ACIDS.filter((code) => {
      const having = measured.filter((index) => shells[index].concentrations[code] !== undefined).length;
      return having > 0 && having >= 0.8 * measured.length;
    });
    const totals = measured.flatMap((shell) => {
      const amounts = codes.map((code) => shells[shell].concentrations[code] ?? Number.NaN);
      const total = amounts.reduce((sum, amount) => sum + amount, 0);
      return Number.isFinite(total) && codes.length > 0 ? [{ shell, total }] : [];
    });
    if (totals.length < FEWEST_WITH_YIELD) continue;
    const usual = median(totals.map(({ total }) => total));
    for (const { shell, total } of totals) {
      if (!(total < limits.yield * usual)) continue;
      const evidence = `total concentration of ${codes.join(', ')} is ${shown((100 * total) / usual)} % of the taxon's median, under the limit of ${shown(100 * limits.yield)} %`;
      marks.push({ shell, mark: 'low yield', evidence });
    }
  }
  return marks.sort((a, b) => a.shell - b.shell);
}
