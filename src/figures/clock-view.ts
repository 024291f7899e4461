import type {
  AdjacentZonesRow,
  BedRow,
  BedSite,
  ClockRow,
  Findings,
  GradientFinding,
  OrderRow,
  RelationRow,
  ShellRow,
  ZoneCountRow,
  ZoneRow,
} from '../model/index.js';
import { bedKey } from './bed-key.js';
import { NO_ZONE, type ZoneInk, zoneInks } from './palette.js';
import { type ShellView, shellsByClock } from './shells-by-clock.js';

export type { ShellView } from './shells-by-clock.js';

/** One bed on one clock with all that figures say of it. */
export interface BedView {
  /** `section/bed`. */
  readonly key: string;
  /** Number of the bed in the whole survey: what ties figures, tables and script together. */
  readonly id: number;
  readonly row: BedRow;
  readonly site: BedSite | null;
  readonly order: OrderRow | null;
  /** Index of its zone, 0 the youngest; -1 without one. */
  readonly zone: number;
  /** Numbers of its shells in findings.shells: of a very large survey an object a shell would cost too much. */
  readonly shells: Int32Array;
  /** Those of its shells that are set aside or doubtful. */
  readonly odd: readonly ShellView[];
}

/** One main clock with its zones, beds and relations, ready to draw. */
export interface ClockView {
  readonly clock: ClockRow;
  /** Number of the clock among the main ones. */
  readonly index: number;
  /** Added to the names of its figures; empty when there is one main clock. */
  readonly suffix: string;
  /** Added to the titles of its figures. */
  readonly heading: string;
  /** The youngest first. */
  readonly zones: readonly ZoneRow[];
  readonly inks: readonly ZoneInk[];
  readonly adjacent: readonly AdjacentZonesRow[];
  readonly counts: readonly ZoneCountRow[];
  /** In section and place order, lowest first, sections in coast order. */
  readonly beds: readonly BedView[];
  /** All shells of the survey, for the numbers of {@link BedView.shells}. */
  readonly shellRows: readonly ShellRow[];
  readonly byKey: ReadonlyMap<string, BedView>;
  /** Sections with beds of this clock, in coast order. */
  readonly sections: readonly string[];
  readonly relations: readonly RelationRow[];
  readonly gradient: GradientFinding | null;
  /** Whether the clock's beds are grouped into zones that the data support or that were asked for. */
  readonly zoned: boolean;
  /** Taxa on it, where it holds several on the scale of a reference taxon; null for a clock of one taxon. */
  readonly combined: readonly string[] | null;
  /** The scatter that was assumed and on which every error of the clock rests; null where it was measured. */
  readonly assumedScatter: number | null;
}

/** Every shell of a bed with its number, where they are drawn or listed one by one. */
export const shellsOf = (view: ClockView, bed: BedView): ShellView[] =>
  Array.from(bed.shells, (id) => ({ id, row: view.shellRows[id] }));

/** Every bed of the survey by `section/bed`, with its number: sites first, then beds no site is known of. */
function bedNumbers(findings: Findings): Map<string, number> {
  const numbers = new Map<string, number>();
  for (const rows of [findings.sites, findings.beds])
    for (const row of rows) {
      const key = bedKey(row);
      if (!numbers.has(key)) numbers.set(key, numbers.size);
    }
  return numbers;
}

/** The rows by `section/bed`; of several of one bed the last. */
function byBed<Row extends { readonly section: string; readonly bed: string }>(rows: readonly Row[]): Map<string, Row> {
  const found = new Map<string, Row>();
  for (const row of rows) found.set(bedKey(row), row);
  return found;
}

/** The main clocks of the findings, each with what its figures draw; worked out once for the figures and the page. */
export function clockViews(findings: Findings): readonly ClockView[] {
  const known = drawn.get(findings);
  if (known !== undefined) return known;
  const views = newViews(findings);
  drawn.set(findings, views);
  return views;
}

const drawn = new WeakMap<Findings, readonly ClockView[]>();

