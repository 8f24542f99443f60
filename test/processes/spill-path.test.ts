import { Geodesic } from 'geographiclib-geodesic';
import { describe, expect, it } from 'vitest';
import type { Json } from '../../src/host/index.ts';
import { spillPath } from '../../src/processes/index.ts';
import { checkGeoJson } from './geojson-checks.ts';
import { documentOf, type MadePlace, runInMemory, terrainFile } from './made-terrain.ts';
import { crater, twoPonds } from './small-terrains.ts';

async function pathOf(
  rows: readonly (readonly number[])[],
  from: string,
  { inputs, place }: { inputs?: Readonly<Record<string, Json>>; place?: MadePlace } = {},
) {
  const file = { 'made.tif': await terrainFile(rows, place) };
  const { outputs, notes } = await runInMemory(spillPath, file, { from, ...inputs });
  const legs = checkGeoJson(documentOf(outputs['spill-path'])).features;
  const section = documentOf(outputs['long-section']) as Section;
  return { legs, properties: legs.map(({ properties }) => properties), section, notes };
}

interface Section {
  readonly crs: string;
  readonly lengthM: number;
  readonly endsAt: string;
  readonly stations: readonly {
    leg: number;
    kind: string;
    distanceM: number;
    x: number;
    y: number;
    groundM: number;
    waterM: number;
  }[];
  readonly sills: readonly unknown[];
}

// Expected values follow from the drawing by hand: centres of cells lie 10 m apart.
describe('from the wall above two ponds', async () => {
  const { legs, properties, section } = await pathOf(twoPonds, '500015,995');
  const a = 'pit-2.1-sill-4.1';
  const b = 'pit-6.1-sill-7.1';

  it('goes leg by leg over land and through both ponds to the edge', () => {
    const leg = (
      number: number,
      kind: string,
      pond: string | null,
      lengthM: number,
      from: number,
      to: number,
    ) => ({
      leg: number,
      kind,
      pond,
      lengthM,
      dropM: from - to,
      slope: (from - to) / lengthM,
      fromElevationM: from,
      toElevationM: to,
      storageM3: pond === null ? 0 : 400,
      endsAt: number === 5 ? 'outlet' : null,
    });
    expect(properties).toEqual([
      leg(1, 'land', null, 20, 50, 19),
      leg(2, 'pond', a, 20, 19, 19),
      leg(3, 'land', null, 10, 19, 13),
      leg(4, 'pond', b, 20, 13, 13),
      leg(5, 'land', null, 20, 13, 5),
    ]);
  });

  it('joins its legs end to end', () => {
    const lines = legs.map(({ geometry }) => (geometry.type === 'LineString' ? geometry.coordinates : []));
    expect(lines.map((line) => line.length)).toEqual([3, 3, 2, 3, 3]);
    for (let i = 1; i < lines.length; i++) expect(lines[i][0]).toEqual(lines[i - 1].at(-1));
  });

  it('gives ground and water along it', () => {
    const { stations, sills } = section;
    expect(stations.map(({ distanceM }) => distanceM)).toEqual([0, 10, 20, 30, 40, 50, 60, 70, 80, 90]);
    expect(stations.map(({ groundM }) => groundM)).toEqual([50, 20, 16, 18, 19, 12, 10, 13, 11, 5]);
    expect(stations.map(({ waterM }) => waterM)).toEqual([50, 20, 19, 19, 19, 13, 13, 13, 11, 5]);
    expect(stations.map(({ leg }) => leg)).toEqual([1, 1, 1, 2, 2, 3, 4, 4, 5, 5]);
    expect(stations[0]).toMatchObject({ x: 500_015, y: 995, kind: 'land' });
    expect(stations[9]).toMatchObject({ x: 500_095, y: 985, kind: 'land' });
    expect(sills).toEqual([
      { distanceM: 40, elevationM: 19, pond: a },
      { distanceM: 70, elevationM: 13, pond: b },
    ]);
    expect(section).toMatchObject({ crs: 'WGS 84 / UTM zone 31N', lengthM: 90, endsAt: 'outlet' });
  });
});

