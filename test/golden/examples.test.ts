import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { drawFigures } from '../../src/figures/index.js';
import { analyse, DEFAULT_OPTIONS, runTask, surveyFromBytes, type Task } from '../../src/index.js';
import { COAST_PLAN } from './examples/coast-plan.js';
import { coastFiles } from './examples/coast-tables.js';
import { spreadsheetFiles, summaryFiles, warmingFiles } from './examples/further-tables.js';

const EXAMPLES = fileURLToPath(new URL('../../examples/', import.meta.url));
const files = { ...coastFiles(), ...summaryFiles(), ...spreadsheetFiles(), ...warmingFiles() };

/** The spreadsheet is saved in Windows-1252; its letters are all in Latin-1 too, where both agree. */
const bytes = (path: string, text: string) => Buffer.from(text, path === 'spreadsheet/shells.csv' ? 'latin1' : 'utf8');

const PICTURE = join(EXAMPLES, 'correlation.svg');

/** The correlation panel of the coast, as the tool draws it. */
async function drawPicture(): Promise<string> {
  const bytesOf = (path: string) => ({
    file: path,
    bytes: new TextEncoder().encode(files[path as keyof typeof files]),
  });
  const { survey } = await surveyFromBytes({
    shells: bytesOf('coast/shells.csv'),
    beds: bytesOf('coast/beds.csv'),
    relations: bytesOf('coast/relations.csv'),
  });
  const host = { progress: () => {}, map: async (tasks: readonly Task[]) => tasks.map(runTask) };
  const findings = await analyse(survey!, DEFAULT_OPTIONS, host);
  return drawFigures(findings).find((figure) => figure.name === 'correlation')!.svg;
}

describe('the example surveys', () => {
  it.each(Object.entries(files))('%s is what its script makes (`npm run golden` writes it anew)', (path, text) => {
    const target = join(EXAMPLES, path);
    if (process.env.GOLDEN === 'write') {
      mkdirSync(dirname(target), { recursive: true });
      writeFileSync(target, bytes(path, text));
    }
    expect(existsSync(target)).toBe(true);
    expect(readFileSync(target).equals(bytes(path, text))).toBe(true);
  });

  it('the coast is as large, and as troubled, as its page says', () => {
    const beds = COAST_PLAN.flatMap((section) => section.beds);
    const shells = beds.reduce((sum, bed) => sum + bed.shells, 0);
    expect(COAST_PLAN.length).toBeGreaterThanOrEqual(12);
    expect(beds.length).toBeGreaterThanOrEqual(30);
    expect(Math.abs(shells - 200)).toBeLessThanOrEqual(20);
    const page = readFileSync(join(EXAMPLES, 'coast/README.md'), 'utf8');
    expect(page).toContain(`${COAST_PLAN.length} sections, ${beds.length} beds and ${shells} shells`);
    for (const section of COAST_PLAN) {
      for (const bed of section.beds) {
        for (const shell of Object.keys(bed.troubles ?? {})) {
          expect(page).toContain(`${section.section}/${bed.bed}/${shell}`);
        }
        if (bed.shells <= 2 || bed.mixedWith !== undefined || bed.burial < 1)
          expect(page).toContain(`${section.section}/${bed.bed}`);
      }
    }
  });

  it('the picture of the first page shows every section of the coast', async () => {
    if (process.env.GOLDEN === 'write') writeFileSync(PICTURE, `${await drawPicture()}\n`);
    const picture = readFileSync(PICTURE, 'utf8');
    expect(picture).toMatch(/^<svg [\s\S]*<\/svg>\s*$/);
    for (const { section, beds } of COAST_PLAN) {
      expect(picture).toContain(`>${section}<`);
      for (const { bed } of beds) expect(picture).toContain(`>${bed}<`);
    }
  });
});
