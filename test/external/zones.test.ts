import { kmeans } from 'ml-kmeans';
import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { averageAnalyses, clockData, fisherIndex } from '../../src/beds/index.js';
import type { Analysis, Clock } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';
import {
  bic,
  chooseModel,
  findZones,
  fitMixture,
  gapOf,
  gapStatistic,
  groupsByGap,
  meanSilhouette,
} from '../../src/zones/index.js';
import { cases } from '../house/effort.js';
import { ACIDITY, IRIS, THREE_AMINO_ACIDS } from './zones-data.js';

const ILE: Clock = {
  name: 'Invenus THAA Ile',
  taxon: 'Invenus',
  fraction: 'THAA',
  amino_acids: ['Ile'],
  weights: [1],
  main: true,
};

describe('a normal mixture against R’s mclust on its acidity data', () => {
  const errors = ACIDITY.map(() => 0);

  // computed in R 4.2: library(mclust); data(acidity); Mclust(acidity, G = 2, modelNames = "E")
  it('reaches the same likelihood, means, variance and shares with all errors 0', () => {
    const fit = fitMixture(ACIDITY, errors, 2);
    expect(fit.logLikelihood).toBeCloseTo(-185.9493, 4);
    expect(fit.means[0]).toBeCloseTo(4.370946, 3);
    expect(fit.means[1]).toBeCloseTo(6.320153, 3);
    expect(fit.tau ** 2).toBeCloseTo(0.1863702, 4);
    expect(fit.weights[0]).toBeCloseTo(0.6233595, 3);
    expect(fit.weights[1]).toBeCloseTo(0.3766405, 3);
  });

  // computed in R: the same with G = 1 … 3 gives log-likelihoods −225.785365 and −185.949305, BIC (with the sign turned)
  // 461.6576, 392.0723 and 402.183
  it('has the same BIC and chooses two groups too', () => {
    const choice = chooseModel(ACIDITY, errors, 0, 4);
    expect(choice.mixtures[0].logLikelihood).toBeCloseTo(-225.785365, 5);
    expect(bic(choice.mixtures[0].logLikelihood, 2, 155)).toBeCloseTo(461.6576, 3);
    expect(choice.bics[1]).toBeCloseTo(392.0723, 3);
    // mclust's own start ends on a lower peak for three groups
    expect(choice.bics[2]).toBeLessThanOrEqual(402.183 + 1e-3);
    expect(choice.bestZones).toBe(2);
  });
});

describe('gap statistic and silhouette against R’s cluster', () => {
  const values = [
    -2.31, -2.28, -2.25, -2.33, -2.05, -2.02, -2.08, -2.01, -1.75, -1.79, -1.71, -1.74, -1.46, -1.52, -1.49,
  ];

  // computed in R: clusGap(matrix(x), f, K.max = 6, B = 2000, d.power = 2, spaceH0 = "original"), seed 1, f being
  // kmeans(x, k, nstart = 50): gap and standard error by simulation
  it('gives the gaps of clusGap on a line', () => {
    const gaps = gapStatistic(
      values,
      values.map(() => 1),
      { seed: 1, references: 2000, most: 6 },
    );
    [-0.41736612, -0.31751448, -0.6137565, 0.95711806, 0.56507649, 0.27512196].forEach((gap, at) => {
      expect(Math.abs(gaps[at].gap! - gap)).toBeLessThan(0.05);
    });
    [0.26782479, 0.29689405, 0.32550807, 0.36900551, 0.41451302, 0.47408733].forEach((se, at) => {
      expect(Math.abs(gaps[at].se! - se)).toBeLessThan(0.04);
    });
    expect(groupsByGap(gaps)).toBe(4);
    // even steps make the gap dip before its peak, where the first rule stops
    expect(groupsByGap(gaps, 'first')).toBe(1);
  });

  // computed in R: mean(silhouette(rep(1:4, c(4, 4, 4, 3)), dist(x))[, 3]), then with the fourth value in group 2
  it('gives the mean silhouette', () => {
    const labels = [0, 0, 0, 0, 1, 1, 1, 1, 2, 2, 2, 2, 3, 3, 3];
    expect(meanSilhouette(values, labels)).toBeCloseTo(0.829724622752, 11);
    expect(
      meanSilhouette(
        values,
        labels.map((label, at) => (at === 3 ? 1 : label)),
      ),
    ).toBeCloseTo(0.647572758686, 11);
  });

  // computed in R: clusGap(as.matrix(iris[, 1:4]), kmeans with nstart = 20, K.max = 8, B = 200, d.power = 2), reference in
  // the box of principal components, rule Tibs2001SEmax: 5 groups, where there are three species
  it('climbs to 5 on Fisher’s iris: the gap alone is no judge', () => {
    const within = (points: readonly (readonly number[])[], seed: number, starts: number) =>
      Array.from({ length: 6 }, (_, at) => {
        let least = Number.POSITIVE_INFINITY;
        for (let start = 0; start < starts; start++) {
          const data = points.map((point) => [...point]);
          const { clusters, centroids } = kmeans(data, at + 1, {
            seed: 100 * seed + start,
            initialization: 'kmeans++',
          });
          const sum = data.reduce(
            (total, point, i) => total + point.reduce((d, x, j) => d + (x - centroids[clusters[i]][j]) ** 2, 0),
            0,
          );
          least = Math.min(least, sum);
        }
        return least;
      });
    const centre = IRIS[0].map((_, j) => IRIS.reduce((sum, row) => sum + row[j], 0) / IRIS.length);
    const centred = new Matrix(IRIS.map((row) => row.map((x, j) => x - centre[j])));
    const axes = new EigenvalueDecomposition(centred.transpose().mmul(centred), { assumeSymmetric: true })
      .eigenvectorMatrix;
    const turned = centred.mmul(axes);
    const random = createRandom(1);
    const references = Array.from({ length: cases(30, 60) }, (_, seed) => {
      const box = Array.from({ length: 4 }, (_, j) => {
        const column = turned.getColumn(j);
        return [Math.min(...column), Math.max(...column)];
      });
      return within(
        IRIS.map(() => box.map(([low, high]) => low + (high - low) * random.uniform())),
        seed + 1,
        4,
      );
    });
    const gaps = gapOf(within(IRIS, 0, 30), references);
    // R: gaps 0.0770 0.5945 0.8737 1.0034 1.0450 1.0638
    [0.077, 0.5945, 0.8737, 1.0034, 1.045, 1.0638].forEach((gap, at) => {
      expect(Math.abs(gaps[at].gap! - gap)).toBeLessThan(0.07);
    });
    // it climbs past the three species
    expect(gaps[3].gap!).toBeGreaterThan(gaps[2].gap! + gaps[3].se!);
    expect(gaps[4].gap!).toBeGreaterThan(gaps[3].gap!);
    expect(groupsByGap(gaps, 'first')).toBeGreaterThan(3);
  });

  // the same table of R, gap and SE.sim of 1 … 8 groups
  it('stops at 5 on R’s own table, by the rule of Tibshirani, Walther and Hastie', () => {
    const gap = [0.07697615, 0.59447419, 0.87368375, 1.00344246, 1.04500302, 1.06375152, 1.05881224, 1.08287901];
    const se = [0.06481837, 0.04656536, 0.04042478, 0.03994687, 0.03875561, 0.03862448, 0.03905993, 0.04005725];
    expect(
      groupsByGap(
        gap.map((value, at) => ({ gap: value, se: se[at] })),
        'first',
      ),
    ).toBe(5);
  });
});

