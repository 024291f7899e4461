import { VERSION } from '../version.js';
import type { CsvColumn } from './csv.js';
import type { AnyShape } from './shape.js';

/** Name of the package in datapackage.json: with the list of files, what proves that a folder is ours. */
export const PACKAGE_NAME = 'bedorder-results';

/** One file of the results folder as it was written. `path` uses `/`; columns only of tables. */
export interface WrittenFile {
  readonly path: string;
  readonly title: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly columns?: readonly CsvColumn<never>[];
}

/**
 * datapackage.json: the Data Package (version 2 of the standard, datapackage.org) that lists every file of the folder
 * with size and hash, and describes each table with the type, unit and meaning of its columns.
 */
export function dataPackage(files: readonly WrittenFile[]): string {
  const described = {
    $schema: 'https://datapackage.org/profiles/2.0/datapackage.json',
    name: PACKAGE_NAME,
    title: 'Aminozones and relative order of deposits',
    description:
      'Written by bedorder. The order of deposits is relative, and is no age. In tables, lists in a cell are joined ' +
      'by a semicolon, and a text that a spreadsheet would take for a formula is preceded by an apostrophe.',
    version: VERSION,
    resources: files.map(resource),
  };
  return `${JSON.stringify(described, null, 1)}\n`;
}

function resource({ path, title, bytes, sha256, columns }: WrittenFile) {
  const extension = path.slice(path.lastIndexOf('.') + 1);
  return {
    name: path.toLowerCase().replace(/[^a-z0-9]+/g, '-'),
    path,
    ...(columns ? { type: 'table' } : {}),
    title,
    format: extension,
    mediatype: MEDIA_TYPES[extension],
    encoding: 'utf-8',
    bytes,
    hash: `sha256:${sha256}`,
    ...(columns
      ? {
          dialect: { delimiter: ',', lineTerminator: '\n', quoteChar: '"', doubleQuote: true, header: true },
          schema: { fields: columns.map(({ header, shape }) => field(header, shape)), missingValues: [''] },
        }
      : {}),
  };
}

const MEDIA_TYPES: Readonly<Record<string, string>> = {
  csv: 'text/csv',
  json: 'application/json',
  geojson: 'application/geo+json',
  html: 'text/html',
  svg: 'image/svg+xml',
};

function field(name: string, shape: AnyShape) {
  const { description, unit } = shape;
  const about = { name, type: FIELD_TYPES[shape.type], description, ...(unit === undefined ? {} : { unit }) };
  switch (shape.type) {
    case 'list':
      return { ...about, delimiter: ';', itemType: 'string' };
    case 'boolean':
      return { ...about, trueValues: ['true'], falseValues: ['false'], ...needed(shape) };
    case 'choice':
      return {
        ...about,
        categories: Object.entries(shape.values).map(([value, label]) => ({ value, label })),
        constraints: { ...(shape.nullable ? {} : { required: true }), enum: Object.keys(shape.values) },
      };
    case 'number':
    case 'integer':
      return { ...about, ...needed(shape) };
    default:
      return about;
  }
}

const FIELD_TYPES = {
  text: 'string',
  choice: 'string',
  number: 'number',
  integer: 'integer',
  boolean: 'boolean',
  list: 'list',
  map: 'object',
  object: 'object',
  either: 'any',
} as const;

function needed({ nullable, minimum, maximum }: AnyShape) {
  const limits = {
    ...(nullable ? {} : { required: true }),
    ...(minimum === undefined ? {} : { minimum }),
    ...(maximum === undefined ? {} : { maximum }),
  };
  return Object.keys(limits).length === 0 ? {} : { constraints: limits };
}
