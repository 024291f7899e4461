import { pooledScatter } from './beds/index.js';
import type { AminoAcid, BedRow, BedSite, Evidence, RelationRow, Shell } from './model/index.js';
import type { Settled } from './passes.js';
import { countRatios } from './screening/index.js';
import { type AminoAcidDifference, type BedFacts, readReversedRelation } from './superposition/index.js';

/** What the rows of relations.csv are made from. */
export interface RelationFindingsInput {
  readonly settled: Settled;
  readonly shells: readonly Shell[];
  readonly beds: readonly BedRow[];
  readonly sites: ReadonlyMap<string, BedSite>;
}

/** Rows of relations.csv, the verdict before and after setting aside, with readings of those still reversed. */
export function relationFindings(input: RelationFindingsInput): { rows: RelationRow[]; evidence: Evidence[] } {
  const { first, last } = input.settled;
  const clock = last.data.clock.name;
  const before = new Map(first.relations.map((relation, at) => [`${relation.lower}\u0001${relation.upper}`, at]));
  const facts = factsOfBeds(input);
  const aminoAcids = groupByAminoAcid(input);
  const bedAt = new Map(last.data.beds.map((bed, at) => [bed.key, at]));
  const evidence: Evidence[] = [];
  const rows = last.relations.map((relation, at): RelationRow => {
    const check = last.checks[at];
    const earlier = before.get(`${relation.lower}\u0001${relation.upper}`);
    const verdict = earlier === undefined ? check.verdict : first.checks[earlier].verdict;
    const { lower, upper, basis, kind, certainty } = relation;
    const { difference, z, p_reversed, verdict: verdict_after } = check;
    let reading = '';
    if (verdict_after === 'reversed') {
      const read = readReversedRelation({
        relation,
        check,
        lower: facts(lower),
        upper: facts(upper),
        differences: differencesOf(aminoAcids, bedAt.get(lower)!, bedAt.get(upper)!),
      });
      reading = read.reading;
      evidence.push({ clock, about: 'relation', name: `${lower} > ${upper}`, sentences: read.sentences });
    } else if (verdict === 'reversed') {
      reading = 'no longer reversed once odd shells were set aside';
    }
    return { clock, lower, upper, basis, kind, certainty, difference, z, p_reversed, verdict, verdict_after, reading };
  });
  return { rows, evidence };
}

/** What is known of a bed beside its ratios, looked up when it is asked for: reversed relations are few. */
function factsOfBeds({ settled, shells, beds, sites }: RelationFindingsInput): (key: string) => BedFacts {
  const { data, relations, checks } = settled.last;
  const tally = new Map<string, { reversed: number; agrees: number }>(
    data.beds.map((bed) => [bed.key, { reversed: 0, agrees: 0 }]),
  );
  relations.forEach(({ lower, upper }, at) => {
    for (const key of [lower, upper]) {
      const counts = tally.get(key);
      if (counts === undefined) continue;
      if (checks[at].verdict === 'reversed') counts.reversed++;
      if (checks[at].verdict === 'agrees') counts.agrees++;
    }
  });
  const rowOf = new Map(beds.map((bed) => [`${bed.section}/${bed.bed}`, bed]));
  const bedOf = new Map(data.beds.map((bed) => [bed.key, bed]));
  return (key) => {
    const bed = bedOf.get(key)!;
    const row = rowOf.get(key)!;
    const counts = tally.get(key)!;
    return {
      key,
      section: bed.section,
      shells: bed.n,
      zone: row.zone,
      marks: row.marks,
      // the relation that is being read is not one of the others
      otherReversed: Math.max(0, counts.reversed - 1),
      otherAgree: counts.agrees,
      highSerine: bed.shells.filter((at) => settled.marks[at].some(({ mark }) => mark === 'high serine')).length,
      serineMeasured: bed.shells.filter((at) => shells[data.shells[at].shell].serine_ratio !== null).length,
      cmat_c: sites.get(key)?.cmat_c ?? null,
    };
  };
}

/** Log ratios of the kept shells of each bed in one amino acid, and their pooled scatter. */
interface AminoAcidGroups {
  readonly amino_acid: AminoAcid;
  readonly groups: readonly (readonly number[])[];
  readonly s: number;
}

/** Nothing for a clock of one amino acid: the relation's own difference says it all. */
function groupByAminoAcid({ settled, shells }: RelationFindingsInput): AminoAcidGroups[] {
  const { data } = settled.last;
  const counts = countRatios(data.shells.map(({ shell }) => shells[shell]));
  const codes = [...counts].flatMap(([code, count]) => (count > 0 ? [code] : []));
  if (codes.length < 2) return [];
  return codes.map((amino_acid) => {
    const groups = data.beds.map((bed) =>
      // the slope of the clock stands in for that of each amino acid
      bed.shells.flatMap((at) => {
        const ratio = shells[data.shells[at].shell].ratios[amino_acid];
        return data.shells[at].setAside || ratio === undefined ? [] : [Math.log(ratio) - data.slope * bed.gradient];
      }),
    );
    return { amino_acid, groups, s: pooledScatter(groups).s };
  });
}

/** Difference of two beds in each amino acid, over the shells kept, with that amino acid's own pooled scatter. */
function differencesOf(aminoAcids: readonly AminoAcidGroups[], lower: number, upper: number): AminoAcidDifference[] {
  const mean = (values: readonly number[]): number => values.reduce((sum, x) => sum + x, 0) / values.length;
  return aminoAcids.flatMap(({ amino_acid, groups, s }) => {
    const [low, high] = [groups[lower], groups[upper]];
    if (low.length === 0 || high.length === 0) return [];
    return [{ amino_acid, difference: mean(low) - mean(high), se: s * Math.sqrt(1 / low.length + 1 / high.length) }];
  });
}
