import type { AminoAcid, Analysis, Fraction, SummaryOfShells } from '../model/index.js';
import { type BedRegister, PLACE_KINDS } from './bed-register.js';
import { checkRatio } from './check-ratio.js';
import { aminoAcidOf } from './column-names.js';
import { joinLongRows } from './join-long-rows.js';
import type { ProblemList } from './problem-list.js';
import { createRowWatch, warnOfRepeatedIds } from './repeats.js';
import { createRowReader, type RowReader } from './row-reader.js';
import { settleDecimal } from './settle-decimal.js';
import { layoutOfShells, type ShellsLayout } from './shells-layout.js';
import { squash } from './squash.js';
import { type Cell, isBlank, type Table } from './table.js';

type Numbers = Partial<Record<AminoAcid, number>>;

/** Analyses are built here and are readonly afterwards. */
export type OpenAnalysis = { -readonly [K in keyof Analysis]: Analysis[K] } & {
  ratios: Numbers;
  concentrations: Numbers;
};

/** Measurements of one row. */
interface RowMeasures {
  readonly ratios: Numbers;
  readonly sd: Numbers;
  readonly concentrations: Numbers;
  /** Whether any ratio's cell was filled, readable or not. */
  readonly filled: boolean;
  readonly hasSd: boolean;
}

/**
 * Reads the shells table, wide or long, and enters its beds and places.
 *
 * @param taxonOf the taxon's name after aliases, told the name as written and its line
 */
export function readShells(
  table: Table,
  beds: BedRegister,
  taxonOf: (name: string, line: number) => string,
  problems: ProblemList,
): Analysis[] {
  const layout = layoutOfShells(table, problems);
  if (layout === null) return [];
  const { at } = layout.columns;
  const reader = createRowReader(table, settleDecimal(table, layout.numeric, problems), problems);
  const repeats = createRowWatch(table, problems);
  const column = {
    section: at('section'),
    bed: at('bed'),
    taxon: at('taxon'),
    shell: at('shell'),
    preparation: at('preparation'),
    injection: at('injection'),
    lab_id: at('lab_id'),
    lab: at('lab'),
    method: at('method'),
    fraction: at('fraction'),
    serine: at('serine'),
  };
  const places = PLACE_KINDS.map((kind) => ({ kind, column: at(kind) })).filter((p) => p.column >= 0);
  const analyses: OpenAnalysis[] = [];

  reader.forEachRow((cells, row) => {
    const text = (index: number) => reader.name(cells, row, index);
    const orNull = (index: number) => text(index) || null;
    const section = reader.neededName(cells, row, column.section, 'section');
    const bed = reader.neededName(cells, row, column.bed, 'bed');
    const written = reader.neededName(cells, row, column.taxon, 'taxon');
    const shell = text(column.shell);
    const fraction = readFraction(text(column.fraction), row, column.fraction, reader, problems);
    const measures = layout.long
      ? longMeasures(layout, cells, row, reader, problems)
      : wideMeasures(layout, cells, row, reader, problems);
    const summary = summaryOf(layout, cells, row, shell, measures, reader, problems);
    const serine = positive(
      reader.number(cells, row, column.serine),
      'L-Ser/L-Asp',
      row,
      column.serine,
      reader,
      problems,
    );
    repeats.row(row);
    if (section === '' || bed === '' || written === '') return;

    const line = table.line(row);
    const taxon = taxonOf(written, line);
    const entry = beds.enter(section, bed, () => ({ file: table.file, line }));
    let placeGiven: string | null = null;
    for (const place of places) {
      const value = reader.number(cells, row, place.column);
      if (value === null) continue;
      if (placeGiven !== null) {
        problems.error(
          'two kinds in a row',
          reader.place(row, place.column),
          `The row gives ${placeGiven} and ${place.kind} as well. Give one kind of place for a whole section.`,
        );
        continue;
      }
      placeGiven = place.kind;
      if (place.kind === 'depth_m' && value < 0) {
        problems.error('negative depth', reader.place(row, place.column), NEGATIVE_DEPTH(value));
        continue;
      }
      beds.setPlace(entry, place.kind, value, () => ({ file: table.file, line, column: table.header[place.column] }));
    }
    if (!measures.filled) {
      problems.warning(
        'nothing measured',
        reader.place(row),
        'The row has no D/L value and is not used. Fill it in, or delete the row.',
      );
      return;
    }
    countShell(entry.shells, taxon, shell, summary, line);
    analyses.push({
      file: table.file,
      line,
      section,
      bed,
      taxon,
      fraction,
      shell,
      preparation: orNull(column.preparation),
      injection: orNull(column.injection),
      lab_id: orNull(column.lab_id),
      lab: orNull(column.lab),
      method: orNull(column.method),
      ratios: measures.ratios,
      concentrations: measures.concentrations,
      serine_ratio: serine,
      summary,
    });
  });
  warnOfRepeatedIds(analyses, column.lab_id < 0 ? '' : table.header[column.lab_id], problems);
  return layout.long ? joinLongRows(analyses) : analyses;
}

