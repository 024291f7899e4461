import { describe, expect, it } from 'vitest';
import {
  adjustedRandIndex,
  benjaminiHochberg,
  effectiveSampleSize,
  holm,
  isotonicRegression,
  jonckheereTerpstra,
  kendallTauB,
  mannWhitney,
  overlapOfNormals,
  splitRHat,
  yorkLine,
} from '../../src/statistics/index.js';

const sequence = (n: number, of: (i: number) => number) => Array.from({ length: n }, (_, i) => of(i + 1));

function expectAll(actual: ArrayLike<number>, wanted: readonly number[], digits: number): void {
  expect(actual.length).toBe(wanted.length);
  wanted.forEach((value, i) => {
    expect(actual[i]).toBeCloseTo(value, digits);
  });
}

describe('Mann–Whitney', () => {
  it('two small groups (data from memory; exact value computed)', () => {
    const found = mannWhitney([19, 22, 16, 29, 24], [20, 11, 17, 12]);
    expect(found.u).toBe(17);
    expect(found.p).toBeCloseTo(1 / 9, 14);
    expect(found.exact).toBe(true);
  });

  it('R’s example, ?wilcox.test (computed in R)', () => {
    const found = mannWhitney(
      [0.8, 0.83, 1.89, 1.04, 1.45, 1.38, 1.91, 1.64, 0.73, 1.46],
      [1.15, 0.88, 0.9, 0.74, 1.21],
    );
    expect(found.u).toBe(35);
    expect(found.pGreater).toBeCloseTo(0.1272, 4);
  });

  it('exact up to 50 each (computed in R)', () => {
    // x <- (1:45*7919)%%10007; y <- (1:49*6007)%%10009+1800.5; wilcox.test(x, y, exact = TRUE)
    const x = sequence(45, (i) => (i * 7919) % 10007);
    const y = sequence(49, (i) => ((i * 6007) % 10009) + 1800.5);
    const found = mannWhitney(x, y);
    expect(found.exact).toBe(true);
    expect(found.u).toBe(921);
    expect(found.p).toBeCloseTo(0.17148705540319, 12);
    expect(found.pLess).toBeCloseTo(0.0857435277015952, 12);
  });

  it('normal with ties (computed in R)', () => {
    // x <- (1:60*37)%%53; y <- (1:70*29)%%61+3; wilcox.test(x, y, exact = FALSE), and alternative = "less", "greater"
    const found = mannWhitney(
      sequence(60, (i) => (i * 37) % 53),
      sequence(70, (i) => ((i * 29) % 61) + 3),
    );
    expect(found.exact).toBe(false);
    expect(found.u).toBe(1572);
    expect(found.p).toBeCloseTo(0.0137464765231516, 12);
    expect(found.pLess).toBeCloseTo(0.0068732382615758, 12);
    expect(found.pGreater).toBeCloseTo(0.993215809926448, 12);
  });
});

describe('orders', () => {
  it('isotonic regression, R’s isoreg example and a weighted one (computed)', () => {
    expect(isotonicRegression([1, 0, 4, 3, 3, 5, 4, 2, 0])).toEqual([0.5, 0.5, 3, 3, 3, 3, 3, 3, 3]);
    const weighted = isotonicRegression([0.32, 0.41, 0.58, 0.5, 0.66], [12, 2, 5, 4, 6]);
    expectAll(weighted, [0.32, 0.41, 0.544444, 0.544444, 0.66], 6);
  });

  it('Jonckheere–Terpstra (Hollander and Wolfe, data from memory; computed)', () => {
    const found = jonckheereTerpstra([
      [40, 35, 38, 43, 44, 41],
      [38, 40, 47, 44, 40, 42],
      [48, 40, 45, 43, 46, 44],
    ]);
    expect(found.j).toBe(79);
    expect(found.zWithoutTies).toBeCloseTo(2.02113, 6);
    expect(found.exact).toBe(false);
  });

  it('Kendall’s tau (computed in R)', () => {
    // cor.test(c(1,2,3,4,5,6,7,8), c(2,1,4,3,7,8,5,6), method = "kendall")
    const plain = kendallTauB([1, 2, 3, 4, 5, 6, 7, 8], [2, 1, 4, 3, 7, 8, 5, 6]);
    expect(plain.tau).toBeCloseTo(0.571428571428571, 14);
    expect(plain.p).toBeCloseTo(0.0610119047619047, 14);
    // cor.test(c(1,2,2,4,5,6,6,6,9,10), c(1,3,2,2,5,5,8,9,7,7), method = "kendall", exact = FALSE)
    const tied = kendallTauB([1, 2, 2, 4, 5, 6, 6, 6, 9, 10], [1, 3, 2, 2, 5, 5, 8, 9, 7, 7]);
    expect(tied.tau).toBeCloseTo(0.674747769796632, 13);
    expect(tied.p).toBeCloseTo(0.00982327450751925, 13);
  });

  it('adjusted p-values (computed in R)', () => {
    // pv <- c(.01,.02,.03,.04,.05,.9,.0001,.03); p.adjust(pv, "BH"); p.adjust(pv, "holm")
    const p = [0.01, 0.02, 0.03, 0.04, 0.05, 0.9, 0.0001, 0.03];
    const bh = [0.04, 0.048, 0.048, 0.0533333333333333, 0.0571428571428571, 0.9, 0.0008, 0.048];
    expectAll(benjaminiHochberg(p), bh, 14);
    expectAll(holm(p), [0.07, 0.12, 0.15, 0.15, 0.15, 0.9, 0.0008, 0.15], 14);
  });
});

