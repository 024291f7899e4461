import type { Browser, Page } from 'playwright-core';

/** A picture as means of grey (0 to 255) over a coarse grid: what stays the same when type differs by a hair. */
export interface Thumbnail {
  readonly width: number;
  readonly height: number;
  readonly grey: readonly number[];
}

const CELL = 32;

/** Reads pictures in a page of its own, since the report lets no picture in. */
export async function pictureReader(browser: Browser): Promise<(png: Buffer) => Promise<Thumbnail>> {
  const page: Page = await browser.newPage();
  return async (png) =>
    page.evaluate(
      async ({ url, cell }) => {
        const image = new Image();
        image.src = url;
        await image.decode();
        const canvas = document.createElement('canvas');
        canvas.width = image.width;
        canvas.height = image.height;
        const context = canvas.getContext('2d')!;
        context.drawImage(image, 0, 0);
        const { data } = context.getImageData(0, 0, image.width, image.height);
        const [width, height] = [Math.ceil(image.width / cell), Math.ceil(image.height / cell)];
        const sums = new Array<number>(width * height).fill(0);
        const counts = new Array<number>(width * height).fill(0);
        for (let y = 0; y < image.height; y++)
          for (let x = 0; x < image.width; x++) {
            const at = Math.floor(y / cell) * width + Math.floor(x / cell);
            const k = 4 * (y * image.width + x);
            sums[at] += 0.2126 * data[k] + 0.7152 * data[k + 1] + 0.0722 * data[k + 2];
            counts[at]++;
          }
        return { width, height, grey: sums.map((sum, i) => Math.round(sum / counts[i])) };
      },
      { url: `data:image/png;base64,${png.toString('base64')}`, cell: CELL },
    );
}

/** How far two pictures are apart: a word where their sizes differ, else the mean and the largest difference of grey. */
export function pictureDifference(a: Thumbnail, b: Thumbnail): string | null {
  if (Math.abs(a.width - b.width) > 1 || Math.abs(a.height - b.height) > 1)
    return `${a.width} x ${a.height} cells against ${b.width} x ${b.height}`;
  let sum = 0;
  let largest = 0;
  let cells = 0;
  for (let y = 0; y < Math.min(a.height, b.height); y++)
    for (let x = 0; x < Math.min(a.width, b.width); x++) {
      const apart = Math.abs(a.grey[y * a.width + x] - b.grey[y * b.width + x]);
      sum += apart;
      largest = Math.max(largest, apart);
      cells++;
    }
  const mean = sum / cells;
  return mean > 2 || largest > 60 ? `mean ${mean.toFixed(1)}, largest ${largest} of 255` : null;
}
