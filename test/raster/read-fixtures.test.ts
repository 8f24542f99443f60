import { readFileSync } from 'node:fs';
import { fromFile } from 'geotiff';
import { describe, expect, test } from 'vitest';
import { fileSource } from '../../src/node/file-source.ts';
import { crsFromEpsg } from '../../src/raster/crs.ts';
import { openTerrain } from '../../src/raster/open-terrain.ts';
import { fromCrs84, toCrs84 } from '../../src/raster/transform.ts';

// Recorded by test/data/make_reader_fixtures.py with an independent raster library; its version stands in the file.
interface Expected {
  files: Record<
    string,
    { values: number[]; west: number; north: number; cellWidth: number; cellHeight: number }
  >;
  points: Record<string, { lonLat: [number, number]; xy: [number, number] }>;
}
const folder = new URL('../data/reader/', import.meta.url).pathname;
const expected: Expected = JSON.parse(readFileSync(`${folder}expected.json`, 'utf8'));
const open = async (path: string) => openTerrain([await fileSource(path)], { verticalUnit: 'm' });

describe('cells as an independent raster library reads them', () => {
  test.each(Object.keys(expected.files))('%s', async (name) => {
    const terrain = await open(`${folder}${name}.tif`);
    const file = expected.files[name];
    expect([terrain.grid.width, terrain.grid.height]).toEqual([37, 29]);
    expect(terrain.grid.elevationM).toEqual(Float32Array.from(file.values));
    const { west, north, cellWidth, cellHeight } = terrain.georeference;
    expect([west, north, cellWidth, cellHeight]).toEqual([
      file.west,
      file.north,
      file.cellWidth,
      file.cellHeight,
    ]);
  });
});

describe('real elevation as the geotiff library reads it', () => {
  test.each(['olinda_dem_utm25s', 'etopo60', 'etopo20'])('%s', async (name) => {
    const path = new URL(`../data/${name}.tif`, import.meta.url).pathname;
    const terrain = await open(path);
    const image = await (await fromFile(path)).getImage(0);
    const [band] = await image.readRasters();
    expect(terrain.grid.elevationM).toEqual(Float32Array.from(band as Float32Array));
  });
});

// The same library's projections; proj4 agrees to well under a millimetre except where noted.
describe('coordinates as an independent projection library gives them', () => {
  test.each(Object.keys(expected.points).filter((code) => /^\d+$/.test(code)))('EPSG:%s', async (code) => {
    const { lonLat, xy } = expected.points[code];
    const crs = await crsFromEpsg(Number(code));
    const [x, y] = fromCrs84(crs)(...lonLat);
    expect(Math.hypot(x - xy[0], y - xy[1]) * (crs.unitM ?? 1)).toBeLessThan(1e-3);
    const [lon, lat] = toCrs84(crs)(...xy);
    expect(Math.hypot(lon - lonLat[0], lat - lonLat[1])).toBeLessThan(1e-8);
  });

  test('user-defined keys: conic projection in US survey feet', async () => {
    const { georeference } = await open(`${folder}user-defined-feet.tif`);
    expect(georeference.crs.epsg).toBeNull();
    expect(georeference.crs.unitM).toBe(1200 / 3937);
    const { lonLat, xy } = expected.points['user-defined-feet'];
    const [x, y] = fromCrs84(georeference.crs)(...lonLat);
    expect(Math.hypot(x - xy[0], y - xy[1])).toBeLessThan(0.003);
  });

  test('user-defined keys: the corner of the Olinda file', async () => {
    const { georeference, grid } = await open(
      new URL('../data/olinda_dem_utm25s.tif', import.meta.url).pathname,
    );
    expect(georeference.crs).toMatchObject({ kind: 'projected', epsg: null, unitM: 1, semiMajorM: 6378137 });
    const { lonLat, xy } = expected.points['olinda-corner'];
    expect([georeference.west, georeference.north]).toEqual(xy);
    const [lon, lat] = toCrs84(georeference.crs)(...xy);
    expect(Math.hypot(lon - lonLat[0], lat - lonLat[1])).toBeLessThan(1e-8);
    expect(grid.metrics.areaM2[0]).toBeCloseTo(georeference.cellWidth ** 2, 9);
    expect(georeference.geoKeys.ascii).toContain('UTM Zone 25');
  });
});
