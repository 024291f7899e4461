/*
 * The invented coast, laid out by hand. No section, number or name of it is real; the coordinates lie in the open South
 * Pacific, days from any shore. Zone 1 is the youngest.
 */

/** What is odd about one shell. `from` is the zone its ratios come from. */
export type Trouble =
  | { readonly kind: 'reworked' | 'intruded'; readonly from: number }
  | { readonly kind: 'contaminated' }
  | { readonly kind: 'altered' }
  | { readonly kind: 'replicate off' };

export interface PlanBed {
  readonly bed: string;
  readonly zone: number;
  readonly shells: number;
  /** Place in the section, in the section's own kind; null on a terrace. */
  readonly place: number | null;
  readonly elevation: number;
  readonly burial: number;
  readonly note?: string;
  /** Zone of each shell from the second half on, in a bed of mixed age. */
  readonly mixedWith?: number;
  /** Shell number to its trouble. */
  readonly troubles?: Readonly<Record<number, Trouble>>;
}

export interface PlanSection {
  readonly section: string;
  readonly km: number;
  readonly kind: 'height_m' | 'depth_m' | 'level' | null;
  readonly coordinates?: false;
  /** As logged, from the lowest bed upwards. */
  readonly beds: readonly PlanBed[];
}

const bed = (
  name: string,
  zone: number,
  shells: number,
  place: number | null,
  elevation: number,
  burial: number,
  more: Pick<PlanBed, 'note' | 'mixedWith' | 'troubles'> = {},
): PlanBed => ({ bed: name, zone, shells, place, elevation, burial, ...more });

/** Sections in coast order. */
export const COAST_PLAN: readonly PlanSection[] = [
  {
    section: 'Low Quern',
    km: 0,
    kind: 'height_m',
    beds: [
      bed('A', 4, 5, 0, 4.2, 7.5, {
        note: 'cemented shingle with open burrows',
        troubles: { 5: { kind: 'intruded', from: 1 } },
      }),
      bed('B', 3, 5, 2.4, 6.6, 5.1),
      bed('C', 1, 5, 4.9, 9.1, 2.6),
    ],
  },
  {
    section: 'Gannet Stair',
    km: 9,
    kind: null,
    beds: [
      bed('T4', 4, 5, null, 34, 2.2, { note: 'highest terrace' }),
      bed('T3', 3, 5, null, 21.5, 1.9),
      bed('T2', 2, 4, null, 11.5, 1.6),
      bed('T1', 1, 6, null, 4.4, 1.7, { note: 'lowest terrace' }),
    ],
  },
  {
    section: 'Merrow Cove',
    km: 17,
    kind: 'height_m',
    beds: [
      bed('A', 3, 6, 0.3, 5.3, 6.8),
      bed('B', 2, 5, 2.1, 7.1, 5),
      bed('C', 1, 5, 4.6, 9.6, 2.5, {
        note: 'storm beach with cobbles of bed A',
        troubles: { 3: { kind: 'reworked', from: 3 } },
      }),
    ],
  },
  {
    section: 'Tallow Point',
    km: 26,
    kind: 'height_m',
    beds: [bed('A', 4, 4, 0, 7.8, 8.3), bed('B', 2, 5, 3.2, 11, 5.1), bed('C', 1, 5, 5.4, 13.2, 2.9)],
  },
  {
    section: 'Old Kiln',
    km: 33,
    kind: 'level',
    beds: [bed('A', 3, 5, 1, 6.9, 5.4), bed('B', 2, 6, 2, 9.4, 2.9, { note: 'pale ash at the top' })],
  },
  {
    section: 'Withy Gut',
    km: 41,
    kind: 'height_m',
    beds: [
      bed('A', 4, 5, 0, 3.6, 10.1),
      bed('B', 2, 5, 2.2, 5.8, 7.9, { note: 'logged from a rope' }),
      bed('C', 3, 5, 4.1, 7.7, 6, { note: 'logged from a rope' }),
      bed('D', 1, 5, 6.7, 10.3, 3.4),
    ],
  },
  {
    section: 'Sixpenny Head',
    km: 52,
    kind: 'height_m',
    beds: [
      bed('A', 4, 5, 0.5, 8.1, 7),
      bed('B', 2, 6, 3, 10.6, 4.5, { note: 'channel lag', mixedWith: 3 }),
      bed('C', 1, 5, 4.8, 12.4, 2.7),
    ],
  },
  {
    section: 'Rushlight Bay',
    km: 60,
    kind: 'height_m',
    coordinates: false,
    beds: [bed('A', 3, 5, 0, 5.9, 4.4, { note: 'position not taken' }), bed('B', 2, 4, 1.9, 7.8, 2.5)],
  },
  {
    section: 'Cinder Steps',
    km: 71,
    kind: 'height_m',
    beds: [
      bed('A', 4, 5, 0, 6.2, 8.8),
      bed('B', 3, 6, 2.7, 8.9, 6.1, { note: 'old hearth above', troubles: { 2: { kind: 'altered' } } }),
      bed('C', 2, 5, 5.3, 11.5, 3.5),
    ],
  },
  {
    section: 'Lanthorn Core',
    km: 78,
    kind: 'depth_m',
    beds: [bed('A', 3, 4, 11.4, -5.9, 11.4), bed('B', 2, 4, 7.2, -1.7, 7.2), bed('C', 1, 3, 3.1, 2.4, 3.1)],
  },
  {
    section: 'Marram Hole',
    km: 86,
    kind: 'height_m',
    beds: [bed('A', 3, 5, 0, 4.8, 6.3), bed('B', 2, 2, 2.3, 7.1, 4), bed('C', 1, 5, 4.2, 9, 2.1)],
  },
  {
    section: 'Pewter Ledge',
    km: 95,
    kind: 'height_m',
    beds: [
      bed('A', 4, 5, 0.2, 7.4, 8.6),
      bed('B', 2, 6, 3.6, 10.8, 5.2, { note: 'roots', troubles: { 4: { kind: 'contaminated' } } }),
      bed('C', 1, 4, 6.1, 13.3, 2.7),
    ],
  },
  {
    section: 'Thrift Bank',
    km: 104,
    kind: 'height_m',
    beds: [
      bed('A', 3, 5, 0, 6.1, 5.2),
      bed('B', 2, 5, 2.2, 8.3, 3, { note: 'pale ash at the top', troubles: { 1: { kind: 'replicate off' } } }),
    ],
  },
  {
    section: 'Kelp House',
    km: 112,
    kind: 'height_m',
    beds: [bed('A', 4, 1, 0, 3.9, 7.7), bed('B', 3, 5, 1.8, 5.7, 5.9), bed('C', 1, 5, 4.4, 8.3, 3.3)],
  },
  {
    section: 'Barrel Sands',
    km: 120,
    kind: 'height_m',
    beds: [bed('A', 2, 5, 0, 6.4, 2.6), bed('B', 1, 5, 2, 8.4, 0.6, { note: 'under thin turf' })],
  },
];

