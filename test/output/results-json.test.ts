import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Ajv } from 'ajv';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Findings } from '../../src/model/index.js';
import { resultsSchema } from '../../src/output/json-schema.js';
import { resultsText as written } from '../house/written.js';
import { FINDINGS } from './fixture.js';

const validate = new Ajv({ allErrors: true }).compile(resultsSchema());
const SHIPPED = fileURLToPath(new URL('../../src/output/results.schema.json', import.meta.url));

describe('results.json', () => {
  it('holds the findings as they are, to 12 digits', () => {
    const back = JSON.parse(written(FINDINGS));
    expect(back.adjacent_zones[0].difference).toBe(0.712345678901);
    expect({ ...back, beds: [], adjacent_zones: [], shells: [], relations: [] }).toEqual({
      ...FINDINGS,
      beds: [],
      adjacent_zones: [],
      shells: [],
      relations: [],
    });
  });

  it('does not depend on the order in which keys were made', () => {
    const turned = Object.fromEntries(Object.entries(FINDINGS).reverse()) as unknown as Findings;
    const beds = FINDINGS.beds.map((row) => Object.fromEntries(Object.entries(row).reverse()));
    expect(written({ ...turned, beds: beds as unknown as Findings['beds'] })).toBe(written(FINDINGS));
  });

  it('writes the same again after it was read', () => {
    expect(written(JSON.parse(written(FINDINGS)))).toBe(written(FINDINGS));
  });

  it('keeps any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const findings = { ...FINDINGS, section_order: [text] };
        expect(JSON.parse(written(findings)).section_order).toEqual([text]);
      }),
    );
  });

  it('has no number that JSON does not know', () => {
    const broken = { ...FINDINGS, zones: [{ ...FINDINGS.zones[0], dl_mean: Number.NaN }] };
    expect(() => written(broken)).toThrow('zones[0].dl_mean');
    const unknown = { ...FINDINGS, zones: [{ ...FINDINGS.zones[0], stability: Number.NaN }] };
    expect(JSON.parse(written(unknown)).zones[0].stability).toBeNull();
  });
});

describe('the JSON Schema of results.json', () => {
  it('accepts what is written', () => {
    validate(JSON.parse(written(FINDINGS)));
    expect(validate.errors).toBeNull();
  });

  it.each<[string, (findings: Record<string, unknown>) => void]>([
    ['a missing part', (findings) => delete findings.zones],
    ['a part too many', (findings) => Object.assign(findings, { more: 1 })],
    ['a wrong verdict', (findings) => Object.assign((findings.clocks as object[])[0], { verdict: 'maybe' })],
    ['a probability above 1', (findings) => Object.assign((findings.pairs as object[])[0], { p_a_older: 1.5 })],
    ['a null that may not be', (findings) => Object.assign((findings.zones as object[])[0], { dl_mean: null })],
  ])('refuses %s', (_, spoil) => {
    const findings = JSON.parse(written(FINDINGS));
    spoil(findings);
    expect(validate(findings)).toBe(false);
  });

  it('is shipped as it is made', () => {
    const made = resultsSchema();
    // the formatter has its own mind about line breaks: `npm run format` after writing
    if (process.env.GOLDEN === 'write') writeFileSync(SHIPPED, `${JSON.stringify(made, null, 2)}\n`);
    expect(JSON.parse(readFileSync(SHIPPED, 'utf8'))).toEqual(made);
  });
});
