import { describe, expect, it } from 'vitest';
import type { DateRecord } from '../../src/model/index.js';
import { judgeDates } from '../../src/planning/judge-dates.js';
import { createRandom } from '../../src/statistics/index.js';
import { cases } from '../house/effort.js';
import { datedCoast, drawnDates, ZONE_AGES } from './dated-coast.js';
import { type MadeBed, madeFindings } from './findings.js';

const bed = (name: string, mean: number, zone: string): MadeBed => ({ section: name, bed: '1', mean, shells: 6, zone });
const date = (section: string, age_ka: number, error_ka: number, more: Partial<DateRecord> = {}): DateRecord => ({
  section,
  bed: '1',
  age_ka,
  error_ka,
  limit: 'equal',
  method: null,
  file: 'dates.csv',
  line: 2,
  ...more,
});
const coast = madeFindings([
  bed('A', -1.2, 'Z3'),
  bed('B', -1.6, 'Z2'),
  bed('C', -1.62, 'Z2'),
  bed('D', -2, 'Z1'),
  bed('E', -2.03, 'Z1'),
]);
const verdicts = (dates: readonly DateRecord[]) =>
  judgeDates(coast, dates).pairs.map((row) => `${row.older} ${row.relation} ${row.younger}: ${row.verdict}`);

describe('judgeDates', () => {
  it('tells agreement, contradiction and silence apart by the errors', () => {
    expect(verdicts([date('A', 200, 10), date('D', 80, 4)])).toEqual(['A/1 older D/1: agrees']);
    expect(verdicts([date('A', 80, 4), date('D', 200, 10)])).toEqual(['A/1 older D/1: contradicts']);
    expect(verdicts([date('A', 80, 40), date('D', 100, 50)])).toEqual(["A/1 older D/1: can't tell"]);
    expect(verdicts([date('A', 200, 90), date('D', 180, 80)])).toEqual(["A/1 older D/1: can't tell"]);
  });

  it('lets a limit speak on its own side only', () => {
    const older = (age: number) => date('D', age, 5, { limit: 'older' });
    const younger = (age: number) => date('A', age, 5, { limit: 'younger' });
    // D is known to be younger than A
    expect(verdicts([date('A', 100, 5), older(200)])).toEqual(['A/1 older D/1: contradicts']);
    expect(verdicts([date('A', 100, 5), older(20)])).toEqual(["A/1 older D/1: can't tell"]);
    expect(verdicts([younger(100), date('D', 200, 5)])).toEqual(['A/1 older D/1: contradicts']);
    expect(verdicts([younger(300), date('D', 200, 5)])).toEqual(["A/1 older D/1: can't tell"]);
    expect(verdicts([younger(100), older(200)])).toEqual(['A/1 older D/1: contradicts']);
    expect(verdicts([date('A', 200, 5, { limit: 'older' }), date('D', 100, 5, { limit: 'younger' })])).toEqual([
      'A/1 older D/1: agrees',
    ]);
    expect(verdicts([date('A', 1, 0.1, { limit: 'older' }), older(200)])).toEqual(["A/1 older D/1: can't tell"]);
  });

  it('names the one date that all contradictions share', () => {
    const found = judgeDates(coast, [
      date('A', 200, 8),
      date('B', 125, 5, { line: 3 }),
      date('C', 122, 5, { line: 4 }),
      date('D', 320, 9, { line: 5 }),
      date('E', 80, 4, { line: 6 }),
    ]);
    expect(found.fewest).toBe(1);
    expect(found.doubts).toMatchObject([{ bed: 'D/1', line: 5, in_every: true, contradictions: 4 }]);
    expect(found.remarks.join(' ')).toMatch(/Leaving out one date .*D\/1 \(320 ± 9 ka; in 4 contradictions\)/);
  });

  it('reports both where either of two would do', () => {
    const found = judgeDates(coast, [date('A', 80, 4), date('D', 200, 10)]);
    expect(found.fewest).toBe(1);
    expect(found.doubts.map(({ bed: name, in_every }) => [name, in_every])).toEqual([
      ['A/1', false],
      ['D/1', false],
    ]);
    expect(found.remarks.join(' ')).toMatch(/Several choices do equally well/);
  });

  it('finds a date moved to the neighbouring zone, though it contradicts no order by itself', () => {
    const found = judgeDates(coast, [date('B', 125, 5), date('C', 121, 5), date('D', 126, 5), date('E', 80, 4)]);
    expect(found.pairs[0]).toMatchObject({
      older: 'E/1',
      younger: 'D/1',
      relation: 'one zone',
      verdict: 'contradicts',
    });
  });

  it('lets a zone span some time where no other zone is reached', () => {
    const found = judgeDates(coast, [date('B', 128, 1), date('C', 118, 1), date('D', 80, 1), date('A', 200, 2)]);
    expect(found.fewest).toBe(0);
    expect(found.pairs.find((row) => row.relation === 'one zone')?.verdict).toBe('differs');
  });

  it('compares two dates of one bed', () => {
    expect(verdicts([date('A', 80, 4), date('A', 125, 5, { line: 3 })])).toEqual(['A/1 as old A/1: contradicts']);
    expect(verdicts([date('A', 122, 4), date('A', 125, 5, { line: 3 })])).toEqual(['A/1 as old A/1: agrees']);
  });

  it("holds the field's certain relations as known, and no others", () => {
    const tied = [bed('A', -1.6, 'Z1'), bed('B', -1.6, 'Z1')];
    const withRelation = (certainty: 'certain' | 'probable', verdict_after: 'tied' | 'reversed') =>
      judgeDates({ ...madeFindings(tied, { relations: [{ lower: 'A/1', upper: 'B/1', certainty, verdict_after }] }) }, [
        date('A', 80, 2),
        date('B', 125, 2),
      ]).pairs.map((row) => [row.relation, row.p_relation, row.verdict]);
    expect(withRelation('certain', 'tied')).toEqual([['older', 1, 'contradicts']]);
    expect(withRelation('probable', 'tied')).toEqual([]);
    expect(withRelation('certain', 'reversed')).toEqual([]);
  });

  it('gives tau-b a clock, and an interval from 5 dates on', () => {
    const dates = [date('A', 200, 5), date('B', 125, 5), date('C', 121, 5), date('D', 80, 5), date('E', 78, 5)];
    const [tau] = judgeDates(coast, dates).taus;
    expect(tau).toMatchObject({ clock: 'Invenus THAA Ile', dates: 5, tau_b: 1, high: 1 });
    expect(tau.low).toBeLessThan(1);
    expect(judgeDates(coast, dates.slice(0, 3)).taus[0]).toMatchObject({ dates: 3, low: null, high: null });
  });

  it('names dates of beds that the results do not hold, and survives having none', () => {
    expect(judgeDates(coast, [date('Nowhere', 80, 4)]).remarks.join(' ')).toMatch(/not used: Nowhere\/1/);
    expect(judgeDates(coast, []).pairs).toEqual([]);
    expect(() => judgeDates(coast, [], { alpha: Number.NaN })).toThrow(/alpha/);
  });
});

