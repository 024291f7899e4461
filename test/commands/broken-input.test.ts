import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Command } from 'commander';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { check } from '../../src/commands/check.js';
import { addSurveyOptions, withUnderscores } from '../../src/commands/survey-options.js';
import { bedorder } from './program.js';

let home: string;
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'bedorder-'));
});
afterEach(() => rmSync(home, { recursive: true, force: true }));

/** `bedorder check` in this process, which is read and answered for as `run` is, without the start of a program. */
async function checkHere(args: readonly string[]) {
  const said = { stdout: '', stderr: '' };
  const listen = (stream: 'stdout' | 'stderr') =>
    vi.spyOn(process[stream], 'write').mockImplementation((text) => {
      said[stream] += text;
      return true;
    });
  const spies = [listen('stdout'), listen('stderr')];
  let status: number | undefined;
  try {
    const command = addSurveyOptions(new Command('check')).action(async (shells: string, options) => {
      status = await check(shells, withUnderscores(options));
    });
    await command.parseAsync(args, { from: 'user' });
  } finally {
    for (const spy of spies) spy.mockRestore();
  }
  return { status, ...said };
}

const header = 'section,bed,taxon,shell,level,D/L Ile\n';
const row = (ratio: string, bed = 'A', level = '1') => `Cove,${bed},Mya,1,${level},${ratio}\n`;
const good = header + row('0.21') + row('0.4', 'B', '2');

/** Kinds of broken input: what is written to shells.csv, and what must be said of it. */
const BROKEN: readonly [string, string | Buffer | null, RegExp][] = [
  ['an empty file', '', /shells\.csv/],
  ['a header only', header, /shells\.csv/],
  ['a binary file', Buffer.from(Array.from({ length: 2000 }, (_, i) => (i * 37) % 256)), /shells\.csv/],
  ['an unclosed quote', `${header}"Cove,A,Mya,1,1,0.2\n${row('0.3')}`, /shells\.csv:2/],
  ['ragged rows', `${good}Cove,A,Mya\n`, /shells\.csv:4/],
  ['text for a number', header + row('n.d.') + row('0.3', 'B', '2'), /shells\.csv:2: error: D\/L Ile: /],
  ['zero', header + row('0'), /shells\.csv:2: error: D\/L Ile: /],
  ['a negative number', header + row('-0.2'), /shells\.csv:2: error: D\/L Ile: /],
  ['NaN', header + row('NaN'), /shells\.csv:2: error: D\/L Ile: /],
  ['Infinity', header + row('Infinity'), /shells\.csv:2: error: D\/L Ile: /],
  ['039.000', header + row('039.000'), /shells\.csv:2: error: D\/L Ile: /],
  ['a range', header + row('0.10-0.12'), /shells\.csv:2: error: D\/L Ile: /],
  ['a bed with two levels', `${header}${row('0.2')}Cove,A,Mya,2,2,0.21\n`, /shells\.csv:3/],
  [
    'a summary row with sd but no n',
    'section,bed,taxon,level,D/L Ile,D/L Ile sd\nCove,A,Mya,1,0.2,0.01\n',
    /shells\.csv:2/,
  ],
  ['no taxon', 'section,bed,shell,level,D/L Ile\nCove,A,1,1,0.2\n', /shells\.csv.*taxon/s],
  ['no ratio column', 'section,bed,taxon,shell,level\nCove,A,Mya,1,1\n', /shells\.csv/],
  ['an unreadable file', null, /shells\.csv/],
];

describe('broken input', () => {
  it.each(BROKEN)('%s: status 2, the place, no stack, no folder', async (_, content, message) => {
    if (content === null) mkdirSync(join(home, 'shells.csv'));
    else writeFileSync(join(home, 'shells.csv'), content);
    for (const outcome of [
      await bedorder(['run', 'shells.csv'], { cwd: home }),
      await checkHere([join(home, 'shells.csv')]),
    ]) {
      const { status, stdout, stderr } = outcome;
      expect(status).toBe(2);
      expect(stderr).toMatch(message);
      expect(stderr).toMatch(/nothing was written/);
      expect(stderr).not.toMatch(/^\s+at .*:\d+:\d+/m);
      expect(stderr).not.toContain('fault');
      expect(stdout).toBe('');
      expect(readdirSync(home)).toEqual(['shells.csv']);
    }
  });

  it('a file that is not there', async () => {
    const { status, stderr } = await bedorder(['run', 'gone.csv'], { cwd: home });
    expect(status).toBe(2);
    expect(stderr).toMatch(/gone\.csv/);
    expect(readdirSync(home)).toEqual([]);
  });

  it('lists problems of several files and rows at once', async () => {
    writeFileSync(join(home, 'shells.csv'), header + row('x') + row('0.2', 'B', '2') + row('-1', 'C', '3'));
    writeFileSync(join(home, 'beds.csv'), 'section,bed,latitude\nCove,A,north\n');
    const { status, stderr } = await bedorder(['check', 'shells.csv', '--beds', 'beds.csv'], { cwd: home });
    expect(status).toBe(2);
    expect(stderr).toMatch(/shells\.csv:2: error.*shells\.csv:4: error/s);
    expect(stderr).toMatch(/beds\.csv:2: error: latitude/);
  });
});

