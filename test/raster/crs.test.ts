import { describe, expect, test } from 'vitest';
import { epsgFiles } from '../../src/node/epsg-files.ts';
import { crsFromEpsg } from '../../src/raster/crs.ts';
import { packagedEpsg } from '../../src/raster/epsg.ts';
import { fromCrs84, toCrs84, transformer } from '../../src/raster/transform.ts';
import { opened, ramp, refusal } from './open.ts';
import type { TiffSpec } from './tiff-builder.ts';

// IOGP Publication 373-7-2 (EPSG Guidance Note 7 part 2), worked examples of each method; values from memory.
// Each is computed from the geographic CRS that the projected one is based on, so that no datum shift enters.
describe('published examples of projections', () => {
  test.each<[string, number, number, [number, number], [number, number], number]>([
    [
      'Transverse Mercator, OSGB36 / British National Grid',
      27700,
      4277,
      [0.5, 50.5],
      [577274.99, 69740.5],
      0.01,
    ],
    [
      'Lambert Conic Conformal 1SP, JAD69 / Jamaica',
      24200,
      4242,
      [-(76 + 56 / 60 + 37.26 / 3600), 17 + 55 / 60 + 55.8 / 3600],
      [255966.58, 142493.51],
      0.01,
    ],
    [
      'Lambert Conic Conformal 2SP, NAD27 / Texas South Central',
      32040,
      4267,
      [-96, 28.5],
      [2963503.91, 254759.8],
      0.01,
    ],
    [
      'Lambert Azimuthal Equal Area, ETRS89 / LAEA Europe',
      3035,
      4258,
      [5, 50],
      [3962799.45, 2999718.85],
      0.01,
    ],
    ['Polar Stereographic B, Australian Antarctic', 3032, 4326, [120, -75], [7255380.79, 7053389.56], 0.01],
    ['Oblique Stereographic, Amersfoort / RD New', 28992, 4289, [6, 53], [196105.283, 557057.739], 0.01],
    ['Mercator 1SP, Makassar / NEIEZ', 3002, 4257, [120, -3], [5009726.58, 569150.82], 0.01],
  ])('%s', async (_, projected, geographic, lonLat, expected, tolerance) => {
    const crs = await crsFromEpsg(projected);
    const base = await crsFromEpsg(geographic);
    const [x, y] = transformer(base, crs)(...lonLat);
    expect(Math.abs(x - expected[0])).toBeLessThan(tolerance);
    expect(Math.abs(y - expected[1])).toBeLessThan(tolerance);
    const [lon, lat] = transformer(crs, base)(x, y);
    // Seen here: proj4 turns seven-parameter shifts round to first order only, which costs about a centimetre.
    expect(Math.hypot(lon - lonLat[0], lat - lonLat[1])).toBeLessThan(2e-7);
  });

  test('UTM: the central meridian is 500 km, the equator 0 (definition of the grid)', async () => {
    expect(fromCrs84(await crsFromEpsg(32631))(3, 0)).toEqual([500000, expect.closeTo(0, 6)]);
    expect(toCrs84(await crsFromEpsg(32731))(500000, 10_000_000)).toEqual([
      expect.closeTo(3, 9),
      expect.closeTo(0, 9),
    ]);
  });
});

describe('what a code tells', () => {
  // EPSG ellipsoids 7030, 7019, 7001 (axes from memory).
  test.each([
    [4326, { kind: 'geographic', name: 'WGS 84', unitM: null, semiMajorM: 6378137 }],
    [3035, { kind: 'projected', name: 'ETRS89-extended / LAEA Europe', unitM: 1, semiMajorM: 6378137 }],
    [27700, { kind: 'projected', unitM: 1, semiMajorM: 6377563.396 }],
    [4979, { kind: 'geographic', unitM: null }],
  ])('EPSG:%i', async (code, facts) => {
    expect(await crsFromEpsg(code)).toMatchObject({ ...facts, epsg: code });
  });

  test('US survey feet', async () => {
    expect((await crsFromEpsg(2263)).unitM).toBeCloseTo(1200 / 3937, 12);
  });

  test('both lookups tell the same', async () => {
    for (const code of [4326, 3035, 6360, 99999])
      expect(await epsgFiles(code)).toEqual(await packagedEpsg(code));
  });
});

