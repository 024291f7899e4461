/*
 * How much work tests of rates and of random cases do. `npm test` is to end within a few minutes on anyone's machine;
 * BEDORDER_TESTS=long, as .ci/run sets it for a step of its own, takes several times as many cases for the same claims.
 */

/** Whether the long tests were asked for. */
export const LONG = process.env.BEDORDER_TESTS === 'long';

/** So many cases: `few` in `npm test`, `many` in the long tests. */
export const cases = (few: number, many: number): number => (LONG ? many : few);