describe('spill path', () => {
  it('starts at a place in longitude and latitude as well', async () => {
    const own = await pathOf(twoPonds, '500025,985');
    const { stations } = own.section;
    // The equator and 3° E are the grid's origin; a degree is about 111 km here (check by hand, to a cell).
    const degrees = await pathOf(twoPonds, '3.000225,0.00891', { inputs: { crs: 'EPSG:4326' } });
    expect(degrees.section).toEqual(own.section);
    expect(stations[0]).toMatchObject({ x: 500_025, y: 985, kind: 'pond', groundM: 16, waterM: 19 });
  });

  it('measures diagonal steps as such', async () => {
    const { properties } = await pathOf(
      [
        [9, 9, 9, 9],
        [9, 4, 9, 9],
        [9, 9, 3, 9],
        [9, 9, 9, 2],
      ],
      '500015,985',
    );
    expect(properties).toMatchObject([{ kind: 'land', dropM: 2 }]);
    expect(properties[0]?.lengthM).toBeCloseTo(2 * Math.hypot(10, 10), 9);
    expect(properties[0]?.slope).toBeCloseTo(2 / (2 * Math.hypot(10, 10)), 9);
  });

  it('ends in a pit that no way leads out of, and says so', async () => {
    const closed = crater.map((row) => row.map((z) => (z === 5 ? Number.NaN : z)));
    const { properties, section, notes } = await pathOf(closed, '500025,975');
    expect(properties).toMatchObject([
      { kind: 'land', fromElevationM: 9, toElevationM: 3, endsAt: 'no-way', storageM3: 0 },
    ]);
    expect(section.endsAt).toBe('no-way');
    expect(notes).toContain(
      'The path ends in a pit from which no way leads to any outlet, since voids or closed edges enclose it.',
    );
    expect(notes).toContain(
      '9 cells in 1 catchment have no way to any outlet, since voids or closed edges enclose them; they get no brim level and no pond.',
    );
  });

  it('spoke of 1 cells in 1 catchments that have no way: it minds the number', async () => {
    const hole = [
      [5, 5, 5, 5, 5],
      [5, Number.NaN, Number.NaN, Number.NaN, 5],
      [5, Number.NaN, 3, Number.NaN, 5],
      [5, Number.NaN, Number.NaN, Number.NaN, 5],
      [5, 5, 5, 5, 5],
    ];
    const { notes } = await pathOf(hole, '500025,975');
    expect(notes).toContain(
      '1 cell in 1 catchment has no way to any outlet, since voids or closed edges enclose it; it gets no brim level and no pond.',
    );
  });

  it('is cut where it crosses the antimeridian', async () => {
    const row = [9, 8, 7, 6, 5, 4, 3, 2, 1, 0];
    const high = row.map(() => 20);
    const { legs, properties, section } = await pathOf([high, row, high], '178.5,0.5', {
      place: { epsg: 4326, west: 175, north: 2, cellSize: 1 },
    });
    expect(legs.map(({ geometry }) => geometry)).toEqual([
      {
        type: 'MultiLineString',
        coordinates: [
          [
            [178.5, 0.5],
            [179.5, 0.5],
            [180, 0.5],
          ],
          [
            [-180, 0.5],
            [-179.5, 0.5],
            [-178.5, 0.5],
            [-177.5, 0.5],
            [-176.5, 0.5],
            [-175.5, 0.5],
          ],
        ],
      },
    ]);
    expect(section.stations.map(({ x }) => x)).toEqual([178.5, 179.5, 180.5, 181.5, 182.5, 183.5, 184.5]);
    // Source: geographiclib, geodesic on WGS 84; along a parallel half a degree from the equator it is all but straight.
    const { s12 = 0 } = Geodesic.WGS84.Inverse(0.5, 178.5, 0.5, -175.5);
    expect(Number(properties[0]?.lengthM) / s12).toBeCloseTo(1, 5);
  });

  it('was empty from an outlet cell: it is one leg of one place and one station', async () => {
    const { legs, properties, section, notes } = await pathOf(twoPonds, '500095,985');
    const [{ geometry }] = legs;
    expect(geometry.type).toBe('LineString');
    const [start, end] = geometry.type === 'LineString' ? geometry.coordinates : [];
    expect(start).toEqual(end);
    expect(properties).toEqual([
      {
        leg: 1,
        kind: 'land',
        pond: null,
        lengthM: 0,
        dropM: 0,
        slope: 0,
        fromElevationM: 5,
        toElevationM: 5,
        storageM3: 0,
        endsAt: 'outlet',
      },
    ]);
    expect(section).toMatchObject({ lengthM: 0, endsAt: 'outlet', sills: [] });
    expect(section.stations).toEqual([
      { leg: 1, kind: 'land', distanceM: 0, x: 500_095, y: 985, groundM: 5, waterM: 5 },
    ]);
    expect(notes).toEqual(['The path starts on an outlet, so water leaves there at once.']);
  });

  it('tells the level from an outlet whose water lies above the ground', async () => {
    const { properties, section } = await pathOf(twoPonds, '500095,985', { inputs: { edgeLevel: 7 } });
    expect(properties).toHaveLength(1);
    expect(properties[0]).toMatchObject({
      kind: 'pond',
      fromElevationM: 7,
      toElevationM: 7,
      endsAt: 'outlet',
    });
    expect(section.stations).toMatchObject([{ groundM: 5, waterM: 7 }]);
  });

  it('follows a flat as land', async () => {
    const { properties } = await pathOf(
      [
        [9, 9, 9, 9, 9, 9],
        [9, 5, 4, 4, 4, 2],
        [9, 9, 9, 9, 9, 9],
      ],
      '500015,985',
    );
    expect(properties).toMatchObject([{ kind: 'land', lengthM: 40, dropM: 3, endsAt: 'outlet' }]);
  });
});
