import type { AminoAcid } from '../../src/model/index.js';
import type { SimulatedCoast } from './coast.js';

/** The coast as the text of a shells and a beds table. */
export function writeCoastCsv(coast: SimulatedCoast): { shells: string; beds: string } {
  const { analyses, beds } = coast.survey;
  const codes = Object.keys(analyses[0].ratios) as AminoAcid[];
  const place = beds[0].place?.kind ?? 'level';
  const table = (rows: (string | number | null)[][]) =>
    `${rows.map((row) => row.map((cell) => cell ?? '').join(',')).join('\n')}\n`;
  return {
    shells: table([
      [
        'section',
        'bed',
        'taxon',
        'shell',
        'preparation',
        'lab_id',
        ...codes.map((code) => `D/L ${code}`),
        ...codes.map((code) => `[${code}]`),
        'L-Ser/L-Asp',
      ],
      ...analyses.map((a) => [
        a.section,
        a.bed,
        a.taxon,
        a.shell,
        a.preparation,
        a.lab_id,
        ...codes.map((code) => a.ratios[code] ?? null),
        ...codes.map((code) => a.concentrations[code] ?? null),
        a.serine_ratio,
      ]),
    ]),
    beds: table([
      ['section', 'bed', place, 'latitude', 'longitude', 'coast_km', 'cmat_c'],
      ...beds.map((bed) => [
        bed.section,
        bed.bed,
        bed.place?.value ?? null,
        bed.latitude,
        bed.longitude,
        bed.coast_km,
        bed.cmat_c,
      ]),
    ]),
  };
}
