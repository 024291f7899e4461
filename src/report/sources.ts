import { html, type Markup } from './html.js';

/** Published sources of the methods, by the key that the methods text cites them with. */
const SOURCES = {
  aitchison: 'Aitchison, J. and Brown, J. A. C. (1957). The Lognormal Distribution. Cambridge University Press.',
  anderson:
    'Anderson, T. W. (1957). Maximum likelihood estimates for a multivariate normal distribution when some observations are missing. Journal of the American Statistical Association 52, 200–203.',
  arthur:
    'Arthur, D. and Vassilvitskii, S. (2007). k-means++: the advantages of careful seeding. Proceedings of the 18th ACM–SIAM Symposium on Discrete Algorithms, 1027–1035.',
  barlow:
    'Barlow, R. E., Bartholomew, D. J., Bremner, J. M. and Brunk, H. D. (1972). Statistical Inference under Order Restrictions. Wiley.',
  beaton:
    'Beaton, A. E. and Tukey, J. W. (1974). The fitting of power series, meaning polynomials, illustrated on band-spectroscopic data. Technometrics 16, 147–185.',
  benjamini:
    'Benjamini, Y. and Hochberg, Y. (1995). Controlling the false discovery rate. Journal of the Royal Statistical Society B 57, 289–300.',
  cohen: 'Cohen, J. (1988). Statistical Power Analysis for the Behavioral Sciences, second edition. Erlbaum.',
  dempster:
    'Dempster, A. P., Laird, N. M. and Rubin, D. B. (1977). Maximum likelihood from incomplete data via the EM algorithm. Journal of the Royal Statistical Society B 39, 1–38.',
  dilworth:
    'Dilworth, R. P. (1950). A decomposition theorem for partially ordered sets. Annals of Mathematics 51, 161–166.',
  dudoit:
    'Dudoit, S. and Fridlyand, J. (2002). A prediction-based resampling method for estimating the number of clusters in a dataset. Genome Biology 3, research0036.',
  engelman:
    'Engelman, L. and Hartigan, J. A. (1969). Percentage points of a test for clusters. Journal of the American Statistical Association 64, 1647–1648.',
  fisherGroups:
    'Fisher, W. D. (1958). On grouping for maximum homogeneity. Journal of the American Statistical Association 53, 789–798.',
  fisherIndex:
    'Fisher, R. A. (1936). The use of multiple measurements in taxonomic problems. Annals of Eugenics 7, 179–188.',
  ford: 'Ford, L. R. and Fulkerson, D. R. (1956). Maximal flow through a network. Canadian Journal of Mathematics 8, 399–404.',
  friedman:
    'Friedman, J. H. (1989). Regularized discriminant analysis. Journal of the American Statistical Association 84, 165–175.',
  gelfand:
    'Gelfand, A. E., Smith, A. F. M. and Lee, T.-M. (1992). Bayesian analysis of constrained parameter and truncated data problems using Gibbs sampling. Journal of the American Statistical Association 87, 523–532.',
  harman:
    'Harman, H. H. and Jones, W. H. (1966). Factor analysis by minimizing residuals (minres). Psychometrika 31, 351–368.',
  hartung:
    'Hartung, J. and Knapp, G. (2001). On tests of the overall treatment effect in meta-analysis with normally distributed responses. Statistics in Medicine 20, 1771–1782.',
  hennig:
    'Hennig, C. (2007). Cluster-wise assessment of cluster stability. Computational Statistics and Data Analysis 52, 258–271.',
  holm: 'Holm, S. (1979). A simple sequentially rejective multiple test procedure. Scandinavian Journal of Statistics 6, 65–70.',
  hubert: 'Hubert, L. and Arabie, P. (1985). Comparing partitions. Journal of Classification 2, 193–218.',
  inman:
    'Inman, H. F. and Bradley, E. L. (1989). The overlapping coefficient as a measure of agreement between probability distributions. Communications in Statistics – Theory and Methods 18, 3851–3874.',
  kass: 'Kass, R. E. and Raftery, A. E. (1995). Bayes factors. Journal of the American Statistical Association 90, 773–795.',
  kaufman:
    'Kaufman, D. S. and Manley, W. F. (1998). A new procedure for determining DL amino acid ratios in fossils using reverse phase liquid chromatography. Quaternary Science Reviews 17, 987–1000.',
  kosnik:
    'Kosnik, M. A. and Kaufman, D. S. (2008). Identifying outliers and assessing the accuracy of amino acid racemization measurements for geochronology. Quaternary Geochronology 3, 328–341.',
  land: 'Land, A. H. and Doig, A. G. (1960). An automatic method of solving discrete programming problems. Econometrica 28, 497–520.',
  macqueen:
    'MacQueen, J. (1967). Some methods for classification and analysis of multivariate observations. Proceedings of the Fifth Berkeley Symposium 1, 281–297.',
  mann: 'Mann, H. B. and Whitney, D. R. (1947). On a test of whether one of two random variables is stochastically larger than the other. Annals of Mathematical Statistics 18, 50–60.',
  mclachlan:
    'McLachlan, G. J. (1987). On bootstrapping the likelihood ratio test statistic for the number of components in a normal mixture. Applied Statistics 36, 318–324.',
  meng: 'Meng, X.-L. and Rubin, D. B. (1993). Maximum likelihood estimation via the ECM algorithm. Biometrika 80, 267–278.',
  mitterer:
    'Mitterer, R. M. (1975). Ages and diagenetic temperatures of Pleistocene deposits of Florida based on isoleucine epimerization in Mercenaria. Earth and Planetary Science Letters 28, 275–282.',
  ohagan:
    'O’Hagan, A., Stevens, J. W. and Campbell, M. J. (2005). Assurance in clinical trial design. Pharmaceutical Statistics 4, 187–201.',
  paule:
    'Paule, R. C. and Mandel, J. (1982). Consensus values and weighting factors. Journal of Research of the National Bureau of Standards 87, 377–385.',
  pawitan: 'Pawitan, Y. (2001). In All Likelihood. Oxford University Press.',
  picard:
    'Picard, J.-C. and Queyranne, M. (1980). On the structure of all minimum cuts in a network and applications. Mathematical Programming Study 13, 8–16.',
  robert: 'Robert, C. P. (1995). Simulation of truncated normal variables. Statistics and Computing 5, 121–125.',
  robertson: 'Robertson, T., Wright, F. T. and Dykstra, R. L. (1988). Order Restricted Statistical Inference. Wiley.',
  rousseeuw:
    'Rousseeuw, P. J. (1987). Silhouettes: a graphical aid to the interpretation and validation of cluster analysis. Journal of Computational and Applied Mathematics 20, 53–65.',
  schwarz: 'Schwarz, G. (1978). Estimating the dimension of a model. Annals of Statistics 6, 461–464.',
  searle: 'Searle, S. R., Casella, G. and McCulloch, C. E. (1992). Variance Components. Wiley.',
  tibshirani:
    'Tibshirani, R., Walther, G. and Hastie, T. (2001). Estimating the number of clusters in a data set via the gap statistic. Journal of the Royal Statistical Society B 63, 411–423.',
  vehtari:
    'Vehtari, A., Gelman, A., Simpson, D., Carpenter, B. and Bürkner, P.-C. (2021). Rank-normalization, folding, and localization: an improved R-hat for assessing convergence of MCMC. Bayesian Analysis 16, 667–718.',
  wang: 'Wang, H. and Song, M. (2011). Ckmeans.1d.dp: optimal k-means clustering in one dimension by dynamic programming. The R Journal 3(2), 29–33.',
  welch:
    'Welch, B. L. (1947). The generalization of ‘Student’s’ problem when several different population variances are involved. Biometrika 34, 28–35.',
  york: 'York, D., Evensen, N. M., López Martínez, M. and De Basabe Delgado, J. (2004). Unified equations for the slope, intercept, and standard errors of the best straight line. American Journal of Physics 72, 367–375.',
} as const;

/** Key of a published source. */
export type SourceKey = keyof typeof SOURCES;

/** Citations of one text: numbered as they come, so that the list holds what was cited, and nothing else. */
export interface Citations {
  /** ` (1, 2)`: the numbers of these sources. */
  readonly cite: (...keys: readonly SourceKey[]) => Markup;
  /** The list of what was cited so far. */
  readonly list: () => Markup;
}

/**
 * Starts the citations of a text.
 * @example
 * ```ts
 * const { cite } = citations();
 * cite('schwarz').markup; // => ' (1)'
 * cite('holm', 'schwarz').markup; // => ' (2, 1)'
 * ```
 */
export function citations(): Citations {
  const cited: SourceKey[] = [];
  return {
    cite: (...keys) => {
      for (const key of keys) if (!cited.includes(key)) cited.push(key);
      return html` (${keys.map((key) => cited.indexOf(key) + 1).join(', ')})`;
    },
    list: () => html`<ol class="sources">${cited.map((key) => html`<li>${SOURCES[key]}</li>`)}</ol>`,
  };
}
