import type { ShellStatus } from '../model/index.js';
import { element, type SvgNode } from './svg-node.js';
import { INK } from './theme.js';

/** Shape of a shell by its status, as Plot names them: shape says what colour can't. */
export const SHAPE: Readonly<Record<ShellStatus, 'circle' | 'diamond' | 'times'>> = {
  kept: 'circle',
  doubtful: 'diamond',
  'set aside': 'times',
};

/** The sign of a shell for a legend. */
export function shellSign(status: ShellStatus, fill: string): SvgNode {
  if (status === 'kept') return element('circle', { r: 2.9, fill, stroke: INK, 'stroke-width': 0.6 });
  if (status === 'doubtful')
    return element('path', { d: 'M0,-4.2L3.2,0L0,4.2L-3.2,0Z', fill, stroke: INK, 'stroke-width': 0.9 });
  return element('path', { d: 'M-3,-3L3,3M3,-3L-3,3', stroke: INK, 'stroke-width': 1.5, fill: 'none' });
}

/** The sign of a bed's mean: a short upright bar. */
export const meanSign = (): SvgNode =>
  element(
    'g',
    { stroke: INK, fill: 'none' },
    element('path', { d: 'M0,-5V5', 'stroke-width': 1.6 }),
    element('path', { d: 'M-7,0H7', 'stroke-width': 0.9 }),
  );

/** The sign of a bed of mixed age: a disc half filled. */
export const mixedSign = (): SvgNode =>
  element(
    'g',
    {},
    element('circle', { r: 4, fill: '#ffffff', stroke: INK, 'stroke-width': 0.9 }),
    element('path', { d: 'M0,-4A4,4 0 0 1 0,4Z', fill: INK }),
  );
