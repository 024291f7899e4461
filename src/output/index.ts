/* Findings to files: tables, results.json, GeoJSON, data package, and the folder that holds them. */

export { csvCell, textCell, writeCsv } from './csv.js';
export { dataPackage, PACKAGE_NAME, type WrittenFile } from './data-package.js';
export { inspectFolder } from './folder/inspect.js';
export { codeOf, inWords, isOutputError, type OutputError, refused } from './folder/output-error.js';
export { type Places, placesOf } from './folder/places.js';
export { recoverFolder } from './folder/recover.js';
export { type FolderHold, holdFolder, refuseForeign, type Step } from './folder/replace-folder.js';
export { geoJson } from './geojson.js';
export { type JsonSchema, resultsSchema } from './json-schema.js';
export { numberText } from './number-text.js';
export { readResults } from './read-results.js';
export { writeResultsJson } from './results-json.js';
export { tableColumns } from './table-columns.js';
export { TABLES, type Table, type TableName } from './tables/index.js';
export { type Drawings, writeResults } from './write-results.js';
