import { placesOf } from '../../src/output/folder/places.js';
import { holdFolder } from '../../src/output/folder/replace-folder.js';
import { writeResults } from '../../src/output/write-results.js';
import { FINDINGS } from './fixture.js';

/* Replaces the results in a folder again and again, until it is killed. */

const out = process.argv[2];
for (let seed = 1; ; seed++) {
  const hold = holdFolder(placesOf(out));
  const findings = { ...FINDINGS, options: { ...FINDINGS.options, seed } };
  await hold.replace(async (folder) => void (await writeResults(findings, { report: '<p></p>', figures: [] }, folder)));
  hold.release();
  if (seed === 2) process.stdout.write('ready\n');
}