describe('broken options', () => {
  beforeEach(() => writeFileSync(join(home, 'shells.csv'), good));

  it.each<[string[], RegExp]>([
    [['--zones', '0'], /--zones 0: a whole number from 1/],
    [['--zones', 'two'], /--zones two/],
    [['--zones', '2.5'], /--zones 2\.5/],
    [['--alpha', '2'], /--alpha 2: a probability/],
    [['--alpha', '1e-300'], /--alpha 1e-300: a probability/],
    [['--alpha', '0.5'], /--alpha 0.5: a probability/],
    [['--alpha', 'NaN'], /--alpha NaN/],
    [['--seed', '-1'], /--seed -1/],
    [['--simulations', '0'], /--simulations 0/],
    [['--amino-acid', 'Ill'], /--amino-acid Ill.*Did you mean Ile/s],
    [['--amino-acid', 'Ile,Xyz'], /--amino-acid Xyz.*Known are/s],
    [['--amino-acid', 'Val'], /--amino-acid Val: the survey has no such ratio.*Ile/s],
    [['--fraction', 'half'], /--fraction half: one of THAA, FAA/],
    [['--staircase', 'up'], /--staircase up: one of/],
    [['--taxon', 'Mia'], /--taxon Mia.*Did you mean Mya/s],
    [['--gradient', 'cmat_c'], /--gradient cmat_c/],
    [['--settings', 'gone.yaml'], /gone\.yaml/],
  ])('%j', async (options, message) => {
    const { status, stdout, stderr } = await checkHere([join(home, 'shells.csv'), ...options]);
    expect(stderr).toMatch(message);
    expect(status).toBe(2);
    expect(stdout).toBe('');
  });

  // of a value, of a name that the survey lacks, of the folder, and of the words of the command line itself
  it.each<[string[], RegExp]>([
    [['--zones', '0'], /--zones 0: a whole number from 1/],
    [['--taxon', 'Mia'], /--taxon Mia.*Did you mean Mya/s],
    [['--settings', 'gone.yaml'], /gone\.yaml/],
    [['--out', '.'], /--out/],
    [['--out', 'shells.csv'], /--out shells\.csv/],
    [['--colour'], /unknown option '--colour'/],
    [['--zone', '3'], /Did you mean --zones/],
  ])('run %j: nothing is written', async (options, message) => {
    const { status, stderr } = await bedorder(['run', 'shells.csv', ...options], { cwd: home });
    expect(stderr).toMatch(message);
    expect(status).toBe(2);
    expect(stderr).not.toMatch(/^\s+at .*:\d+:\d+/m);
    expect(readdirSync(home)).toEqual(['shells.csv']);
  });

  it('are all told of at once', async () => {
    const { stderr } = await bedorder(['run', 'shells.csv', '--zones', '0', '--alpha', '2'], { cwd: home });
    expect(stderr).toMatch(/--zones 0.*--alpha 2.*2 options/s);
  });

  it('in a settings file have their line', async () => {
    writeFileSync(join(home, 's.yaml'), 'alpha: 0.05\nzones: 0\n');
    const { status, stderr } = await bedorder(['run', 'shells.csv', '--settings', 's.yaml'], { cwd: home });
    expect(status).toBe(2);
    expect(stderr).toMatch(/s\.yaml:2: error: zones/);
  });

  it('an input within the results folder is not overwritten', async () => {
    mkdirSync(join(home, 'old'));
    writeFileSync(join(home, 'old/shells.csv'), good);
    const { status, stderr } = await bedorder(['run', 'old/shells.csv', '--out', 'old'], { cwd: home });
    expect(status).toBe(2);
    expect(stderr).toMatch(/would be lost/);
  });

  it.each([
    [['rnu'], /unknown command 'rnu'.*Did you mean run/s],
    [['run'], /missing required argument 'shells'/],
    [['run', 'a.csv', 'b.csv'], /too many arguments/],
  ])('%j', async (args, message) => {
    const { status, stderr } = await bedorder(args, { cwd: home });
    expect(status).toBe(2);
    expect(stderr).toMatch(message);
  });
});
