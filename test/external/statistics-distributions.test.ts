import { describe, expect, it } from 'vitest';
import {
  chiSquaredCdf,
  chiSquaredQuantile,
  chiSquaredUpperTail,
  fCdf,
  fUpperTail,
  noncentralT,
  normalCdf,
  normalQuantile,
  powerTTest,
  sampleSizeTTest,
  studentTCdf,
  studentTQuantile,
} from '../../src/statistics/index.js';

/** Equal to a relative error, which is the only fair measure far out in a tail. */
function expectNear(actual: number, wanted: number, relative: number): void {
  expect(Math.abs(actual - wanted), `${actual} against ${wanted}`).toBeLessThanOrEqual(relative * Math.abs(wanted));
}

// All values of this file: computed with R 4.2.2, command beside each group, printed by format(x, digits = 16).

describe('normal distribution against R', () => {
  // pnorm(z)
  it.each([
    [-37, 5.725571222524577e-300],
    [-20, 2.753624118606234e-89],
    [-10, 7.619853024160527e-24],
    [-6, 9.86587645037698e-10],
    [-5.66, 7.568649751997714e-9],
    [-5, 2.866515718791939e-7],
    [-3, 0.001349898031630095],
    [-1, 0.158655253931457],
    [-0.6, 0.2742531177500736],
    [0, 0.5],
    [0.3, 0.6179114221889527],
    [0.7, 0.758036347776927],
    [2, 0.9772498680518208],
    [6, 0.9999999990134123],
  ])('pnorm(%d)', (z, wanted) => expectNear(normalCdf(z), wanted, 1e-14));

  // qnorm(p)
  it.each([
    [1e-300, -37.0470962993612],
    [1e-100, -21.27345356096532],
    [1e-10, -6.361340902404056],
    [1e-5, -4.264890793922826],
    [0.01, -2.326347874040841],
    [0.07, -1.47579102817917],
    [0.3, -0.5244005127080407],
    [0.5, 0],
    [0.93, 1.475791028179171],
    [0.999, 3.090232306167813],
  ])('qnorm(%d)', (p, wanted) => expectNear(normalQuantile(p), wanted, 1e-14));
});

describe('Student’s t against R', () => {
  // pt(t, df)
  it.each([
    [-2.5, 7.3, 0.01982511733280023],
    [-1, 0.5, 0.3011216108413221],
    [-50, 0.1, 0.2822503607963489],
    [-300, 2, 5.555462964677608e-6],
    [-6, 1e6, 9.86924906177221e-10],
    [-10, 1e8, 7.620047315123796e-24],
    [-40, 30, 6.863022597203181e-28],
    [-0.001, 4, 0.499625000078125],
    [3, 1, 0.8975836176504333],
    [-1e8, 3, 1.102657790843584e-24],
  ])('pt(%d, %d)', (t, df, wanted) => expectNear(studentTCdf(t, df), wanted, 1e-11));

  // qt(p, df)
  it.each([
    [0.975, 4, 2.776445105197793],
    [1e-10, 3, -2225.769284683095],
    [1e-10, 1000, -6.427876283134206],
    [0.4, 0.3, -0.5023012820592925],
    [0.3, 1e6, -0.5244006798602087],
    [0.05, 1, -6.313751514675044],
    [0.0005, 12.5, -4.266936766292122],
    [0.4999, 7, -0.0002597460309024743],
  ])('qt(%d, %d)', (p, df, wanted) => expectNear(studentTQuantile(p, df), wanted, 1e-11));
});

describe('chi-squared against R', () => {
  // c(pchisq(x, df), pchisq(x, df, lower.tail = FALSE))
  it.each([
    [3.2, 2, 0.7981034820053446, 0.2018965179946554],
    [1e-5, 0.5, 0.05217001758066663, 0.9478299824193334],
    [100, 2, 1, 1.928749847963918e-22],
    [1000, 900, 0.9890053910578641, 0.01099460894213585],
    [20000, 20500, 0.006452301474785649, 0.9935476985252144],
    [0.01, 5, 5.300270042686517e-7, 0.9999994699729957],
    [300, 3, 1, 9.948758346327708e-65],
  ])('pchisq(%d, %d)', (x, df, lower, upper) => {
    expectNear(chiSquaredCdf(x, df), lower, 1e-11);
    expectNear(chiSquaredUpperTail(x, df), upper, 1e-11);
  });

  // qchisq(p, df)
  it.each([
    [0.95, 1, 3.841458820694124],
    [1e-10, 3, 5.20939762143448e-7],
    [0.001, 0.2, 1.214609672481588e-30],
    [0.5, 1000, 999.333412403381],
    [0.999999, 10, 46.86304684671568],
    [0.3, 2.5, 1.058042521596022],
  ])('qchisq(%d, %d)', (p, df, wanted) => expectNear(chiSquaredQuantile(p, df), wanted, 1e-10));
});

