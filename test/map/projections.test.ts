import Projection from 'ol/proj/Projection.js';
import { get, getTransform, transform } from 'ol/proj.js';
import proj4 from 'proj4';
import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { terrainProjection, viewToTerrain } from '../../src/map/projections.ts';
import { cellAt, readOut } from '../../src/map/read-out.ts';
import { madeView, utm33, wgs84 } from './made-view.ts';

const { georeference } = madeView({ width: 1, height: 1 });
const userDefined = {
  ...georeference,
  crs: {
    ...utm33,
    epsg: null,
    proj4: '+proj=tmerc +lat_0=0 +lon_0=14 +k=1 +x_0=500000 +y_0=0 +datum=WGS84 +units=m',
  },
};

describe('terrainProjection', () => {
  it('is the one that the library knows already', () => {
    expect(terrainProjection({ ...georeference, crs: wgs84 })).toBe(get('EPSG:4326'));
  });

  it('registers a user-defined CRS with extent, both ways to degrees and to web mercator', () => {
    const projection = terrainProjection(userDefined);
    expect(terrainProjection(userDefined)).toBe(projection);
    expect(projection.getExtent()).not.toBeNull();
    expect(projection.getMetersPerUnit()).toBe(1);
    // Source: proj4 by itself.
    const exact = proj4('EPSG:4326', userDefined.crs.proj4).forward([14.1, 47.9]);
    const mercator = proj4('EPSG:4326', 'EPSG:3857').forward([14.1, 47.9]);
    for (const [from, point] of [
      ['EPSG:4326', [14.1, 47.9]],
      ['EPSG:3857', mercator],
    ] as const) {
      const there = transform([...point], from, projection);
      expect(there[0]).toBeCloseTo(exact[0], 5);
      expect(there[1]).toBeCloseTo(exact[1], 5);
      const back = transform(exact, projection, from);
      expect(back[0]).toBeCloseTo(point[0], 5);
      expect(back[1]).toBeCloseTo(point[1], 5);
    }
  });
});

describe('viewToTerrain', () => {
  it('leaves coordinates of the terrain’s own CRS as they are', () => {
    expect(viewToTerrain(terrainProjection(userDefined), userDefined.crs)(1 / 3, 2 / 3)).toEqual([
      1 / 3,
      2 / 3,
    ]);
  });

  // Source: proj4, asked directly for the whole way.
  it('leads web mercator to UTM as proj4 does', () => {
    const view = get('EPSG:3857');
    if (!view) throw new Error('no web mercator');
    const exact = proj4('EPSG:3857', utm33.proj4).forward([1_565_600, 6_080_250]);
    const found = viewToTerrain(view, utm33)(1_565_600, 6_080_250);
    expect(found[0]).toBeCloseTo(exact[0], 5);
    expect(found[1]).toBeCloseTo(exact[1], 5);
  });

  it('says what to do about a projection without a way to degrees', () => {
    const view = new Projection({ code: 'somewhere', units: 'pixels', extent: [0, 0, 1, 1] });
    expect(() => viewToTerrain(view, utm33)).toThrow(
      new OverbrimError(
        'unsupported',
        "The view's projection is somewhere, from which no way to EPSG:4326 is known; register it with proj4 before the map is made.",
      ),
    );
    expect(getTransform('EPSG:4326', 'EPSG:3857')).toBeTypeOf('function');
  });
});

describe('readOut', () => {
  const view = get('EPSG:4326');
  if (!view) throw new Error('no degrees');
  const survey = madeView({
    width: 4,
    height: 2,
    wraps: true,
    georeference: { ...georeference, crs: wgs84, west: -180, north: 90, cellWidth: 90, cellHeight: 90 },
    elevationM: Float32Array.of(1, 2, 3, Number.NaN, 5, 6, 7, 8),
    leaf: Int32Array.of(0, 0, 1, -1, 2, 0, 1, 2),
    levelM: Float32Array.of(2, 4.5, Number.POSITIVE_INFINITY),
    pondOfLeaf: Int32Array.of(0, 1, -1),
    ponds: ['one', 'two'],
  });

  it.each([
    ['wet', [-170, 10], { cell: 0, column: 0, row: 0, groundM: 1, waterM: 2, depthM: 1, pond: 'one' }],
    ['level at ground', [-80, 10], { cell: 1, groundM: 2, waterM: null, depthM: 0, pond: null }],
    ['another copy of the world', [370, 10], { cell: 2, groundM: 3, waterM: 4.5, depthM: 1.5, pond: 'two' }],
    ['void', [100, 10], { cell: 3, groundM: null, waterM: null, depthM: null, pond: null }],
    [
      'no way to an outlet',
      [-170, -10],
      { cell: 4, row: 1, groundM: 5, waterM: null, depthM: 0, pond: null },
    ],
  ] as const)('tells of a cell: %s', (_, place, expected) => {
    expect(readOut(survey, view, place)).toMatchObject(expected);
  });

  it('is null beside the terrain', () => {
    expect(readOut(madeView({ width: 3, height: 3 }), view, [0, 0])).toBeNull();
    expect(cellAt(madeView({ width: 3, height: 3 }), 430_015, 5_299_990)).toBe(-1);
    expect(cellAt(madeView({ width: 3, height: 3 }), 430_014.9, 5_299_990)).toBe(8);
  });

  it('takes other levels', () => {
    expect(readOut(survey, view, [-170, 10], Float32Array.of(9, 9, 9))).toMatchObject({ depthM: 8 });
  });
});
