import { describe, expect, it } from 'vitest';
import { tableColumns } from '../../src/output/table-columns.js';
import { TABLES } from '../../src/output/tables/index.js';
import { FINDINGS } from './fixture.js';

/** The contract of the results folder, column by column. */
const CONTRACT = {
  clocks:
    'clock, taxon, fraction, amino_acids, main, shells, beds, scatter, spread, zones, verdict, slope, slope_low, slope_high, rand_with_main',
  zones: 'clock, zone, beds, shells, dl_mean, dl_low, dl_high, shell_low, shell_high, stability',
  zone_counts: 'clock, model, log_likelihood, bic, gap, gap_se, silhouette, chosen',
  adjacent_zones:
    'clock, older, younger, difference, p_difference, mann_whitney_u, p_mann_whitney, overlap, overlap_low, overlap_high, one_sigma_overlap, verdict',
  beds: 'clock, section, bed, place, taxon, shells, set_aside, dl_mean, dl_sd, dl_se, log_mean, log_se, zone, zone_probability, second_zone, second_probability, straddles, marks, reading',
  shells:
    'clock, section, bed, taxon, shell, lab_id, preparations, dl, log_ratio, residual, status, zone, zone_probability, marks, reading, confidence',
  order: 'clock, rank, section, bed, zone, rank_low, rank_high, p_older_than_next, resolved',
  pairs: 'clock, bed_a, bed_b, p_a_older, p_same_zone',
  relations: 'clock, lower, upper, basis, kind, certainty, difference, z, p_reversed, verdict, verdict_after, reading',
  sections: 'clock, section, beds, relations, statistic, p_order, verdict',
  correlation: 'clock, zone, Low cliff, "north", section zone',
  plan: 'clock, kind, rank, beds, shells, total, gap, gap_error, power, chance, pairs_gained, beds_bracketed, proven_best, settles',
  problems: 'file, line, column, severity, message',
};

describe('the tables', () => {
  it.each(TABLES.map((table) => [table.name, table] as const))('%s has the columns of the contract', (name, table) => {
    const headers = tableColumns(table, FINDINGS).map(({ header }) => header);
    expect(headers.join(', ')).toBe(CONTRACT[name]);
    expect(new Set(headers).size).toBe(headers.length);
  });

  it('are all there, and every column says what it is', () => {
    expect(TABLES.map(({ name }) => name)).toEqual(Object.keys(CONTRACT));
    for (const { columns } of TABLES) {
      for (const shape of Object.values(columns)) expect(shape.description.length).toBeGreaterThan(3);
    }
  });
});
