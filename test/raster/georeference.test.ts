import { describe, expect, test } from 'vitest';
import { cellCentre } from '../../src/raster/place.ts';
import { opened, ramp, refusal } from './open.ts';
import { degreesMetres, type Tag, type TiffSpec, utmMetres } from './tiff-builder.ts';

const small: TiffSpec = { width: 4, height: 3, values: ramp(4, 3), place: [1000, 2000, 30, 30] };
const double = (...values: number[]): Tag => ({ type: 12, values });
const asPoint = utmMetres.map(([key, value]) => [key, key === 1025 ? 2 : value] as const);
const matrix = (a: number, b: number, x: number, c: number, d: number, y: number): TiffSpec['tags'] => ({
  33550: null,
  33922: null,
  34264: double(a, b, 0, x, c, d, 0, y, 0, 0, 0, 0, 0, 0, 0, 1),
});

describe('where cells lie', () => {
  // OGC GeoTIFF 1.1: tie point (0,0,0,X,Y,0), scale 30: the centre of cell 0,0 is (X+15, Y−15) for area, (X, Y) for point.
  test('tie point and scale, values of areas', async () => {
    const terrain = await opened([small]);
    expect(cellCentre(terrain, 0)).toEqual([1015, 1985]);
    expect(terrain.georeference).toMatchObject({ west: 1000, north: 2000, pixelIsPoint: false });
  });

  test('tie point and scale, values of points: half a cell out', async () => {
    const terrain = await opened([{ ...small, keys: asPoint }]);
    expect(cellCentre(terrain, 0)).toEqual([1000, 2000]);
    expect(terrain.georeference).toMatchObject({ west: 985, north: 2015, pixelIsPoint: true });
  });

  test('a tie point inside the image', async () => {
    const tags = { 33922: double(2, 1, 0, 1060, 1970, 0) };
    expect((await opened([{ ...small, tags }])).georeference).toMatchObject({ west: 1000, north: 2000 });
  });

  test('a transformation without rotation, values of areas and points', async () => {
    const tags = matrix(30, 0, 1000, 0, -20, 2000) ?? {};
    const { georeference, grid } = await opened([{ ...small, tags }]);
    expect(georeference).toMatchObject({ west: 1000, north: 2000, cellWidth: 30, cellHeight: 20 });
    expect(grid.metrics.areaM2[0]).toBe(600);
    expect((await opened([{ ...small, tags, keys: asPoint }])).georeference).toMatchObject({
      west: 985,
      north: 2010,
    });
  });

  test('feet on the ground become metres in the metrics only', async () => {
    const keys = [
      [1024, 1],
      [3072, 2263],
      [4099, 9001],
    ] as const;
    const { grid, georeference } = await opened([{ ...small, keys }]);
    expect(georeference.cellWidth).toBe(30);
    expect(grid.metrics.eastM[0]).toBeCloseTo((30 * 1200) / 3937, 9);
  });
});

describe('places that are refused', () => {
  test.each<[string, TiffSpec['tags'], string]>([
    [
      'none',
      { 33550: null, 33922: null },
      'a.tif has no georeference (tags 33550 and 33922, or 34264); expected a GeoTIFF, so give it its place and cell size.',
    ],
    [
      'rotated',
      matrix(30, 5, 1000, 5, -30, 2000),
      'a.tif is rotated or sheared against its CRS (tag 34264); expected rows that run east, so warp it to a north-up grid first.',
    ],
    [
      'south-up',
      matrix(30, 0, 1000, 0, 30, 2000),
      'a.tif has its first row in the south; expected a north-up grid, so flip or warp it first.',
    ],
    [
      'mirrored',
      matrix(-30, 0, 1000, 0, -30, 2000),
      'a.tif has its first column in the east; expected a north-up grid, so flip or warp it first.',
    ],
    [
      'south-up by scale',
      { 33550: double(30, -30, 0) },
      'a.tif has its first row in the south; expected a north-up grid, so flip or warp it first.',
    ],
    [
      'control points',
      { 33550: null, 33922: double(...Array.from({ length: 24 }, (_, i) => i)) },
      'a.tif is placed by 4 control points; expected one tie point and a cell size, so warp it to a north-up grid first.',
    ],
    [
      'cells of no size',
      { 33550: double(0, 30, 0) },
      'a.tif has cells of 0 × 30 at 1000, 2000; expected finite numbers above 0, so mend its georeference.',
    ],
  ])('%s', async (_, tags, sentence) => {
    expect(await refusal(opened([{ ...small, tags: tags ?? {} }]))).toBe(`unsupported: ${sentence}`);
  });

  test('latitudes beyond a pole', async () => {
    const spec: TiffSpec = { ...small, place: [0, 95, 1, 1], keys: degreesMetres };
    expect(await refusal(opened([spec]))).toBe(
      'unsupported: a.tif reaches from latitude 92 to 95; expected −90 to 90, so mend its georeference.',
    );
  });
});