describe('Fisher’s F against R', () => {
  // c(pf(f, df1, df2), pf(f, df1, df2, lower.tail = FALSE))
  it.each([
    [3.1, 4, 12, 0.9427051434383424, 0.05729485656165757],
    [747.279, 2, 80, 1, 1.72684344648304e-52],
    [0.01, 3, 200, 0.00137454913763523, 0.9986254508623648],
    [1.05, 5000, 8000, 0.9725142035106151, 0.02748579648938491],
    [1e-6, 0.7, 3.3, 0.00575511488656073, 0.9942448851134393],
    [400, 1, 2, 0.9975093361076329, 0.002490663892367097],
  ])('pf(%d, %d, %d)', (f, df1, df2, lower, upper) => {
    expectNear(fCdf(f, df1, df2), lower, 1e-11);
    expectNear(fUpperTail(f, df1, df2), upper, 1e-11);
  });
});

describe('noncentral t and power against R', () => {
  // c(pt(t, df, ncp), pt(t, df, ncp, lower.tail = FALSE)); R's own method claims about 1e-12 absolute
  it.each([
    [2, 10, 1, 0.8076115625303111, 0.1923884374696889],
    [-1, 3, 2, 0.003005247595450067, 0.9969947524045499],
    [0, 5, -1, 0.8413447460685429, 0.1586552539314571],
    [5, 1.5, 2, 0.7781606538660963, 0.2218393461339037],
    [12, 100, 10, 0.9340949420774498, 0.06590505792255019],
    [1.97, 1000, 3, 0.1516237256617982, 0.8483762743382017],
    [-3, 8, -1.2, 0.08329698907731109, 0.9167030109226889],
  ])('pt(%d, %d, %d)', (t, df, ncp, lower, upper) => {
    const found = noncentralT(t, df, ncp);
    expect(Math.abs(found.lower - lower)).toBeLessThan(1e-11);
    expect(Math.abs(found.upper - upper)).toBeLessThan(1e-11);
  });

  it('is Student’s t without noncentrality, also far out', () => {
    for (const [t, df] of [
      [-6, 5],
      [-40, 30],
      [-1, 0.7],
      [-5, 1e5],
    ]) {
      expectNear(noncentralT(t, df, 0).lower, studentTCdf(t, df), 1e-11);
    }
  });

  it('gives the power of power.t.test', () => {
    // power.t.test(n = 20, delta = 1, sd = 1, strict = TRUE)$power
    expectNear(powerTTest({ delta: 1, sd: 1 }, 20), 0.8689530277245856, 1e-11);
    // power.t.test(n = 6, delta = 1.5, sd = 1, sig.level = .01, alternative = "one.sided")$power
    expectNear(powerTTest({ delta: 1.5, sd: 1, alpha: 0.01, sides: 1 }, 6), 0.4690316914981955, 1e-11);
    // df <- 48; ncp <- 1 / sqrt(1/10 + 1/40); q <- qt(.975, df); pt(q, df, ncp, lower = FALSE) + pt(-q, df, ncp)
    expectNear(powerTTest({ delta: 1, sd: 1 }, 10, 40), 0.7914512899855867, 1e-11);
  });

  it('gives the numbers of power.t.test', () => {
    // power.t.test(delta = 1, sd = 1, power = .9, strict = TRUE, tol = 1e-12)$n
    expectNear(sampleSizeTTest({ delta: 1, sd: 1 }, 0.9), 22.02108842637363, 1e-9);
    // power.t.test(delta = .3, sd = 1, power = .8, strict = TRUE, tol = 1e-12)$n
    expectNear(sampleSizeTTest({ delta: -0.3, sd: 1 }), 175.3846694702209, 1e-9);
    // power.t.test(delta = 2, sd = 1, power = .5, sig.level = .01, alternative = "one.sided", tol = 1e-12)$n
    expectNear(sampleSizeTTest({ delta: 2, sd: 1, alpha: 0.01, sides: 1 }, 0.5), 4.276822914760949, 1e-9);
  });
});
