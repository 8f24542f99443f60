import type { Feature, FeatureCollection, Geometry, Position } from 'geojson';
import { describe, expect, it } from 'vitest';
import type { Json } from '../../src/host/index.ts';
import { depressions } from '../../src/processes/index.ts';
import { transformer } from '../../src/raster/transform.ts';
import { foundPonds } from './found-ponds.ts';
import { runInMemory, terrainFile } from './made-terrain.ts';
import { floorWithVoid, twoPonds } from './small-terrains.ts';

const toLonLat = transformer(
  { proj4: '+proj=utm +zone=31 +datum=WGS84 +units=m +no_defs' },
  { proj4: '+proj=longlat +datum=WGS84 +no_defs' },
);
/** Longitude and latitude of a point of the made terrain, by column and row as fractions. */
const at = (column: number, row: number): Position => toLonLat(500_000 + 10 * column, 1000 - 10 * row);
const feature = (geometry: Geometry | null, properties: Feature['properties'] = {}) =>
  ({ type: 'Feature', properties, geometry }) as Feature;
const collection = (...features: Feature[]): FeatureCollection => ({ type: 'FeatureCollection', features });

const box = (west: number, north: number, east: number, south: number): Position[] => [
  at(west, north),
  at(west, south),
  at(east, south),
  at(east, north),
  at(west, north),
];
const pitOfA: Geometry = { type: 'Point', coordinates: at(2.5, 1.5) };

async function withOutlets(
  document: unknown,
  rows: readonly (readonly number[])[] = twoPonds,
  inputs: Readonly<Record<string, Json>> = {},
) {
  const text = typeof document === 'string' ? document : JSON.stringify(document);
  const files = { 'made.tif': await terrainFile(rows), 'reach.geojson': text };
  return foundPonds(await runInMemory(depressions, files, { outlets: ['reach.geojson'], ...inputs }));
}

const a = 'pit-2.1-sill-4.1';
const b = 'pit-6.1-sill-7.1';