/** Field statements across sections, and down the terraces of Gannet Stair. */
export const COAST_RELATIONS: readonly (readonly [string, string, string, string, string])[] = [
  ['Gannet Stair/T4', 'Gannet Stair/T3', 'staircase', 'older', 'certain'],
  ['Gannet Stair/T3', 'Gannet Stair/T2', 'staircase', 'older', 'certain'],
  ['Gannet Stair/T2', 'Gannet Stair/T1', 'staircase', 'older', 'certain'],
  ['Tallow Point/A', 'Merrow Cove/B', 'inset', 'older', 'certain'],
  ['Cinder Steps/B', 'Marram Hole/C', 'inclusion', 'older', 'certain'],
  ['Pewter Ledge/A', 'Thrift Bank/A', 'cross-cutting', 'older', 'probable'],
  ['Old Kiln/B', 'Thrift Bank/B', 'marker', 'same', 'certain'],
  ['Lanthorn Core/B', 'Barrel Sands/A', 'marker', 'same', 'probable'],
];

/** Invented luminescence-like ages; the one of Marram Hole/A contradicts the order. */
export const COAST_DATES: readonly (readonly [string, string, number, number, string, string])[] = [
  ['Low Quern', 'A', 318, 24, 'equal', 'luminescence'],
  ['Low Quern', 'C', 78, 5, 'equal', 'luminescence'],
  ['Merrow Cove', 'B', 124, 8, 'equal', 'luminescence'],
  ['Tallow Point', 'C', 45, 2, 'older', 'radiocarbon'],
  ['Cinder Steps', 'B', 207, 14, 'equal', 'luminescence'],
  ['Marram Hole', 'A', 96, 6, 'equal', 'luminescence'],
  ['Pewter Ledge', 'A', 335, 27, 'equal', 'luminescence'],
  ['Thrift Bank', 'B', 131, 9, 'equal', 'luminescence'],
  ['Barrel Sands', 'B', 83, 6, 'equal', 'luminescence'],
];
