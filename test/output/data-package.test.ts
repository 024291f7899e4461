import { createHash } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Ajv } from 'ajv';
import { parse } from 'csv-parse/sync';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { filesIn } from '../../src/output/folder/inspect.js';
import { writeResults } from '../../src/output/write-results.js';
import { DATA_PACKAGE_RULES } from './data-package-rules.js';
import { FINDINGS } from './fixture.js';

interface Field {
  readonly name: string;
  readonly type: string;
  readonly constraints?: { readonly required?: boolean; readonly enum?: readonly string[]; readonly minimum?: number };
}

interface Resource {
  readonly name: string;
  readonly path: string;
  readonly bytes: number;
  readonly hash: string;
  readonly schema?: { readonly fields: readonly Field[] };
}

describe('datapackage.json', () => {
  const folder = mkdtempSync(join(tmpdir(), 'bedorder-'));
  let described: { readonly resources: readonly Resource[] };

  beforeAll(async () => {
    await writeResults(FINDINGS, { report: '<p>report</p>', figures: [{ name: 'ranks', svg: '<svg/>' }] }, folder);
    described = JSON.parse(readFileSync(join(folder, 'datapackage.json'), 'utf8'));
  });
  afterAll(() => rmSync(folder, { recursive: true }));

  it('keeps the rules of the standard', () => {
    const validate = new Ajv({ allErrors: true, strict: false }).compile(DATA_PACKAGE_RULES);
    validate(described);
    expect(validate.errors).toBeNull();
  });

  it('lists every other file of the folder, by name only once, with its size and hash', () => {
    expect(described.resources.map(({ path }) => path).sort()).toEqual(
      filesIn(folder).filter((name) => name !== 'datapackage.json'),
    );
    expect(new Set(described.resources.map(({ name }) => name)).size).toBe(described.resources.length);
    for (const { path, bytes, hash } of described.resources) {
      const content = readFileSync(join(folder, path));
      expect(content.length).toBe(bytes);
      expect(`sha256:${createHash('sha256').update(content).digest('hex')}`).toBe(hash);
    }
  });

  it('says in the title of each table that its errors rest on a scatter that was assumed', async () => {
    const own = mkdtempSync(join(tmpdir(), 'bedorder-'));
    try {
      const beds = FINDINGS.beds.map((bed) => ({ ...bed, marks: ['assumed scatter' as const] }));
      await writeResults({ ...FINDINGS, beds }, { report: '', figures: [] }, own);
      const { resources } = JSON.parse(readFileSync(join(own, 'datapackage.json'), 'utf8'));
      const said = resources.filter((one: { title: string }) => one.title.includes('scatter that was assumed'));
      const tables = resources.filter((one: { path: string }) => one.path.endsWith('.csv'));
      expect(said.length).toBe(tables.length - 1);
      expect(described.resources.filter((one) => JSON.stringify(one).includes('was assumed'))).toEqual([]);
    } finally {
      rmSync(own, { recursive: true });
    }
  });

  it('describes the tables as they are: headers, and cells that fit their type', () => {
    let cells = 0;
    for (const { path, schema } of described.resources) {
      if (!schema) continue;
      const [header, ...rows] = parse(readFileSync(join(folder, path)), { record_delimiter: '\n' }) as string[][];
      expect(header).toEqual(schema.fields.map(({ name }) => (name.startsWith('=') ? `'${name}` : name)));
      for (const row of rows) {
        schema.fields.forEach((field, i) => {
          expect(fits(field, row[i]), `${path}, ${field.name}: ${row[i]}`).toBe(true);
          cells++;
        });
      }
    }
    expect(cells).toBeGreaterThan(150);
  });

  it('says nothing of when, where or by whom it was written', () => {
    for (const name of filesIn(folder)) {
      const text = readFileSync(join(folder, name), 'utf8');
      expect(text).not.toContain(folder);
      expect(text).not.toMatch(/\b20\d\d-\d\d-\d\d/);
    }
  });
});

function fits({ type, constraints }: Field, cell: string): boolean {
  if (cell === '') return constraints?.required !== true;
  if (constraints?.enum && !constraints.enum.includes(cell)) return false;
  switch (type) {
    case 'integer':
      return /^-?\d+$/.test(cell);
    case 'number':
      return /^-?(?:\d+(?:\.\d+)?)(?:e-?\d+)?$/.test(cell);
    case 'boolean':
      return cell === 'true' || cell === 'false';
    default:
      return true;
  }
}
