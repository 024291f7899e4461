import { describe, expect, it } from 'vitest';
import { clockData } from '../../src/beds/index.js';
import type { Clock, Shell } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';
import { assignZone } from '../../src/zones/index.js';
import { cases, LONG } from '../house/effort.js';
import { settledZones } from '../simulation/zone-runs.js';

const ILE: Clock = {
  name: 'Invenus THAA Ile',
  taxon: 'Invenus',
  fraction: 'THAA',
  amino_acids: ['Ile'],
  weights: [1],
  main: true,
};

describe('stages of the raised beaches of south-west Britain', () => {
  // Bowen and others 1985, Quaternary Science Reviews 4, 279–318, abstract, seen: A/I 0.105 ± 0.016, 0.135 ± 0.014 and
  // 0.175 ± 0.014, the spread of beds about the stage on the D/L scale; here with 4 to 8 shells a bed, 10 beds a stage
  const STAGES = [
    { mean: 0.105, sd: 0.016 },
    { mean: 0.135, sd: 0.014 },
    { mean: 0.175, sd: 0.014 },
  ];

  async function drawStages(seed: number, each = 10) {
    const random = createRandom(seed);
    const stageOf: number[] = [];
    const shells: Shell[] = [];
    STAGES.forEach(({ mean, sd }, stage) => {
      for (let bed = 0; bed < each; bed++) {
        stageOf.push(stage);
        const count = 4 + random.integer(5);
        for (let shell = 0; shell < count; shell++) {
          shells.push({
            section: `S${bed}`,
            bed: `stage ${stage}`,
            taxon: 'Invenus',
            fraction: 'THAA',
            shell: String(shell),
            lab_ids: [],
            labs: [],
            methods: [],
            preparations: 1,
            ratios: { Ile: Math.max(0.02, mean + sd * random.normal()) },
            replicates: [],
            concentrations: {},
            serine_ratio: null,
            file: 'shells.csv',
            line: 2,
          });
        }
      }
    });
    const data = clockData({ clock: ILE, shells, summaries: [] });
    return { data, stageOf, zoning: await settledZones(data, createRandom(seed)) };
  }

  it('come back as three zones in their order, most beds in their own, and single shells near a cut straddle', async () => {
    const { data, stageOf, zoning } = await drawStages(1);
    expect(zoning.fit.k).toBe(3);
    expect(zoning.labels.filter((label, at) => label === stageOf[at]).length).toBeGreaterThanOrEqual(27);
    // computed: equal-density cuts 0.120 and 0.155
    for (const cut of [0.12, 0.155]) {
      expect(assignZone(Math.log(cut), data.scatter.s, zoning.priors).straddles).toBe(true);
    }
  });

  it('do so for most seeds with 10 beds a stage, and for some with 5', async () => {
    // measured over 200 seeds: 85 % and 21 %, most others called a continuum (10 % and 78 %); of 14 seeds at least 10
    // are three with a chance of 95 % where that is so, and of 9 % where 50 % of all are (binomial)
    const seeds = cases(14, 40);
    const rates = [
      { each: 10, least: cases(10, 33) },
      { each: 5, least: 6 },
    ];
    // with 5 beds a stage few come back, which takes many seeds to see: in the long tests
    for (const { each, least } of LONG ? rates : rates.slice(0, 1)) {
      let three = 0;
      for (let seed = 1; seed <= seeds; seed++) if ((await drawStages(seed, each)).zoning.fit.k === 3) three++;
      expect(three).toBeGreaterThanOrEqual(least);
    }
  });
});
