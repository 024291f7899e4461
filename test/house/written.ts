import type { Findings } from '../../src/model/index.js';
import { writeCsv } from '../../src/output/csv.js';
import { writeResultsJson } from '../../src/output/results-json.js';
import { tableColumns } from '../../src/output/table-columns.js';
import type { Table } from '../../src/output/tables/index.js';
import { textOf } from '../../src/output/text-out.js';

/** One table of the findings as a run writes it. */
export const tableText = (table: Table, findings: Findings): string =>
  textOf((out) =>
    writeCsv<never>(out, `${table.name}.csv`, tableColumns(table, findings), findings[table.name] as never[]),
  );

/** results.json as a run writes it. */
export const resultsText = (findings: Findings): string => textOf((out) => writeResultsJson(out, findings));
