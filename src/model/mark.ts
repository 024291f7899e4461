/** Marks that screening puts on a shell. */
export type ShellMark =
  | 'high serine'
  | 'discordant ratios'
  | 'rate order'
  | 'free below total'
  | 'replicates disagree'
  | 'low yield';

/** Marks on a bed. */
export type BedMark =
  | 'shallow burial'
  | 'provisional'
  | 'mixed age'
  | 'one shell'
  | 'near equilibrium'
  | 'no place in section'
  | 'assumed scatter'
  /** Its mean rests, in part or whole, on another taxon's shells put on the scale of the reference taxon. */
  | 'converted taxon';

/** A mark of one screening rule on one shell, with the numbers behind it in a sentence. */
export interface ScreeningMark {
  /** Index of the shell in the list that was screened. */
  readonly shell: number;
  readonly mark: ShellMark;
  /** For example: "L-Ser/L-Asp is 0.93, at or above the limit of 0.8". */
  readonly evidence: string;
}

/** Whether a shell counts in the means. `set aside` is left out; `doubtful` counts, but is named. */
export type ShellStatus = 'kept' | 'doubtful' | 'set aside';

/** What the tool says of an odd shell (design 7.9). */
export type ShellReading =
  | 'none'
  | 'reworked from an older deposit'
  | 'altered'
  | 'intruded from a younger deposit'
  | 'contaminated by younger amino acids'
  | 'reworked or altered'
  | 'intruded or contaminated';

/** How sure a reading is. */
export type Confidence = 'high' | 'moderate' | 'low';
