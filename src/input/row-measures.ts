import { checkRatio } from './check-ratio.js';
import { aminoAcidOf } from './column-names.js';
import type { Numbers } from './open-analysis.js';
import type { ProblemList } from './problem-list.js';
import type { RowReader } from './row-reader.js';
import type { ShellsLayout } from './shells-layout.js';
import { type Cell, isBlank } from './table.js';

/** Measurements of one row. */
export interface RowMeasures {
  readonly ratios: Numbers;
  readonly sd: Numbers;
  readonly concentrations: Numbers;
  /** Whether any ratio's cell was filled, readable or not. */
  readonly filled: boolean;
  readonly hasSd: boolean;
}

/** A number that can't be below 0; when it is, an error is noted. */
export function notNegative(
  value: number | null,
  what: string,
  row: number,
  column: number,
  reader: RowReader,
  problems: ProblemList,
): number | null {
  if (value === null || value >= 0) return value;
  problems.error('negative', reader.place(row, column), `${what} is ${value}; it can't be below 0.`);
  return null;
}

/** The measurements of a row of the wide form. */
export function wideMeasures(
  layout: ShellsLayout,
  cells: readonly Cell[],
  row: number,
  reader: RowReader,
  problems: ProblemList,
): RowMeasures {
  const ratios: Numbers = {};
  // most tables give neither: all their rows share the empty one, which nothing is put into
  const sd: Numbers = layout.measures.some((m) => m.sd >= 0) ? {} : NONE;
  const concentrations: Numbers = layout.measures.some((m) => m.concentration >= 0) ? {} : NONE;
  let filled = false;
  let hasSd = false;
  for (const m of layout.measures) {
    const ratio = reader.number(cells, row, m.ratio);
    if (ratio !== null && checkRatio(ratio, m.amino, () => reader.place(row, m.ratio), problems))
      ratios[m.amino] = ratio;
    const ratioFilled = ratio !== null || (m.ratio >= 0 && !isBlank(cells[m.ratio]));
    filled ||= ratioFilled;
    if (m.sd >= 0) {
      const value = notNegative(
        reader.number(cells, row, m.sd),
        `The standard deviation of ${m.amino}`,
        row,
        m.sd,
        reader,
        problems,
      );
      if (value !== null) {
        sd[m.amino] = value;
        hasSd = true;
        if (!ratioFilled) problems.error('sd without ratio', reader.place(row, m.sd), SD_ALONE);
      }
    }
    if (m.concentration >= 0) {
      const value = reader.number(cells, row, m.concentration);
      const checked = notNegative(value, `The concentration of ${m.amino}`, row, m.concentration, reader, problems);
      if (checked !== null) concentrations[m.amino] = checked;
    }
  }
  return { ratios, sd, concentrations, filled, hasSd };
}

const NONE: Numbers = Object.freeze({});

const SD_ALONE = 'The row gives a standard deviation without its ratio. Add the mean ratio, or empty the cell.';

/** The measurement of a row of the long form. */
export function longMeasures(
  layout: ShellsLayout,
  cells: readonly Cell[],
  row: number,
  reader: RowReader,
  problems: ProblemList,
): RowMeasures {
  const { at } = layout.columns;
  const dl = at('dl');
  const ratio = reader.number(cells, row, dl);
  const filled = ratio !== null || !isBlank(cells[dl]);
  const sdAt = at('dl_sd');
  const sd = notNegative(reader.number(cells, row, sdAt), 'The standard deviation', row, sdAt, reader, problems);
  if (sd !== null && !filled) problems.error('sd without ratio', reader.place(row, sdAt), SD_ALONE);
  const concentrationAt = at('concentration');
  const value = reader.number(cells, row, concentrationAt);
  const concentration = notNegative(value, 'The concentration', row, concentrationAt, reader, problems);
  const name = reader.neededName(cells, row, at('amino_acid'), 'amino acid');
  const amino = aminoAcidOf(name);
  if (amino === null) {
    if (name !== '') {
      problems.error(
        'amino acid',
        reader.place(row, at('amino_acid')),
        `"${name}" is no amino acid that is read here. Wanted is one of Asx, Glx, Ser, Ala, Val, Phe, Leu, Ile, Tyr, Met.`,
      );
    }
    return { ratios: {}, sd: {}, concentrations: {}, filled, hasSd: sd !== null };
  }
  const sound = ratio !== null && checkRatio(ratio, amino, () => reader.place(row, dl), problems);
  return {
    ratios: sound ? { [amino]: ratio } : {},
    sd: sd === null ? {} : { [amino]: sd },
    concentrations: concentration === null ? {} : { [amino]: concentration },
    filled,
    hasSd: sd !== null,
  };
}
