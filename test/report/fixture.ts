import {
  type AminoAcid,
  type BedRow,
  type BedSite,
  DEFAULT_OPTIONS,
  type Findings,
  type OrderRow,
  type RelationRow,
  type ShellRatios,
  type ShellRow,
} from '../../src/model/index.js';
import { planOfRun } from '../../src/planning/index.js';

/** Size and troubles of an invented survey. */
export interface FixtureOptions {
  readonly sections?: number;
  readonly beds?: number;
  readonly shells?: number;
  readonly zones?: number;
  readonly taxa?: readonly string[];
  readonly place?: 'level' | 'height_m' | 'depth_m' | 'none';
  readonly gradient?: boolean;
  readonly elevation?: boolean;
  readonly aminoAcids?: readonly AminoAcid[];
  readonly verdict?: 'zones' | 'continuum' | 'one zone' | 'too few beds';
  /** Names that a hostile or careless table could hold, put in place of the first section, bed, shell and taxon. */
  readonly hostile?: string;
  readonly odd?: boolean;
  readonly longNames?: boolean;
  /** Whether there is a plan, which no figure shows and which takes seconds for hundreds of beds. Default true. */
  readonly planned?: boolean;
}

const PLACES = [
  'Skell Ness',
  'Brine Cove',
  'Tarrow',
  'Old Harbour',
  'Gannet Stair',
  'Mallow Point',
  'Quern Bay',
  'Sallow Head',
  'Limpet Row',
  'Far Sands',
  'Oxter',
  'Wrack End',
  'Hollin',
  'Cairn Foot',
  'Pebble Gut',
  'Stennis',
  'Low Garth',
  'Thrift Bank',
  'Merrow',
  'Dunlin Reach',
  'Kelder',
  'Whin Scar',
  'Eddergate',
  'Sorrel Hythe',
  'Nab Top',
  'Ravensey',
  'Sandle',
  'Ulver Mouth',
  'Barrow Nook',
  'Yarl',
  'Fennick',
  'Glasswater',
  'Heron Slack',
  'Inch Point',
  'Jetsam',
  'Knott End',
  'Lammer',
  'Mussel Craig',
  'Norwick',
  'Otter Geo',
];

/** A small generator for invented numbers (Lehmer, 48271). */
function generator(seed: number): { uniform: () => number; normal: () => number } {
  let state = seed;
  const uniform = () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
  const normal = () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal };
}

const made = new Map<string, Findings>();

/**
 * Findings of an invented survey, complete enough to draw; numbers are plausible, and only the plan is an engine's. Those of
 * the same options are made once, as nothing may change them and a plan of many beds takes a second.
 */
export function fixture(options: FixtureOptions = {}): Findings {
  const key = JSON.stringify(options);
  const findings = made.get(key) ?? freshFixture(options);
  made.set(key, findings);
  return findings;
}

