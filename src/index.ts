/**
 * The library: the whole engine on plain data, without a Node module, so that it runs in a browser unchanged.
 *
 * {@link surveyFromBytes} reads tables, {@link analyse} finds all there is to find, {@link drawFigures} and
 * {@link renderReport} draw it, {@link plan} says what to collect or date next, {@link judgeDates} holds dates against the order.
 * Field names of all rows are the column names of the published tables.
 *
 * @module
 */

// Drawing
export { drawFigures, type Figure } from './figures/index.js';
export type { FileBytes } from './input/read-table.js';
// Reading
export { type SurveyBytes, type SurveyResult, surveyFromBytes } from './input/survey-from-bytes.js';
// The words of the trade as plain data, and the defaults of every option
export * from './model/index.js';
// Finding
export { analyse } from './pipeline.js';
// Afterwards
export { type JudgeDatesOptions, judgeDates, type PlanOptions, plan } from './planning/index.js';
export { renderReport } from './report/index.js';
export { runTask } from './tasks.js';
// What wrote it
export { VERSION } from './version.js';
