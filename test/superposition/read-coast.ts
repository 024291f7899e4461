import { averageAnalyses, bedKey, chooseClocks, clockData } from '../../src/beds/index.js';
import { DEFAULT_OPTIONS, type RelationRecord, type ScreeningMark } from '../../src/model/index.js';
import { relationGraph, sectionRelations } from '../../src/order/index.js';
import { screenShells } from '../../src/screening/index.js';
import { createRandom } from '../../src/statistics/index.js';
import { bedsAbove, readShells, robustScatter, type ShellFinding } from '../../src/superposition/index.js';
import { findZones } from '../../src/zones/index.js';
import { type CoastOptions, type ShellKind, simulateCoast } from '../simulation/coast.js';

export interface ReadShell {
  readonly key: string;
  readonly kind: ShellKind;
  readonly finding: ShellFinding;
  readonly marks: readonly ScreeningMark[];
}

/** Simulates a coast and reads its shells over passes as the pipeline does, until nothing changes or five are over. */
export function readCoast(options: CoastOptions): { shells: ReadShell[]; passes: number; zones: number } {
  const { survey, truth } = simulateCoast(options);
  const { shells, summaries } = averageAnalyses(survey.analyses);
  const screening = screenShells(shells);
  const [set] = chooseClocks(shells, summaries, DEFAULT_OPTIONS);
  let setAside = new Set<number>();
  for (let pass = 1; ; pass++) {
    const data = clockData({
      clock: set.main,
      shells,
      summaries,
      setAside,
      imputation: set.index?.imputation,
      ...(pass === 1 ? { scatter: (groups: readonly (readonly number[])[]) => robustScatter(groups).s } : {}),
    });
    const zoning = findZones(data, { alpha: 0.05, zones: null, random: createRandom(1), simulations: 99 });
    const relations: RelationRecord[] = sectionRelations(
      survey.beds.map(({ section, bed, place }) => ({ key: bedKey(section, bed), section, place })),
    );
    const graph = relationGraph(
      data.beds.map(({ key }) => key),
      relations,
    );
    const aminoAcids = set.main.amino_acids;
    const zones = (zoning?.priors.means ?? []).map((mean, k) => ({
      name: `Z${k + 1}`,
      mean,
      sd: Math.hypot(zoning?.priors.tau ?? 0, zoning?.priors.se[k] ?? 0),
      weight: zoning?.priors.weights[k] ?? 1,
    }));
    const readings = readShells({
      data,
      aminoAcids,
      logs: data.shells.map(({ shell }) =>
        aminoAcids.map((code) => Math.log(shells[shell].ratios[code] ?? Number.NaN)),
      ),
      marks: data.shells.map(({ shell }) => screening.filter((mark) => mark.shell === shell)),
      above: bedsAbove(graph),
      zones,
      spread: zoning?.spread ?? 0,
    });
    const next = new Set(
      data.shells.flatMap(({ shell }, i) => (readings.shells[i].status === 'set aside' ? [shell] : [])),
    );
    const same = next.size === setAside.size && [...next].every((shell) => setAside.has(shell));
    setAside = next;
    if (!same && pass < 5) continue;
    return {
      passes: pass,
      zones: zones.length,
      shells: data.shells.map(({ shell }, i) => {
        const { section, bed, shell: name } = shells[shell];
        const key = `${section}/${bed}/${name}`;
        const marks = screening.filter((mark) => mark.shell === shell);
        return { key, kind: truth.shells.get(key)?.kind ?? 'clean', finding: readings.shells[i], marks };
      }),
    };
  }
}
