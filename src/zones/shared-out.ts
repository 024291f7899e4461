/** Some of the repeats of a simulation: `first` … `first + repeats − 1`. */
export interface Part {
  readonly first: number;
  readonly repeats: number;
}

/**
 * Repeats in parts of one size, the last perhaps smaller, for the tasks that share them.
 * @example
 * sharedOut(5, 2) // => [{ first: 0, repeats: 2 }, { first: 2, repeats: 2 }, { first: 4, repeats: 1 }]
 */
export function sharedOut(repeats: number, size: number): Part[] {
  return Array.from({ length: Math.ceil(repeats / size) }, (_, at) => ({
    first: at * size,
    repeats: Math.min(size, repeats - at * size),
  }));
}
