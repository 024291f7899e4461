import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { renderReport } from '../../src/report/index.js';
import { fixture } from '../report/fixture.js';
import { browserThere, open, startBrowser } from './browser.js';
import { pictureDifference, pictureReader, type Thumbnail } from './pictures.js';

const GOLDEN = fileURLToPath(new URL('./golden/pictures.txt', import.meta.url));

/*
 * Pictures of the page against those that were looked at and found good, as coarse greys. After a wanted change:
 * GOLDEN=write npm run test:browser, look at the page, and review the change.
 */
describe.skipIf(!browserThere)('pictures of the page', () => {
  let browser: Browser;
  const folder = mkdtempSync(join(tmpdir(), 'bedorder-pictures-'));
  const path = join(folder, 'report.html');

  beforeAll(async () => {
    writeFileSync(path, renderReport(fixture({ gradient: true })));
    browser = await startBrowser();
  });
  afterAll(async () => {
    await browser?.close();
    rmSync(folder, { recursive: true, force: true });
  });

  it('are as they were at two widths and in print', async () => {
    const read = await pictureReader(browser);
    const now: Record<string, Thumbnail> = {};
    for (const [name, width, print] of [
      ['wide', 1400, false],
      ['narrow', 400, false],
      ['print', 680, true],
    ] as const) {
      const { page } = await open(browser, path, { width });
      if (print) await page.emulateMedia({ media: 'print' });
      for (const figure of await page.locator('figure').all())
        now[`${name} ${await figure.getAttribute('id')}`] = await read(await figure.locator('svg').screenshot());
      now[`${name} findings`] = await read(await page.locator('#findings').screenshot());
      await page.close();
    }
    if (process.env.GOLDEN === 'write') {
      mkdirSync(fileURLToPath(new URL('./golden', import.meta.url)), { recursive: true });
      const rows = Object.entries(now).map(
        ([name, picture]) => `  ${JSON.stringify(name)}: ${JSON.stringify(picture)}`,
      );
      writeFileSync(GOLDEN, `{\n${rows.join(',\n')}\n}\n`);
    }
    const then = JSON.parse(readFileSync(GOLDEN, 'utf8')) as Record<string, Thumbnail>;
    expect(Object.keys(now)).toEqual(Object.keys(then));
    const changed = Object.keys(now).flatMap((name) => pictureDifference(now[name], then[name]) ?? []);
    expect(changed).toEqual([]);
  });

  it('would differ if a figure changed', () => {
    const then = JSON.parse(readFileSync(GOLDEN, 'utf8')) as Record<string, Thumbnail>;
    expect(pictureDifference(then['wide fig-shells'], then['wide fig-correlation'])).not.toBeNull();
    const one = then['wide fig-correlation'];
    const inverse = { ...one, grey: one.grey.map((grey) => 255 - grey) };
    expect(pictureDifference(one, inverse)).not.toBeNull();
  });

  it.each(['deuteranopia', 'achromatopsia'] as const)('tell the zones apart under %s', async (type) => {
    const { page } = await open(browser, path);
    const session = await page.context().newCDPSession(page);
    await session.send('Emulation.setEmulatedVisionDeficiency', { type });
    const chips = page.locator('.zonekey .chip');
    const colours: number[][] = [];
    const reader = await browser.newPage();
    for (const chip of await chips.all()) {
      const png = (await chip.screenshot()).toString('base64');
      colours.push(
        await reader.evaluate(async (url) => {
          const image = new Image();
          image.src = url;
          await image.decode();
          const canvas = document.createElement('canvas');
          canvas.width = image.width;
          canvas.height = image.height;
          const context = canvas.getContext('2d')!;
          context.drawImage(image, 0, 0);
          // inside the border, left of the letters
          return [...context.getImageData(3, Math.floor(image.height / 2), 1, 1).data].slice(0, 3);
        }, `data:image/png;base64,${png}`),
      );
    }
    expect(colours).toHaveLength(4);
    for (let i = 0; i < colours.length; i++)
      for (let k = 0; k < i; k++) {
        const apart = Math.hypot(...colours[i].map((c, at) => c - colours[k][at]));
        expect(apart, `Z${k + 1} and Z${i + 1}: ${colours[k]} and ${colours[i]}`).toBeGreaterThan(45);
      }
    await page.close();
    await reader.close();
  });
});
