import type { BedRow, BedSite, Findings, OrderRow } from '../model/index.js';
import { numberText } from './number-text.js';

/**
 * deposits.geojson (RFC 7946): one point a bed and main clock, [longitude, latitude] in WGS 84, for every bed whose
 * coordinates are known and legal. Beds without coordinates are left out; no elevation is put into the position,
 * since RFC 7946 wants it above the ellipsoid and the field gives it above sea level.
 */
export function geoJson(findings: Findings): string {
  const sites = new Map(findings.sites.map((site) => [`${site.section}/${site.bed}`, site]));
  const ranks = new Map(findings.order.map((row) => [key(row), row]));
  const lines: string[] = [];
  for (const bed of findings.beds) {
    const site = sites.get(`${bed.section}/${bed.bed}`);
    if (site && onEarth(site)) lines.push(JSON.stringify(feature(bed, site, ranks.get(key(bed)))));
  }
  const features = lines.length === 0 ? '[]' : `[\n${lines.join(',\n')}\n]`;
  return `{"type":"FeatureCollection","features":${features}}\n`;
}

function feature(bed: BedRow, site: BedSite, rank: OrderRow | undefined) {
  return {
    type: 'Feature',
    id: `${bed.clock}: ${bed.section}/${bed.bed}`,
    geometry: { type: 'Point', coordinates: [rounded(site.longitude, 9), rounded(site.latitude, 9)] },
    properties: {
      clock: bed.clock,
      section: bed.section,
      bed: bed.bed,
      taxon: bed.taxon,
      zone: bed.zone,
      zone_probability: rounded(bed.zone_probability),
      rank: rank?.rank ?? null,
      rank_low: rounded(rank?.rank_low),
      rank_high: rounded(rank?.rank_high),
      dl_mean: rounded(bed.dl_mean),
      dl_se: rounded(bed.dl_se),
      shells: bed.shells,
      set_aside: bed.set_aside,
      elevation_m: rounded(site.elevation_m),
      marks: bed.marks.join(';'),
      reading: bed.reading,
      note: site.note,
    },
  };
}

function key(row: { readonly clock: string; readonly section: string; readonly bed: string }): string {
  return JSON.stringify([row.clock, row.section, row.bed]);
}

function onEarth({ latitude, longitude }: BedSite): boolean {
  return latitude !== null && longitude !== null && Math.abs(latitude) <= 90 && Math.abs(longitude) <= 180;
}

function rounded(value: number | null | undefined, digits = 6): number | null {
  return value === null || value === undefined || !Number.isFinite(value) ? null : Number(numberText(value, digits));
}
