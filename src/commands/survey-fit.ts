import { nearestName } from '../input/edit-distance.js';
import type { RunOptions, Survey } from '../model/index.js';

/**
 * Options that name something of the survey which is not there: a taxon, a gradient column, an amino acid, a fraction.
 *
 * @returns One message a problem, with what there is instead.
 */
export function optionsAgainstSurvey(survey: Survey, options: RunOptions): string[] {
  const problems: string[] = [];
  // looked up only for what is asked for
  const taxa = () => new Set(survey.analyses.map(({ taxon }) => taxon));
  const columns = () => new Set(survey.beds.flatMap((bed) => Object.keys(bed.columns)));
  const fractions = () => new Set(survey.analyses.map(({ fraction }) => fraction));
  const measured = () => new Set(survey.analyses.flatMap(({ ratios }) => Object.keys(ratios)));
  const want = (option: string, name: string | null, names: () => ReadonlySet<string>, what: string) => {
    if (name === null) return;
    const there = names();
    if (there.has(name)) return;
    const near = nearestName(name, there);
    const known = there.size === 0 ? `The survey has no ${what}.` : `The survey has ${listed(there)}.`;
    problems.push(`${option} ${name}: the survey has no such ${what}. ${near ? `Did you mean ${near}?` : known}`);
  };
  want('--taxon', options.taxon, taxa, 'taxon');
  want('--reference-taxon', options.reference_taxon, taxa, 'taxon');
  want('--gradient', options.gradient, columns, 'numeric column in its beds table');
  want('--fraction', options.fraction, fractions, 'fraction');
  if (Array.isArray(options.amino_acid)) {
    for (const code of options.amino_acid) want('--amino-acid', code, measured, 'ratio');
  }
  return problems;
}

function listed(names: ReadonlySet<string>): string {
  const all = [...names];
  return all.length > 12 ? `${all.slice(0, 12).join(', ')} and ${all.length - 12} more` : all.join(', ');
}
