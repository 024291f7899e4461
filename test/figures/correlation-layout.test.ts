import { describe, expect, it } from 'vitest';
import { clockViews } from '../../src/figures/clock-view.js';
import { layColumns, metreScale } from '../../src/figures/correlation-layout.js';
import { contactOf, runsOf } from '../../src/figures/correlation-runs.js';
import type { Findings } from '../../src/model/index.js';
import { type FixtureOptions, fixture } from '../report/fixture.js';

const view = (options: FixtureOptions = {}) => clockViews(fixture(options))[0];

describe('the columns of the correlation panel', () => {
  it.each([
    {},
    { place: 'level' },
    { place: 'depth_m' },
    { sections: 40, beds: 150, shells: 1200, planned: false },
  ] as FixtureOptions[])('stand in coast order, with beds in superposition (%o)', (options) => {
    const columns = layColumns(view(options));
    expect(columns.map((column) => column.section)).toEqual(view(options).sections);
    for (const column of columns) {
      const up = column.slices.map((slice) => {
        const place = slice.bed.site!.place!;
        return place.kind === 'depth_m' ? -place.value : place.value;
      });
      expect(up).toEqual([...up].sort((a, b) => a - b));
      for (let i = 1; i < column.slices.length; i++)
        expect(column.slices[i].bottom).toBeCloseTo(column.slices[i - 1].top, 9);
      for (const slice of column.slices) expect(slice.bottom - slice.top).toBeGreaterThanOrEqual(13 - 1e-9);
    }
  });

  it('keeps one scale for all sections with metres', () => {
    const own = view({ place: 'height_m' });
    const scale = metreScale(own)!;
    for (const column of layColumns(own))
      for (let i = 1; i < column.slices.length; i++) {
        const rise = column.slices[i].bed.site!.place!.value - column.slices[i - 1].bed.site!.place!.value;
        expect(column.slices[i - 1].bottom - column.slices[i].bottom).toBeCloseTo(rise * scale, 6);
      }
  });

  it('puts beds of one place side by side, and beds without one apart by rank', () => {
    const findings = fixture({ sections: 2, beds: 6, shells: 40, place: 'level' });
    const level = { kind: 'level', value: 1 } as const;
    const together: Findings = {
      ...findings,
      sites: findings.sites.map((site, i) =>
        i < 2 ? { ...site, place: level } : i >= 3 ? { ...site, place: null } : site,
      ),
    };
    const [first, second] = layColumns(clockViews(together)[0]);
    expect(first.slices.slice(0, 2).map((slice) => [slice.left, slice.right])).toEqual([
      [0, 0.5],
      [0.5, 1],
    ]);
    expect(second.slices.every((slice) => !slice.placed)).toBe(true);
    const ranks = second.slices.map((slice) => slice.bed.order!.rank);
    expect(ranks).toEqual([...ranks].sort((a, b) => a - b));
  });

  it('finds where a missing zone would lie', () => {
    const own = view({ sections: 40, beds: 150, shells: 1200, planned: false, odd: false });
    let between = 0;
    for (const column of layColumns(own)) {
      const runs = runsOf(column);
      for (let zone = 0; zone < own.zones.length; zone++) {
        if (runs.some((run) => run.zone === zone)) continue;
        const contact = contactOf(column, zone)!;
        const older = runs.filter((run) => run.zone > zone);
        const younger = runs.filter((run) => run.zone < zone);
        expect(contact.where).toBe(older.length === 0 ? 'below' : younger.length === 0 ? 'above' : 'between');
        if (contact.where === 'between') between++;
        for (const run of older) expect(run.top).toBeGreaterThanOrEqual(contact.y - 1e-9);
        for (const run of younger) expect(run.bottom).toBeLessThanOrEqual(contact.y + 1e-9);
      }
    }
    expect(between).toBeGreaterThan(5);
  });
});
