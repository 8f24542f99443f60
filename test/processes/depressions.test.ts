import type { MultiPolygon } from 'geojson';
import { fromArrayBuffer } from 'geotiff';
import { describe, expect, it } from 'vitest';
import type { Json } from '../../src/host/index.ts';
import { pondsOf } from './found-ponds.ts';
import { propertiesBy, turn } from './geojson-checks.ts';
import { crater, floorWithVoid, plane, twinPits, twoPonds } from './small-terrains.ts';

/** Read back by a general-purpose library. */
async function rasterOf(bytes: Uint8Array) {
  const image = await (await fromArrayBuffer(new Uint8Array(bytes).buffer)).getImage();
  const [band] = (await image.readRasters()) as unknown as [Float32Array];
  return { width: image.getWidth(), height: image.getHeight(), band: [...band] };
}

// Expected values on made terrain follow from the drawing by hand: areas are cells × 100 m², capacities the sums of
// depths × 100 m², catchments the cells whose steepest descent leads to the pond.
describe('two ponds, one above the other', async () => {
  const { ponds, pourPoints, byId, summary, bytes } = await pondsOf(twoPonds);
  const a = 'pit-2.1-sill-4.1';
  const b = 'pit-6.1-sill-7.1';

  it('reports every property of both', () => {
    expect(byId).toEqual({
      [a]: {
        id: a,
        parent: null,
        spillElevationM: 19,
        pitElevationM: 16,
        depthM: 3,
        areaM2: 200,
        capacityM3: 400,
        catchmentAreaM2: 1200,
        contributingAreaM2: 1200,
        spillsInto: b,
        touchesEdge: true,
        heldByOutlet: false,
      },
      [b]: {
        id: b,
        parent: null,
        spillElevationM: 13,
        pitElevationM: 10,
        depthM: 3,
        areaM2: 200,
        capacityM3: 400,
        catchmentAreaM2: 1200,
        contributingAreaM2: 2400,
        spillsInto: null,
        touchesEdge: true,
        heldByOutlet: false,
      },
    });
    expect(ponds.features.map(({ id }) => id).sort()).toEqual([a, b]);
  });

  it('puts pour points on the sill cells', () => {
    expect(propertiesBy(pourPoints, 'pond')).toEqual({
      [a]: { pond: a, spillElevationM: 19, spillsInto: b },
      [b]: { pond: b, spillElevationM: 13, spillsInto: null },
    });
    // 45 m east of the central meridian 3° E and 985 m north of the equator on the grid: there, degrees follow from
    // the radii a and a(1 − e²) and the scale 0.9996 (Snyder, Map Projections: A Working Manual, 1987, p. 60 f.).
    const [longitude, latitude] = pourPoints.features
      .filter(({ properties }) => properties?.pond === a)
      .flatMap(({ geometry }) => (geometry.type === 'Point' ? geometry.coordinates : []));
    expect(longitude).toBeCloseTo(3 + ((45 / (0.9996 * 6378137)) * 180) / Math.PI, 7);
    expect(latitude).toBeCloseTo(((985 / (0.9996 * 6335439.327)) * 180) / Math.PI, 7);
  });

  it('sums up, and gives the levels as a raster', async () => {
    expect(summary).toEqual({
      width: 10,
      height: 3,
      cells: 30,
      voids: 0,
      cellsWithoutOutlet: 0,
      ponds: 2,
      outermostPonds: 2,
      areaM2: 400,
      capacityM3: 800,
    });
    const { width, height, band } = await rasterOf(bytes);
    expect([width, height]).toEqual([10, 3]);
    expect(band.slice(10, 20)).toEqual([50, 20, 19, 19, 19, 13, 13, 13, 11, 5]);
    expect(new Set([...band.slice(0, 10), ...band.slice(20)])).toEqual(new Set([50]));
  });
});

