import { expect, it } from 'vitest';
import { cases } from '../house/effort.js';
import { found, said } from './found.js';
import { aboutRatio, chainOfSections, foursOfBeds, oneSection, shellsTable } from './surveys.js';

/* Seconds of the processor are several times what an idle machine of two cores needs: a hang fails, a busy machine does not. */

/** Repeats of bootstraps, which are the same work over and over: none of these claims hangs on how many. */
const FEW = { simulations: 19 };

/** Beds of a long chain: beyond the 400 that have pairs, the 600 that the mixture is searched on, and the 1,000 sampled longer. */
const LONG_CHAIN = cases(1100, 2000);

it.each([
  [`${LONG_CHAIN} beds in one section`, { shells: oneSection(LONG_CHAIN) }],
  [`a chain of ${LONG_CHAIN} relations from section to section`, chainOfSections(LONG_CHAIN)],
])('%s: ranks are the ones of superposition, none is reversed', async (_, texts) => {
  const { findings, seconds } = await found(texts, FEW);
  expect(seconds).toBeLessThan(25);
  expect(findings.order).toHaveLength(LONG_CHAIN);
  const number = ({ section, bed }: { section: string; bed: string }) => Number(`${section}${bed}`.replace(/\D/g, ''));
  expect(findings.order.map(number)).toEqual(Array.from({ length: LONG_CHAIN }, (_, at) => at));
  expect(findings.order.every(({ rank, rank_low, rank_high }) => rank === rank_low && rank === rank_high)).toBe(true);
  expect(findings.relations.filter(({ verdict_after }) => verdict_after === 'reversed')).toEqual([]);
  // what the sampling can't say of so long a chain is said
  if (!findings.diagnostics[0].converged) expect(said(findings)).toMatch(/has not settled/);
});

it('400 beds have their pairs, 401 have none, and the order stays', async () => {
  const [few, many] = [await found({ shells: foursOfBeds(400) }, FEW), await found({ shells: foursOfBeds(401) }, FEW)];
  expect(few.findings.pairs).toHaveLength((400 * 399) / 2);
  expect(many.findings.pairs).toHaveLength(0);
  for (const { findings, seconds } of [few, many]) {
    expect(seconds).toBeLessThan(25);
    expect(findings.clocks[0]).toMatchObject({ verdict: 'zones', zones: 4 });
    expect(findings.diagnostics[0].converged).toBe(true);
  }
});

it('a bed of 5,000 shells is as sure as it is, and takes no other with it', async () => {
  const about = aboutRatio(7);
  const rows = [0, 1, 2, 3].flatMap((b) =>
    Array.from(
      { length: b === 1 ? 5000 : 5 },
      (_, k) => [`S${b >> 1}`, `b${b}`, 2 - (b % 2), k, about(0.1 * 1.5 ** b)] as const,
    ),
  );
  const { findings, report, seconds } = await found({ shells: shellsTable(rows) }, FEW);
  expect(seconds).toBeLessThan(15);
  const bed = findings.beds.find((row) => row.bed === 'b1')!;
  expect(bed.shells + bed.set_aside).toBe(5000);
  expect(bed.log_mean).toBeCloseTo(Math.log(0.15), 2);
  expect(bed.log_se! * Math.sqrt(bed.shells)).toBeCloseTo(findings.clocks[0].scatter, 3);
  // of 5,000 sound shells hardly any is set aside
  expect(bed.set_aside).toBeLessThan(5);
  expect(report.length).toBeLessThan(8e6);
  expect(findings.order.map((row) => row.bed)).toEqual(['b3', 'b2', 'b1', 'b0']);
});
