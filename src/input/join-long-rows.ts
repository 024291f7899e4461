import type { AminoAcid, Analysis } from '../model/index.js';
import type { OpenAnalysis } from './open-analysis.js';

/**
 * Joins the rows of the long form, one an amino acid, to analyses: rows alike in everything but the amino acid are one
 * analysis; where an amino acid comes again, it goes to the next analysis. Rows whose n differ stay apart.
 */
export function joinLongRows(rows: readonly OpenAnalysis[]): Analysis[] {
  const joined: OpenAnalysis[] = [];
  const groups = new Map<string, { analyses: OpenAnalysis[]; met: Map<AminoAcid, number> }>();
  for (const row of rows) {
    const amino = Object.keys(row.ratios)[0] as AminoAcid | undefined;
    if (amino === undefined) continue;
    const key = [
      ...[row.section, row.bed, row.taxon, row.fraction, row.shell, row.preparation, row.injection, row.lab_id],
      ...[row.lab, row.method, row.summary?.n],
    ].join('\u0000');
    let group = groups.get(key);
    if (group === undefined) {
      group = { analyses: [], met: new Map() };
      groups.set(key, group);
    }
    const place = group.met.get(amino) ?? 0;
    group.met.set(amino, place + 1);
    const home = group.analyses[place];
    if (home === undefined) {
      group.analyses.push(row);
      joined.push(row);
      continue;
    }
    Object.assign(home.ratios, row.ratios);
    Object.assign(home.concentrations, row.concentrations);
    home.serine_ratio ??= row.serine_ratio;
    if (home.summary !== null && row.summary !== null) {
      home.summary = { n: home.summary.n, sd: { ...home.summary.sd, ...row.summary.sd } };
    }
  }
  return joined;
}
