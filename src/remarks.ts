import type { ClockRow, Findings, Remark } from './model/index.js';

/** The sentences that open the report and the terminal summary, the most important first. */
export function remarks(findings: Findings): Remark[] {
  const main = findings.clocks.filter((clock) => clock.main);
  return [
    ...main.map((clock) => zoneRemark(findings, clock)),
    ...main.map((clock) => superpositionRemark(findings, clock)),
    ...findings.remarks,
    ...main.flatMap((clock) => doubts(findings, clock)),
    {
      clock: null,
      level: 'caution',
      text: 'The order is relative: it says which deposit is older, never how old any of them is.',
    },
  ];
}

const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

function zoneRemark(findings: Findings, row: ClockRow): Remark {
  const zones = findings.zones.filter((zone) => zone.clock === row.clock);
  const beds = count(row.beds, 'bed');
  const range = zones.map((zone) => `${zone.zone} ${zone.dl_mean.toPrecision(3)}`).join(', ');
  const inUse = row.zones > 1 ? ` ${count(row.zones, 'zone')} in use: ${range}.` : '';
  const said = {
    zones: `${row.clock}: the ${beds} fall into ${count(row.zones, 'zone')}, youngest to oldest D/L ${range}.`,
    'one zone': `${row.clock}: the ${beds} can't be told from a single zone; no zones are supported.${inUse}`,
    continuum: `${row.clock}: the ${beds} spread without gaps; a continuum explains them better than zones, so no zones are supported. The order is still given.${inUse}`,
    'too few beds': `${row.clock}: ${beds}, too few to speak of zones.${inUse}`,
  }[row.verdict];
  const forced = findings.options.zones !== null && row.verdict === 'zones';
  return { clock: row.clock, level: 'finding', text: forced ? `${said} The number of zones was forced.` : said };
}

function superpositionRemark(findings: Findings, { clock }: ClockRow): Remark {
  const relations = findings.relations.filter((relation) => relation.clock === clock);
  const tested = relations.filter((relation) => relation.verdict_after !== 'not tested');
  const reversed = tested.filter((relation) => relation.verdict_after === 'reversed');
  if (tested.length === 0) {
    return {
      clock,
      level: 'finding',
      text: `${clock}: no field relation joins two measured beds, so nothing checks the order.`,
    };
  }
  const tied = tested.filter((relation) => relation.verdict_after === 'tied').length;
  const names = reversed.slice(0, 3).map(({ lower, upper }) => `${lower} below ${upper}`);
  const more = reversed.length > 3 ? ` and ${reversed.length - 3} more` : '';
  const tail = reversed.length === 0 ? 'none is reversed.' : `${reversed.length} reversed: ${names.join('; ')}${more}.`;
  return {
    clock,
    level: 'finding',
    text: `${clock}: of ${count(tested.length, 'field relation')} tested, ${tested.length - tied - reversed.length} agree with the order and ${tied} can't be told; ${tail}`,
  };
}

function doubts(findings: Findings, row: ClockRow): Remark[] {
  const said: string[] = [];
  const diagnostics = findings.diagnostics.find((entry) => entry.clock === row.clock);
  if (diagnostics !== undefined && !diagnostics.converged) {
    said.push(
      `${row.clock}: the sampling of the order has not settled (effective draws ${Math.round(diagnostics.ess_min)}, split R-hat ${diagnostics.rhat_max.toFixed(3)}); rank intervals are rough.`,
    );
  }
  if (findings.beds.some((bed) => bed.clock === row.clock && bed.marks.includes('assumed scatter'))) {
    said.push(
      `${row.clock}: too few repeated shells to estimate their scatter; ${row.scatter} is assumed in log ratios (shells of one bed differ by 5 to 10 %), and every error rests on it.`,
    );
  }
  const straddling = findings.beds.filter((bed) => bed.clock === row.clock && bed.straddles);
  if (straddling.length > 0) {
    const names = straddling.slice(0, 4).map((bed) => `${bed.section}/${bed.bed}`);
    const more = straddling.length > 4 ? ` and ${straddling.length - 4} more` : '';
    said.push(
      `${row.clock}: ${count(straddling.length, 'bed')} straddle${straddling.length === 1 ? 's' : ''} two zones: ${names.join(', ')}${more}.`,
    );
  }
  return said.map((text) => ({ clock: row.clock, level: 'caution', text }));
}
