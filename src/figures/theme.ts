/*
 * Sizes and inks of every figure. One unit of a drawing is one CSS pixel, 1/96 inch, so that 180 mm are 680 units and
 * 10 units of type are 7.5 points: what journals ask of two-column figures.
 */

/** Two journal columns: 180 mm. */
export const WIDE = 680;
/** One journal column: 88 mm. */
export const NARROW = 332;

/** Type that every editor has. */
export const FONT = 'Helvetica, Arial, sans-serif';
/** Sizes of type in units. */
export const TYPE = { title: 12.5, label: 10, small: 9, tiny: 8.2 } as const;

/** Inks of a figure on white; the page swaps them by class in dark mode. */
export const INK = '#1b1a19';
/** Ink of less weight. */
export const SOFT = '#57534d';
/** Ink of the least weight. */
export const FAINT = '#8c867d';
/** The ground of a figure. */
export const PAPER = '#ffffff';
/** For what contradicts the field: always together with a sign of its own. */
export const ALARM = '#b3261e';

/** Classes that let the page swap a colour: by attribute and colour. */
export const SWAPS: Readonly<Record<string, string>> = {
  currentColor: 'k',
  [INK]: 'k',
  [SOFT]: 'm',
  [FAINT]: 'n',

  [PAPER]: 'p',
  [ALARM]: 'a',
};

/** Most beds that are drawn one by one; above it figures are summarised. */
export const MOST_BEDS = 180;
/** Most shells that are drawn one by one. */
export const MOST_SHELLS = 4000;
