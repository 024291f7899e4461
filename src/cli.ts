#!/usr/bin/env node
import { Command, CommanderError } from 'commander';
import { EXIT, type ExitStatus } from './commands/exit-status.js';
import { ending, endShortlyOnFaults } from './commands/fault.js';
import { endQuietlyWithoutReader } from './commands/print.js';
import { addSurveyOptions, withUnderscores } from './commands/survey-options.js';
import { VERSION } from './version.js';

const DESCRIPTION =
  'Groups beds into aminozones by D/L ratios, orders deposits from oldest to youngest without dates, and checks ' +
  'the order against superposition. The order is relative, and is no age.';

const FIRST_STEPS = `
To see what it does:      bedorder demo
With a survey of yours:   bedorder run shells.csv --beds beds.csv`;

/*
 * The command line: registers the commands and starts the one that was asked for. What a command does is loaded only
 * when it runs.
 */

async function program(args: readonly string[]): Promise<void> {
  endQuietlyWithoutReader();
  endShortlyOnFaults();
  let status: ExitStatus = EXIT.done;
  const root = new Command('bedorder')
    .description(DESCRIPTION)
    .version(VERSION)
    .exitOverride()
    .addHelpText('after', FIRST_STEPS)
    .showHelpAfterError('(see `bedorder --help`)');

  addSurveyOptions(root.command('run').description('zone, order and check a survey; write a results folder')).action(
    async (shells: string, options) => {
      const { run } = await import('./commands/run.js');
      status = await run(shells, withUnderscores(options));
    },
  );

  addSurveyOptions(root.command('check').description('read and validate only; list every problem')).action(
    async (shells: string, options) => {
      const { check } = await import('./commands/check.js');
      status = await check(shells, withUnderscores(options));
    },
  );

  root
    .command('explain')
    .description('all that is known of one bed, shell or relation, in sentences')
    .argument('<results>', 'results folder')
    .argument('<name...>', 'section/bed, section/bed/shell, "a > b", or two beds')
    .action(async (results: string, names: string[]) => {
      const { explain } = await import('./commands/explain.js');
      status = await explain(results, names);
    });

  root
    .command('plan')
    .description('what to collect or date next, and what it would settle')
    .argument('<results>', 'results folder')
    .option('--dates <n>', 'most beds to date (default: 3)')
    .option('--out <file>', 'the whole plan as CSV (default: <results>-plan.csv, beside the folder)')
    .option('--json', 'print the plan as JSON')
    .action(async (results: string, options) => {
      const { plan } = await import('./commands/plan.js');
      status = await plan(results, options);
    });

  root
    .command('dates')
    .description('do these independent dates agree with the order')
    .argument('<results>', 'results folder')
    .argument('<dates>', 'dates table: section, bed, age_ka, error_ka, limit, method')
    .option('--sheet <name>', 'sheet of an .xlsx (default: the first)')
    .option('--out <file>', 'every pair as CSV (default: <results>-dates.csv, beside the folder)')
    .option('--json', 'print what was found as JSON')
    .action(async (results: string, table: string, options) => {
      const { dates } = await import('./commands/dates.js');
      status = await dates(results, table, options);
    });

  root
    .command('demo')
    .description('write the example survey of an invented coast, and run it')
    .argument('[folder]', 'where to write it (default: bedorder-demo)')
    .option('--json', 'print the summary as JSON')
    .option('--quiet', 'print neither progress nor summary')
    .action(async (folder: string | undefined, options) => {
      const { DEFAULT_DEMO, demo } = await import('./commands/demo.js');
      status = await demo(folder ?? DEFAULT_DEMO, options);
    });

  if (args.length === 0) return void root.outputHelp();
  await ending(async () => {
    try {
      await root.parseAsync(args, { from: 'user' });
    } catch (error) {
      // commander has said what was wrong; asking for help or the version is no fault
      if (error instanceof CommanderError) return error.exitCode === 0 ? EXIT.done : EXIT.unusable;
      throw error;
    }
    return status;
  });
}

await program(process.argv.slice(2));
