import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readSettings } from '../../src/input/index.js';
import { settingsFromBytes } from '../../src/input/settings.js';
import { utf8 } from './survey-of.js';

const read = (text: string) => settingsFromBytes({ file: 'settings.yaml', bytes: utf8(text) });
const refused = async (text: string) => {
  const { settings, input, problems } = await read(text);
  expect([settings, input]).toEqual([null, null]);
  return problems;
};

describe('settings', () => {
  it('take every option under its own name, with - or _', async () => {
    const { settings, input, problems } = await read(`
beds: beds.csv
relations: relations.csv
standards: standards.csv
aliases: aliases.csv
out: results
taxon: Patellina
amino-acid: [Ile, asp]
fraction: THAA
zones: 3
alpha: 0.01
gradient: cmat_c
reference_taxon: Macoma
staircase: coast
staircase-certain: true
simulations: 99
seed: 7
strict: true
json: false
quiet: true
sheet: 2
screening:
  serine_ratio: 0.7
  shells-a-bed: 4
`);
    expect(problems).toEqual([]);
    expect(settings).toEqual({
      beds: 'beds.csv',
      relations: 'relations.csv',
      standards: 'standards.csv',
      aliases: 'aliases.csv',
      out: 'results',
      taxon: 'Patellina',
      amino_acid: ['Ile', 'Asx'],
      fraction: 'THAA',
      zones: 3,
      alpha: 0.01,
      gradient: 'cmat_c',
      reference_taxon: 'Macoma',
      staircase: 'coast',
      staircase_certain: true,
      simulations: 99,
      seed: 7,
      strict: true,
      json: false,
      quiet: true,
      sheet: '2',
      screening: { serine_ratio: 0.7, shells_a_bed: 4 },
    });
    expect(input).toMatchObject({ role: 'settings', file: 'settings.yaml' });
    expect(input?.sha256).toMatch(/^[0-9a-f]{64}$/);
  });

  it('may be empty, or leave a value empty', async () => {
    expect((await read('')).settings).toEqual({});
    expect((await read('# nothing yet\n')).settings).toEqual({});
    expect((await read('taxon:\namino-acid: all\nstaircase: no\n')).settings).toEqual({
      amino_acid: 'all',
      staircase: 'no',
    });
  });

  it('SHA-256 is that of the bytes', async () => {
    // sha256sum of the seven bytes "seed: 1" without a line break, computed
    expect((await read('seed: 1')).input?.sha256).toBe(
      'e8b0d9f7f4027917287b4adebf4c0bbfe2f9965ae54c4cfe62aab76b20a9af18',
    );
  });

  it('refuse an option they do not know, with its line and the one that may be meant', async () => {
    const problems = await refused('alpha: 0.05\nsimulation: 99\nscreening:\n  serine-ration: 0.8\ncolour: red\n');
    expect(problems.map((p) => [p.line, p.severity])).toEqual([
      [2, 'error'],
      [4, 'error'],
      [5, 'error'],
    ]);
    expect(problems[0].message).toMatch(/Did you mean simulations\?/);
    expect(problems[1].message).toMatch(/Did you mean serine_ratio\?/);
    expect(problems[2].message).toMatch(/Known are: /);
  });

  it.each([
    ['alpha: 0.5', 1, /from 0.000001 to below 0.5/],
    ['alpha: 1e-9', 1, /from 0.000001 to below 0.5/],
    ['alpha: .nan', 1, /from 0.000001 to below 0.5/],
    ['alpha: .inf', 1, /, \.inf came/],
    ['screening: 3', 1, /screening: limits are wanted, one a line below it, 3 came/],
    ['screening:\n  yield: .nan', 2, /\.nan came/],
    ['alpha: five', 1, /"five" came/],
    ['seed: 1.5', 1, /whole number/],
    ['\nzones: 0', 2, /whole number/],
    ['fraction: bound', 1, /THAA, FAA/],
    ['amino-acid: Xyz', 1, /amino-acid codes/],
    ['strict: perhaps', 1, /true or false/],
    ['screening: 5', 1, /screening/],
    ['screening:\n  yield: 2', 2, /from 0 to 1/],
    ['taxon: {a: b}', 1, /name is wanted/],
    ['- a\n- b', 1, /one option a line/],
    ['just text', 1, /one option a line/],
    ['a: [1, 2', 1, /no YAML/],
    ['alpha: 0.1\nalpha: 0.2', 2, /no YAML/],
    ['alpha: 0.1\nbeds: x\nALPHA: 0.2', 3, /twice/],
  ])('refuse %j', async (text, line, word) => {
    const problems = await refused(text);
    expect(problems[0].message).toMatch(word);
    expect(problems[0].line).toBe(line);
  });

  it('refuse aliases, deep nesting and what is no text, quickly', async () => {
    const bomb = `a: &a [x,x,x,x]\n${[...'bcdefghij'].map((c, i) => `${c}: &${c} [*${'abcdefghij'[i]},*${'abcdefghij'[i]}]`).join('\n')}`;
    const start = performance.now();
    expect((await refused(bomb))[0].message).toMatch(/aliases/);
    expect((await refused(`a: ${'['.repeat(30_000)}`))[0].message).toMatch(/too deeply/);
    expect((await refused(`${'- '.repeat(30_000)}x`))[0].message).toMatch(/too deeply/);
    const steps = Array.from({ length: 200 }, (_, i) => `${' '.repeat(i)}k:`).join('\n');
    expect((await refused(steps))[0].message).toMatch(/too deeply/);
    expect((await refused('\u0000\u0001\u0002'))[0].message).toMatch(/no text/);
    expect(performance.now() - start).toBeLessThan(5_000);
  });

  it('are read from disk, up to 64 kB', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'bedorder-'));
    try {
      const path = join(folder, 's.yaml');
      await writeFile(path, 'seed: 3\n');
      expect((await readSettings(path)).settings).toEqual({ seed: 3 });
      await writeFile(path, '#'.repeat(65_537));
      expect((await readSettings(path)).problems[0].message).toMatch(/at most 64 kB/);
      expect((await readSettings(join(folder, 'none.yaml'))).problems).toMatchObject([
        { file: 'none.yaml', line: null },
      ]);
    } finally {
      await rm(folder, { recursive: true });
    }
  });
});
