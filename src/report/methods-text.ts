import type { BedView, ClockView } from '../figures/clock-view.js';
import type { ByAminoAcid, Findings } from '../model/index.js';
import { type HtmlValue, html, listed, type Markup } from './html.js';
import { figures } from './numbers.js';
import type { Citations } from './sources.js';

type Cite = Citations['cite'];

/** The methods in paragraphs: only those that ran on these data. */
export function methodsText(findings: Findings, views: readonly ClockView[], cite: Cite): Markup {
  const paragraphs = [
    averages(findings, views, cite),
    screening(findings, cite),
    index(findings, views, cite),
    zones(findings, views, cite),
    neighbours(findings, views, cite),
    gradient(findings, cite),
    conversion(findings, cite),
    order(findings, cite),
    superposition(findings, views, cite),
    plan(findings, cite),
  ];
  return html`${paragraphs.filter((one) => one !== null).map((one) => html`<p>${one}</p>\n`)}`;
}

function averages(findings: Findings, views: readonly ClockView[], cite: Cite): HtmlValue {
  const single = findings.shell_ratios.length > 0;
  const published = views.some(
    (view) => view.combined === null && view.beds.some((bed) => bed.row.shells > shellsCounted(bed)),
  );
  const assumed = views.some((view) => view.assumedScatter !== null);
  return [
    single ? 'Injections were averaged to preparations and preparations to shells on D/L. ' : '',
    published
      ? html`Published means and standard deviations were taken to the log scale as those of lognormal ratios${cite('aitchison')}. `
      : '',
    'All else works on the log ratio ln(D/L), on which the scatter between shells of one bed is about constant; it is pooled over the beds of a clock by degrees of freedom, and a bed’s error is that scatter over the root of its number of shells. ',
    listed(views.map(scatterOf)),
    '.',
    assumed
      ? html` <strong>A scatter was assumed where too few shells of one bed were there to measure it (0.07: shells of one bed commonly differ by 5 to 10 %), or where they agree closer than one shell analysed twice (0.005); every error rests on it.</strong>`
      : '',
    findings.inputs.some((input) => input.role === 'standards')
      ? html` Laboratories were put on one scale by the standards that they share, for each amino acid by itself; where too few standards show how well they agree, 7 % for each measurement is assumed${cite('kaufman')}. The error is carried.`
      : '',
  ];
}

const shellsCounted = ({ shells, odd }: BedView): number =>
  shells.length - odd.filter((shell) => shell.row.status === 'set aside').length;

function scatterOf(view: ClockView): Markup {
  const { clock, spread } = view.clock;
  const how = view.assumedScatter === null ? 'is' : 'is assumed to be';
  return html`On ${clock} that scatter ${how} ${figures(view.clock.scatter)}${spread === null ? '' : html`, and the spread between beds of one zone beyond their errors ${figures(spread)}`}`;
}

function screening(findings: Findings, cite: Cite): HtmlValue {
  if (findings.shell_ratios.length === 0) return null;
  const [{ fraction }] = findings.shell_ratios;
  let several = false;
  let twoFractions = false;
  for (const shell of findings.shell_ratios) {
    several ||= hasSeveral(shell.ratios);
    twoFractions ||= shell.fraction !== fraction;
  }
  return [
    html`Shells were screened${cite('kosnik')}, each rule where the table holds what it needs: high serine, replicates that disagree, low yield`,
    several
      ? html`, ratios off the taxon’s robust line between two amino acids${cite('beaton')}, the order of rates`
      : '',
    twoFractions ? html`, free below total${cite('kaufman')}` : '',
    '; beds for shallow burial. A rule gives a mark; high serine alone, or marks of two rules, set a shell aside.',
  ];
}

function hasSeveral(ratios: ByAminoAcid): boolean {
  let count = 0;
  for (const _ in ratios) if (++count > 1) return true;
  return false;
}

function index(findings: Findings, views: readonly ClockView[], cite: Cite): HtmlValue {
  const indexed = views.filter((view) => view.combined === null && view.clock.amino_acids.length > 1);
  if (indexed.length === 0) return null;
  const zoned = indexed.some((view) => view.zoned);
  return [
    html`Several amino acids are joined by Fisher’s linear discriminant, the direction of greatest between-bed against within-bed variance${cite('fisherIndex')}, its covariance shrunk${cite('friedman')}; what an amino acid shares with no other between beds counts as error${cite('harman')}. A shell on which some were not measured has them filled by regression${cite('anderson')}.`,
    zoned
      ? html` k-means${cite('macqueen', 'arthur')} on whitened log ratios is the independent check of the zones, and each amino acid is zoned by itself; groupings are compared by the adjusted Rand index${cite('hubert')}.`
      : ' Each amino acid is also zoned by itself.',
    findings.votes.length > 0
      ? html` Where amino acids disagree on two beds, pairs are named at a false discovery rate of ${figures(findings.options.alpha)}${cite('benjamini')}.`
      : '',
  ];
}