describe('systems that are refused', () => {
  test.each([
    [
      99999,
      'EPSG:99999 is not in the register of coordinate reference systems; expected a projected or geographic CRS, so give the file the CRS that it is in.',
    ],
    [
      5703,
      'EPSG:5703 (NAVD88 height) is no projected or geographic CRS with a known definition; expected a projected or geographic CRS, so give the file the CRS that it is in.',
    ],
    [
      2048,
      'The axes of EPSG:2048 (Hartebeesthoek94 / Lo19) do not run east and north; expected a projected or geographic CRS, so give the file the CRS that it is in.',
    ],
  ])('EPSG:%i', async (code, sentence) => {
    expect(await refusal(crsFromEpsg(code))).toBe(`unsupported: ${sentence}`);
  });

  const small: TiffSpec = { width: 2, height: 2, values: ramp(2, 2) };
  const remedy = 'expected a projected or geographic CRS, so give the file the CRS that it is in.';
  test.each<[string, Partial<TiffSpec>, string]>([
    [
      'no keys',
      { tags: { 34735: null } },
      'a.tif tells no CRS (tag 34735); expected a GeoTIFF, so give the file the CRS that it is in.',
    ],
    [
      'an unknown code',
      {
        keys: [
          [1024, 1],
          [3072, 9999],
        ],
      },
      `EPSG:9999 is not in the register of coordinate reference systems; ${remedy}`,
    ],
    [
      'geocentric',
      {
        keys: [
          [1024, 3],
          [2048, 4978],
        ],
      },
      `a.tif has a CRS of kind 3 (key 1024); ${remedy}`,
    ],
    [
      'kinds mixed up',
      {
        keys: [
          [1024, 1],
          [3072, 4326],
        ],
      },
      `a.tif calls EPSG:4326 (WGS 84) a projected CRS; ${remedy}`,
    ],
    [
      'a CRS that inflates areas',
      {
        keys: [
          [1024, 1],
          [3072, 3857],
        ],
      },
      'The CRS of a.tif is EPSG:3857, in which areas are inflated (fourfold at 60° latitude); expected one to measure in, so warp the terrain to a local projected CRS or to EPSG:4326.',
    ],
    [
      'a method unknown',
      {
        keys: [
          [1024, 1],
          [1026, 'Town grid'],
          [2048, 4326],
          [3072, 32767],
          [3074, 32767],
          [3075, 99],
          [3076, 9001],
        ],
      },
      `The keys of a.tif define a CRS ("Town grid") that cannot be made out; ${remedy}`,
    ],
    [
      'grads',
      {
        keys: [
          [1024, 2],
          [2048, 32767],
          [2054, 9105],
          [2057, 6378137],
          [2059, 298.25],
        ],
      },
      `The keys of a.tif define a CRS ("user-defined") that cannot be made out; ${remedy}`,
    ],
    [
      "a unit beside the code that is not the code's",
      {
        keys: [
          [1024, 1],
          [3072, 2263],
          [3076, 9001],
        ],
      },
      'a.tif names EPSG:2263 (NAD83 / New York Long Island (ftUS)), whose unit is 0.3048006096012192 m, but gives another unit (key 3076: 1 m); mend the keys so that both agree.',
    ],
    [
      'keys that point nowhere',
      { tags: { 34735: { type: 3, values: [1, 1, 1, 1, 1026, 34737, 9, 50] } } },
      'CRS key 1026 of a.tif points to values 50 to 59 of tag 34737, which are not there; write the file anew.',
    ],
  ])('%s', async (_, spec, sentence) => {
    expect(await refusal(opened([{ ...small, ...spec }], { verticalUnit: 'm' }))).toMatch(
      /^(unsupported|unreadable): /,
    );
    expect(
      (await refusal(opened([{ ...small, ...spec }], { verticalUnit: 'm' }))).replace(/^\w+: /, ''),
    ).toBe(sentence);
  });

  test('a shift by a grid file that is not at hand is said', async () => {
    const terrain = await opened([
      {
        ...small,
        keys: [
          [1024, 1],
          [3072, 27700],
          [4099, 9001],
        ],
      },
    ]);
    expect(terrain.notices.map(({ kind }) => kind)).toEqual(['datum-shift']);
  });
});

describe('user-defined keys', () => {
  test('a geographic CRS by its ellipsoid', async () => {
    const keys: TiffSpec['keys'] = [
      [1024, 2],
      [2048, 32767],
      [2049, 'Old survey'],
      [2054, 9102],
      [2057, 6378245],
      [2059, 298.3],
      [4099, 9001],
    ];
    const { georeference } = await opened([
      { width: 2, height: 2, values: ramp(2, 2), place: [10, 50, 1, 1], keys: keys ?? [] },
    ]);
    // Krassowsky 1940, EPSG:7024: a = 6378245 m, 1/f = 298.3, so b = 6356863.0188 m (value from memory).
    expect(georeference.crs).toMatchObject({
      kind: 'geographic',
      name: 'Old survey',
      epsg: null,
      unitM: null,
      semiMajorM: 6378245,
    });
    expect(georeference.crs.semiMinorM).toBeCloseTo(6356863.0188, 4);
    expect(georeference.geoKeys).toMatchObject({ doubles: [6378245, 298.3], ascii: 'Old survey|' });
  });
});
