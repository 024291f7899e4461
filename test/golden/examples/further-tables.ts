import { createRandom } from '../../../src/statistics/random.js';
import { simulateCoast } from '../../simulation/coast.js';
import { fixed, tableText } from './table.js';

/** Invented rows in the manner of a published table: mean, standard deviation and number of shells; one mean alone. */
export function summaryFiles(): Record<string, string> {
  return {
    'summaries/shells.csv': tableText([
      ['section', 'bed', 'level', 'taxon', 'n', 'D/L Ile', 'D/L Ile sd'],
      ['Flint Row', 'lower', 1, 'Glycymeris', 9, 0.412, 0.031],
      ['Flint Row', 'middle', 2, 'Glycymeris', 12, 0.279, 0.022],
      ['Flint Row', 'upper', 3, 'Glycymeris', 21, 0.148, 0.013],
      ['Bell Rope', 'lower', 1, 'Glycymeris', 6, 0.405, 0.024],
      ['Bell Rope', 'upper', 2, 'Glycymeris', 8, 0.153, 0.012],
      ['Candle Gap', 'lower', 1, 'Glycymeris', 5, 0.286, 0.02],
      ['Candle Gap', 'upper', 2, 'Glycymeris', 7, 0.144, 0.01],
      ['Skep House', 'only', 1, 'Glycymeris', null, 0.271, null],
    ]),
  };
}

const ACCENTED = ['Grève Basse', "Rocher de l'Écuelle", 'Dune à Suif'];
/** The right spelling stands first; one bed each has another. */
const SPELLINGS: Readonly<Record<string, string>> = { '0/2': 'Glycimeris', '1/1': 'Glycymerris' };

/** A table as a spreadsheet with a comma for the decimal point saves it; text is given before it is encoded. */
export function spreadsheetFiles(): Record<string, string> {
  const random = createRandom(77);
  const rows: (string | number)[][] = [['Section', 'Bed', 'Level', 'Taxon', 'Shell', 'Lab ID', 'A/I', 'Asp D/L']];
  const ages = [
    [2, 1, 0],
    [2, 0],
    [1, 0],
  ];
  ages.forEach((beds, s) => {
    beds.forEach((age, b) => {
      const taxon = SPELLINGS[`${s}/${b}`] ?? 'Glycymeris';
      for (let shell = 1; shell <= 5; shell++) {
        const ile = 0.13 * Math.exp(0.36 * age + 0.05 * random.normal());
        const asx = 0.36 * Math.exp(0.22 * age + 0.03 * random.normal());
        const [a, d] = [ile, asx].map((ratio) => fixed(ratio, 3).replace('.', ','));
        rows.push([ACCENTED[s], `c${b + 1}`, b + 1, taxon, shell, `T${100 + rows.length}`, a, d]);
      }
    });
  });
  return {
    'spreadsheet/shells.csv': tableText(rows, ';').replaceAll('\n', '\r\n'),
    'spreadsheet/aliases.csv': tableText([
      ['name', 'taxon'],
      ['Glycimeris', 'Glycymeris'],
      ['Glycymerris', 'Glycymeris'],
    ]),
  };
}

const WARMING_NAMES = [
  'Ladle Point',
  'Cork Gully',
  'Anvil Beach',
  'Thimble Head',
  'Cistern Bay',
  'Bramble Chine',
  'Saddler Sands',
  'Wicket Cove',
  'Ninepin Rocks',
  'Copper Slip',
  'Hamper Bank',
  'Lintel Cliff',
] as const;

/** A coast that is 8 °C warmer at its far end: 0.06 in the log ratio a degree, zones 0.35 apart. */
export function warmingFiles(): Record<string, string> {
  const { survey } = simulateCoast({
    seed: 12,
    sections: 12,
    beds: 36,
    zones: 3,
    spacing: 0.35,
    youngest: Math.log(0.14),
    spread: 0.01,
    gradient: { slope: 0.06, range: 8 },
    aminoAcids: [{ code: 'Ile' }, { code: 'Val', scatter: 0.06 }],
    correlation: 0.3,
  });
  const name = (section: string) => WARMING_NAMES[Number(section.slice(1)) - 1];
  return {
    'warming-coast/shells.csv': tableText([
      ['section', 'bed', 'taxon', 'shell', 'lab_id', 'D/L Ile', 'D/L Val'],
      ...survey.analyses.map((a, i) => [
        name(a.section),
        a.bed,
        'Patella',
        a.shell,
        `W${String(i + 1).padStart(3, '0')}`,
        fixed(a.ratios.Ile ?? Number.NaN, 3),
        fixed(a.ratios.Val ?? Number.NaN, 3),
      ]),
    ]),
    'warming-coast/beds.csv': tableText([
      ['section', 'bed', 'level', 'coast_km', 'cmat_c'],
      ...survey.beds.map((bed) => [
        name(bed.section),
        bed.bed,
        bed.place?.value ?? null,
        (bed.coast_km ?? 0) * 8,
        fixed(bed.cmat_c ?? Number.NaN, 1),
      ]),
    ]),
  };
}