describe('twin pits', () => {
  const outer = 'pit-3.1-sill-4.1';
  const west = 'pit-1.1-sill-2.1';
  const east = 'pit-3.1-sill-2.1';

  it('are one pond from outside', async () => {
    const { byId, summary } = await pondsOf(twinPits);
    expect(byId).toEqual({
      [outer]: {
        id: outer,
        parent: null,
        spillElevationM: 20,
        pitElevationM: 8,
        depthM: 12,
        areaM2: 300,
        capacityM3: 2800,
        catchmentAreaM2: 1200,
        contributingAreaM2: 1200,
        spillsInto: null,
        touchesEdge: true,
        heldByOutlet: false,
      },
    });
    expect(summary).toMatchObject({ ponds: 3, outermostPonds: 1, areaM2: 300, capacityM3: 2800 });
  });

  it('are three ponds with nested ones, under the same names', async () => {
    const { byId, pourPoints } = await pondsOf(twinPits, { inputs: { nested: true } });
    expect(byId).toMatchObject({
      [outer]: { parent: null, spillsInto: null, areaM2: 300, capacityM3: 2800 },
      [west]: {
        parent: outer,
        spillElevationM: 14,
        pitElevationM: 10,
        depthM: 4,
        areaM2: 100,
        capacityM3: 400,
        catchmentAreaM2: 600,
        spillsInto: east,
      },
      [east]: {
        parent: outer,
        spillElevationM: 14,
        pitElevationM: 8,
        depthM: 6,
        areaM2: 100,
        capacityM3: 600,
        catchmentAreaM2: 600,
        spillsInto: west,
      },
    });
    expect(Object.keys(byId)).toHaveLength(3);
    expect(pourPoints.features).toHaveLength(3);
  });

  it.each<[string, Json, string[]]>([
    ['minDepth', 4.5, [east, outer]],
    ['minDepth', 12, [outer]],
    ['minDepth', 12.1, []],
    ['minArea', 101, [outer]],
    ['minCapacity', 400.5, [east, outer]],
  ])('are filtered by %s %d, and refer to written ponds only', async (name, least, kept) => {
    const { byId, summary } = await pondsOf(twinPits, { inputs: { nested: true, [name]: least } });
    expect(Object.keys(byId).sort()).toEqual(kept);
    if (kept.includes(east)) expect(byId[east]).toMatchObject({ parent: outer, spillsInto: null });
    expect(summary).toMatchObject({ ponds: 3, outermostPonds: 1, capacityM3: 2800 });
  });
});

