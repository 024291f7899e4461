/** The parts of a survey that a try may hold; each is the bytes of one file. */
export const PARTS = ['shells', 'beds', 'relations', 'standards', 'aliases', 'dates', 'settings'] as const;

export type Part = (typeof PARTS)[number];

/** The files of one try. */
export type SurveyFiles = Readonly<Partial<Record<Part, Uint8Array>>> & { readonly shells: Uint8Array };

/** A named survey that tries start from. */
export interface Start {
  readonly name: string;
  readonly files: SurveyFiles;
}
