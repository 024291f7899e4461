import { expect, it } from 'vitest';
import { geoJson } from '../../src/output/geojson.js';
import { FINDINGS } from './fixture.js';

// RFC 7946: members and the order of coordinates (sections 3.1.1, 3.1.2, 3.2, 3.3, 4); seen
it('gives a point, longitude first, to every bed with legal coordinates, and to no other', () => {
  const map = JSON.parse(geoJson(FINDINGS));
  expect(map.type).toBe('FeatureCollection');
  expect(map.features).toHaveLength(1);
  const [feature] = map.features;
  expect(feature).toMatchObject({ type: 'Feature', geometry: { type: 'Point', coordinates: [-126.5, -48.1234568] } });
  expect(feature.properties).toMatchObject({
    section: 'Low cliff, "north"',
    bed: 'A',
    zone: 'Z1',
    rank: 3,
    dl_mean: 0.2,
  });
  expect(map).not.toHaveProperty('crs');
});

it('is an empty collection where no bed has coordinates', () => {
  expect(JSON.parse(geoJson({ ...FINDINGS, sites: [] }))).toEqual({ type: 'FeatureCollection', features: [] });
});
