import type { BedRow, Findings, RelationRow, ShellRow } from '../../model/index.js';
import { normalQuantile } from '../../statistics/index.js';
import { counted, figure } from '../terminal.js';
import { bedKey } from './says.js';

/* What would have to be otherwise for a conclusion to change, in numbers of shells and ratios. */

const POWER = 0.8;

/** What would move a bed into another zone, or settle its place in the order. */
export function bedChanges(findings: Findings, row: BedRow): string[] {
  if (row.log_mean === null) return ['Shells that can be kept would give it a mean.'];
  // where the run made a plan, it says better what its neighbours would take
  const planned = findings.plan.some(({ clock }) => clock === row.clock);
  return [...zoneChange(findings, row), ...(planned ? [] : neighbourChange(findings, row))];
}

function zoneChange(findings: Findings, row: BedRow): string[] {
  const zones = findings.zones.filter(({ clock }) => clock === row.clock);
  const own = zones.find(({ zone }) => zone === row.zone);
  const others = zones.filter(({ zone }) => zone !== row.zone);
  if (!own || others.length === 0 || row.log_mean === null) return [];
  const mean = row.log_mean;
  const near = others.reduce((best, zone) =>
    Math.abs(Math.log(zone.dl_mean) - mean) < Math.abs(Math.log(best.dl_mean) - mean) ? zone : best,
  );
  const border = (Math.log(own.dl_mean) + Math.log(near.dl_mean)) / 2;
  const errors = row.log_se ? ` (${figure(Math.abs(border - mean) / row.log_se, 2)} standard errors)` : '';
  return [
    `A mean D/L beyond ${figure(Math.exp(border))} would bring it nearer to ${near.zone} than to ${own.zone}; ` +
      `that is ${figure(Math.abs(border - mean), 2)} away in log ratio${errors}.`,
  ];
}

// n = 2 (z_alpha + z_beta)^2 s^2 / delta^2 shells in each of two beds (Cohen 1988, two means, known scatter).
function neighbourChange(findings: Findings, row: BedRow): string[] {
  const order = findings.order.filter(({ clock }) => clock === row.clock).sort((a, b) => a.rank - b.rank);
  const at = order.findIndex((one) => bedKey(one) === bedKey(row));
  const next = at >= 0 && order[at].resolved === false ? order[at + 1] : undefined;
  if (!next) return [];
  const other = findings.beds.find((one) => one.clock === row.clock && bedKey(one) === bedKey(next));
  const scatter = findings.clocks.find(({ clock }) => clock === row.clock)?.scatter ?? Number.NaN;
  if (!other || other.log_mean === null || row.log_mean === null) return [];
  const delta = Math.abs(row.log_mean - other.log_mean);
  const z = normalQuantile(1 - findings.options.alpha) + normalQuantile(POWER);
  const shells = Math.ceil((2 * z * z * scatter * scatter) / (delta * delta));
  const pair = `To tell it from the next bed, ${bedKey(next)}`;
  if (!(shells <= 200)) return [`${pair}, no workable number of shells would do: the means hardly differ.`];
  return [
    shells <= Math.min(row.shells, other.shells)
      ? `${pair}, more shells would help less than knowing how much beds of one age differ.`
      : `${pair}, some ${counted(shells, 'shell')} in each would be wanted, if the means are as they seem.`,
  ];
}

/** Between which ratios a shell would count as within error, and what would settle its reading. */
export function shellChanges(findings: Findings, row: ShellRow): string[] {
  const clock = findings.clocks.find(({ clock }) => clock === row.clock);
  const bed = findings.beds.find((one) => one.clock === row.clock && bedKey(one) === bedKey(row));
  const sentences: string[] = [];
  if (clock && row.residual !== null) {
    const others = Math.max(1, (bed?.shells ?? 1) - (row.status === 'set aside' ? 0 : 1));
    const reach = normalQuantile(1 - findings.options.alpha / 2) * clock.scatter * Math.sqrt(1 + 1 / others);
    const middle = row.log_ratio - row.residual;
    sentences.push(
      `By itself, a D/L between ${figure(Math.exp(middle - reach))} and ${figure(Math.exp(middle + reach))} would be ` +
        'within error of its bed.',
    );
  }
  if (row.status !== 'kept' && row.preparations < 2) {
    sentences.push('A second preparation would show whether the ratio comes back.');
  }
  if (row.reading === 'reworked or altered' || row.reading === 'intruded or contaminated') {
    sentences.push('A second amino acid would tell the two apart: they agree in a shell that is only of another age.');
  }
  if (row.status === 'doubtful') sentences.push('One more fact against it would set it aside.');
  return sentences;
}

/** What would turn a verdict on a relation. */
export function relationChanges(findings: Findings, row: RelationRow): string[] {
  const { difference, z, verdict_after, lower, upper } = row;
  if (difference === null || z === null || z === 0)
    return ['A mean of both beds on this clock would let it be tested.'];
  const error = Math.abs(difference / z);
  const reach = normalQuantile(1 - findings.options.alpha) * error;
  const sentences: string[] = [];
  if (verdict_after === 'reversed') {
    sentences.push(
      `The two would count as tied if ${lower} rose by ${figure(-difference - reach, 2)} in log ratio, or more.`,
    );
    sentences.push(
      'More shells of both beds would show whether the difference stays; a look at the field record, whether they are rightly named.',
    );
  } else if (verdict_after === 'tied') {
    sentences.push(
      `A difference of ${figure(reach, 2)} in log ratio either way would decide it; it is ${figure(difference, 2)} now.`,
    );
  } else if (verdict_after === 'agrees') {
    sentences.push(`It would be reversed if ${lower} came ${figure(reach, 2)} in log ratio below ${upper}.`);
  }
  return sentences.filter((sentence) => !sentence.includes('rose by -'));
}
