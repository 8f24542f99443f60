import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { fileSource } from '../../src/node/file-source.ts';
import { openTerrain } from '../../src/raster/open-terrain.ts';
import { opened, ramp } from './open.ts';
import { degreesMetres, type TiffSpec } from './tiff-builder.ts';

const degrees = (
  width: number,
  height: number,
  west: number,
  north: number,
  cell: number,
  point = false,
): TiffSpec => ({
  width,
  height,
  values: ramp(width, height),
  place: [west, north, cell, cell],
  keys: degreesMetres.map(([key, value]) => [key, key === 1025 && point ? 2 : value] as const),
});

describe('how a geographic grid meets itself and the poles', () => {
  const all = { wraps: true, north: 'pole', south: 'pole' };
  const none = { wraps: false, north: 'beyond', south: 'beyond' };
  test.each<[string, TiffSpec, object]>([
    ['the whole globe', degrees(36, 18, -180, 90, 10), all],
    ['from 0 to 360', degrees(36, 18, 0, 90, 10), all],
    ['half a cell too narrow for a column still wraps', degrees(36, 18, -180, 90, 9.87), all],
    [
      'without its polar rows',
      degrees(36, 14, -180, 70, 10),
      { wraps: true, north: 'beyond', south: 'beyond' },
    ],
    ['northern half', degrees(36, 9, -180, 90, 10), { wraps: true, north: 'pole', south: 'beyond' }],
    [
      'rows registered on the poles',
      degrees(36, 19, -180, 90, 10, true),
      { wraps: true, north: 'pole-row', south: 'pole-row' },
    ],
    ['two columns short', degrees(34, 18, -180, 90, 10), none],
    ['a cut-out at the pole', degrees(10, 9, 0, 90, 10), none],
  ])('%s', async (_, spec, frame) => {
    const terrain = await opened([spec]);
    expect(terrain.grid.frame).toMatchObject(frame);
    expect(terrain.droppedColumn).toBe(false);
  });

  test('a projected grid never wraps', async () => {
    const spec: TiffSpec = { width: 36, height: 18, values: ramp(36, 18), place: [-180, 90, 10, 10] };
    expect((await opened([spec])).grid.frame).toMatchObject(none);
  });

  test('a last column that repeats the first is dropped, and it is said', async () => {
    const terrain = await opened([degrees(37, 19, -180, 90, 10, true)]);
    expect(terrain.droppedColumn).toBe(true);
    expect([terrain.grid.width, terrain.grid.height]).toEqual([36, 19]);
    expect(terrain.grid.frame).toMatchObject({ wraps: true, north: 'pole-row', south: 'pole-row' });
    expect(Array.from(terrain.grid.elevationM.subarray(35, 38))).toEqual([35, 37, 38]);
    expect(terrain.notices).toEqual([
      {
        kind: 'duplicate-column',
        message: 'The last column lies on the first, 360° on; it was left out and is restored on writing.',
      },
    ]);
    expect(terrain.files[0].hashOf).toBe('file');
  });

  test('a window of a globe is a cut-out, unless it goes all the way round', async () => {
    const globe = degrees(36, 18, -180, 90, 10);
    const part = await opened([globe], { window: { column: 0, row: 0, width: 35, height: 18 } });
    expect(part.grid.frame).toMatchObject(none);
    const band = await opened([globe], { window: { column: 0, row: 0, width: 36, height: 3 } });
    expect(band.grid.frame).toMatchObject({ wraps: true, north: 'pole', south: 'beyond' });
  });
});

describe('real globes', () => {
  // WGS 84 ellipsoid, whole surface 510,065,621.724 km² (computed from the closed formula for an ellipsoid's area).
  test.each(['etopo60', 'etopo20'])(
    '%s has the area of the Earth, wraps and ends at the poles',
    async (name) => {
      const path = fileURLToPath(new URL(`../data/${name}.tif`, import.meta.url));
      const { grid } = await openTerrain([await fileSource(path)], { verticalUnit: 'm' });
      expect(grid.frame).toMatchObject({ wraps: true, north: 'pole', south: 'pole' });
      const km2 = (grid.metrics.areaM2.reduce((sum, area) => sum + area, 0) * grid.width) / 1e6;
      expect(km2).toBeCloseTo(510065621.724, 2);
    },
  );
});
