import type { Command } from 'commander';

/** Adds the options that `run` and `check` share. */
export function addSurveyOptions(command: Command): Command {
  return command
    .argument('<shells>', 'shells table: CSV, TSV, semicolon-separated, or .xlsx')
    .option('--beds <file>', 'beds table: places, heights, coordinates')
    .option('--relations <file>', 'field relations between beds')
    .option('--standards <file>', 'interlaboratory standards')
    .option('--aliases <file>', 'other names of taxa')
    .option('--settings <file>', 'YAML file in which any of these options may stand')
    .option('--sheet <name>', 'sheet of an .xlsx (default: the first)')
    .option('--out <folder>', 'results folder (default: bedorder-results)')
    .option('--taxon <name>', 'use this taxon only')
    .option('--amino-acid <codes>', 'amino acid of the main clock, several with commas, or all')
    .option('--fraction <fraction>', 'THAA or FAA')
    .option('--zones <n>', 'force this number of zones (default: the data choose)')
    .option('--alpha <p>', 'level of the tests (default: 0.05)')
    .option('--gradient <column>', 'column of the beds table along which ratios may slope')
    .option('--reference-taxon <name>', 'convert other taxa to this one')
    .option('--staircase <where>', 'higher terraces are older: within each section, or along the coast')
    .option('--simulations <n>', 'repeats of bootstraps and simulations (default: 999)')
    .option('--seed <n>', 'seed of the random numbers (default: 1)')
    .option('--strict', 'end with status 3 when a reversed relation is left')
    .option('--json', 'print the summary as JSON')
    .option('--quiet', 'print neither progress nor summary');
}

/** Option names as commander gives them (aminoAcid) to those of the settings file (amino_acid). */
export function withUnderscores(options: Readonly<Record<string, unknown>>): Record<string, unknown> {
  return Object.fromEntries(
    Object.entries(options).map(([name, value]) => [
      name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`),
      value,
    ]),
  );
}