describe('groupings and overlap', () => {
  it('overlap of two normals', () => {
    // Python's documentation of statistics.NormalDist.overlap, seen
    expect(overlapOfNormals(70, 4, 65, 3.5)).toBeCloseTo(0.5028719270195425, 14);
    // computed
    expect(overlapOfNormals(0, 1, 1, 1)).toBeCloseTo(0.6170750774519738, 14);
  });

  it('adjusted Rand index', () => {
    // scikit-learn's documentation of adjusted_rand_score, seen
    expect(adjustedRandIndex([0, 0, 1, 1], [0, 0, 1, 2])).toBeCloseTo(0.5714285714, 10);
    expect(adjustedRandIndex([0, 0, 1, 1], [0, 1, 0, 1])).toBeCloseTo(-0.5, 14);
    // computed
    expect(adjustedRandIndex([0, 0, 0, 1, 1, 1], [0, 0, 1, 1, 2, 2])).toBeCloseTo(0.2424242424, 10);
  });
});

describe('line with errors in both', () => {
  it('Pearson’s data with York’s weights (York and others 2004)', () => {
    // weights from memory; slope, intercept, their errors and chi-square seen
    const x = [0, 0.9, 1.8, 2.6, 3.3, 4.4, 5.2, 6.1, 6.5, 7.4];
    const y = [5.9, 5.4, 4.4, 4.6, 3.5, 3.7, 2.8, 2.8, 2.4, 1.5];
    const wx = [1000, 1000, 500, 800, 200, 80, 60, 20, 1.8, 1];
    const wy = [1, 1.8, 4, 8, 20, 20, 70, 70, 100, 500];
    const line = yorkLine(x, y, wx, wy);
    expect(line.slope).toBeCloseTo(-0.48053, 5);
    expect(line.slopeSe).toBeCloseTo(0.05799, 5);
    expect(line.intercept).toBeCloseTo(5.47991, 5);
    expect(line.interceptSe).toBeCloseTo(0.29497, 5);
    expect(line.chiSquared).toBeCloseTo(11.87, 2);
    expect(line.df).toBe(8);
  });

  it('is weighted regression where x has no error (computed in R)', () => {
    // x <- c(1,2,3,4,5.5,7); y <- c(1.1,1.9,3.2,3.7,5.9,6.8); w <- c(4,1,2,8,1,5)
    // m <- summary(lm(y ~ x, weights = w)); coef(m)[,1]; coef(m)[,2]/m$sigma; m$sigma^2*4; vcov(m)[1,2]/m$sigma^2
    const none = new Array<number>(6).fill(Infinity);
    const line = yorkLine([1, 2, 3, 4, 5.5, 7], [1.1, 1.9, 3.2, 3.7, 5.9, 6.8], none, [4, 1, 2, 8, 1, 5]);
    expect(line.intercept).toBeCloseTo(0.0593516542155845, 12);
    expect(line.slope).toBeCloseTo(0.9580309498399142, 12);
    expect(line.interceptSe).toBeCloseTo(0.4785974260949118, 12);
    expect(line.slopeSe).toBeCloseTo(0.1058582850834601, 12);
    expect(line.chiSquared).toBeCloseTo(0.8009111526147284, 12);
    expect(line.covariance).toBeCloseTo(-0.0450907150480256, 12);
  });
});

describe('chains of draws against the formulas of Vehtari and others 2021, written out in R', () => {
  // draws <- sapply(1:4, function(k) { s <- k*1000; v <- 0
  //   sapply(1:200, function(i) { s <<- (s*1103+12345) %% 65536; v <<- .6*v + s/65536 - .5; v }) })
  const chains = [1, 2, 3, 4].map((k) => {
    let s = 1000 * k;
    let v = 0;
    return sequence(200, () => {
      s = (s * 1103 + 12345) % 65536;
      v = 0.6 * v + s / 65536 - 0.5;
      return v;
    });
  });

  // h <- cbind(draws[1:100,], draws[101:200,])
  // zs <- function(h) { r <- rank(h); matrix(qnorm((r-3/8)/(length(h)+1/4)), nrow(h)) }
  it('split R-hat', () => {
    // rh <- function(h) { n <- nrow(h); W <- mean(apply(h,2,var)); sqrt(((n-1)/n*W + var(colMeans(h)))/W) }
    // rh(h); max(rh(zs(h)), rh(zs(abs(h-median(h)))))
    expect(splitRHat(chains, { rankNormalise: false })).toBeCloseTo(1.0233255854541, 12);
    expect(splitRHat(chains)).toBeCloseTo(1.0227293473537, 12);
    // the same with draws[,4] three times as wide: only the folded value sees it
    const wider = [...chains.slice(0, 3), chains[3].map((v) => 3 * v)];
    expect(splitRHat(wider)).toBeCloseTo(1.19787484799752, 12);
  });

  it('effective sample size', () => {
    // ess <- function(h) { n <- nrow(h); W <- mean(apply(h,2,var)); vp <- (n-1)/n*W + var(colMeans(h))
    //   ac <- rowMeans(apply(h, 2, function(x) acf(x, lag.max=n-1, type="covariance", plot=FALSE)$acf[,1,1]))
    //   rho <- 1-(W-ac)/vp; rho[1] <- 1; P <- rho[seq(1,n-1,2)]+rho[seq(2,n,2)]; K <- which(P<=0)[1]-1
    //   tau <- -1+2*sum(cummin(P[1:K]))+max(rho[2*K+1],0); length(h)/max(tau, 1/log10(length(h))) }
    // ess(zs(h)); ess(h)
    expect(effectiveSampleSize(chains)).toBeCloseTo(165.595754882387, 8);
    expect(effectiveSampleSize(chains, { rankNormalise: false })).toBeCloseTo(163.897369597981, 8);
  });
});
