import { expect, it } from 'vitest';
import { keysInMetres } from '../../src/raster/geo-tags.ts';
import { cloudOptimizedGeoTiff } from '../../src/raster/write-cog.ts';
import { opened } from './open.ts';
import { utmKeys } from './sample-rasters.ts';
import { utmMetres } from './tiff-builder.ts';

// Codes: EPSG 6360 NAVD88 height (ftUS), unit 9003 US survey foot, 9001 metre; keys of OGC GeoTIFF 1.1.
const inFeet = {
  directory: [1, 1, 1, 5, ...utmKeys.directory.slice(4), 4096, 0, 1, 6360, 4099, 0, 1, 9003],
  doubles: [],
  ascii: '',
};

it('lets a vertical CRS in feet give way to a user-defined one in metres', () => {
  expect(keysInMetres(inFeet, 'us-ft', false).directory).toEqual([
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
  expect(keysInMetres(inFeet, 'm', false)).toBe(inFeet);
  expect(keysInMetres(utmKeys, 'ft', false)).toBe(utmKeys);
});

// EPSG 6357 NAVD88 depth and 6358 the same in US survey feet, axis down.
it.each([6357, 6358])(
  'depths that became heights keep no downward CRS: EPSG:%i, written and read back',
  async (code) => {
    const keys = [...utmMetres.slice(0, 3), [4096, code]] as const;
    const { grid, georeference, verticalUnit, fromDepths } = await opened([
      { width: 3, height: 1, values: [1, 20, 300], keys },
    ]);
    expect(fromDepths).toBe(true);
    const back = await opened([
      cloudOptimizedGeoTiff({
        width: 3,
        height: 1,
        samples: grid.elevationM,
        noData: null,
        georeference: {
          ...georeference,
          geoKeys: keysInMetres(georeference.geoKeys, verticalUnit, fromDepths),
        },
      }),
    ]);
    expect(back.grid.elevationM).toEqual(grid.elevationM);
    expect(back.grid.elevationM[0]).toBeLessThan(0);
    expect(back).toMatchObject({ fromDepths: false, verticalUnit: 'm', notices: [] });
  },
);
