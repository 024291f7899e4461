import type { AminoAcid, Analysis } from '../../src/model/index.js';
import type { Random } from '../../src/statistics/random.js';
import type { CoastOptions, SimulatedAminoAcid } from './coast-options.js';
import { type ShellKind, spoil } from './odd-shells.js';
import { type PlannedBed, stream } from './plan-coast.js';

/** What is true of one shell. */
export interface TrueShell {
  /** `section/bed/shell`. */
  readonly key: string;
  readonly bed: string;
  readonly taxon: string;
  readonly shell: string;
  readonly kind: ShellKind;
  /** Zone and bed a reworked or intruded shell came from. */
  readonly sourceZone: number | null;
  readonly sourceBed: string | null;
}

/** Plausible D/L in a young Quaternary zone, for amino acids after the first. */
const YOUNG_RATIO: Readonly<Record<AminoAcid, number>> = {
  Asx: 0.25,
  Glx: 0.12,
  Ser: 0.4,
  Ala: 0.2,
  Val: 0.09,
  Phe: 0.16,
  Leu: 0.13,
  Ile: 0.12,
  Tyr: 0.16,
  Met: 0.2,
};

/** Typical total concentration, in pmol a milligram. */
const CONCENTRATION: Readonly<Record<AminoAcid, number>> = {
  Asx: 6000,
  Glx: 4200,
  Ser: 2200,
  Ala: 3600,
  Val: 1900,
  Phe: 1100,
  Leu: 1700,
  Ile: 1000,
  Tyr: 600,
  Met: 300,
};

/** D/L of each amino acid for a shell at log ratio x (main amino acid, first taxon), with its errors. */
function drawRatios(
  aminoAcids: readonly Required<SimulatedAminoAcid>[],
  x: number,
  origin: number,
  correlation: number,
  random: Random,
): number[] {
  const shared = random.normal();
  return aminoAcids.map((aminoAcid) => {
    const error = aminoAcid.scatter * (Math.sqrt(correlation) * shared + Math.sqrt(1 - correlation) * random.normal());
    const signal = aminoAcid.noise ? 0 : aminoAcid.slope * (x - origin);
    return Math.exp(Math.log(aminoAcid.youngest) + signal + error);
  });
}

/** The amino acids of a coast with every default filled in. */
export function completeAminoAcids(options: CoastOptions & { youngest: number; scatter: number }) {
  return (options.aminoAcids ?? [{ code: 'Ile' as const }]).map((aminoAcid, i) => ({
    code: aminoAcid.code,
    slope: aminoAcid.slope ?? 1,
    scatter: aminoAcid.scatter ?? options.scatter,
    youngest: aminoAcid.youngest ?? (i === 0 ? Math.exp(options.youngest) : YOUNG_RATIO[aminoAcid.code]),
    noise: aminoAcid.noise ?? false,
  }));
}

/** One shell to be drawn. */
export interface ShellOrder {
  readonly bed: PlannedBed;
  readonly taxon: string;
  readonly shell: string;
  /** Log ratio that the main amino acid should show, before the shell's own error. */
  readonly x: number;
  readonly kind: ShellKind;
}

/** The rows of one shell, one a preparation. The error stream is the shell's own, so that odd shells disturb no other. */
export function drawShell(
  order: ShellOrder,
  options: CoastOptions & { seed: number; youngest: number; scatter: number },
  random: Random,
  firstLine: number,
): Analysis[] {
  const aminoAcids = completeAminoAcids(options);
  const clean = drawRatios(aminoAcids, order.x, options.youngest, options.correlation ?? 0, random);
  const cleanSerine = Math.min(0.6, 0.36 * Math.exp(0.15 * random.normal()));
  const richness = Math.exp(0.25 * random.normal());
  const amounts = aminoAcids.map(({ code }) => CONCENTRATION[code] * richness * Math.exp(0.08 * random.normal()));
  const serineDl = 0.45 * Math.exp(0.08 * random.normal());
  const { ratios, serine } = spoil(order.kind, clean, cleanSerine, stream(options.seed, 8, order.bed.index));
  const preparations = options.preparations ?? 1;
  return Array.from({ length: preparations }, (_, p): Analysis => {
    const byCode: Partial<Record<AminoAcid, number>> = {};
    const concentrations: Partial<Record<AminoAcid, number>> = {};
    aminoAcids.forEach(({ code }, k) => {
      byCode[code] = ratios[k] * Math.exp((options.withinShell ?? 0) * random.normal());
      concentrations[code] = amounts[k];
    });
    if (options.serine === 'concentrations') {
      const { Asx } = byCode;
      if (Asx === undefined || concentrations.Asx === undefined) {
        throw new Error("simulateCoast: serine 'concentrations' needs Asx among the amino acids");
      }
      byCode.Ser = serineDl;
      concentrations.Ser = serine * (concentrations.Asx / (1 + Asx)) * (1 + serineDl);
    }
    return {
      file: 'shells.csv',
      line: firstLine + p,
      section: order.bed.section,
      bed: order.bed.bed,
      taxon: order.taxon,
      fraction: 'THAA',
      shell: order.shell,
      preparation: preparations > 1 ? String(p + 1) : null,
      injection: null,
      lab_id: `L${String(firstLine + p).padStart(5, '0')}`,
      lab: null,
      method: null,
      ratios: byCode,
      concentrations,
      serine_ratio: options.serine === 'concentrations' ? null : serine,
      summary: null,
    };
  });
}
