import { AMINO_ACIDS, type AminoAcid } from '../model/index.js';
import { squash } from './squash.js';

/** Names of each amino acid as laboratories write them, squashed. */
const NAMES: Readonly<Record<AminoAcid, readonly string[]>> = {
  Asx: ['asx', 'asp', 'aspartic', 'asparticacid', 'aspartate'],
  Glx: ['glx', 'glu', 'glutamic', 'glutamicacid', 'glutamate'],
  Ser: ['ser', 'serine'],
  Ala: ['ala', 'alanine'],
  Val: ['val', 'valine'],
  Phe: ['phe', 'phenylalanine'],
  Leu: ['leu', 'leucine'],
  Ile: ['ile', 'isoleucine'],
  Tyr: ['tyr', 'tyrosine'],
  Met: ['met', 'methionine'],
};

/** D-alloisoleucine and L-isoleucine as written in ratios, also with the letter l in place of a capital I. */
const ALLO = ['aile', 'alle', 'alloile', 'alloisoleucine', 'ai'] as const;
const ISO = ['ile', 'lle', 'isoleucine', 'i'] as const;

/** Words for a standard deviation between shells. */
const SD = ['sd', 'stdev', 'stddev', 'std', 'standarddeviation', '1sd', '1s', '1sigma', 'sigma'] as const;
const MEAN = ['mean', 'average', 'avg'] as const;

/** What a column of the shells table holds of one amino acid. */
export type MeasureKind = 'ratio' | 'sd' | 'concentration';

/** Key of a measured column: `ratio Asx`, `sd Asx`, `concentration Asx`. */
export type MeasureKey = `${MeasureKind} ${AminoAcid}`;

const measures = new Map<string, MeasureKey>();
const aminoAcids = new Map<string, AminoAcid>();
const ratioForms = new Map<string, AminoAcid>();

for (const amino of AMINO_ACIDS) {
  const forms: string[] = [];
  for (const name of NAMES[amino]) {
    aminoAcids.set(name, amino);
    forms.push(`dl${name}`, `${name}dl`, `d${name}l${name}`, `dlratio${name}`, `${name}dlratio`, `dl${name}ratio`);
  }
  if (amino === 'Ile') {
    for (const allo of ALLO) {
      for (const iso of ISO) forms.push(`${allo}${iso}`, `d${allo}l${iso}`, `d${allo}${iso}`);
    }
    forms.push('ai', 'airatio', 'ileai', 'dlai', 'aidl', 'dlalloisoleucine', 'dlaile', 'dlalle');
  }
  for (const form of forms) {
    ratioForms.set(form, amino);
    measures.set(form, `ratio ${amino}`);
    for (const word of MEAN) {
      measures.set(form + word, `ratio ${amino}`);
      measures.set(word + form, `ratio ${amino}`);
    }
  }
  for (const base of [...forms, ...NAMES[amino]]) {
    for (const word of SD) {
      measures.set(base + word, `sd ${amino}`);
      measures.set(word + base, `sd ${amino}`);
    }
  }
  for (const name of NAMES[amino]) {
    for (const word of ['conc', 'concentration']) {
      measures.set(word + name, `concentration ${amino}`);
      measures.set(name + word, `concentration ${amino}`);
    }
  }
}

/** Headers of the ratio of L-serine to L-aspartic acid, squashed. */
const SERINE = new Set(
  ['ser', 'serine'].flatMap((ser) => NAMES.Asx.flatMap((asx) => [`l${ser}l${asx}`, `l${ser}l${asx}ratio`])),
);

const UNIT =
  /[([]?\s*((?:[munpµμ]?mol(?:e?s?)|[munpµμ]g|ppm|[munpµμ]?M)\s*(?:[/ ·.].*|per .*|[munpk]?g\s*-1.*)?)[)\]]?$/u;

/**
 * What a header says of an amino acid's ratio, its standard deviation between shells, or its concentration.
 *
 * @example
 * measureOf('Asp D/L')?.key // => 'ratio Asx'
 * @example
 * measureOf('alle/Ile')?.key // => 'ratio Ile'
 * @example
 * measureOf('[Ser] (nmol/g)') // => { key: 'concentration Ser', unit: 'nmol/g' }
 */
export function measureOf(
  header: string,
): { readonly key: MeasureKey | 'serine'; readonly unit: string | null } | null {
  const plain = squash(header);
  if (SERINE.has(plain)) return { key: 'serine', unit: null };
  const bracketed = /^\s*\[\s*(?:total\s+)?([^\][]+?)\s*\]\s*(.*)$/iu.exec(header);
  if (bracketed !== null) {
    const amino = aminoAcids.get(squash(bracketed[1]));
    if (amino !== undefined && !/^\s*\//.test(bracketed[2])) {
      const unit = bracketed[2].replace(/^[\s,([]+|[\s)\]]+$/g, '');
      return { key: `concentration ${amino}`, unit: unit === '' ? null : unit };
    }
    return null;
  }
  const known = measures.get(plain);
  if (known !== undefined) return { key: known, unit: null };
  const unit = UNIT.exec(header.trim());
  if (unit !== null && unit.index > 0) {
    const stem = squash(header.trim().slice(0, unit.index));
    const amino = aminoAcids.get(stem) ?? aminoAcids.get(stem.replace(/^conc(entration)?|conc(entration)?$/g, ''));
    if (amino !== undefined) return { key: `concentration ${amino}`, unit: unit[1].replace(/[\s)\]]+$/, '') };
  }
  return null;
}

/**
 * The amino acid that a cell or a name stands for.
 *
 * @example
 * aminoAcidOf('aspartic acid') // => 'Asx'
 * @example
 * aminoAcidOf('A/I') // => 'Ile'
 */
export function aminoAcidOf(text: string): AminoAcid | null {
  const plain = squash(text);
  return aminoAcids.get(plain) ?? ratioForms.get(plain) ?? null;
}

/** Whether a header is an amino acid's bare name, which may be a ratio as well as a concentration. */
export function isBareAminoAcid(header: string): boolean {
  return aminoAcids.has(squash(header)) && !header.includes('[');
}