/** Advice for a depth below 0, which would turn the order of the beds round. */
export const NEGATIVE_DEPTH = (value: number): string =>
  `depth_m is ${value}; a depth is counted downwards from the surface and is not below 0. Leave the minus sign out, or give height_m in its place.`;

function readFraction(text: string, row: number, column: number, reader: RowReader, problems: ProblemList): Fraction {
  if (text === '' || text === 'THAA') return 'THAA';
  const plain = squash(text);
  if (plain === 'thaa') return 'THAA';
  if (plain === 'faa') return 'FAA';
  problems.error(
    'fraction',
    reader.place(row, column),
    `"${text}" is no fraction. Write THAA (total hydrolysable amino acids) or FAA (free amino acids), or leave the cell empty for THAA.`,
  );
  return 'THAA';
}

function positive(
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

function wideMeasures(
  layout: ShellsLayout,
  cells: readonly Cell[],
  row: number,
  reader: RowReader,
  problems: ProblemList,
): RowMeasures {
  const ratios: Numbers = {};
  const sd: Numbers = {};
  const concentrations: Numbers = {};
  let filled = false;
  let hasSd = false;
  for (const m of layout.measures) {
    const ratio = reader.number(cells, row, m.ratio);
    if (ratio !== null && checkRatio(ratio, m.amino, () => reader.place(row, m.ratio), problems))
      ratios[m.amino] = ratio;
    const ratioFilled = ratio !== null || (m.ratio >= 0 && !isBlank(cells[m.ratio]));
    filled ||= ratioFilled;
    if (m.sd >= 0) {
      const value = positive(
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
      const checked = positive(value, `The concentration of ${m.amino}`, row, m.concentration, reader, problems);
      if (checked !== null) concentrations[m.amino] = checked;
    }
  }
  return { ratios, sd, concentrations, filled, hasSd };
}

const SD_ALONE = 'The row gives a standard deviation without its ratio. Add the mean ratio, or empty the cell.';

function longMeasures(
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
  const sd = positive(reader.number(cells, row, sdAt), 'The standard deviation', row, sdAt, reader, problems);
  if (sd !== null && !filled) problems.error('sd without ratio', reader.place(row, sdAt), SD_ALONE);
  const concentrationAt = at('concentration');
  const value = reader.number(cells, row, concentrationAt);
  const concentration = positive(value, 'The concentration', row, concentrationAt, reader, problems);
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

/** A row without a shell is a summary: of `n` shells, or of one where a mean alone is given. */
function summaryOf(
  layout: ShellsLayout,
  cells: readonly Cell[],
  row: number,
  shell: string,
  measures: RowMeasures,
  reader: RowReader,
  problems: ProblemList,
): SummaryOfShells | null {
  const column = layout.columns.at('n');
  const n = reader.number(cells, row, column);
  const sound = n === null || (Number.isInteger(n) && n >= 1 && n <= 1_000_000);
  if (!sound) {
    problems.error('n', reader.place(row, column), `n is ${n}; it is the number of shells, a whole number from 1.`);
    return null;
  }
  if (shell !== '') {
    if (measures.hasSd || (n !== null && n > 1)) {
      problems.warning(
        'n with shell',
        reader.place(row),
        `The row names shell "${shell}", so its n and standard deviation are not used: they belong to rows that sum up several shells and name none.`,
      );
    }
    return null;
  }
  if (measures.hasSd && n === null && isBlank(cells[column])) {
    problems.error(
      'sd without n',
      column < 0 ? reader.place(row) : reader.place(row, column),
      'The row gives a standard deviation but not the number of shells. Write that number into the column n.',
    );
  } else if (measures.hasSd && n === 1) {
    problems.error(
      'sd of one shell',
      reader.place(row, column),
      'n is 1, and one shell has no standard deviation between shells. Correct n, or empty the cell of the standard deviation.',
    );
  } else if (n === null && isBlank(cells[column]) && measures.filled) {
    problems.warning(
      'mean alone',
      reader.place(row),
      'The row has neither shell nor n: it counts as one shell, which says nothing of the scatter. Name the shell, or give n (and the standard deviation).',
    );
  }
  return { n: n ?? 1, sd: measures.sd };
}

function countShell(
  shells: Map<string, { count: number; only: string; line: number }>,
  taxon: string,
  shell: string,
  summary: SummaryOfShells | null,
  line: number,
): void {
  const known = shells.get(taxon);
  const n = summary?.n ?? 1;
  if (known === undefined) shells.set(taxon, { count: n, only: shell, line });
  else if (summary !== null || shell !== known.only) known.count += n;
}
