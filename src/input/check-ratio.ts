import type { AminoAcid } from '../model/index.js';
import type { ProblemList, ProblemPlace } from './problem-list.js';

/** Largest D/L that is believed: A/I reaches equilibrium near 1.3, the other ratios at 1; measurement adds a little. */
export function ratioLimit(amino: AminoAcid): number {
  return amino === 'Ile' ? 1.5 : 1.2;
}

/** Whether a D/L ratio is possible; when not, an error is noted. */
export function checkRatio(value: number, amino: AminoAcid, place: () => ProblemPlace, problems: ProblemList): boolean {
  const limit = ratioLimit(amino);
  if (value > 0 && value <= limit) return true;
  if (value > limit) {
    problems.error(
      'ratio too high',
      place(),
      `D/L ${amino} is ${value}; at most ${limit} is possible (equilibrium is ${amino === 'Ile' ? 'near 1.3' : '1'}). ` +
        'Look for a lost decimal sign, an L/D in place of a D/L, or a concentration in the column of a ratio.',
    );
  } else {
    problems.error(
      'ratio not above 0',
      place(),
      `D/L ${amino} is ${value}; a ratio is above 0. Leave the cell empty where the D form was not detected.`,
    );
  }
  return false;
}
