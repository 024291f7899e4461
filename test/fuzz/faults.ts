import { Ajv } from 'ajv';
import type { Findings } from '../../src/model/index.js';
import { geoJson } from '../../src/output/geojson.js';
import { resultsSchema } from '../../src/output/json-schema.js';
import { TABLES } from '../../src/output/tables/index.js';
import { resultsText, tableText } from '../house/written.js';

const fits = new Ajv({ allErrors: false }).compile(resultsSchema());

/** Everything that must not be in findings: numbers that are none, values out of their range, rows lost. */
export function faultsOfFindings(findings: Findings): string[] {
  return [
    ...notFinite(findings),
    ...outOfRange(findings),
    ...misfits(findings),
    ...TABLES.flatMap((table) => {
      return faultsOfText(`${table.name}.csv`, tableText(table, findings));
    }),
    ...(JSON.parse(geoJson(findings)).type === 'FeatureCollection' ? [] : ['deposits.geojson is no collection']),
  ];
}

/** Words of JavaScript that stand in a text by mistake. */
export function faultsOfText(name: string, text: string): string[] {
  const found = /\bNaN\b|\bInfinity\b|\bundefined\b|\[object /.exec(text);
  return found === null ? [] : [`${name}: …${text.slice(Math.max(0, found.index - 80), found.index + 40)}…`];
}

function notFinite(findings: Findings): string[] {
  const faults: string[] = [];
  // findings hold millions of values: the way to one is spelt out where it is at fault only
  const way = ['findings'];
  const look = (value: unknown): void => {
    if (typeof value === 'string') {
      if (faultsOfText('', value).length > 0) faults.push(...faultsOfText(way.join('.'), value));
    } else if (value === undefined || (typeof value === 'number' && !Number.isFinite(value))) {
      faults.push(`${way.join('.')} is ${value}`);
    } else if (typeof value === 'object' && value !== null) {
      for (const key of Object.keys(value)) {
        way.push(key);
        look((value as Record<string, unknown>)[key]);
        way.pop();
      }
    }
  };
  look(findings);
  return faults;
}

function outOfRange(findings: Findings): string[] {
  const faults: string[] = [];
  const hold = (what: string, holds: boolean) => {
    if (!holds) faults.push(what);
  };
  const share = (p: number | null) => p === null || (p >= 0 && p <= 1);
  for (const row of findings.zones) {
    hold(
      `zone ${row.zone}: ${row.dl_low} ${row.dl_mean} ${row.dl_high}`,
      row.dl_low <= row.dl_mean && row.dl_mean <= row.dl_high,
    );
    hold(
      `zone ${row.zone}: shells ${row.shell_low} to ${row.shell_high}`,
      row.shell_low <= row.shell_high && row.shell_low >= 0,
    );
    hold(`zone ${row.zone}: stability ${row.stability}`, share(row.stability));
  }
  for (const row of findings.adjacent_zones) {
    const shares = [row.p_difference, row.p_mann_whitney, row.overlap, row.overlap_low, row.overlap_high];
    hold(`neighbours ${row.older} ${row.younger}: ${shares}`, shares.every(share));
  }
  for (const row of findings.beds) {
    hold(
      `bed ${row.bed}: ${row.zone_probability} ${row.second_probability}`,
      share(row.zone_probability) && share(row.second_probability),
    );
    hold(`bed ${row.bed}: se ${row.log_se}`, row.log_se === null || row.log_se > 0);
  }
  for (const row of findings.shells) hold(`shell ${row.shell}: ${row.dl}`, row.dl > 0 && share(row.zone_probability));
  for (const row of findings.order) {
    hold(
      `rank ${row.rank_low} ${row.rank} ${row.rank_high}`,
      row.rank_low >= 1 && row.rank_low <= row.rank_high && row.rank >= 1,
    );
    hold(`order ${row.bed}: ${row.p_older_than_next}`, share(row.p_older_than_next));
  }
  for (const row of findings.pairs)
    hold(
      `pair ${row.bed_a} ${row.bed_b}: ${row.p_a_older} ${row.p_same_zone}`,
      share(row.p_a_older) && share(row.p_same_zone),
    );
  for (const row of findings.relations)
    hold(`relation ${row.lower} > ${row.upper}: ${row.p_reversed}`, share(row.p_reversed));
  for (const row of findings.sections) hold(`section ${row.section}: ${row.p_order}`, share(row.p_order));
  for (const clock of findings.clocks.filter((one) => one.main)) {
    const ranks = findings.order.filter((row) => row.clock === clock.clock).map((row) => row.rank);
    hold(
      `${clock.clock}: ranks ${ranks}`,
      // beds that are as old share a rank
      ranks.every((rank, i) => rank === i + 1 || rank === ranks[i - 1]),
    );
    hold(`${clock.clock}: scatter ${clock.scatter}`, clock.scatter > 0);
  }
  return faults;
}

function misfits(findings: Findings): string[] {
  const written = JSON.parse(resultsText(findings));
  return fits(written) ? [] : [`results.json: ${JSON.stringify(fits.errors?.[0])}`];
}
