import type { Problem, RelationRow, SectionRow } from '../../model/index.js';
import { BASES, CERTAINTIES, RELATION_KINDS, RELATION_VERDICTS, SECTION_VERDICTS, SEVERITIES } from '../choices.js';
import type { FieldsOf } from '../shape.js';
import * as c from './columns.js';

/** Columns of relations.csv. */
export const relations = {
  clock: c.clock,
  lower: c.text('bed said to be the older, as section/bed'),
  upper: c.text('bed said to be the younger, as section/bed'),
  basis: { type: 'choice', values: BASES, description: 'on what the statement rests' },
  kind: { type: 'choice', values: RELATION_KINDS, description: 'older, or as old' },
  certainty: { type: 'choice', values: CERTAINTIES, description: 'whether the statement binds the order' },
  difference: c.logRatioOrNone('mean log ratio of lower less that of upper; positive agrees'),
  z: c.plainOrNone('difference over its standard error'),
  p_reversed: c.shareOrNone('one-sided p-value of the opposite order'),
  verdict: { type: 'choice', values: RELATION_VERDICTS, description: 'verdict on all shells' },
  verdict_after: { type: 'choice', values: RELATION_VERDICTS, description: 'verdict after setting shells aside' },
  reading: c.text('what would explain a reversed relation'),
} satisfies FieldsOf<RelationRow>;

/** Columns of sections.csv. */
export const sections = {
  clock: c.clock,
  section: c.section,
  beds: c.count('beds with a mean'),
  relations: c.count('relations within the section'),
  statistic: c.plainOrNone('weighted squares between the means and their isotonic regression'),
  p_order: c.shareOrNone('p-value of that statistic, simulated at equal means'),
  verdict: { type: 'choice', values: SECTION_VERDICTS, description: 'whether ratios and order agree' },
} satisfies FieldsOf<SectionRow>;

/** Columns of problems.csv. */
export const problems = {
  file: c.text('input file, without folders'),
  line: { type: 'integer', nullable: true, minimum: 1, description: 'line of the file; the header is line 1' },
  column: c.textOrNone('header of the column as written in the file'),
  severity: { type: 'choice', values: SEVERITIES, description: 'error or warning' },
  message: c.text('what was wanted, what came, and what to do'),
} satisfies FieldsOf<Problem>;
