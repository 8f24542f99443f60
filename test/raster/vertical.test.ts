import { describe, expect, test } from 'vitest';
import { opened, refusal } from './open.ts';
import type { TiffSpec } from './tiff-builder.ts';

const utm = [
  [1024, 1],
  [3072, 32631],
] as const;
const heights = (...keys: (readonly [number, number | string])[]): TiffSpec => ({
  width: 2,
  height: 1,
  values: [100, 200],
  keys: [...utm, ...keys],
});

// foot 0.3048 m, US survey foot 1200/3937 m (85 FR 62698); EPSG units 9001, 9002, 9003; EPSG vertical CRS 5703, 6360,
// 8228, 3855, 5773 and, axis down, 6357 and 6358.
describe('unit and datum of heights', () => {
  test.each<[string, TiffSpec, 'm' | 'ft' | 'us-ft' | undefined, number, string | null]>([
    ['unit key metre', heights([4099, 9001]), undefined, 1, null],
    ['unit key foot', heights([4099, 9002]), undefined, 0.3048, null],
    ['unit key US survey foot', heights([4099, 9003]), undefined, 1200 / 3937, null],
    ['EPSG:5703', heights([4096, 5703]), undefined, 1, 'North American Vertical Datum 1988'],
    ['EPSG:6360', heights([4096, 6360]), undefined, 1200 / 3937, 'North American Vertical Datum 1988'],
    ['EPSG:8228', heights([4096, 8228]), undefined, 0.3048, 'North American Vertical Datum 1988'],
    ['EPSG:3855', heights([4096, 3855]), undefined, 1, 'EGM2008 geoid'],
    ['EPSG:5773', heights([4096, 5773]), undefined, 1, 'EGM96 geoid'],
    [
      'a user-defined datum',
      heights([4096, 32767], [4097, 'Town gauge'], [4099, 9002]),
      undefined,
      0.3048,
      'Town gauge',
    ],
    ['the option m', heights(), 'm', 1, null],
    ['the option ft', heights(), 'ft', 0.3048, null],
    ['the option us-ft', heights(), 'us-ft', 1200 / 3937, null],
    [
      'option and file agree',
      heights([4096, 6360]),
      'us-ft',
      1200 / 3937,
      'North American Vertical Datum 1988',
    ],
  ])('%s', async (_, spec, verticalUnit, metres, datum) => {
    const { grid, verticalDatum } = await opened([spec], verticalUnit ? { verticalUnit } : {});
    expect(Array.from(grid.elevationM)).toEqual([Math.fround(100 * metres), Math.fround(200 * metres)]);
    expect(verticalDatum).toBe(datum);
  });

  test('ellipsoidal heights are named as such', async () => {
    expect((await opened([heights([4096, 4979])])).verticalDatum).toBe('ellipsoid of WGS 84');
  });

  test('depths below a datum become heights, and it is said', async () => {
    const terrain = await opened([heights([4096, 6357])]);
    expect(Array.from(terrain.grid.elevationM)).toEqual([-100, -200]);
    expect(terrain.notices).toEqual([
      {
        kind: 'vertical-datum',
        message:
          'a.tif holds depths below North American Vertical Datum 1988; they became heights by changing the sign.',
      },
    ]);
    expect(Array.from((await opened([heights([4096, 6358])])).grid.elevationM)).toEqual(
      [100, 200].map((depth) => Math.fround((-depth * 1200) / 3937)),
    );
  });

  test('never from the horizontal unit', async () => {
    const spec: TiffSpec = {
      ...heights(),
      keys: [
        [1024, 1],
        [3072, 2263],
        [3076, 9003],
      ],
    };
    expect(await refusal(opened([spec]))).toBe(
      'unit-missing: a.tif does not say in which unit its elevations are; give --vertical-unit m|ft|us-ft.',
    );
  });
});

describe('units that are refused', () => {
  test('the option against the file', async () => {
    expect(await refusal(opened([heights([4096, 6360])], { verticalUnit: 'm' }))).toBe(
      'bad-input: a.tif says that its elevations are in US survey feet, but --vertical-unit m was given; leave the option out or mend the file.',
    );
  });

  test('the file against itself', async () => {
    expect(await refusal(opened([heights([4096, 5703], [4099, 9002])]))).toBe(
      'unsupported: a.tif contradicts itself: its vertical CRS is in metres, its vertical unit key says feet; mend the keys so that both agree.',
    );
  });

  test('an unknown unit', async () => {
    expect(await refusal(opened([heights([4099, 9036])]))).toBe(
      'unsupported: a.tif has elevations in unit EPSG:9036; expected 9001 (metre), 9002 (foot) or 9003 (US survey foot), so convert them first.',
    );
  });
});
