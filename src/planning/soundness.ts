import type { Findings } from '../model/index.js';
import { clocksInView } from './bed-on-clock.js';

/** How sound a bed is to date, and why not more. */
export interface Soundness {
  /** 0 to 1. */
  readonly score: number;
  /** Reasons for doubt, in words. */
  readonly doubts: readonly string[];
}

/**
 * How well a bed stands as a place to date: its zone's probability, times the share of its shells that were kept, less
 * where it is of mixed age, in a reversed relation, of few shells or straddles two zones. A bed on several clocks takes its
 * worst. It only chooses between beds whose dates would bracket as many others; the weights are common practice.
 *
 * @param reversed beds in a relation that is reversed after setting aside
 */
export function soundnessOf(findings: Findings, reversed: ReadonlySet<string>): ReadonlyMap<string, Soundness> {
  const result = new Map<string, Soundness>();
  for (const view of clocksInView(findings)) {
    for (const { key, row, shells } of view.beds) {
      const doubts: string[] = [];
      let score = row.zone_probability ?? 0.5;
      const doubt = (when: boolean, factor: number, words: string) => {
        if (!when) return;
        score *= factor;
        doubts.push(words);
      };
      score *= shells / (shells + row.set_aside);
      doubt(row.straddles, 0.8, 'straddles two zones');
      doubt(row.set_aside > shells, 1, 'more of its shells were set aside than kept');
      doubt(row.marks.includes('mixed age'), 0.4, 'holds shells of mixed age');
      doubt(reversed.has(key), 0.4, 'stands in a reversed relation');
      doubt(
        shells < findings.options.screening.shells_a_bed,
        shells === 1 ? 0.6 : 0.8,
        `rests on ${shells} ${shells === 1 ? 'shell' : 'shells'}`,
      );
      doubt(row.marks.includes('near equilibrium'), 0.9, 'is near equilibrium');
      const before = result.get(key);
      if (!before || score < before.score) result.set(key, { score, doubts });
    }
  }
  return result;
}
