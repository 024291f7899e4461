import type { Analysis, Fraction } from '../model/index.js';
import type { BedRegister } from './bed-register.js';
import { joinLongRows } from './join-long-rows.js';
import type { OpenAnalysis } from './open-analysis.js';
import { placeColumns, readPlace } from './place-columns.js';
import type { ProblemList } from './problem-list.js';
import { createRowWatch, warnOfRepeatedIds } from './repeats.js';
import { longMeasures, notNegative, wideMeasures } from './row-measures.js';
import { createRowReader, type RowReader } from './row-reader.js';
import { settleDecimal } from './settle-decimal.js';
import { layoutOfShells } from './shells-layout.js';
import { squash } from './squash.js';
import { countShell, summaryOf } from './summary-row.js';
import type { Table } from './table.js';

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
  const places = placeColumns(at);
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
    const serine = notNegative(
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
    readPlace(places, cells, row, entry, reader, beds, problems);
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
