import type { AnyFields } from '../shape.js';
import { beds, shells } from './beds.js';
import { correlation, order, pairs } from './order.js';
import { plan } from './plan.js';
import { problems, relations, sections } from './relations.js';
import { adjacent_zones, clocks, zone_counts, zones } from './zones.js';

/** One table of the results folder: its name (also its key in results.json), what a row is, and its columns. */
export interface Table {
  readonly name: TableName;
  readonly description: string;
  /** Columns in the order in which they stand in the file. */
  readonly columns: AnyFields;
  /** No value in it rests on the scatter between shells. */
  readonly scatterless?: true;
}

/** Names of the tables; with `.csv` added, of their files. */
export type TableName =
  | 'clocks'
  | 'zones'
  | 'zone_counts'
  | 'adjacent_zones'
  | 'beds'
  | 'shells'
  | 'order'
  | 'pairs'
  | 'relations'
  | 'sections'
  | 'correlation'
  | 'plan'
  | 'problems';

/** The tables of the results folder, in the order in which they are best read. */
export const TABLES: readonly Table[] = [
  { name: 'clocks', description: 'What was zoned: one row a clock', columns: clocks },
  { name: 'zones', description: 'Aminozones: one row a zone of a clock', columns: zones },
  { name: 'zone_counts', description: 'How the number of zones was chosen: one row a model', columns: zone_counts },
  { name: 'adjacent_zones', description: 'Whether neighbouring zones are really distinct', columns: adjacent_zones },
  { name: 'beds', description: 'One row a bed of a main clock', columns: beds },
  { name: 'shells', description: 'One row a shell of a main clock', columns: shells },
  {
    name: 'order',
    description: 'Deposits from oldest to youngest; the order is relative, and is no age',
    columns: order,
  },
  { name: 'pairs', description: 'Which of two beds is older, for surveys of up to 400 beds', columns: pairs },
  { name: 'relations', description: 'Field relations against the ratios', columns: relations },
  { name: 'sections', description: 'Whether each section agrees with its own superposition', columns: sections },
  { name: 'correlation', description: 'Beds of each zone, one column a section in coast order', columns: correlation },
  { name: 'plan', description: 'What to collect or date next, and what it would settle', columns: plan },
  { name: 'problems', description: 'Warnings about the input', columns: problems, scatterless: true },
];
