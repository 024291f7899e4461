import type { ClockView, ShellView } from '../figures/clock-view.js';
import { relationNumbers } from '../figures/reversed-marks.js';
import type { ShellReading } from '../model/index.js';
import { html, listed, type Markup } from './html.js';
import { bedLink, shellLink } from './links.js';
import { counted, ratio } from './numbers.js';

/** What was found on one clock, in plain sentences, for the top of the page. */
export function findingsInSentences(view: ClockView): Markup {
  return html`<p>${[groups(view), ' ', order(view), ' ', field(view), ' ', odd(view)]}</p>`;
}

function groups(view: ClockView): Markup {
  const { clock, zones } = view;
  const taxa =
    view.combined === null
      ? html`<i>${clock.taxon}</i>`
      : html`all taxa (${listed(view.combined.map((taxon) => html`<i>${taxon}</i>`))}), put on the scale of <i>${clock.taxon}</i>,`;
  const what = html`${counted(clock.shells, 'shell')} of ${taxa} from ${counted(clock.beds, 'bed')} in ${counted(view.sections.length, 'section')} were compared by ${clock.amino_acids.length > 1 ? html`the index of ${listed(clock.amino_acids)}` : html`${clock.amino_acids[0] ?? 'D/L'}`} (${clock.fraction}).`;
  const range = zones.length > 0 ? [zones[0], zones[zones.length - 1]] : null;
  const forced =
    clock.verdict !== 'zones' && view.zoned
      ? html` You asked for ${zones.length} zones, so ${zones.length} are drawn; the data do not support them.`
      : null;
  if (clock.verdict === 'zones' && view.zoned && range !== null) {
    const weak = view.adjacent.filter((row) => row.verdict !== 'distinct');
    const neighbours =
      weak.length === 0
        ? html` All neighbouring zones are distinct.`
        : html` Not all neighbours stand apart: ${listed(weak.map((row) => html`${row.younger} and ${row.older} are ${row.verdict}`))}.`;
    return html`${what} The beds fall into <strong>${counted(zones.length, 'aminozone')}</strong>, from ${range[0].zone} (youngest, D/L ${ratio(range[0].dl_mean)}) to ${range[1].zone} (oldest, D/L ${ratio(range[1].dl_mean)}).${neighbours}`;
  }
  if (clock.verdict === 'continuum')
    return html`${what} The ratios form a <strong>continuum</strong>: no zones are supported, and the order is given without them.${forced}`;
  if (clock.verdict === 'one zone')
    return html`${what} All beds share <strong>one extent of racemization</strong> within error: no further zones are supported.${forced}`;
  if (clock.verdict === 'too few beds')
    return html`${what} There are <strong>too few beds</strong> to look for zones; the order is still given.${forced}`;
  return what;
}

function order(view: ClockView): Markup | null {
  const ranked = view.beds.filter((bed) => bed.order !== null);
  if (ranked.length < 2) return null;
  const oldest = ranked.reduce((best, bed) => (bed.order!.rank < best.order!.rank ? bed : best));
  const youngest = ranked.reduce((best, bed) => (bed.order!.rank >= best.order!.rank ? bed : best));
  const resolved = ranked.filter((bed) => bed.order!.resolved === true).length;
  return html`The oldest bed is ${bedLink(view, oldest.key)} and the youngest ${bedLink(view, youngest.key)}; of ${counted(ranked.length - 1, 'step')} between neighbours in the order, ${someAre(resolved)} resolved.`;
}

function field(view: ClockView): Markup | null {
  const tested = view.relations.filter((row) => row.verdict_after !== 'not tested');
  if (tested.length === 0) return html`No field relation could be tested against the ratios.`;
  const agree = tested.filter((row) => row.verdict_after === 'agrees').length;
  const tied = tested.filter((row) => row.verdict_after === 'tied').length;
  const numbers = relationNumbers(view);
  const reversed = [...numbers.keys()].filter((row) => row.verdict_after === 'reversed');
  const settled = tested.filter((row) => row.verdict === 'reversed' && row.verdict_after !== 'reversed').length;
  const link = (row: (typeof tested)[number]) =>
    html`<a href="#relation-${view.index}-${numbers.get(row) ?? ''}">${numbers.get(row) ?? ''}</a> (${bedLink(view, row.lower)} below ${bedLink(view, row.upper)})`;
  const shown = reversed.slice(0, 4);
  return html`Of ${counted(tested.length, 'tested field relation')}, ${agree === 0 ? 'none agrees' : agree === 1 ? '1 agrees' : `${agree} agree`}, ${someAre(tied)} tied within error and <strong>${someAre(reversed.length)} reversed</strong>${
    reversed.length === 0
      ? ''
      : html`: ${listed([...shown.map(link), ...(reversed.length > shown.length ? [`${reversed.length - shown.length} more`] : [])])}`
  }.${settled === 0 ? '' : html` ${settled === 1 ? 'One more was' : `${settled} more were`} reversed until odd shells were set aside.`}`;
}

function odd(view: ClockView): Markup | null {
  if (view.combined !== null) return html`Its shells are screened and read on the clock of each taxon.`;
  const kinds = setAsideByReading(view);
  if (kinds.size === 0) return html`No shell was set aside.`;
  const aside = [...kinds.values()].reduce((sum, shells) => sum + shells.length, 0);
  const parts = [...kinds].map(([reading, shells]) => {
    const names = shells.length <= 4 ? html` (${listed(shells.map((shell) => shellLink(view, shell)))})` : null;
    return html`${shells.length} ${reading === 'none' ? 'for their marks in screening' : `read as ${reading}`}${names}`;
  });
  return html`<strong>${counted(aside, 'shell')} ${aside === 1 ? 'was' : 'were'} set aside</strong>: ${listed(parts)}.`;
}

function setAsideByReading(view: ClockView): Map<ShellReading, ShellView[]> {
  const kinds = new Map<ShellReading, ShellView[]>();
  for (const bed of view.beds)
    for (const shell of bed.odd) {
      if (shell.row.status !== 'set aside') continue;
      const kind = kinds.get(shell.row.reading);
      if (kind === undefined) kinds.set(shell.row.reading, [shell]);
      else kind.push(shell);
    }
  return kinds;
}

const someAre = (count: number) => (count === 0 ? 'none is' : count === 1 ? '1 is' : `${count} are`);
