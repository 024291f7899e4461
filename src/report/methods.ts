import type { ClockView } from '../figures/clock-view.js';
import type { Findings } from '../model/index.js';
import { html, listed, type Markup } from './html.js';
import { figures } from './numbers.js';

/** How the answer was reached, with the settings of the run, its inputs, and the sources of the methods. */
export function methods(findings: Findings, views: readonly ClockView[]): Markup {
  const { options } = findings;
  const assumed = views.some((view) => view.beds.some((bed) => bed.row.marks.includes('assumed scatter')));
  return html`<p>Injections were averaged to preparations and preparations to shells on D/L; all else works on the log ratio ln(D/L), on which the scatter between shells of one bed is about constant. ${listed(views.map((view) => html`On ${view.clock.clock} that scatter is ${figures(view.clock.scatter)}${view.clock.spread === null ? '' : html`, and the spread between beds of one zone beyond their errors ${figures(view.clock.spread)}`}`))}.${assumed ? html` <strong>A scatter was assumed where too few shells of one bed were there to measure it (0.07), or where they agree closer than one shell analysed twice (0.005).</strong>` : ''}</p>
<p>Zones come from a normal mixture with known errors and one spread, started from the exact partition of bed means (1), for every number of zones, beside a continuum as the rival; the lowest BIC (2) wins, and neighbours whose shells overlap are joined. The gap statistic (3), the silhouette (4) and the overlap coefficient (5) are printed beside it. Stability is the mean Jaccard similarity over bootstraps of beds and shells (6). Several amino acids are joined by Fisher’s linear discriminant (7) and compared by the adjusted Rand index (8).</p>
<p>The order is sampled under superposition by Gibbs steps (9), checked by effective sample size and split R-hat (10). Relations are tested from unconstrained means with the false discovery rate held at ${figures(options.alpha)} (11); sections by the order-restricted statistic (12). Shells in conflict with superposition are found by a minimum cut (13); odd shells of a bed by leave-one-out residuals (14). A slope along a gradient is fitted together with the zones.</p>
${diagnostics(findings)}
<h3>Settings</h3>
<dl class="settings">${settings(findings).map(([name, value]) => html`<div><dt>${name}</dt><dd>${value}</dd></div>`)}</dl>
<h3>Input</h3>
<ul class="inputs">${findings.inputs.map((input) => html`<li>${input.role}: ${input.file}, ${input.rows} rows, SHA-256 <code>${input.sha256}</code></li>`)}</ul>
<h3>Sources</h3>
<ol class="sources">${SOURCES.map((source) => html`<li>${source}</li>`)}</ol>
<p>To cite: bedorder ${findings.version}, with the settings and input checksums above; the same input, settings and seed give the same results.</p>`;
}

function diagnostics(findings: Findings): Markup | null {
  if (findings.diagnostics.length === 0) return null;
  return html`<ul>${findings.diagnostics.map(
    (row) =>
      html`<li>Order on ${row.clock}: ${row.chains} chains, ${row.draws} draws, least effective sample size ${Math.round(row.ess_min)}, largest split R-hat ${row.rhat_max.toFixed(3)}: ${row.converged ? 'settled' : html`<strong>not settled, take the ranks with care</strong>`}. ${row.relations_kept} relations bound the order, ${row.relations_left_out} were left out.</li>`,
  )}</ul>`;
}

function settings(findings: Findings): [string, string][] {
  const { options } = findings;
  const words = (value: unknown) =>
    value === null ? 'chosen by the program' : Array.isArray(value) ? value.join(', ') : String(value);
  return [
    ['taxon', options.taxon ?? 'all'],
    ['amino_acid', words(options.amino_acid)],
    ['fraction', options.fraction ?? 'all'],
    ['zones', words(options.zones)],
    ['alpha', String(options.alpha)],
    ['gradient', options.gradient ?? 'none'],
    ['reference_taxon', options.reference_taxon ?? 'none'],
    ['staircase', options.staircase],
    ['simulations', String(options.simulations)],
    ['seed', String(options.seed)],
    ...Object.entries(options.screening).map(([name, value]): [string, string] => [
      `screening: ${name}`,
      String(value),
    ]),
  ];
}

const SOURCES = [
  'Fisher, W. D. (1958). On grouping for maximum homogeneity. Journal of the American Statistical Association 53, 789–798.',
  'Schwarz, G. (1978). Estimating the dimension of a model. Annals of Statistics 6, 461–464.',
  'Tibshirani, R., Walther, G. and Hastie, T. (2001). Estimating the number of clusters in a data set via the gap statistic. Journal of the Royal Statistical Society B 63, 411–423.',
  'Rousseeuw, P. J. (1987). Silhouettes. Journal of Computational and Applied Mathematics 20, 53–65.',
  'Inman, H. F. and Bradley, E. L. (1989). The overlapping coefficient as a measure of agreement between probability distributions. Communications in Statistics 18, 3851–3874.',
  'Hennig, C. (2007). Cluster-wise assessment of cluster stability. Computational Statistics and Data Analysis 52, 258–271.',
  'Fisher, R. A. (1936). The use of multiple measurements in taxonomic problems. Annals of Eugenics 7, 179–188.',
  'Hubert, L. and Arabie, P. (1985). Comparing partitions. Journal of Classification 2, 193–218.',
  'Gelfand, A. E., Smith, A. F. M. and Lee, T.-M. (1992). Bayesian analysis of constrained parameter and truncated data problems using Gibbs sampling. Journal of the American Statistical Association 87, 523–532.',
  'Gelman, A. and others (2013). Bayesian Data Analysis, third edition. Chapman and Hall.',
  'Benjamini, Y. and Hochberg, Y. (1995). Controlling the false discovery rate. Journal of the Royal Statistical Society B 57, 289–300.',
  'Robertson, T., Wright, F. T. and Dykstra, R. L. (1988). Order Restricted Statistical Inference. Wiley.',
  'Dilworth, R. P. (1950). A decomposition theorem for partially ordered sets. Annals of Mathematics 51, 161–166.',
  'Holm, S. (1979). A simple sequentially rejective multiple test procedure. Scandinavian Journal of Statistics 6, 65–70.',
  'Mitterer, R. M. (1975). Ages and diagenetic temperatures of Pleistocene deposits of Florida based on isoleucine epimerization in Mercenaria. Earth and Planetary Science Letters 28, 275–282.',
];
