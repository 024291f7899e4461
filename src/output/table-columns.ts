import type { CorrelationRow, Findings } from '../model/index.js';
import { type CsvColumn, plainColumns } from './csv.js';
import type { AnyShape } from './shape.js';
import type { Table } from './tables/index.js';

/**
 * The columns of one table for these findings. All are as described, except that the correlation table has one column
 * a section, in coast order.
 */
export function tableColumns(table: Table, findings: Findings): readonly CsvColumn<never>[] {
  if (table.name !== 'correlation') return plainColumns(table.columns) as unknown as CsvColumn<never>[];
  const { sections, ...fixed } = table.columns;
  const taken = new Set(Object.keys(fixed));
  const columns: CsvColumn<CorrelationRow>[] = findings.section_order.map((section) => ({
    header: freeName(section, taken),
    shape: sectionShape(sections, section),
    value: (row) => (Object.hasOwn(row.sections, section) ? row.sections[section] : []),
  }));
  return [...(plainColumns(fixed) as unknown as CsvColumn<never>[]), ...(columns as unknown as CsvColumn<never>[])];
}

function sectionShape(sections: AnyShape, section: string): AnyShape {
  return {
    type: 'list',
    items: { type: 'text', description: 'bed' },
    description: `${sections.description}: ${section}`,
  };
}

// a section may be called `zone`; headers must still differ
function freeName(section: string, taken: Set<string>): string {
  let name = section;
  while (taken.has(name)) name = `section ${name}`;
  taken.add(name);
  return name;
}
