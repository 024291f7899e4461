import type { Analysis, Remark } from '../model/index.js';
import { type LaboratoryOffset, rowsByLaboratory } from './laboratory-offsets.js';
import { caution, counted, finding, shown, someOf } from './remark-words.js';

/** What one clock's rows of the shells table rest on. */
export interface ClockSources {
  readonly clock: string;
  readonly taxon: string;
  readonly fraction: string;
}

/**
 * What is said of laboratories and methods (design 7.12): the offsets taken out, and cautions where a clock, or one bed,
 * mixes laboratories without an offset, or methods. Published offsets between instruments are 5 to 21 %, as large as a step
 * between zones (common practice).
 * @param clocks the main clocks
 */
export function laboratoryRemarks(
  analyses: readonly Analysis[],
  offsets: readonly LaboratoryOffset[],
  clocks: readonly ClockSources[],
): Remark[] {
  return [
    ...offsetRemarks(offsets),
    ...clocks.flatMap((clock) => {
      const own = analyses.filter((row) => row.taxon === clock.taxon && row.fraction === clock.fraction);
      return [
        ...mixedRemarks(clock.clock, own, 'laboratory', 'laboratories', (row) => row.lab, offsets),
        ...mixedRemarks(clock.clock, own, 'method', 'methods', (row) => row.method, []),
      ];
    }),
  ];
}

function offsetRemarks(offsets: readonly LaboratoryOffset[]): Remark[] {
  const labs = [...new Set(offsets.map(({ lab }) => lab))];
  return labs.map((lab) => {
    const own = offsets.filter((offset) => offset.lab === lab);
    const each = own.map(
      ({ amino_acid, offset, se, standards }) =>
        `${amino_acid} ${percent(offset)} ± ${shown(100 * se, 2)} % (${counted(standards, 'standard')})`,
    );
    const assumed = own.some((offset) => offset.assumed)
      ? ' Too few standards show how well they agree; 7 % for each measurement is assumed.'
      : '';
    return finding(
      `Ratios of laboratory ${lab} were put on the scale of ${own[0].reference} by shared standards; it read ${each.join(', ')} off. The errors are carried into its beds.${assumed}`,
    );
  });
}

const percent = (offset: number): string => {
  const value = 100 * (Math.exp(offset) - 1);
  return `${value < 0 ? '−' : '+'}${shown(Math.abs(value), 2)} %`;
};

function mixedRemarks(
  clock: string,
  rows: readonly Analysis[],
  one: string,
  many: string,
  of: (row: Analysis) => string | null,
  offsets: readonly LaboratoryOffset[],
): Remark[] {
  const names = [...new Set(rows.map(of).filter((name): name is string => name !== null))];
  if (names.length < 2) return [];
  const tied = new Set(offsets.flatMap(({ lab, reference }) => [lab, reference]));
  const loose = one === 'laboratory' ? names.filter((name) => !tied.has(name)) : names;
  const named = rows.filter((row) => of(row) === null).length;
  const beds = new Map<string, Set<string>>();
  for (const row of rows) {
    const name = of(row);
    if (name === null) continue;
    const key = `${row.section}/${row.bed}`;
    beds.set(key, (beds.get(key) ?? new Set()).add(name));
  }
  const mixed = [...beds].flatMap(([key, own]) =>
    own.size > 1 && [...own].some((n) => loose.includes(n)) ? [key] : [],
  );
  if (loose.length === 0) return [];
  const counts = one === 'laboratory' ? rowsByLaboratory(rows) : null;
  const list = names.map((name) =>
    counts === null ? name : `${name} (${counted(counts.get(name)!, 'analysis', 'analyses')})`,
  );
  const without =
    one === 'laboratory'
      ? loose.length < names.length
        ? ` No shared standard ties ${loose.join(', ')} to the others.`
        : ' No shared standards tie them: give a standards table.'
      : '';
  const unnamed = named > 0 ? ` ${counted(named, 'row names', 'rows name')} none.` : '';
  const inBeds = mixed.length > 0 ? ` ${counted(mixed.length, 'bed mixes', 'beds mix')} them: ${someOf(mixed)}.` : '';
  return [
    caution(
      `The clock mixes ${many}: ${list.join(', ')}.${without} Published offsets between instruments are 5 to 21 %, as large as a step between zones.${inBeds}${unnamed}`,
      clock,
    ),
  ];
}
