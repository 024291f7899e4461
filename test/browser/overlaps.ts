import type { Page } from 'playwright-core';

/** Pairs of labels of one figure that cover each other, and labels that stick out of their figure. */
export async function labelFaults(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const faults: string[] = [];
    for (const svg of document.querySelectorAll('svg.fig')) {
      const name = svg.querySelector('title')?.textContent ?? '';
      const frame = svg.getBoundingClientRect();
      const labels = [...svg.querySelectorAll('text')]
        .map((node) => ({ text: node.textContent ?? '', box: node.getBoundingClientRect() }))
        .filter((entry) => entry.text.trim() !== '' && entry.box.width > 0);
      for (const { text, box } of labels)
        if (
          box.left < frame.left - 1 ||
          box.right > frame.right + 1 ||
          box.top < frame.top - 1 ||
          box.bottom > frame.bottom + 1
        )
          faults.push(`${name}: "${text}" sticks out`);
      labels.sort((a, b) => a.box.top - b.box.top);
      for (let i = 0; i < labels.length; i++) {
        for (let k = i + 1; k < labels.length; k++) {
          const [a, b] = [labels[i].box, labels[k].box];
          if (b.top > a.bottom) break;
          const wide = Math.min(a.right, b.right) - Math.max(a.left, b.left);
          // Boxes of type hold room above and below the letters, so lines may touch by a third of their height.
          const high = Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top);
          if (wide > 1 && high > 0.36 * Math.min(a.height, b.height))
            faults.push(`${name}: "${labels[i].text}" and "${labels[k].text}"`);
        }
      }
    }
    return faults;
  });
}
