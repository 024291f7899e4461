import type { Lists } from './flat-lists.js';

/** What the beds of each deposit say together; arrays have one entry a deposit. */
export interface DepositMeans {
  /** Sum of their precisions. */
  readonly weight: Float64Array;
  /** Their mean, weighted by precision. */
  readonly mean: Float64Array;
  /** The section of all of them; −1 where they stand in several. */
  readonly section: Int32Array;
}

/**
 * Sums up the beds of each deposit.
 *
 * @param means of the beds, as their precisions and numbers of sections
 * @param members beds of each deposit
 */
export function depositMeans(
  means: Float64Array,
  precision: Float64Array,
  section: Int32Array,
  members: Lists,
): DepositMeans {
  const deposits = members.start.length - 1;
  const weight = new Float64Array(deposits);
  const mean = new Float64Array(deposits);
  const own = new Int32Array(deposits);
  for (let deposit = 0; deposit < deposits; deposit++) {
    const beds = members.items.subarray(members.start[deposit], members.start[deposit + 1]);
    for (const bed of beds) {
      weight[deposit] += precision[bed];
      mean[deposit] += precision[bed] * means[bed];
    }
    mean[deposit] /= weight[deposit];
    own[deposit] = beds.every((bed) => section[bed] === section[beds[0]]) ? section[beds[0]] : -1;
  }
  return { weight, mean, section: own };
}
