import { LEAST_SCATTER } from './beds/index.js';
import type { ClockRow, Findings, Remark } from './model/index.js';

/**
 * What the reader must hear beyond the tables: first what belongs to single clocks, then the caution that holds for all. The
 * texts do not name their clock; `clock` does.
 */
export function remarks(findings: Findings): Remark[] {
  const main = findings.clocks.filter((clock) => clock.main);
  return [
    ...findings.remarks,
    ...main.flatMap((clock) => doubts(findings, clock)),
    {
      clock: null,
      level: 'caution',
      text: 'The order is relative: it says which deposit is older, never how old any of them is.',
    },
  ];
}

function doubts(findings: Findings, row: ClockRow): Remark[] {
  const said: (string | null)[] = [
    aminoAcidsNotJoined(findings, row),
    shellsWithoutValue(findings, row),
    fewerZonesThanAsked(findings, row),
    unsettledSampling(findings, row),
    assumedScatter(findings, row),
    straddlingBeds(findings, row),
    nearEquilibrium(findings, row),
    nothingToCheck(findings, row),
  ];
  return said.flatMap((text) => (text === null ? [] : [{ clock: row.clock, level: 'caution' as const, text }]));
}

function aminoAcidsNotJoined({ options }: Findings, { amino_acids }: ClockRow): string | null {
  const wanted = options.amino_acid;
  if (!Array.isArray(wanted) || wanted.length < 2 || amino_acids.length > 1) return null;
  return `No shell of this taxon has all of ${wanted.join(', ')}, so they make no index: ${amino_acids[0]} is used alone.`;
}

function fewerZonesThanAsked({ options }: Findings, { zones }: ClockRow): string | null {
  if (options.zones === null || zones === 0 || zones >= options.zones) return null;
  return `${options.zones} zones were asked for; the beds fill ${zones}, so that many are used.`;
}

function shellsWithoutValue(findings: Findings, { clock, taxon, fraction, amino_acids }: ClockRow): string | null {
  // a clock of converted taxa has no row a shell
  if (findings.conversions.some((conversion) => conversion.clock === clock)) return null;
  const all = findings.shell_ratios.filter((shell) => shell.taxon === taxon && shell.fraction === fraction).length;
  const missing = all - findings.shells.filter((shell) => shell.clock === clock && shell.taxon === taxon).length;
  if (!(missing > 0)) return null;
  const which = `${missing} of ${all} shells ${missing === 1 ? 'stands' : 'stand'} in no table of this clock`;
  return amino_acids.length === 1
    ? `${which}: ${amino_acids[0]} was not measured on ${missing === 1 ? 'it' : 'them'}.`
    : `${which}: not all of ${amino_acids.join(', ')} were measured, and too few shells have them all to fill the gap.`;
}

function unsettledSampling(findings: Findings, { clock }: ClockRow): string | null {
  const diagnostics = findings.diagnostics.find((entry) => entry.clock === clock);
  if (diagnostics === undefined || diagnostics.converged) return null;
  const { ess_min, rhat_max } = diagnostics;
  return `The sampling of the order has not settled (effective draws ${Math.round(ess_min)}, split R-hat ${rhat_max.toFixed(3)}); rank intervals are rough.`;
}

function assumedScatter(findings: Findings, { clock, scatter }: ClockRow): string | null {
  if (!findings.beds.some((bed) => bed.clock === clock && bed.marks.includes('assumed scatter'))) return null;
  if (scatter === LEAST_SCATTER) {
    return `Shells of one bed have all but equal ratios, closer than one shell analysed twice: a scatter of ${scatter} is assumed on log ratios, and every error rests on it. Look for rows copied or rounded.`;
  }
  return `Too few repeated shells to estimate their scatter: ${scatter} is assumed on log ratios (shells of one bed differ by 5 to 10 %), and every error rests on it.`;
}

function straddlingBeds(findings: Findings, { clock }: ClockRow): string | null {
  const names = bedsWhere(findings, clock, (bed) => bed.straddles);
  if (names.length === 0) return null;
  const verb = names.length === 1 ? 'bed straddles' : 'beds straddle';
  return `${names.length} ${verb} two zones: ${listed(names)}.`;
}

function nearEquilibrium(findings: Findings, { clock }: ClockRow): string | null {
  const names = bedsWhere(findings, clock, (bed) => bed.marks.includes('near equilibrium'));
  if (names.length === 0) return null;
  return `Near equilibrium, where older and younger beds come to look alike: ${listed(names)}.`;
}

function nothingToCheck(findings: Findings, { clock }: ClockRow): string | null {
  const tested = findings.relations.some(
    (relation) => relation.clock === clock && relation.verdict_after !== 'not tested',
  );
  return tested ? null : 'No field relation joins two measured beds, so nothing checks the order.';
}

function bedsWhere(findings: Findings, clock: string, holds: (bed: Findings['beds'][number]) => boolean): string[] {
  return findings.beds.filter((bed) => bed.clock === clock && holds(bed)).map((bed) => `${bed.section}/${bed.bed}`);
}

function listed(names: readonly string[]): string {
  const more = names.length > 4 ? ` and ${names.length - 4} more` : '';
  return `${names.slice(0, 4).join(', ')}${more}`;
}
