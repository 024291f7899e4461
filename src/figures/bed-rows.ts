import type { BedView, ClockView } from './clock-view.js';

/** A line of a figure that lists beds: the head of a zone, or one bed. */
type BedLine =
  | { readonly kind: 'zone'; readonly zone: number; readonly y: number }
  | { readonly kind: 'bed'; readonly zone: number; readonly y: number; readonly bed: BedView };

/** One column of lines, and where each zone's band begins and ends in it. */
export interface BedColumn {
  readonly lines: readonly BedLine[];
  readonly bands: readonly { readonly zone: number; readonly top: number; readonly bottom: number }[];
  readonly bottom: number;
}

const HEAD = 17;

/** Columns and the height of a line for a list of beds: what fits a printed page with type that is still read. */
export function listShape(lines: number): { readonly columns: number; readonly line: number } {
  return lines <= 66 ? { columns: 1, line: 12 } : { columns: Math.ceil(lines / 80), line: 10.3 };
}

/**
 * Lists the beds by zone, youngest at the top as in the field, and breaks the list into columns that fit a page.
 * @param view the clock
 * @param top where the first line begins
 */
export function bedColumns(view: ClockView, top: number): { readonly columns: BedColumn[]; readonly line: number } {
  const groups = [...view.zones.keys(), -1]
    .map((zone) => ({ zone, beds: youngestFirst(view.beds.filter((bed) => bed.zone === zone)) }))
    .filter((group) => group.beds.length > 0);
  const total = view.beds.length + groups.length * 1.5;
  const { columns, line } = listShape(total);
  const each = Math.ceil(total / columns);
  const out: BedColumn[] = [];
  let lines: BedLine[] = [];
  let bands: { zone: number; top: number; bottom: number }[] = [];
  let y = top;
  const close = () => {
    if (lines.length > 0) out.push({ lines, bands, bottom: y });
    lines = [];
    bands = [];
    y = top;
  };
  for (const { zone, beds } of groups) {
    let open = false;
    for (const bed of beds) {
      if (out.length < columns - 1 && (y - top) / line > each - (open ? 0 : 2)) {
        close();
        open = false;
      }
      if (!open) {
        if (lines.length > 0) y += 5;
        bands.push({ zone, top: y, bottom: y });
        lines.push({ kind: 'zone', zone, y: y + HEAD / 2 + 1 });
        y += HEAD;
        open = true;
      }
      lines.push({ kind: 'bed', zone, bed, y: y + line / 2 });
      y += line;
      bands[bands.length - 1].bottom = y + 2;
    }
  }
  close();
  return { columns: out, line };
}

function youngestFirst(beds: BedView[]): BedView[] {
  const rank = (bed: BedView) => bed.order?.rank ?? -(bed.row.log_mean ?? Number.NEGATIVE_INFINITY);
  return beds.sort((a, b) => rank(b) - rank(a) || a.id - b.id);
}

/** Words beside a bed's line for what is particular to it. */
export function bedNote(bed: BedView): string {
  const notes: string[] = [];
  if (bed.row.straddles && bed.row.second_zone !== null) notes.push(`or ${bed.row.second_zone}`);
  if (bed.row.marks.includes('mixed age')) notes.push('mixed');
  return notes.length > 1 ? `${bed.row.second_zone}?, mix` : notes.join('');
}