describe('outlets from GeoJSON', () => {
  it.each<[string, unknown]>([
    ['a point', pitOfA],
    ['a feature', feature(pitOfA)],
    ['a collection', collection(feature(pitOfA))],
    ['a text with a byte order mark', `\uFEFF${JSON.stringify(pitOfA)}`],
    ['several points', { type: 'MultiPoint', coordinates: [at(2.5, 1.5), at(2.4, 1.4)] }],
    ['a line', { type: 'LineString', coordinates: [at(2.5, 0.5), at(2.5, 2.5)] }],
    ['lines', { type: 'MultiLineString', coordinates: [[at(2.5, 0.5), at(2.5, 2.5)]] }],
    ['a polygon', { type: 'Polygon', coordinates: [box(2, 0, 3, 3)] }],
    ['a polygon within one cell', { type: 'Polygon', coordinates: [box(2.1, 1.1, 2.2, 1.2)] }],
    ['polygons', { type: 'MultiPolygon', coordinates: [[box(2, 1, 3, 2)]] }],
    ['a collection of geometries', { type: 'GeometryCollection', geometries: [pitOfA] }],
    ['a point, and ground outside', { type: 'MultiPoint', coordinates: [at(2.5, 1.5), at(70, 1.5)] }],
  ])('drain the pond under %s', async (_, document) => {
    const { byId } = await withOutlets(document);
    expect(Object.keys(byId)).toEqual([b]);
    // What runs to the outlet leaves there: nothing of pond A arrives at B any more.
    expect(byId[b]).toMatchObject({ contributingAreaM2: 1200 });
  });

  it('leave out the hole of a polygon', async () => {
    const { byId } = await withOutlets({ type: 'Polygon', coordinates: [box(1, 0, 4, 3), box(2, 1, 3, 2)] });
    // Pit and sill of A lie in columns 2 and 4; only column 3 and the walls around are outlets, so 18 is the brim.
    expect(Object.values(byId)).toMatchObject([
      { spillElevationM: 18, pitElevationM: 16 },
      { pitElevationM: 10 },
    ]);
  });

  it('hold the water at their level', async () => {
    const { byId, notes } = await withOutlets(feature(pitOfA, { levelM: 17.5 }));
    // Depth 1.5 m over the pit, which is the only cell below that level.
    expect(Object.values(byId)).toMatchObject([
      { spillElevationM: 17.5, depthM: 1.5, areaM2: 100, capacityM3: 150, heldByOutlet: true },
      { pitElevationM: 10, heldByOutlet: false },
    ]);
    expect(notes).toContain(
      '1 outermost pond stands at the level of water outside an outlet (heldByOutlet); its capacity is no storage of the ground.',
    );
  });

  it('are told of in the plural where they hold several ponds', async () => {
    const pitOfB: Geometry = { type: 'Point', coordinates: at(6.5, 1.5) };
    const { notes } = await withOutlets(
      collection(feature(pitOfA, { levelM: 17.5 }), feature(pitOfB, { levelM: 11 })),
    );
    expect(notes).toContain(
      '2 outermost ponds stand at the level of water outside an outlet (heldByOutlet); their capacity is no storage of the ground.',
    );
  });

  it('take the lowest of several levels, and none above the sill', async () => {
    const levels = (...all: (number | null)[]) =>
      withOutlets(collection(...all.map((levelM) => feature(pitOfA, { levelM }))));
    expect(Object.values((await levels(18.5, 17.5)).byId)[0]).toMatchObject({ spillElevationM: 17.5 });
    expect(Object.keys((await levels(17.5, null)).byId)).toEqual([b]);
    expect((await levels(40)).byId[a]).toMatchObject({ spillElevationM: 19, heldByOutlet: false });
  });

  it('stand beside typed ones', async () => {
    const { summary } = await withOutlets(pitOfA, twoPonds, { outlets: ['reach.geojson', '500065,985'] });
    expect(summary).toMatchObject({ ponds: 0 });
  });

  it('work alone where the edges are closed', async () => {
    const deepest = await withOutlets(pitOfA, twoPonds, { edges: 'closed' });
    // The only way out is now the pit of A: B fills to A's sill, 19 m.
    expect(Object.values(deepest.byId)).toMatchObject([
      { spillElevationM: 19, pitElevationM: 5, capacityM3: 100 * (7 + 9 + 6 + 8 + 14) },
    ]);
  });
});

/** A globe of 10° cells that begins at Greenwich, with a valley along 185° and a hollow in it. */
describe('outlets on a grid of longitudes 0 to 360', async () => {
  const rows = Array.from({ length: 18 }, (_, row) =>
    Array.from({ length: 36 }, (_, column) =>
      row === 9 && column === 18 ? 1 : 5 + Math.abs(column - 18) / 64,
    ),
  );
  const globe = await terrainFile(rows, { epsg: 4326, west: 0, north: 90, cellSize: 10 });
  const summaryWith = async (geometry: Geometry) => {
    const files = { 'globe.tif': globe, 'reach.geojson': JSON.stringify(geometry) };
    const inputs = { outlets: ['reach.geojson'] };
    return foundPonds(await runInMemory(depressions, files, inputs)).summary;
  };

  it('cross Greenwich the short way', async () => {
    // Were the line drawn the long way round, it would run through the hollow at 185° and drain it.
    const line = await summaryWith({
      type: 'LineString',
      coordinates: [
        [-5, -5],
        [5, -5],
      ],
    });
    expect(line).toMatchObject({ ponds: 1 });
    const ring = [
      [-15, -10],
      [15, -10],
      [15, 0],
      [-15, 0],
      [-15, -10],
    ];
    expect(await summaryWith({ type: 'Polygon', coordinates: [ring] })).toMatchObject({ ponds: 1 });
  });

  it('are found beyond 180° as well as before', async () => {
    for (const longitude of [-175, 185]) {
      const summary = await summaryWith({ type: 'Point', coordinates: [longitude, -5] });
      expect(summary).toMatchObject({ ponds: 0 });
    }
  });
});

