import type {
  AdjacentZonesRow,
  AminoAcidShare,
  ClockRow,
  ConflictRow,
  Findings,
  GradientFinding,
  OrderDiagnostics,
  OrderRow,
  RelationRow,
  ShellRow,
  ZoneCountRow,
  ZoneRow,
} from '../../model/index.js';
import { bestAdvice } from './advice.js';

/** What the summary of a run tells; printed as it is with `--json`. */
export interface SummaryFacts {
  readonly program: 'bedorder';
  readonly version: string;
  readonly read: ReadFacts;
  /** The main clocks. */
  readonly clocks: readonly ClockFacts[];
  /** Sentences about the whole run. */
  readonly findings: readonly string[];
  readonly cautions: readonly string[];
  /** The best of the plan: where to collect, and what to date. */
  readonly next: readonly string[];
  readonly written: string;
}

/** How much was read. */
export interface ReadFacts {
  /** Single shells; those behind published means are counted in the clocks only. */
  readonly shells: number;
  readonly beds: number;
  readonly sections: number;
  readonly taxa: readonly string[];
  readonly warnings: number;
}

/** What was found on one main clock. */
export interface ClockFacts {
  readonly clock: ClockRow;
  /** Number of zones asked for with --zones; null where the data chose. */
  readonly forced: number | null;
  /** How the number of zones was chosen and which criteria agree; null where nothing was chosen. */
  readonly choice: string | null;
  readonly models: readonly ZoneCountRow[];
  /** Oldest first. */
  readonly zones: readonly ZoneRow[];
  readonly adjacent: readonly AdjacentZonesRow[];
  /** What each amino acid brings to an index. */
  readonly shares: readonly AminoAcidShare[];
  readonly gradient: GradientFinding | null;
  readonly order: readonly OrderRow[];
  readonly sampling: OrderDiagnostics | null;
  readonly relations: RelationFacts;
  readonly inconsistent_sections: readonly string[];
  /** Shells that are not simply kept, set aside first. */
  readonly odd_shells: readonly ShellRow[];
  readonly conflicts: readonly ConflictRow[];
  readonly findings: readonly string[];
  readonly cautions: readonly string[];
}

/** How the order agrees with the field. */
export interface RelationFacts {
  readonly tested: number;
  readonly agrees: number;
  readonly tied: number;
  readonly reversed: readonly RelationRow[];
  /** Reversed on all shells, no longer so after setting shells aside. */
  readonly resolved: readonly RelationRow[];
}

/** Gathers what the summary tells from the findings. */
export function summaryFacts(findings: Findings, out: string): SummaryFacts {
  return {
    program: findings.program,
    version: findings.version,
    read: readFacts(findings),
    clocks: findings.clocks.filter(({ main }) => main).map((clock) => clockFacts(findings, clock)),
    ...remarksOf(findings, null),
    next: bestAdvice(findings),
    written: out,
  };
}

function readFacts(findings: Findings): ReadFacts {
  return {
    shells: findings.shell_ratios.length,
    beds: findings.sites.length,
    sections: findings.section_order.length,
    taxa: [...new Set(findings.clocks.map(({ taxon }) => taxon))],
    warnings: findings.problems.length,
  };
}

function clockFacts(findings: Findings, clock: ClockRow): ClockFacts {
  const mine = <Row extends { readonly clock: string }>(rows: readonly Row[]) =>
    rows.filter((row) => row.clock === clock.clock);
  const relations = mine(findings.relations);
  const after = (verdict: RelationRow['verdict_after']) => relations.filter((row) => row.verdict_after === verdict);
  const odd = findings.shells.filter((row) => row.status !== 'kept' && row.clock === clock.clock);
  return {
    clock,
    forced: findings.options.zones,
    models: mine(findings.zone_counts),
    choice: findings.evidence.find((row) => row.about === 'clock' && row.clock === clock.clock)?.sentences[0] ?? null,
    zones: [...mine(findings.zones)].sort((a, b) => b.dl_mean - a.dl_mean),
    adjacent: mine(findings.adjacent_zones),
    shares: mine(findings.shares),
    gradient: mine(findings.gradients)[0] ?? null,
    order: [...mine(findings.order)].sort((a, b) => a.rank - b.rank),
    sampling: mine(findings.diagnostics)[0] ?? null,
    relations: {
      tested: relations.length - after('not tested').length,
      agrees: after('agrees').length,
      tied: after('tied').length,
      reversed: after('reversed'),
      resolved: relations.filter((row) => row.verdict === 'reversed' && row.verdict_after !== 'reversed'),
    },
    inconsistent_sections: mine(findings.sections)
      .filter(({ verdict }) => verdict === 'inconsistent')
      .map(({ section }) => section),
    odd_shells: [
      ...odd.filter(({ status }) => status === 'set aside'),
      ...odd.filter(({ status }) => status === 'doubtful'),
    ],
    conflicts: mine(findings.conflicts),
    ...remarksOf(findings, clock.clock),
  };
}

function remarksOf({ remarks }: Findings, clock: string | null) {
  const of = (level: 'finding' | 'caution') =>
    remarks.filter((remark) => remark.clock === clock && remark.level === level).map(({ text }) => text);
  return { findings: of('finding'), cautions: of('caution') };
}
