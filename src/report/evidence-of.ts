import type { Evidence, Findings } from '../model/index.js';

/** What speaks for each of these shells or relations of a clock, in sentences, by name; of a large survey a few. */
export function evidenceOf(
  { evidence }: Findings,
  clock: string,
  about: Evidence['about'],
  names: ReadonlySet<string>,
): Map<string, readonly string[]> {
  const sentences = new Map<string, readonly string[]>();
  for (const row of evidence)
    if (row.about === about && row.clock === clock && names.has(row.name)) sentences.set(row.name, row.sentences);
  return sentences;
}