describe('outlets are refused', () => {
  const cross: Position[] = [at(1, 0), at(4, 3), at(4, 0), at(1, 3), at(1, 0)];
  it.each<[string, unknown, string | RegExp]>([
    ['when not JSON', '{"type":', /^reach\.geojson is not JSON \(.+\); expected a GeoJSON file\.$/],
    [
      'when JSON of another kind',
      { kind: 'x' },
      'reach.geojson holds "object"; expected a GeoJSON FeatureCollection, Feature or geometry.',
    ],
    ['when null', null, 'reach.geojson holds "object"; expected a GeoJSON FeatureCollection'],
    [
      'when of a wrong type',
      { type: 'Topology' },
      'reach.geojson holds "Topology"; expected a GeoJSON FeatureCollection, Feature or geometry.',
    ],
    [
      'without geometry',
      collection(feature(pitOfA), feature(null)),
      'Feature 2 of reach.geojson has the geometry null; expected points, lines or polygons.',
    ],
    [
      'with an unknown geometry',
      { type: 'Circle', coordinates: [0, 0] },
      'Feature 1 of reach.geojson has the geometry "Circle"; expected points, lines or polygons.',
    ],
    [
      'with a feature that is none',
      { type: 'FeatureCollection', features: [null] },
      /^Feature 1 of .* is not as GeoJSON has it; expected .*, so mend the file\.$/,
    ],
    ['with a line of numbers', { type: 'LineString', coordinates: [1, 2] }, /is not as GeoJSON has it/],
    ['without coordinates', feature({ type: 'Polygon' } as Geometry), /is not as GeoJSON has it/],
    [
      'with a position that is none',
      { type: 'Point', coordinates: ['3', 0] },
      'Feature 1 of reach.geojson has the position ["3",0]; expected longitude and latitude in degrees.',
    ],
    [
      'in metres',
      { type: 'Point', coordinates: [500_025, 985] },
      'Feature 1 of reach.geojson has the position [500025,985]; expected longitude and latitude in degrees.',
    ],
    [
      'outside the terrain',
      { type: 'Point', coordinates: [4, 0.0089] },
      'Feature 1 of reach.geojson lies outside the terrain; give outlets inside it, as GeoJSON in longitude and latitude (CRS84).',
    ],
    [
      'when a polygon crosses itself',
      { type: 'Polygon', coordinates: [cross] },
      /^Feature 1 of reach\.geojson is a polygon that crosses itself at 3\.0002\d\d,0\.0089\d\d; mend its outline\.$/,
    ],
    [
      'when a polygon is open',
      { type: 'Polygon', coordinates: [box(1, 0, 4, 3).slice(0, 4)] },
      /^Feature 1 of reach\.geojson is a polygon with a ring of 4 positions from .*; expected at least 4, the last like the first, so close it\.$/,
    ],
    [
      'when a level is no number',
      feature(pitOfA, { levelM: '17.5' }),
      'Feature 1 of reach.geojson has the level "17.5"; expected a number of metres from -3.4e38 to 3.4e38 as "levelM", or none.',
    ],
    [
      'when a level became infinite as float32',
      feature(pitOfA, { levelM: 1e39 }),
      'Feature 1 of reach.geojson has the level 1e+39; expected a number of metres from -3.4e38 to 3.4e38 as "levelM", or none.',
    ],
  ])('%s', async (_, document, message) => {
    await expect(withOutlets(document)).rejects.toThrow(message);
    await expect(withOutlets(document)).rejects.toMatchObject({ code: 'bad-input' });
  });

  it('when they lie only on voids', async () => {
    await expect(withOutlets({ type: 'Point', coordinates: at(2.5, 2.5) }, floorWithVoid)).rejects.toThrow(
      'Feature 1 of reach.geojson lies only on cells without elevation; name "voids" as outlet, or move it onto known ground.',
    );
  });
});
