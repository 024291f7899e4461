import { type ClockView, shellsOf, zoneTag } from '../figures/clock-view.js';
import { MOST_BEDS, MOST_SHELLS } from '../figures/theme.js';
import type { ShellRow } from '../model/index.js';
import { sectionsOf } from './contents.js';
import { chance, ratio } from './numbers.js';

/** What the page's script knows: for filters and for the line that reads out what is lit. */
export interface PageData {
  /** By bed number: section, then for each clock its zone's tag, or ''. */
  readonly beds: Readonly<Record<number, readonly [section: number, zones: readonly string[], text: string]>>;
  /** By shell number: its bed and what is said of it. */
  readonly shells: Readonly<Record<number, readonly [bed: number, text: string]>>;
  readonly zones: Readonly<Record<string, string>>;
}

/** Gathers the script's data; of a very large survey beds only. */
export function pageData(views: readonly ClockView[]): PageData {
  const sections = new Map(sectionsOf(views).map((section, i) => [section, i]));
  const beds: Record<number, [number, string[], string]> = {};
  const shells: Record<number, [number, string]> = {};
  const zones: Record<string, string> = {};
  const many = views.reduce((sum, view) => sum + view.clock.shells, 0) > MOST_SHELLS;
  for (const view of views) {
    view.zones.forEach((zone, i) => {
      zones[zoneTag(view, i)!] =
        `${zone.zone}${view.heading}: D/L ${ratio(zone.dl_mean)} (${ratio(zone.dl_low)} to ${ratio(zone.dl_high)}), ${zone.beds} beds, ${zone.shells} shells`;
    });
    for (const bed of view.beds) {
      const entry = beds[bed.id] ?? [sections.get(bed.row.section)!, views.map(() => ''), bed.key];
      beds[bed.id] = entry;
      entry[1][view.index] = zoneTag(view, bed.zone) ?? '-';
      if (view.beds.length <= 10 * MOST_BEDS) entry[2] += bedText(view, bed);
      if (!many) for (const { id, row } of shellsOf(view, bed)) shells[id] = [bed.id, shellText(row)];
    }
  }
  return { beds, shells, zones };
}

function bedText(view: ClockView, bed: ClockView['beds'][number]): string {
  const { row, order } = bed;
  const zone = view.zoned && row.zone !== null ? ` · ${row.zone} (${chance(row.zone_probability)})` : '';
  const rank = order === null ? '' : ` · rank ${order.rank} (${order.rank_low} to ${order.rank_high})`;
  const aside = row.set_aside > 0 ? `, ${row.set_aside} set aside` : '';
  const marks = row.marks.length > 0 ? ` · ${row.marks.join(', ')}` : '';
  return `${view.heading}${zone} · D/L ${ratio(row.dl_mean)} · ${row.shells} shells${aside}${rank}${marks}`;
}

function shellText(row: ShellRow): string {
  const reading = row.reading === 'none' ? '' : ` · ${row.reading}`;
  const marks = row.marks.length > 0 ? ` · ${row.marks.join(', ')}` : '';
  return `shell ${row.shell} · D/L ${ratio(row.dl)} · ${row.status}${reading}${marks}`;
}
