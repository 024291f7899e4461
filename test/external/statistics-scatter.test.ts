import { describe, expect, it } from 'vitest';
import {
  generalizedEsd,
  grubbs,
  medianAbsoluteDeviation,
  oneWayAnova,
  quantile,
  robustSd,
  varianceComponents,
  welchTTest,
} from '../../src/statistics/index.js';

describe('outliers', () => {
  // NIST/SEMATECH e-Handbook 1.3.5.17.1, data from memory; statistic and limits computed.
  const spectrometer = [199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57];

  it('Grubbs', () => {
    const both = grubbs(spectrometer);
    expect(both.g).toBeCloseTo(2.468765, 6);
    expect(both.limit).toBeCloseTo(2.126645, 6);
    expect(both.index).toBe(7);
    expect(both.outlier).toBe(true);
    expect(grubbs(spectrometer, { side: 'high' }).limit).toBeCloseTo(2.031652, 6);
    expect(grubbs(spectrometer, { side: 'low' }).outlier).toBe(false);
  });

  it('generalized extreme studentized deviates', () => {
    // Rosner 1983, Technometrics 25, 165–172: data seen; statistics and limits computed.
    const rosner = [
      -0.25, 0.68, 0.94, 1.15, 1.2, 1.26, 1.26, 1.34, 1.38, 1.43, 1.49, 1.49, 1.55, 1.56, 1.58, 1.65, 1.69, 1.7, 1.76,
      1.77, 1.81, 1.91, 1.94, 1.96, 1.99, 2.06, 2.09, 2.1, 2.14, 2.15, 2.23, 2.24, 2.26, 2.35, 2.37, 2.4, 2.47, 2.54,
      2.62, 2.64, 2.9, 2.92, 2.92, 2.93, 3.21, 3.26, 3.3, 3.59, 3.68, 4.3, 4.64, 5.34, 5.42, 6.01,
    ];
    expect(rosner.length).toBe(54);
    const { outliers, steps } = generalizedEsd(rosner, 10);
    expect(outliers.map((i) => rosner[i])).toEqual([6.01, 5.42, 5.34]);
    const wanted = [
      [3.1189, 3.1588],
      [2.943, 3.1514],
      [3.1794, 3.1439],
    ];
    wanted.forEach(([statistic, limit], i) => {
      expect(steps[i].statistic).toBeCloseTo(statistic, 4);
      expect(steps[i].limit).toBeCloseTo(limit, 4);
    });
  });
});

describe('analysis of variance', () => {
  it('NIST StRD SiRstv, certified values seen', () => {
    const anova = oneWayAnova([
      [196.3052, 196.124, 196.189, 196.2569, 196.3403],
      [196.3042, 196.3825, 196.1669, 196.3257, 196.0422],
      [196.1303, 196.2005, 196.2889, 196.0343, 196.1811],
      [196.2795, 196.1748, 196.1494, 196.1485, 195.9885],
      [196.2119, 196.1051, 196.185, 196.0052, 196.209],
    ]);
    expect([anova.dfBetween, anova.dfWithin]).toEqual([4, 20]);
    expect(anova.f / 1.18046237440255).toBeCloseTo(1, 12);
    expect(anova.sumOfSquaresBetween / 5.11462616e-2).toBeCloseTo(1, 12);
    expect(anova.sumOfSquaresWithin / 2.1663656e-1).toBeCloseTo(1, 12);
    expect(anova.pooledSd).toBeCloseTo(0.104076068334656, 14);
  });

  it('variance components of Davies’ dyestuff, data seen, values computed', () => {
    const components = varianceComponents([
      [1545, 1440, 1440, 1520, 1580],
      [1540, 1555, 1490, 1560, 1495],
      [1595, 1550, 1605, 1510, 1560],
      [1445, 1440, 1595, 1465, 1545],
      [1595, 1630, 1515, 1635, 1625],
      [1520, 1455, 1450, 1480, 1445],
    ]);
    expect(components.between).toBeCloseTo(1764.05, 8);
    expect(components.within).toBeCloseTo(2451.25, 8);
    expect(components.f).toBeCloseTo(4.598266, 6);
    expect(components.groupSize).toBe(5);
  });

  it('unequal groups, computed in R', () => {
    // g <- list(c(4.1,5.2), c(6.3,7.7,6.9,7.1), c(3.3), c(5.5,5.9,6.4))
    // d <- data.frame(y = unlist(g), g = factor(rep(1:4, sapply(g, length)))); s <- summary(aov(y ~ g, d))[[1]]
    // n <- sapply(g, length); n0 <- (sum(n) - sum(n^2)/sum(n))/3; (s$"Mean Sq"[1] - s$"Mean Sq"[2])/n0
    const groups = [[4.1, 5.2], [6.3, 7.7, 6.9, 7.1], [3.3], [5.5, 5.9, 6.4]];
    const anova = oneWayAnova(groups);
    expect(anova.f).toBeCloseTo(14.6071251035625, 11);
    expect(anova.p).toBeCloseTo(0.00364387148548799, 14);
    expect(anova.meanSquareBetween).toBeCloseTo(4.89744444444444, 12);
    expect(anova.meanSquareWithin).toBeCloseTo(0.335277777777778, 12);
    const components = varianceComponents(groups);
    expect(components.groupSize).toBeCloseTo(2.33333333333333, 12);
    expect(components.between).toBeCloseTo(1.95521428571429, 12);
  });
});

describe('two means and order statistics against R', () => {
  it('t.test(c(5.1,4.9,6.2,5.8), c(6.1,7.3,6.6,8.0,7.7))', () => {
    const welch = welchTTest([5.1, 4.9, 6.2, 5.8], [6.1, 7.3, 6.6, 8, 7.7]);
    expect(welch.t).toBeCloseTo(-3.54296238362383, 12);
    expect(welch.df).toBeCloseTo(6.99998367993518, 11);
    expect(welch.p).toBeCloseTo(0.00943234593443287, 14);
    expect(welch.low).toBeCloseTo(-2.73456019724387, 12);
    expect(welch.high).toBeCloseTo(-0.545439802756135, 12);
  });

  it('v <- c(2.1,3.7,1.4,9.9,5.5,5.5,0.2); quantile(v, c(0,.1,.25,.5,.77,1)); mad(v); mad(v, constant = 1)', () => {
    const v = [2.1, 3.7, 1.4, 9.9, 5.5, 5.5, 0.2];
    [0.2, 0.92, 1.75, 3.7, 5.5, 9.9].forEach((wanted, i) => {
      expect(quantile(v, [0, 0.1, 0.25, 0.5, 0.77, 1][i])).toBeCloseTo(wanted, 14);
    });
    expect(robustSd(v)).toBeCloseTo(2.66868, 4);
    expect(medianAbsoluteDeviation(v)).toBeCloseTo(1.8, 14);
  });
});
