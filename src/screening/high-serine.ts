import type { ScreeningLimits, ScreeningMark, Shell } from '../model/index.js';
import { shown } from './rule.js';

/**
 * Marks shells whose L-Ser/L-Asp is at or above the limit (settings key `screening.serine_ratio`, default 0.8, common
 * practice). Serine breaks down within thousands of years, so much of it in a fossil is a sign of modern amino acids.
 * A shell whose serine was not measured is not marked.
 *
 * Source of the rule: Kosnik and Kaufman 2008, Quaternary Geochronology 3, 328–341, 10.1016/j.quageo.2008.03.001.
 */
export function highSerine(shells: readonly Shell[], limits: ScreeningLimits): ScreeningMark[] {
  return shells.flatMap((shell, index) => {
    const ratio = shell.serine_ratio;
    if (ratio === null || !(ratio >= limits.serine_ratio)) return [];
    const evidence = `L-Ser/L-Asp is ${shown(ratio)}, at or above the limit of ${shown(limits.serine_ratio)}`;
    return [{ shell: index, mark: 'high serine' as const, evidence }];
  });
}
