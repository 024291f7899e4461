import { describe, expect, it } from 'vitest';
import { summaryJson, summaryText } from '../../src/commands/summary/index.js';
import { PLAIN } from '../../src/commands/terminal.js';
import type { Findings } from '../../src/model/index.js';
import { FINDINGS } from '../output/fixture.js';

const text = (findings: Findings) => summaryText(findings, 'out', PLAIN);
const flat = (findings: Findings) => text(findings).replace(/\s+/g, ' ');
const clockAs = (changes: object): Findings => ({ ...FINDINGS, clocks: [{ ...FINDINGS.clocks[0], ...changes }] });

describe('the summary', () => {
  it('tells what was read, found and written', () => {
    for (const words of [
      'Read 2 shells of 1 taxon (Mya) in 3 beds of 2 sections; 1 warning.',
      '2 zones are supported. BIC is lowest for 2 zones (1.900): 2.3 less than for the continuum.',
      'Z2 0.400 0.380 to 0.420 0.376 to 0.425 1 3',
      'Z2 Low cliff, "north"/=B [1] >',
      'Z1 zone/@1+1 [2-3] ~ Low cliff, "north"/A [2-3]',
      '1 of 2 steps are resolved',
      '1 relation tested, 0 agree, 0 tied, 1 reversed.',
      'should be older than Low cliff, "north"/=B, and looks younger (p < 0.001).',
      'Sections that contradict their own order as a whole: Low cliff, "north".',
      'Odd shells: 1 set aside, 0 doubtful, of 7 shells.',
      'D/L 0.420, set aside: reworked or altered (moderate confidence).',
      'Caution: The order is relative.',
      'Written out: report.html',
      'bedorder explain out "Low cliff, \\"north\\"/A > Low cliff, \\"north\\"/=B"',
    ]) {
      expect(flat(FINDINGS)).toContain(words);
    }
  });

  it('ends with the best of the plan: where to collect, and what to date', () => {
    expect(flat(FINDINGS)).toContain('Next =3 more shells; which of two is older');
    const [shells, date] = FINDINGS.plan;
    const dated = {
      ...date,
      beds_bracketed: 1,
      settles: 'Dating St. No/A and B brackets 1 of 3. No other 2 beds bracket more. But B is odd.',
    };
    const checked = { ...shells, kind: 'check bed' as const, settles: 'Look again.' };
    const said = flat({ ...FINDINGS, plan: [shells, checked, date, dated] });
    expect(said).toContain('Next Look again. Next Dating St. No/A and B brackets 1 of 3. Written out');
    expect(flat({ ...FINDINGS, plan: [], plan_notes: ['Too many beds.'] })).toContain('Next Too many beds. Written');
    expect(JSON.parse(summaryJson(FINDINGS, 'out')).next).toEqual([shells.settles]);
  });

  it.each<[object, string]>([
    [{ verdict: 'continuum', zones: 1 }, 'No zones are supported: the ratios run on without gaps.'],
    [{ verdict: 'one zone', zones: 1 }, 'No separate zones are supported: all beds agree with one.'],
    [{ verdict: 'too few beds', zones: 1 }, 'Too few beds to tell zones apart.'],
  ])('%j', (changes, words) => {
    expect(flat(clockAs(changes))).toContain(words);
  });

  it('keeps saying what the data supported when zones were forced', () => {
    const options = { ...FINDINGS.options, zones: 4 };
    expect(flat({ ...FINDINGS, options })).toContain('4 zones asked for with --zones; the data do support zones.');
    expect(flat({ ...clockAs({ verdict: 'continuum' }), options })).toContain('no zones are supported');
  });

  it('says when neighbours were joined, are not distinct or not resolved', () => {
    expect(flat(clockAs({ zones: 1 }))).toContain('were joined, which leaves 1');
    const adjacent = (verdict: 'not distinct' | 'not resolved') =>
      flat({ ...FINDINGS, adjacent_zones: [{ ...FINDINGS.adjacent_zones[0], verdict }] });
    expect(adjacent('not distinct')).toContain('Z2 and Z1: not really distinct');
    expect(adjacent('not resolved')).toContain('Z2 and Z1: too few shells or beds to resolve');
  });

  it('passes on what the run remarks of a clock, findings before cautions', () => {
    const remark = (level: 'finding' | 'caution', text: string) => ({ clock: 'Mya THAA Ile', level, text });
    const remarks = [remark('caution', 'Rank intervals are rough.'), remark('finding', 'A slope was found.')];
    expect(flat({ ...FINDINGS, remarks })).toContain('A slope was found. Caution: Rank intervals are rough.');
  });

  it('shortens a long order, and stays within 80 columns', () => {
    const order = Array.from({ length: 4000 }, (_, i) => ({
      ...FINDINGS.order[0],
      rank: i + 1,
      bed: `bed ${i}`,
      zone: `Z${8 - Math.floor(i / 500)}`,
      rank_low: Math.max(1, i - 200),
      rank_high: i + 200,
    }));
    const long = text({ ...FINDINGS, order });
    expect(long.split('\n').length).toBeLessThan(70);
    expect(long).toContain('more');
    expect(long).toContain('order.csv');
    for (const line of [...long.split('\n'), ...text(FINDINGS).split('\n')])
      expect(line.length, line).toBeLessThanOrEqual(80);
  });

  it('lets no control character of a name through', () => {
    const beds = FINDINGS.order.map((row) => ({ ...row, bed: '\u001b[31mred' }));
    expect(text({ ...FINDINGS, order: beds })).not.toContain('\u001b');
  });

  it('as JSON holds the same facts', () => {
    const facts = JSON.parse(summaryJson(FINDINGS, 'out'));
    expect(facts).toMatchObject({
      program: 'bedorder',
      version: '1.0.0',
      written: 'out',
      read: { beds: 3, warnings: 1 },
    });
    expect(facts.clocks[0].relations).toMatchObject({ tested: 1, agrees: 0, tied: 0 });
    expect(facts.clocks[0].relations.reversed[0].lower).toBe('Low cliff, "north"/A');
  });
});