/** {@link fixture}, made anew. */
export function freshFixture(options: FixtureOptions = {}): Findings {
  const sections = options.sections ?? 12;
  const bedCount = options.beds ?? 36;
  const shellCount = options.shells ?? 200;
  const taxa = options.taxa ?? ['Patellina'];
  const odd = options.odd ?? true;
  const aminoAcids = options.aminoAcids ?? (['Asx', 'Glx', 'Val', 'Ile'] as const);
  const verdict = options.verdict ?? 'zones';
  const zoneCount = verdict === 'zones' ? (options.zones ?? 4) : 1;
  const random = generator(20231);
  const means = Array.from({ length: zoneCount }, (_, z) => Math.log(0.13) + z * 0.42);
  const hostile = options.hostile;
  const sectionNames = Array.from({ length: sections }, (_, i) =>
    hostile !== undefined && i === 0
      ? hostile
      : (PLACES[i % PLACES.length] ?? '') +
        (i < PLACES.length ? '' : ` ${Math.floor(i / PLACES.length) + 1}`) +
        (options.longNames ? ', eastern cliff below the lookout' : ''),
  );

  const sites: BedSite[] = [];
  const zoneOf = new Map<string, number>();
  for (let s = 0; s < sections; s++) {
    const count = Math.floor(bedCount / sections) + (s < bedCount % sections ? 1 : 0);
    // oldest first: a walk down from the oldest zones with steps skipped here and there
    const base = random.uniform() < 0.35 ? 1 : 0;
    let z = zoneCount - 1 - Math.min(base, zoneCount - 1);
    let height = 0.4 + random.uniform() * 1.5;
    for (let b = 0; b < count; b++) {
      const bed =
        hostile !== undefined && s === 0 && b === 0
          ? hostile
          : options.longNames
            ? `Upper gravel ${b + 1}`
            : `${b + 1}`;
      const left = count - b;
      if (b > 0 && z > 0) z -= z >= left ? (random.uniform() < 0.25 && z > 1 ? 2 : 1) : random.uniform() < 0.6 ? 1 : 0;
      zoneOf.set(`${sectionNames[s]}/${bed}`, z);
      const kind = options.place ?? (s % 5 === 4 ? 'level' : 'height_m');
      sites.push({
        section: sectionNames[s],
        bed,
        place:
          kind === 'none'
            ? null
            : { kind, value: kind === 'level' ? b + 1 : kind === 'depth_m' ? 12 - height : round(height) },
        elevation_m: (options.elevation ?? true) ? round(2 + z * 5.5 + height * 0.5 + random.normal()) : null,
        latitude: 48 + s * 0.02,
        longitude: -5 + s * 0.03,
        coast_km: s * 4.2,
        cmat_c: 9 + (s * 6) / sections,
        burial_m: 2 + random.uniform(),
        note: null,
        gradient: options.gradient ? 9 + (s * 6) / sections : null,
      });
      height += 0.5 + random.uniform() * 2;
    }
  }

  const clocks = taxa.flatMap((taxon, t) => [
    {
      clock: `${taxon} THAA ${aminoAcids.length > 1 ? 'index' : aminoAcids[0]}`,
      taxon,
      fraction: 'THAA' as const,
      amino_acids: aminoAcids,
      main: true,
      shells: Math.floor(shellCount / taxa.length),
      beds: sites.length,
      scatter: 0.061,
      spread: 0.021,
      zones: zoneCount,
      verdict,
      slope: options.gradient ? 0.058 : null,
      slope_low: options.gradient ? 0.044 : null,
      slope_high: options.gradient ? 0.071 : null,
      rand_with_main: null,
    },
    ...(aminoAcids.length > 1 && t === 0
      ? aminoAcids.map((code, i) => ({
          clock: `${taxon} THAA ${code}`,
          taxon,
          fraction: 'THAA' as const,
          amino_acids: [code],
          main: false,
          shells: shellCount,
          beds: sites.length,
          scatter: 0.07 + i * 0.01,
          spread: 0.02,
          zones: zoneCount,
          verdict,
          slope: null,
          slope_low: null,
          slope_high: null,
          rand_with_main: 0.95 - i * 0.06,
        }))
      : []),
  ]);
  const mains = clocks.filter((clock) => clock.main);

  const shells: ShellRow[] = [];
  const shellRatios: ShellRatios[] = [];
  const beds: BedRow[] = [];
  const order: OrderRow[] = [];
  mains.forEach((clock, c) => {
    const own = sites.filter((_, i) => taxa.length === 1 || i % taxa.length === c || i % 4 === 0);
    const each = shellCount / taxa.length / own.length;
    let made = 0;
    own.forEach((site, i) => {
      const z = zoneOf.get(`${site.section}/${site.bed}`)!;
      const want = Math.max(1, Math.round((i + 1) * each) - made);
      made += want;
      const truth =
        verdict === 'continuum'
          ? Math.log(0.12) + (1.1 * i) / own.length + 0.1 * random.normal()
          : means[z] + 0.02 * random.normal() + (options.gradient ? 0.058 * (site.gradient! - 12) : 0);
      const rows: ShellRow[] = [];
      for (let k = 0; k < want; k++) {
        const strange = odd && want > 3 && k === 0 && i % 9 === 4;
        const shift = strange ? (i % 2 === 0 ? 0.45 : -0.4) : 0;
        const doubtful = odd && !strange && k === 1 && i % 11 === 7;
        const x = truth + shift + 0.06 * random.normal() + (doubtful ? 0.17 : 0);
        rows.push({
          clock: clock.clock,
          section: site.section,
          bed: site.bed,
          taxon: clock.taxon,
          shell: hostile !== undefined && i === 0 && k === 0 ? hostile : `${k + 1}`,
          lab_id: [`L${4000 + shells.length + k}`],
          preparations: 2,
          dl: Math.exp(x),
          log_ratio: x,
          residual: x - truth,
          status: strange ? 'set aside' : doubtful ? 'doubtful' : 'kept',
          zone: `Z${z + 1}`,
          zone_probability: strange ? 0.12 : 0.98,
          marks: strange && shift < 0 ? ['high serine', 'low yield'] : doubtful ? ['discordant ratios'] : [],
          reading: strange
            ? shift > 0
              ? 'reworked from an older deposit'
              : 'contaminated by younger amino acids'
            : 'none',
          confidence: strange ? 'high' : null,
        });
        shellRatios.push({
          section: site.section,
          bed: site.bed,
          taxon: clock.taxon,
          fraction: 'THAA',
          shell: rows[k].shell,
          ratios: Object.fromEntries(
            aminoAcids.map((code, a) => [
              code,
              Math.exp(x * (0.75 + a * 0.14) - a * 0.22 + 0.03 * random.normal() + (doubtful && a === 0 ? 0.4 : 0)),
            ]),
          ),
        });
      }
      const kept = rows.filter((row) => row.status !== 'set aside');
      const mean = kept.reduce((sum, row) => sum + row.log_ratio, 0) / kept.length;
      const straddles = i % 13 === 6 && zoneCount > 1;
      beds.push({
        clock: clock.clock,
        section: site.section,
        bed: site.bed,
        place: site.place?.value ?? null,
        taxon: clock.taxon,
        shells: kept.length,
        set_aside: rows.length - kept.length,
        dl_mean: Math.exp(mean),
        dl_sd: 0.06 * Math.exp(mean),
        dl_se: (0.06 * Math.exp(mean)) / Math.sqrt(kept.length),
        log_mean: mean,
        log_se: 0.061 / Math.sqrt(kept.length),
        zone: verdict === 'zones' ? `Z${z + 1}` : 'Z1',
        zone_probability: straddles ? 0.71 : 0.99,
        second_zone: straddles ? `Z${z === 0 ? 2 : z}` : null,
        second_probability: straddles ? 0.28 : null,
        straddles,
        marks: i % 17 === 8 ? ['mixed age'] : kept.length === 1 ? ['one shell'] : [],
        reading: i % 17 === 8 ? 'shells of two ages: scatter 0.19, three times that of other beds' : '',
      });
      shells.push(...rows);
    });
    const sorted = beds.filter((bed) => bed.clock === clock.clock).sort((a, b) => b.log_mean! - a.log_mean!);
    sorted.forEach((bed, r) => {
      const step = r + 1 < sorted.length ? bed.log_mean! - sorted[r + 1].log_mean! : null;
      const wide = Math.round(2 + random.uniform() * 0.06 * sorted.length + 3 * bed.log_se! * 10);
      order.push({
        clock: clock.clock,
        rank: r + 1,
        section: bed.section,
        bed: bed.bed,
        zone: bed.zone,
        rank_low: Math.max(1, r + 1 - wide),
        rank_high: Math.min(sorted.length, r + 1 + wide),
        p_older_than_next: step === null ? null : Math.min(0.999, 0.5 + step * 6),
        resolved: step === null ? null : 0.5 + step * 6 > 0.95,
      });
    });
  });

  const relations: RelationRow[] = mains.flatMap((clock) => {
    const own = beds.filter((bed) => bed.clock === clock.clock);
    return own.slice(1).flatMap((upper, i): RelationRow[] => {
      const lower = own[i];
      if (lower.section !== upper.section || upper.place === null) return [];
      const difference = lower.log_mean! - upper.log_mean!;
      const se = Math.hypot(lower.log_se!, upper.log_se!);
      const reversed = odd && i % 15 === 3;
      const d = reversed ? -Math.abs(difference) - 0.15 : difference;
      const before = d / se < -3 ? 'reversed' : Math.abs(d / se) < 2 ? 'tied' : 'agrees';
      return [
        {
          clock: clock.clock,
          lower: `${lower.section}/${lower.bed}`,
          upper: `${upper.section}/${upper.bed}`,
          basis: i % 7 === 2 ? 'inset' : 'superposition',
          kind: 'older',
          certainty: i % 7 === 2 ? 'probable' : 'certain',
          difference: d,
          z: d / se,
          p_reversed: d < 0 ? 0.0004 : 0.8,
          verdict: before,
          verdict_after: reversed && i % 2 === 0 ? 'tied' : before,
          reading: reversed
            ? `The whole of ${lower.section}/${lower.bed} may be younger than logged: its amino acids agree and its shells scatter no more than elsewhere. A slip of the field log is as likely.`
            : '',
        },
      ];
    });
  });

  const zones = mains.flatMap((clock) =>
    Array.from({ length: zoneCount }, (_, z) => {
      const own = beds.filter((bed) => bed.clock === clock.clock && bed.zone === `Z${z + 1}`);
      const mean = verdict === 'zones' ? means[z] : own.reduce((sum, bed) => sum + bed.log_mean!, 0) / own.length;
      const sd = verdict === 'zones' ? 0.065 : 0.35;
      return {
        clock: clock.clock,
        zone: `Z${z + 1}`,
        beds: own.length,
        shells: own.reduce((sum, bed) => sum + bed.shells, 0),
        dl_mean: Math.exp(mean),
        dl_low: Math.exp(mean - 0.02),
        dl_high: Math.exp(mean + 0.02),
        shell_low: Math.exp(mean - sd),
        shell_high: Math.exp(mean + sd),
        stability: 0.96 - 0.05 * z,
      };
    }),
  );

  const findings: Findings = {
    program: 'bedorder',
    version: '1.0.0',
    options: { ...DEFAULT_OPTIONS, gradient: options.gradient ? 'cmat_c' : null },
    inputs: [{ role: 'shells', file: 'shells.csv', sha256: 'ab'.repeat(32), rows: shells.length }],
    clocks,
    zones,
    zone_counts: clocks.flatMap((clock) =>
      ['1', '2', '3', '4', '5', '6', '7', '8', 'continuum'].map((model, i) => ({
        clock: clock.clock,
        model,
        log_likelihood: -20 + i,
        bic: model === 'continuum' ? 31 : -40 + 9 * Math.abs(i + 1 - zoneCount) * (i + 1 < zoneCount ? 2.5 : 1),
        gap: model === 'continuum' ? null : 0.9 - 0.14 * Math.abs(i + 1 - zoneCount),
        gap_se: model === 'continuum' ? null : 0.04,
        silhouette: model === 'continuum' || model === '1' ? null : 0.8 - 0.07 * Math.abs(i + 1 - zoneCount),
        chosen: verdict === 'continuum' ? model === 'continuum' : model === String(zoneCount),
      })),
    ),
    adjacent_zones: zones.flatMap((zone, i) =>
      zones[i + 1] !== undefined && zones[i + 1].clock === zone.clock
        ? [
            {
              clock: zone.clock,
              older: zones[i + 1].zone,
              younger: zone.zone,
              difference: 0.42,
              p_difference: 1.2e-9,
              mann_whitney_u: 12,
              p_mann_whitney: 3e-12,
              overlap: 0.004,
              overlap_low: 0.001,
              overlap_high: 0.02,
              one_sigma_overlap: false,
              verdict: 'distinct' as const,
            },
          ]
        : [],
    ),
    beds,
    shells,
    order,
    pairs: [],
    relations,
    sections: mains.flatMap((clock) =>
      sectionNames.map((section, i) => ({
        clock: clock.clock,
        section,
        beds: beds.filter((bed) => bed.section === section && bed.clock === clock.clock).length,
        relations: relations.filter((row) => row.clock === clock.clock && row.lower.startsWith(`${section}/`)).length,
        statistic: 0.4,
        p_order: i === 3 ? 0.001 : 0.8,
        verdict: i === 3 ? ('inconsistent' as const) : ('consistent' as const),
      })),
    ),
    correlation: zones.map((zone) => ({
      clock: zone.clock,
      zone: zone.zone,
      sections: Object.fromEntries(
        sectionNames.map((section) => [
          section,
          beds.filter((b) => b.clock === zone.clock && b.zone === zone.zone && b.section === section).map((b) => b.bed),
        ]),
      ),
    })),
    problems: [
      {
        file: 'shells.csv',
        line: 14,
        column: 'lab_id',
        severity: 'warning',
        message: 'lab_id L4012 comes twice (lines 13 and 14); remove one, or give each its own number.',
      },
    ],
    sites,
    section_order: sectionNames,
    shell_ratios: shellRatios,
    evidence: shells
      .filter((shell) => shell.status !== 'kept')
      .map((shell) => ({
        clock: shell.clock,
        about: 'shell' as const,
        name: `${shell.section}/${shell.bed}/${shell.shell}`,
        sentences: [
          `Its ratio lies ${Math.abs(shell.residual! / 0.061).toFixed(1)} standard deviations ${shell.residual! > 0 ? 'above' : 'below'} its bed.`,
          shell.marks.length > 0 ? 'L-Ser/L-Asp is 0.93, at or above the limit of 0.8.' : 'All four amino acids agree.',
        ],
      })),
    conflicts: [],
    diagnostics: mains.map((clock) => ({
      clock: clock.clock,
      chains: 4,
      draws: 4000,
      ess_min: 1830,
      rhat_max: 1.004,
      converged: true,
      relations_kept: relations.length - 1,
      relations_left_out: 1,
    })),
    conversions: [],
    gradients: options.gradient
      ? mains.map((clock) => ({
          clock: clock.clock,
          column: 'cmat_c',
          centre: 12,
          slope: 0.058,
          slope_low: 0.044,
          slope_high: 0.071,
          bic_with: -60,
          bic_without: -22,
          used: true,
        }))
      : [],
    votes: mains.slice(0, 1).flatMap((clock) =>
      sites.length > 8 && aminoAcids.length > 1
        ? [
            {
              clock: clock.clock,
              bed_a: `${sites[1].section}/${sites[1].bed}`,
              bed_b: `${sites[7].section}/${sites[7].bed}`,
              votes: aminoAcids.map((code, i) => ({
                amino_acid: code,
                older: `${sites[i === 1 ? 7 : 1].section}/${sites[i === 1 ? 7 : 1].bed}`,
                p: 0.9,
              })),
            },
          ]
        : [],
    ),
    shares: mains.flatMap((clock) =>
      aminoAcids.length > 1
        ? aminoAcids.map((code, i) => ({
            clock: clock.clock,
            amino_acid: code,
            weight: [0.4, 0.25, 0.1, 0.25][i] ?? 0.1,
            resolution: [41, 22, 9, 30][i] ?? 5,
            verdict: (i === 0 ? 'carries the resolution' : i === 2 ? 'adds noise' : 'helps') as 'helps',
          }))
        : [],
    ),
    remarks: [
      { clock: mains[0].clock, level: 'finding', text: 'BIC, gap and silhouette agree on the number of zones.' },
      {
        clock: mains[0].clock,
        level: 'caution',
        text: 'Groups that were found from the data flatter the p-values of the tests between them.',
      },
    ],
    plan: [],
    plan_criterion: '',
    plan_notes: [],
  };
  return (options.planned ?? true) ? { ...findings, ...planOfRun(findings) } : findings;
}

const round = (value: number) => Math.round(value * 100) / 100;
