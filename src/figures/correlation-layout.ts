import { median } from '../statistics/index.js';
import type { BedView, ClockView } from './clock-view.js';

/** A bed's slice of its column: y grows downwards, in units, before the section is shifted. */
export interface Slice {
  readonly bed: BedView;
  readonly top: number;
  readonly bottom: number;
  /** Part of the column's width, for beds at one and the same place: 0 to 1. */
  readonly left: number;
  readonly right: number;
  /** False for a bed with no place in its section. */
  readonly placed: boolean;
}

/** One section as a column of slices, the lowest bed first. */
export interface SectionColumn {
  readonly section: string;
  readonly slices: readonly Slice[];
  /** Whether thickness follows metres. */
  readonly metric: boolean;
  /** How far the section is moved down so that its zones line up with its neighbours'. */
  readonly shift: number;
  readonly top: number;
  readonly bottom: number;
}

/** Thickness of a bed without metres, and the least a bed may have. */
const EVEN = 21;
const LEAST = 13;
const TALLEST = 250;

/** Units a metre at which every bed keeps the least thickness and no section grows too tall; null where there is none. */
export function metreScale(view: ClockView): number | null {
  const gaps: number[] = [];
  const spans: number[] = [];
  for (const section of view.sections) {
    const heights = metricHeights(view.beds.filter((bed) => bed.row.section === section));
    if (heights === null || heights.length < 2) continue;
    for (let i = 1; i < heights.length; i++) gaps.push(heights[i] - heights[i - 1]);
    spans.push(heights[heights.length - 1] - heights[0]);
  }
  if (gaps.length === 0) return null;
  const need = LEAST / Math.min(...gaps);
  if (!(need * Math.max(...spans) + EVEN <= TALLEST)) return null;
  // A long coast is drawn flatter, so that its rows fit one page.
  return Math.max(need, (view.sections.length > 15 ? 15.5 : EVEN) / median(gaps));
}

// Distinct heights above the lowest bed, ascending; null unless every placed bed has metres.
function metricHeights(beds: readonly BedView[]): number[] | null {
  const heights = beds.map((bed) => bedHeight(bed));
  if (heights.length === 0 || heights.some((height) => height === null)) return null;
  return [...new Set(heights as number[])].sort((a, b) => a - b);
}

/** Height in metres, growing upwards; null for levels and for beds without a place. */
export function bedHeight(bed: BedView): number | null {
  const place = bed.site?.place ?? null;
  if (place === null || place.kind === 'level') return null;
  return place.kind === 'height_m' ? place.value : -place.value;
}

// Upwards within the section whatever the kind of place.
const upwards = (bed: BedView): number | null => {
  const place = bed.site?.place ?? null;
  return place === null ? null : place.kind === 'depth_m' ? -place.value : place.value;
};

/** Lays every section out as a column, and shifts the columns so that zones run as level as they can. */
export function layColumns(view: ClockView): SectionColumn[] {
  const scale = metreScale(view);
  const raw = view.sections.map((section) =>
    layColumn(
      section,
      view.beds.filter((bed) => bed.row.section === section),
      scale,
    ),
  );
  return align(raw, view.zones.length);
}

function layColumn(section: string, beds: readonly BedView[], scale: number | null): SectionColumn {
  const placed = beds.filter((bed) => upwards(bed) !== null);
  // Beds without a place stand by their rank, the oldest lowest: all that is known of them.
  const floating = beds
    .filter((bed) => upwards(bed) === null)
    .sort((a, b) => (a.order?.rank ?? 0) - (b.order?.rank ?? 0));
  const steps = [...new Set(placed.map((bed) => upwards(bed)!))].sort((a, b) => a - b);
  const metric = scale !== null && metricHeights(placed) !== null && steps.length > 0;
  const slices: Slice[] = [];
  let y = 0;
  steps.forEach((step, i) => {
    const last = i === steps.length - 1;
    const thick = metric && !last ? Math.max((steps[i + 1] - step) * scale, LEAST) : EVEN;
    const here = placed.filter((bed) => upwards(bed) === step);
    here.forEach((bed, k) => {
      slices.push({
        bed,
        top: y - thick,
        bottom: y,
        left: k / here.length,
        right: (k + 1) / here.length,
        placed: true,
      });
    });
    y -= thick;
  });
  if (steps.length === 0) {
    for (const bed of floating) {
      slices.push({ bed, top: y - EVEN + 3, bottom: y, left: 0, right: 1, placed: false });
      y -= EVEN;
    }
    return { section, slices, metric: false, shift: 0, top: y, bottom: 0 };
  }
  // Beside beds with a place they stand apart, below the column.
  let below = floating.length > 0 ? 8 : 0;
  for (const bed of [...floating].reverse()) {
    slices.push({ bed, top: below, bottom: below + EVEN - 3, left: 0, right: 1, placed: false });
    below += EVEN;
  }
  return { section, slices, metric, shift: 0, top: y, bottom: Math.max(0, below) };
}

/*
 * Each zone gets a level, the mean of where it stands in the sections; each section moves to fit its zones to those
 * levels; and again, until both have settled. Sections keep their own heights: only the whole column moves.
 */
function align(columns: readonly SectionColumn[], zones: number): SectionColumn[] {
  const centres = columns.map((column) =>
    Array.from({ length: zones }, (_, zone) => {
      const own = column.slices.filter((slice) => slice.bed.zone === zone);
      return own.length === 0 ? null : own.reduce((sum, slice) => sum + (slice.top + slice.bottom) / 2, 0) / own.length;
    }),
  );
  const levels = Array.from({ length: zones }, (_, zone) => zone * EVEN * 1.6);
  const shifts = columns.map((column) => -(column.top + column.bottom) / 2);
  for (let pass = 0; pass < 30; pass++) {
    centres.forEach((own, c) => {
      const wants = own.flatMap((centre, zone) => (centre === null ? [] : [levels[zone] - centre]));
      if (wants.length > 0) shifts[c] = wants.reduce((a, b) => a + b, 0) / wants.length;
    });
    for (let zone = 0; zone < zones; zone++) {
      const at = centres.flatMap((own, c) => (own[zone] === null ? [] : [own[zone]! + shifts[c]]));
      if (at.length > 0) levels[zone] = at.reduce((a, b) => a + b, 0) / at.length;
    }
  }
  return columns.map((column, c) => ({ ...column, shift: Math.round(shifts[c]) }));
}
