import type { Findings } from '../model/index.js';
import { aminoAcidPairs } from './amino-acid-pairs.js';
import { clockViews } from './clock-view.js';
import { correlationPanel } from './correlation-panel.js';
import type { Figure } from './figure.js';
import { ratioAgainstGradient } from './gradient.js';
import { heightsAgainstRatio } from './heights.js';
import { ranksWithIntervals } from './ranks.js';
import { relationDifferences } from './relation-differences.js';
import { shellsByBed } from './shells-by-bed.js';
import { zoneCounts } from './zone-counts.js';
import { zoneRanges } from './zone-ranges.js';

export type { Figure } from './figure.js';

/**
 * Draws every figure the findings allow, in the order of the report; a figure with nothing to show is left out.
 * With several main clocks each has its own set, named after it. Every figure is one SVG document that stands alone.
 * @param findings what was found
 */
export function drawFigures(findings: Findings): Figure[] {
  const views = clockViews(findings);
  const kinds = [
    shellsByBed,
    correlationPanel,
    ranksWithIntervals,
    heightsAgainstRatio,
    relationDifferences,
    aminoAcidPairs,
    zoneRanges,
    zoneCounts,
    ratioAgainstGradient,
  ];
  return kinds.flatMap((draw) => views.flatMap((view) => draw(view, findings) ?? []));
}