describe('judgeDates over many simulated coasts', () => {
  // of 150 runs more than 5 % contradict with a chance of 98 % where 10 % of all do (binomial, computed)
  const runs = cases(150, 400);

  it('contradicts good dates of 5 % error in at most 5 % of runs, also where zones are not well apart', () => {
    for (const step of [Math.log(1.3), Math.log(1.15)]) {
      const random = createRandom(21);
      let contradicted = 0;
      for (let run = 0; run < runs; run++) {
        const { findings, zone } = datedCoast(random, { step });
        const dates = drawnDates(random, [...zone.keys()].slice(0, 16), (at) => ZONE_AGES[zone[at]]);
        const { fewest } = judgeDates(findings, dates);
        if (fewest > 0) contradicted++;
      }
      expect(contradicted / runs).toBeLessThanOrEqual(0.05);
    }
  });

  it('finds a date swapped between any two zones in 95 % of runs or more, and names it alone in 90 % or more', () => {
    const random = createRandom(22);
    let found = 0;
    let alone = 0;
    for (let run = 0; run < runs; run++) {
      const { findings, zone } = datedCoast(random);
      const swapped = random.integer(16);
      const other = (zone[swapped] + 1 + random.integer(ZONE_AGES.length - 1)) % ZONE_AGES.length;
      const dates = drawnDates(
        random,
        [...zone.keys()].slice(0, 16),
        (at) => ZONE_AGES[at === swapped ? other : zone[at]],
      );
      const { doubts } = judgeDates(findings, dates);
      if (doubts.some((doubt) => doubt.line === swapped + 2)) found++;
      if (doubts.length === 1 && doubts[0].line === swapped + 2) alone++;
    }
    expect(found / runs).toBeGreaterThanOrEqual(0.95);
    expect(alone / runs).toBeGreaterThanOrEqual(0.9);
  });
});
