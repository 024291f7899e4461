// Mutation testing of one room, by hand (DEVELOPERS.md): ROOM=zones npx stryker run test/mutation/stryker.config.mjs
// MUTATE=src/zones/partition.ts narrows it to some files, or to lines of one: …partition.ts:20-40.
const room = process.env.ROOM ?? 'statistics';

export default {
  testRunner: 'in-process',
  plugins: ['./test/mutation/in-process-runner.mjs'],
  mutate: process.env.MUTATE?.split(',') ?? [`src/${room}/**/*.ts`, `!src/${room}/index.ts`],
  coverageAnalysis: 'perTest',
  concurrency: 2,
  timeoutMS: 5000,
  timeoutFactor: 1.5,
  dryRunTimeoutMinutes: 20,
  // its rewriting of tsconfig.json needs TypeScript before 7, and is of no use here: nothing outside the folder is extended
  tsconfigFile: 'none',
  incremental: true,
  incrementalFile: `reports/mutation/${room}-incremental.json`,
  reporters: ['clear-text', 'json', 'progress-append-only'],
  clearTextReporter: { allowColor: false, logTests: false, reportTests: false, reportMutants: true, skipFull: true },
  jsonReporter: { fileName: `reports/mutation/${room}.json` },
  ignorePatterns: ['dist', 'program', 'examples', 'reports', 'test/golden', 'test/browser', 'test/bench', 'test/fuzz'],
  allowEmpty: false,
};
