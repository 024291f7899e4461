import { expect, it } from 'vitest';
import type { Findings } from '../../src/index.js';
import { TABLES } from '../../src/output/tables/index.js';
import { tableText } from '../house/written.js';
import { found } from './found.js';

/** Names that programs have tripped over. */
const NAMES = [
  '__proto__',
  'constructor',
  'toString',
  'hasOwnProperty',
  '1',
  '=1+1',
  '@here',
  'zone',
  'null',
  'a;b',
  '<img src=x onerror=alert(1)>',
  '$& $1',
  'Skagerrak 🐚',
  'Zürich',
  '海岸',
  'x'.repeat(2_000),
];

function tables(findings: Findings): Map<string, string> {
  return new Map(TABLES.map((table) => [table.name, tableText(table, findings)]));
}

const survey = (as: (name: string, at: number) => { section: string; bed: string; taxon: string }, count = 2) =>
  `section,bed,taxon,shell,level,A/I\n${NAMES.flatMap((name, at) => {
    const { section, bed, taxon } = as(name, at);
    return Array.from({ length: count }, (_, b) =>
      [0, 1, 2].map(
        (k) => `${section},${bed}${b || ''},${taxon},${k},${b + 1},${((0.4 - 0.2 * b) * (1 + 0.02 * k)).toFixed(3)}\n`,
      ),
    ).flat();
  }).join('')}`;

it.each([
  ['sections', (name: string) => ({ section: name, bed: 'b', taxon: 'Mya' })],
  ['beds', (name: string, at: number) => ({ section: `S${at}`, bed: name, taxon: 'Mya' })],
])('strange names of %s stand in every table, the page and the order as they are', async (part, as) => {
  const { findings, report } = await found({ shells: survey(as) });
  expect(findings.beds).toHaveLength(2 * NAMES.length);
  expect(findings.order).toHaveLength(2 * NAMES.length);
  const field = part === 'sections' ? 'section' : 'bed';
  expect(new Set(findings.order.map((row) => row[field]))).toEqual(new Set(findings.beds.map((row) => row[field])));
  for (const name of NAMES)
    expect(
      findings.beds.some((row) => row[field] === name),
      name.slice(0, 40),
    ).toBe(true);
  for (const zone of findings.zones) {
    const inZone = findings.beds.filter((row) => row.zone === zone.zone).length;
    const row = findings.correlation.find((one) => one.zone === zone.zone)!;
    expect(Object.values(row.sections).flat()).toHaveLength(inZone);
  }
  expect(report).not.toContain('<img src=x');
  const csv = tables(findings);
  // nothing that a spreadsheet would run
  for (const [name, text] of csv) expect(text, name).not.toMatch(/(?:^|,|;)"?[=@]/m);
  expect(csv.get('beds')).toContain("'=1+1");
  expect(csv.get('correlation')!.split('\n')[0].split(',').length).toBeGreaterThan(
    part === 'sections' ? NAMES.length : 2,
  );
});

it('strange names of taxa make clocks of their own', async () => {
  const { findings } = await found({ shells: survey((name, at) => ({ section: `S${at}`, bed: 'b', taxon: name })) });
  const taxa = findings.clocks.filter(({ main }) => main).map(({ taxon }) => taxon);
  expect(taxa).toEqual(NAMES);
});
