export { type SurveyBytes, type SurveyResult, surveyFromBytes } from './input/survey-from-bytes.js';
export * from './model/index.js';
export { analyse } from './pipeline.js';
export { runTask } from './tasks.js';
export { VERSION } from './version.js';
