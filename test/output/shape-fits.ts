import type { BedRow, ClockRow } from '../../src/model/index.js';
import type { FieldsOf } from '../../src/output/shape.js';
import { beds } from '../../src/output/tables/beds.js';
import { clocks } from '../../src/output/tables/zones.js';

// These lines fail to compile when a description no longer fits its type: `tsc` is the test.
export const FITS: readonly unknown[] = [
  clocks satisfies FieldsOf<ClockRow>,
  beds satisfies FieldsOf<BedRow>,
  // @ts-expect-error a column that may be unknown must say so
  { ...beds, dl_mean: { type: 'number', description: '' } } satisfies FieldsOf<BedRow>,
  // @ts-expect-error a column that is always known must not say that it may be unknown
  { ...clocks, scatter: { type: 'number', description: '', nullable: true } } satisfies FieldsOf<ClockRow>,
  // @ts-expect-error every word of a vocabulary needs its meaning
  { ...clocks, verdict: { type: 'choice', values: { zones: '' }, description: '' } } satisfies FieldsOf<ClockRow>,
  // @ts-expect-error a number is no text
  { ...clocks, shells: { type: 'text', description: '' } } satisfies FieldsOf<ClockRow>,
  // @ts-expect-error a column that the row does not have
  { ...clocks, colour: { type: 'text', description: '' } } satisfies FieldsOf<ClockRow>,
];
