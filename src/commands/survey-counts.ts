import type { Survey } from '../model/index.js';

/** How much was read. */
export interface SurveyCounts {
  readonly analyses: number;
  readonly beds: number;
  readonly sections: number;
  readonly taxa: readonly string[];
  readonly relations: number;
}

/** Counts what a survey holds. */
export function surveyCounts(survey: Survey): SurveyCounts {
  return {
    analyses: survey.analyses.length,
    beds: survey.beds.length,
    sections: new Set(survey.beds.map(({ section }) => section)).size,
    taxa: [...new Set(survey.analyses.map(({ taxon }) => taxon))],
    relations: survey.relations.length,
  };
}
