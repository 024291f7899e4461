import { describe, expect, it } from 'vitest';
import { surveyFromBytes } from '../../src/input/index.js';
import { utf8 } from './survey-of.js';

/** A zip archive whose files are stored as they are (PKWARE APPNOTE 4.3); `claimed` is the size it says they unpack to. */
function zip(files: Readonly<Record<string, string>>, claimed?: number): Uint8Array {
  const parts: number[] = [];
  const directory: number[] = [];
  const two = (value: number) => [value & 255, (value >> 8) & 255];
  const four = (value: number) => [...two(value & 0xffff), ...two(Math.floor(value / 65_536))];
  for (const [name, text] of Object.entries(files)) {
    const [path, bytes] = [utf8(name), utf8(text)];
    const sizes = [...four(crc32(bytes)), ...four(bytes.length), ...four(claimed ?? bytes.length)];
    const offset = parts.length;
    parts.push(
      ...four(0x04034b50),
      ...two(20),
      ...two(0),
      ...two(0),
      ...four(0),
      ...sizes,
      ...two(path.length),
      ...two(0),
      ...path,
      ...bytes,
    );
    directory.push(
      ...four(0x02014b50),
      ...two(20),
      ...two(20),
      ...two(0),
      ...two(0),
      ...four(0),
      ...sizes,
      ...two(path.length),
    );
    directory.push(...two(0), ...two(0), ...two(0), ...two(0), ...four(0), ...four(offset), ...path);
  }
  const count = two(Object.keys(files).length);
  const end = [
    ...four(0x06054b50),
    ...two(0),
    ...two(0),
    ...count,
    ...count,
    ...four(directory.length),
    ...four(parts.length),
    ...two(0),
  ];
  return Uint8Array.from([...parts, ...directory, ...end]);
}

function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) {
    crc ^= byte;
    for (let bit = 0; bit < 8; bit += 1) crc = (crc >>> 1) ^ (crc & 1 ? 0xedb88320 : 0);
  }
  return (crc ^ 0xffffffff) >>> 0;
}

const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';

/** A workbook of one sheet whose rows are given as XML. */
function workbook(rows: string, claimed?: number): Uint8Array {
  return zip(
    {
      '[Content_Types].xml': '<Types/>',
      'xl/workbook.xml': `<workbook xmlns="${MAIN}" xmlns:r="${OFFICE}"><sheets><sheet name="A &amp; B" sheetId="1" r:id="r1"/></sheets></workbook>`,
      'xl/_rels/workbook.xml.rels': `<Relationships><Relationship Id="r1" Type="${OFFICE}/worksheet" Target="worksheets/sheet1.xml"/></Relationships>`,
      'xl/worksheets/sheet1.xml': `<worksheet xmlns="${MAIN}"><sheetData>${rows}</sheetData></worksheet>`,
    },
    claimed,
  );
}

const text = (cell: string, value: string) => `<c r="${cell}" t="inlineStr"><is><t>${value}</t></is></c>`;
const HEADER = `<row r="1">${['section', 'bed', 'taxon', 'shell', 'A/I'].map((name, i) => text(`${'ABCDE'[i]}1`, name)).join('')}</row>`;
const ROW = `<row r="2">${['A', '1', 'P', 'a'].map((name, i) => text(`${'ABCD'[i]}2`, name)).join('')}<c r="E2"><v>0.4</v></c></row>`;

const read = (bytes: Uint8Array, sheet?: string) => surveyFromBytes({ shells: { file: 's.xlsx', bytes }, sheet });

describe('a workbook is looked over before it is read', () => {
  it('a sound one is read', async () => {
    const { survey, problems } = await read(workbook(HEADER + ROW), 'A & B');
    expect(problems.filter((p) => p.severity === 'error')).toEqual([]);
    expect(survey?.analyses).toMatchObject([{ line: 2, section: 'A', bed: '1', ratios: { Ile: 0.4 } }]);
  });

  it('a lone cell far out is refused, quickly', async () => {
    const start = performance.now();
    const far = `<row r="1048576"><c r="XFD1048576"><v>1</v></c></row>`;
    expect((await read(workbook(HEADER + ROW + far))).problems[0].message).toMatch(
      /spans 1048576 rows and 16384 columns/,
    );
    const beyond = `<row r="99999999999"><c r="A99999999999"><v>1</v></c></row>`;
    expect((await read(workbook(HEADER + ROW + beyond))).problems[0].message).toMatch(/more than can be read/);
    expect(performance.now() - start).toBeLessThan(2_000);
  });

  it('empty formatted cells far to the right do no harm', async () => {
    const formatted = ROW.replace('</row>', '<c r="XFD2" s="0"/></row>');
    expect((await read(workbook(HEADER + formatted))).survey?.analyses).toHaveLength(1);
  });

  it('an archive that unpacks to too much is refused', async () => {
    expect((await read(workbook(HEADER + ROW, 400 * 1_048_576))).problems[0].message).toMatch(
      /unpacks to 1600 MB; at most 512 MB/,
    );
  });

  it('a damaged one is refused', async () => {
    const bytes = workbook(HEADER + ROW);
    for (const length of [40, 200, bytes.length - 30]) {
      expect((await read(bytes.slice(0, length))).survey).toBeNull();
    }
    const outOfPlace = ROW + HEADER;
    expect((await read(workbook(outOfPlace))).problems[0].message).toMatch(/can't be read as an \.xlsx/);
  });

  it('an archive of something else is named', async () => {
    expect((await read(zip({ 'content.xml': 'x' }))).problems[0].message).toMatch(/OpenDocument/);
    expect((await read(zip({ 'a.txt': 'x' }))).problems[0].message).toMatch(/no \.xlsx workbook/);
  });
});
