import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import packageJson from '../../package.json' with { type: 'json' };
import { readResults } from '../../src/output/read-results.js';
import { VERSION } from '../../src/version.js';
import { resultsText } from '../house/written.js';
import { FINDINGS } from './fixture.js';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'bedorder-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

const put = (text: string) => writeFileSync(join(folder, 'results.json'), text);
const written = resultsText(FINDINGS);

it('reads what was written, from the folder or the file', () => {
  put(written);
  expect(readResults(folder)).toEqual(JSON.parse(written));
  expect(readResults(join(folder, 'results.json'))).toEqual(JSON.parse(written));
});

it('accepts another minor version, and refuses another major one with advice', () => {
  put(written.replace('"version": "1.0.0"', '"version": "1.9.3"'));
  expect(readResults(folder).version).toBe('1.9.3');
  put(written.replace('"version": "1.0.0"', '"version": "2.0.0"'));
  expect(() => readResults(folder)).toThrow(/written by bedorder 2\.0\.0.*Run the survey again/);
});

it.each([
  ['half of it', () => put(written.slice(0, 500)), /is broken: .*Run the survey again/s],
  ['nothing', () => put(''), /is broken/],
  ['other JSON', () => put('[1]'), /was not written by bedorder/],
  ['null', () => put('null'), /was not written by bedorder/],
  [
    'a number that became a text',
    () => put(written.replace(/"set_aside":\d+/, '"set_aside":"many"')),
    /a whole number was wanted in beds\[0\]\.set_aside, "many" came/,
  ],
  [
    'a row that became a list',
    () => put(written.replace(/\n"shells": \[\n\{[^\n]*\}/, '\n"shells": [\n[]')),
    /an object was wanted in shells\[0\], \[\] came/,
  ],
  [
    'a field too few',
    () => put(written.replace('"verdict_after":', '"after":')),
    /a text was wanted in relations\[0\]\.verdict_after, nothing came/,
  ],
  [
    'an unknown where none may be',
    () => put(written.replace(/"dl":[\d.]+/, '"dl":null')),
    /a number was wanted in shells\[\d+\]\.dl, null came/,
  ],
  ['a part too few', () => put(written.replace('\n"zones":', '\n"zonen":')), /zones is missing/],
  ['no file', () => {}, /holds no results.*bedorder run/s],
])('tells what to do about %s', (_, make, message) => {
  make();
  expect(() => readResults(folder)).toThrow(message);
});

it('has the version of package.json', () => {
  expect(VERSION).toBe(packageJson.version);
});
