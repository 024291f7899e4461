import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import type { Findings } from '../../src/model/index.js';
import { analyseInPlace, surveyOfTables } from '../coast/in-place.js';

const bedOf = (findings: Findings, key: string) => findings.beds.find((row) => `${row.section}/${row.bed}` === key)!;

// Mirecki, PhD thesis, University of Delaware, https://udspace.udel.edu/handle/19716/13230, seen: Mercenaria, A/I, mean ± sd
// between shells (n). At Gomez Pit from the top down IIa, IIc, IId; at Norris Bridge the same zone as IId.
const VIRGINIA = `section,bed,level,taxon,n,A/I,A/I sd
Gomez Pit,IIa,3,Mercenaria,55,0.141,0.026
Gomez Pit,IIc,2,Mercenaria,19,0.335,0.028
Gomez Pit,IId,1,Mercenaria,9,0.471,0.038
Norris Bridge,IId,1,Mercenaria,5,0.473,0.020
`;

describe('four beds of hard clams in Virginia, as published summaries', () => {
  it('give three zones in the published order, both IId beds together, and no reversed relation', async () => {
    const findings = await analyseInPlace(await surveyOfTables({ shells: VIRGINIA }));
    expect(findings.clocks).toMatchObject([{ verdict: 'zones', zones: 3, beds: 4, shells: 88 }]);
    expect(bedOf(findings, 'Gomez Pit/IIa').zone).toBe('Z1');
    expect(bedOf(findings, 'Gomez Pit/IIc').zone).toBe('Z2');
    expect(bedOf(findings, 'Gomez Pit/IId').zone).toBe('Z3');
    expect(bedOf(findings, 'Norris Bridge/IId').zone).toBe('Z3');
    for (const bed of findings.beds) expect(bed.straddles).toBe(false);
    expect(findings.relations).toHaveLength(2);
    for (const relation of findings.relations) {
      expect(relation).toMatchObject({ basis: 'superposition', verdict: 'agrees', verdict_after: 'agrees' });
    }
    expect(findings.adjacent_zones.map((row) => row.verdict)).toEqual(['distinct', 'distinct']);
    // the order within one section is sure, that of the two IId beds is not
    const ranks = findings.order.map((row) => row.bed);
    expect(ranks).toEqual(['IId', 'IId', 'IIc', 'IIa']);
    expect(findings.order[1]).toMatchObject({ rank_low: 1, rank_high: 2, resolved: true });
    expect(findings.order[0].resolved).toBe(false);
  });

  it('keep the published means and standard deviations', async () => {
    const findings = await analyseInPlace(await surveyOfTables({ shells: VIRGINIA }));
    expect(bedOf(findings, 'Gomez Pit/IIa').dl_mean).toBeCloseTo(0.141, 12);
    expect(bedOf(findings, 'Gomez Pit/IIa').dl_sd).toBeCloseTo(0.026, 12);
    expect(bedOf(findings, 'Gomez Pit/IIa').dl_se).toBeCloseTo(0.026 / Math.sqrt(55), 12);
  });
});

describe('the example of published summaries', () => {
  it('gives its three zones, with a mean alone counted as one shell', async () => {
    const path = fileURLToPath(new URL('../../examples/summaries/shells.csv', import.meta.url));
    const findings = await analyseInPlace(await surveyOfTables({ shells: readFileSync(path, 'utf8') }));
    expect(findings.clocks).toMatchObject([{ verdict: 'zones', zones: 3 }]);
    expect(bedOf(findings, 'Skep House/only')).toMatchObject({ shells: 1, zone: 'Z2', dl_sd: null });
    expect(findings.relations.every((relation) => relation.verdict_after === 'agrees')).toBe(true);
  });
});