function newViews(findings: Findings): ClockView[] {
  const mains = findings.clocks.filter((clock) => clock.main);
  const numbers = bedNumbers(findings);
  const sites = byBed(findings.sites);
  const shellsOf = shellsByClock(findings.shells, mains);
  return mains.map((clock, index) => {
    const own = <Row extends { readonly clock: string }>(rows: readonly Row[]) =>
      rows.filter((row) => row.clock === clock.clock);
    const zones = [...own(findings.zones)].sort((a, b) => zoneNumber(a.zone) - zoneNumber(b.zone));
    const zoneIndex = new Map(zones.map((zone, i) => [zone.zone, i]));
    const orders = byBed(own(findings.order));
    const shells = shellsOf.get(clock.clock)!;
    const beds = own(findings.beds)
      .map((row): BedView => {
        const key = bedKey(row);
        return {
          key,
          id: numbers.get(key)!,
          row,
          site: sites.get(key) ?? null,
          order: orders.get(key) ?? null,
          zone: row.zone === null ? -1 : (zoneIndex.get(row.zone) ?? -1),
          shells: shells.get(key)?.shells ?? new Int32Array(0),
          odd: shells.get(key)?.odd ?? [],
        };
      })
      .sort((a, b) => a.id - b.id);
    const present = new Set(beds.map((bed) => bed.row.section));
    // a section of the order that is there, then what the order does not name
    const sections = new Set(findings.section_order.filter((section) => present.has(section)));
    for (const section of present) sections.add(section);
    return {
      clock,
      index,
      suffix: mains.length > 1 ? `-${slug(clock.clock)}-${index + 1}` : '',
      heading: mains.length > 1 ? `, ${clock.clock}` : '',
      zones,
      inks: zoneInks(Math.max(1, zones.length)),
      adjacent: own(findings.adjacent_zones),
      counts: own(findings.zone_counts),
      beds,
      shellRows: findings.shells,
      byKey: new Map(beds.map((bed) => [bed.key, bed])),
      sections: [...sections],
      relations: own(findings.relations),
      gradient: findings.gradients.find((gradient) => gradient.clock === clock.clock) ?? null,
      zoned: zones.length > 1,
      combined: combinedTaxa(findings, clock),
      assumedScatter: beds.some((bed) => bed.row.marks.includes('assumed scatter')) ? clock.scatter : null,
    };
  });
}

/** Taxa that conversions brought onto a clock, the reference first. */
function combinedTaxa(findings: Findings, { clock }: ClockRow): string[] | null {
  const own = findings.conversions.filter((row) => row.clock === clock && row.verdict === 'converted');
  return own.length === 0 ? null : [...new Set(own.flatMap((row) => [row.reference, row.taxon]))];
}

/** Ink of a zone by its index; the plain one where there is none. */
export const inkOf = (view: ClockView, zone: number): ZoneInk => view.inks[zone] ?? NO_ZONE;

/** Value of `data-z` of a zone: the clock's number and the zone's. */
export const zoneTag = (view: ClockView, zone: number): string | undefined =>
  zone < 0 ? undefined : `${view.index}.${zone}`;

const zoneNumber = (zone: string) => Number.parseInt(zone.replace(/^\D+/, ''), 10) || 0;

const slug = (name: string) =>
  name
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 40) || 'clock';

/**
 * Log ratio of a shell as its bed's mean has it: with the slope taken out where one is used, at the gradient's centre.
 */
export function shellRatio(view: ClockView, bed: BedView, shell: ShellRow): number {
  const { gradient } = view;
  const at = bed.site?.gradient ?? null;
  return gradient?.used && at !== null ? shell.log_ratio - gradient.slope * (at - gradient.centre) : shell.log_ratio;
}

/** Said of an axis or a caption where the slope was taken out: at which value of the gradient the ratios hold. */
export function atCentre(view: ClockView): string {
  const { gradient } = view;
  return gradient?.used ? `, at ${gradient.column} ${Number(gradient.centre.toPrecision(3))}` : '';
}