describe('the index against R', () => {
  const beds = [3, 5, 6, 4, 4, 6].flatMap((count, bed) => new Array<number>(count).fill(bed));

  // computed in R: W pooled within beds, off-diagonals times 1 − 4/(22 + 4), B the mean square between beds,
  // v <- eigen(solve(W, B))$vectors[, 1]; v / sum(v). Without the shrinkage R's MASS::lda(x, g)$scaling[, 1] over its sum
  // gives 0.214485582653 0.179639773674 0.605874643672.
  it('has the weights of the leading discriminant', () => {
    const index = fisherIndex(THREE_AMINO_ACIDS, beds, ['Ile', 'Asx', 'Glx']);
    expect(index.basis).toBe('fisher');
    [0.234823363071, 0.174937922328, 0.5902387146].forEach((weight, i) => {
      expect(index.shares[i].weight).toBeCloseTo(weight, 8);
    });
    // computed in R: W[1, ] = 0.001849122727273 3.17934090909e-04 5.05529545455e-04, here shrunk off the diagonal
    expect(index.within[0][0]).toBeCloseTo(0.001849122727273, 12);
    expect(index.within[0][1]).toBeCloseTo(3.17934090909e-4 * (22 / 26), 12);
  });
});

/** A published summary as a row of the shells table. */
const summaryRow = (section: string, bed: string, mean: number, sd: number, n: number): Analysis => ({
  section,
  bed,
  taxon: 'Invenus',
  fraction: 'THAA',
  shell: '',
  preparation: null,
  injection: null,
  lab_id: null,
  lab: null,
  method: null,
  ratios: { Ile: mean },
  concentrations: {},
  serine_ratio: null,
  summary: { n, sd: { Ile: sd } },
  file: 'shells.csv',
  line: 2,
});

describe('four published beds of Virginia', () => {
  // Mirecki, PhD thesis, University of Delaware, udspace.udel.edu/handle/19716/13230, seen: A/I, mean ± sd (n)
  it('fall into three zones, both IId beds together', () => {
    const { shells, summaries } = averageAnalyses([
      summaryRow('Gomez Pit', 'IIa', 0.141, 0.026, 55),
      summaryRow('Gomez Pit', 'IIc', 0.335, 0.028, 19),
      summaryRow('Gomez Pit', 'IId', 0.471, 0.038, 9),
      summaryRow('Norris Bridge', 'IId', 0.473, 0.02, 5),
    ]);
    const data = clockData({ clock: ILE, shells, summaries });
    const zoning = findZones(data, { alpha: 0.05, zones: null, random: createRandom(1) })!;
    expect(zoning.verdict).toBe('zones');
    expect(zoning.labels).toEqual([0, 1, 2, 2]);
    for (const test of zoning.neighbours) expect(test.verdict).toBe('distinct');
  });
});