describe('depressions', () => {
  it('tells a pond whose ground does not reach the edge', async () => {
    const { ponds, byId } = await pondsOf(crater);
    expect(byId).toMatchObject({
      'pit-3.3-sill-2.2': {
        areaM2: 100,
        capacityM3: 600,
        catchmentAreaM2: 900,
        contributingAreaM2: 900,
        touchesEdge: false,
      },
    });
    // One cell: a square of 5 positions.
    expect((ponds.features[0].geometry as MultiPolygon).coordinates[0][0]).toHaveLength(5);
  });

  it('cuts holes out of ponds, clockwise', async () => {
    const { ponds, byId } = await pondsOf([
      [9, 9, 9, 9, 9],
      [9, 2, 2, 2, 9],
      [9, 2, 9, 2, 9],
      [9, 2, 2, 2, 9],
      [9, 9, 9, 9, 9],
    ]);
    const { coordinates } = ponds.features[0].geometry as MultiPolygon;
    expect(coordinates.map((polygon) => polygon.length)).toEqual([2]);
    expect(turn(coordinates[0][0]) / turn(coordinates[0][1])).toBeCloseTo(-9, 1);
    expect(Object.values(byId)).toMatchObject([{ areaM2: 800, capacityM3: 5600 }]);
  });

  it('gives empty collections where no water stands', async () => {
    const { ponds, pourPoints, summary, bytes } = await pondsOf(plane);
    expect(ponds).toEqual({ type: 'FeatureCollection', features: [] });
    expect(pourPoints).toEqual({ type: 'FeatureCollection', features: [] });
    expect(summary).toMatchObject({ cells: 40, ponds: 0, outermostPonds: 0, areaM2: 0, capacityM3: 0 });
    expect((await rasterOf(bytes)).band).toEqual(plane.flat());
  });

  it('lets water into voids where asked to', async () => {
    const walls = await pondsOf(floorWithVoid);
    expect(Object.values(walls.byId)).toMatchObject([{ areaM2: 800, capacityM3: 4000, spillElevationM: 9 }]);
    expect(walls.summary).toMatchObject({ voids: 1 });
    expect((await rasterOf(walls.bytes)).band[12]).toBeNaN();
    for (const inputs of [{ voids: 'all' }, { outlets: ['voids'] }] as const) {
      expect((await pondsOf(floorWithVoid, { inputs })).summary).toMatchObject({ ponds: 0 });
    }
  });

  it('runs diagonally with 8 neighbours and not with 4', async () => {
    const diagonal = [
      [9, 9, 9, 9],
      [9, 4, 9, 9],
      [9, 9, 3, 2],
      [9, 9, 9, 9],
    ];
    expect((await pondsOf(diagonal)).summary).toMatchObject({ ponds: 0 });
    const four = await pondsOf(diagonal, { inputs: { neighbours: 4 } });
    expect(Object.values(four.byId)).toMatchObject([
      { pitElevationM: 4, spillElevationM: 9, capacityM3: 500 },
    ]);
  });

  it('converts feet, and takes unit and level from one file', async () => {
    const feet = await pondsOf(twoPonds, { place: { verticalUnit: 9002 } });
    expect(feet.byId['pit-2.1-sill-4.1']).toMatchObject({ spillElevationM: 5.7912, pitElevationM: 4.8768 });
    // 400 m³ with depths in feet: 0.3048 of them (international foot).
    expect(feet.byId['pit-2.1-sill-4.1']).toHaveProperty('capacityM3', expect.closeTo(400 * 0.3048, 4));
    expect(feet.byId['pit-2.1-sill-4.1']).toHaveProperty('depthM', 0.9144);
  });

  it('cuts ponds at the antimeridian and keeps longitudes within 180°', async () => {
    const rows = Array.from({ length: 6 }, (_, row) =>
      Array.from({ length: 10 }, (_, column) =>
        row === 2 && column > 2 && column < 8 ? 1 : 5 - column / 128,
      ),
    );
    const { ponds, pourPoints } = await pondsOf(rows, {
      place: { epsg: 4326, west: 175, north: 3, cellSize: 1 },
    });
    const { coordinates } = ponds.features[0].geometry as MultiPolygon;
    const extents = coordinates.map(([ring]) => {
      const longitudes = ring.map(([longitude]) => longitude);
      return [Math.min(...longitudes), Math.max(...longitudes)];
    });
    expect(extents).toEqual([
      [178, 180],
      [-180, -177],
    ]);
    expect(pourPoints.features.map(({ geometry }) => geometry)).toEqual([
      { type: 'Point', coordinates: [-176.5, 1.5] },
    ]);
  });

  it('keeps the repeated last column of a globe in its raster', async () => {
    const globe = Array.from({ length: 18 }, (_, row) =>
      Array.from({ length: 37 }, (_, column) => (row === 9 && column % 36 === 0 ? -5 : (column % 36) + row)),
    );
    const { bytes, summary, notes } = await pondsOf(globe, {
      inputs: { outlets: ['deepest'] },
      place: { epsg: 4326, west: -180, north: 90, cellSize: 10 },
    });
    const { width, height, band } = await rasterOf(bytes);
    expect([width, height]).toEqual([37, 18]);
    for (let row = 0; row < 18; row++) expect(band[row * 37 + 36]).toBe(band[row * 37]);
    expect(summary).toMatchObject({ width: 36, height: 18, cells: 648 });
    expect(notes).toContain(
      'The last column lies on the first, 360° on; it was left out and is restored on writing.',
    );
  });
});