function zones(findings: Findings, views: readonly ClockView[], cite: Cite): HtmlValue {
  const looked = views.filter((view) => view.clock.verdict !== 'too few beds' && view.counts.length > 0);
  if (looked.length === 0) {
    return views.length === 0 ? null : 'Too few beds have a mean to look for zones.';
  }
  const bootstrapped = findings.evidence.some(
    (entry) => entry.about === 'clock' && entry.sentences.some((sentence) => /bootstrap/i.test(sentence)),
  );
  return [
    html`Zones come from a normal mixture with known errors and one spread, fitted by expectation and conditional maximisation${cite('dempster', 'meng')} from the exact partition of bed means${cite('fisherGroups', 'wang')}, for every number of zones, beside a continuum as the rival. The lowest BIC${cite('schwarz')} wins, with differences read after Kass and Raftery${cite('kass')}`,
    bootstrapped
      ? html`; where it is close, a parametric bootstrap of the likelihood ratio decides${cite('mclachlan')}`
      : '',
    '.',
    beside(looked, cite),
    findings.options.zones === null
      ? ''
      : ` ${findings.options.zones} ${findings.options.zones === 1 ? 'zone was' : 'zones were'} asked for, and the choice only says what the data support.`,
    looked.some((view) => view.zones.some((zone) => zone.stability !== null))
      ? html` The stability of a zone is the mean Jaccard similarity between it and the zone most like it when beds and shells are drawn again${cite('hennig')}; the same draws carry the doubt about the zones into the probabilities of beds.`
      : '',
  ];
}

function beside(looked: readonly ClockView[], cite: Cite): Markup | null {
  const counts = looked.flatMap((view) => view.counts);
  const printed = [
    counts.some((row) => row.gap !== null) ? html`the gap statistic${cite('tibshirani', 'dudoit')}` : null,
    counts.some((row) => row.silhouette !== null) ? html`the silhouette${cite('rousseeuw')}` : null,
  ].filter((one) => one !== null);
  return printed.length === 0 ? null : html` Beside it are printed ${listed(printed)}.`;
}

function neighbours(findings: Findings, views: readonly ClockView[], cite: Cite): HtmlValue {
  if (!views.some((view) => view.adjacent.length > 0)) return null;
  return html`Neighbouring zones are held apart by the difference of their means with beds as the units that repeat${cite('welch', 'hartung')}, by the ranks of their shells${cite('mann')}, and by the overlap of their shells with a bootstrap interval${cite('inman')}. Distinct: p at most ${figures(findings.options.alpha)} and an overlap of at most 0.317, where the ±1 standard deviation ranges of two equal normals just touch. Neighbours that fail are joined. The p-values test groups that were found in the same data, so they come out too small; the number of zones does not rest on them.`;
}

function gradient(findings: Findings, cite: Cite): HtmlValue {
  if (findings.gradients.length === 0) return null;
  return html`One slope of the log ratio along ${findings.gradients[0].column} is fitted together with the zones: on a grid with exact partitions, then refined with the full mixtures. It counts as one parameter, is taken out only where BIC gains by it, and its interval comes from the profile of the likelihood${cite('pawitan')}, widened by what sections have of their own${cite('searle')}. A rate of racemization rises by about 18 to 22 % for each degree${cite('mitterer')}.`;
}

function conversion(findings: Findings, cite: Cite): HtmlValue {
  if (!findings.conversions.some((row) => row.slope !== null)) return null;
  return html`Taxa are put on the scale of ${findings.conversions[0].reference} by a line through the beds that hold both, with errors in both${cite('york')}, its slope fixed at 1 under five such beds; where they scatter beyond their errors, an extra scatter is added${cite('paule')}. The error of the line is carried.`;
}

function order(findings: Findings, cite: Cite): HtmlValue {
  if (findings.diagnostics.length === 0) return null;
  return html`The order is sampled under superposition by Gibbs steps${cite('gelfand')} with truncated normals${cite('robert')}, the scatter drawn with its own error and one shift for all beds of a section; effective sample size and split R-hat check it${cite('vehtari')}.`;
}

function superposition(findings: Findings, views: readonly ClockView[], cite: Cite): HtmlValue {
  const { options } = findings;
  const tested = findings.relations.some((row) => row.verdict !== 'not tested');
  const sections = findings.sections.some((row) => row.p_order !== null);
  const shells = views.some((view) => view.beds.some((bed) => bed.shells.length > 1));
  const said: HtmlValue[] = [
    tested
      ? html`Relations are tested from means that know nothing of them, with the false discovery rate held at ${figures(options.alpha)}${cite('benjamini')}. `
      : '',
    options.staircase === 'no'
      ? ''
      : 'Relations of the staircase follow from elevations: on a rising coast the higher terrace is the older. ',
    sections
      ? html`A section as a whole is tested by the order-restricted statistic${cite('barlow', 'robertson')}, adjusted after Holm${cite('holm')}. `
      : '',
    shells
      ? html`Odd shells of a bed show by their distance from its other shells, measured by a scatter that odd shells do not raise, adjusted after Holm${cite('holm')}; beds of mixed age by a scatter beyond that and a split in two${cite('engelman')}. `
      : '',
    shells && tested
      ? html`The fewest shells whose removal ends every conflict with superposition are found as a minimum cut${cite('dilworth', 'ford')}, with all equal solutions${cite('picard')}; one is set aside only where its own evidence agrees.`
      : '',
  ];
  return said.every((one) => one === '') ? null : said;
}

function plan(findings: Findings, cite: Cite): HtmlValue {
  if (findings.plan.length === 0) return null;
  return [
    html`Numbers of further shells come from the power of the comparison${cite('cohen')} and from the chance that, from the gap as measured, it ends resolved${cite('ohagan')}`,
    findings.plan.some((row) => row.kind === 'date beds')
      ? html`; beds to date from a search of all choices by branch and bound${cite('land')}`
      : '',
    '.',
  ];
}
