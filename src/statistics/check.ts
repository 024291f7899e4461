/** Any list of numbers: an array, a frozen array or a typed array. Nothing in this room writes into one. */
export type Numbers = ArrayLike<number>;

/**
 * Refuses a list that holds NaN or an infinity, or is shorter than wanted, since one such value would spoil the answer
 * without a trace.
 *
 * @param who name of the calling function, put first in the message
 * @param what what the list holds, for the message
 * @param values the list
 * @param atLeast least number of values, default 1
 * @throws RangeError that names the function, what was wanted, and the value and place that failed
 * @example
 * ```ts
 * requireNumbers('mean', 'values', [1, 2]); // => undefined
 * ```
 */
export function requireNumbers(who: string, what: string, values: Numbers, atLeast = 1): void {
  if (!(values.length >= atLeast)) {
    throw new RangeError(`${who} needs at least ${atLeast} ${what}, got ${values.length}`);
  }
  for (let i = 0; i < values.length; i++) {
    if (!Number.isFinite(values[i])) {
      throw new RangeError(`${who} needs finite numbers as ${what}, got ${values[i]} at index ${i}`);
    }
  }
}

/**
 * Refuses numbers for which the test does not hold; write the test so that NaN fails it. Values are passed as they are,
 * so that no text is made while all is well.
 *
 * @throws RangeError in the form `who needs wanted, got value`
 * @example
 * ```ts
 * requireThat(2 > 0, 'studentTCdf', 'df > 0', 2); // => undefined
 * ```
 */
export function requireThat(holds: boolean, who: string, wanted: string, ...got: unknown[]): void {
  if (!holds) throw new RangeError(`${who} needs ${wanted}, got ${got.map(String).join(', ')}`);
}
