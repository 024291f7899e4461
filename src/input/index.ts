/** The input room: files to a survey, with every problem collected. */
export { type DatesResult, datesFromBytes } from './dates-table.js';
export { LIMITS } from './limits.js';
export { readDates } from './read-dates.js';
export { readSettings } from './read-settings.js';
export { readSurvey, type SurveyFiles } from './read-survey.js';
export type { FileBytes } from './read-table.js';
export type { SettingsResult } from './settings.js';
export type { Settings } from './settings-schema.js';
export { type SurveyBytes, type SurveyResult, surveyFromBytes } from './survey-from-bytes.js';
