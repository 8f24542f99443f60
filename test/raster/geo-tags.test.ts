import { expect, it } from 'vitest';
import { keysInMetres } from '../../src/raster/geo-tags.ts';
import { utmKeys } from './sample-rasters.ts';

// Codes: EPSG 6360 NAVD88 height (ftUS), unit 9003 US survey foot, 9001 metre; keys of OGC GeoTIFF 1.1.
const inFeet = {
  directory: [1, 1, 1, 5, ...utmKeys.directory.slice(4), 4096, 0, 1, 6360, 4099, 0, 1, 9003],
  doubles: [],
  ascii: '',
};

it('lets a vertical CRS in feet give way to a user-defined one in metres', () => {
  expect(keysInMetres(inFeet, 'us-ft').directory).toEqual([
    1,
    1,
    1,
    5,
    ...utmKeys.directory.slice(4),
    4096,
    0,
    1,
    32767,
    4099,
    0,
    1,
    9001,
  ]);
});

it('leaves keys alone that are in metres or say nothing of heights', () => {
  expect(keysInMetres(inFeet, 'm')).toBe(inFeet);
  expect(keysInMetres(utmKeys, 'ft')).toBe(utmKeys);
});
