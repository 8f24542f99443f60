import kinks from '@turf/kinks';
import type { Feature, FeatureCollection, Geometry, Polygon, Position } from 'geojson';
import { type OutletCells, OverbrimError } from '../core/index.ts';
import { cellsOfLine, cellsOfPolygon } from '../raster/burn.ts';
import type { Terrain } from '../raster/terrain.ts';
import { fromCrs84, type Point } from '../raster/transform.ts';

/** Water level of outlet cells by cell, metres; −∞ where the ground decides. The lowest level named wins. */
export type OutletLevels = Map<number, number>;

/** Outlet cells in ascending order. */
export function sortedOutlets(levels: OutletLevels): OutletCells {
  const cell = Float64Array.from(levels.keys()).sort();
  return { cell, levelM: Float32Array.from(cell, (c) => levels.get(c) ?? Number.NEGATIVE_INFINITY) };
}

/** Adds cells with one level. */
export function addOutlet(levels: OutletLevels, cells: Iterable<number>, levelM: number): void {
  for (const cell of cells) levels.set(cell, Math.min(levels.get(cell) ?? Number.POSITIVE_INFINITY, levelM));
}

/** The lowest cell of a terrain, of smallest index among equals. */
export function deepestCell({ elevationM }: Terrain['grid']): number {
  let deepest = -1;
  for (let cell = 0; cell < elevationM.length; cell++) {
    const z = elevationM[cell];
    if (!Number.isNaN(z) && (deepest < 0 || z < elevationM[deepest])) deepest = cell;
  }
  return deepest;
}

/**
 * Adds the features of a GeoJSON document (CRS84) as outlets: points, lines and polygons, each at the level of its
 * property `levelM` (metres; `usualLevelM` without), so that a reach with fall is given piece by piece.
 * @throws OverbrimError `bad-input` when it is no GeoJSON, a feature lies outside the terrain or only on voids, a
 * polygon crosses itself, or a level is no number.
 */
export function addOutletFeatures(
  levels: OutletLevels,
  terrain: Terrain,
  name: string,
  text: string,
  usualLevelM: number,
): void {
  featuresOf(name, text).forEach((feature, i) => {
    const what = `Feature ${i + 1} of ${name}`;
    const levelM = levelOf(what, feature, usualLevelM);
    const inside = cellsOfFeature(what, feature, terrain);
    if (inside.length === 0) {
      throw new OverbrimError(
        'bad-input',
        `${what} lies outside the terrain; give outlets inside it, as GeoJSON in longitude and latitude (CRS84).`,
      );
    }
    const cells = inside.filter((cell) => !Number.isNaN(terrain.grid.elevationM[cell]));
    if (cells.length === 0) {
      throw new OverbrimError(
        'bad-input',
        `${what} lies only on cells without elevation; name "voids" as outlet, or move it onto known ground.`,
      );
    }
    addOutlet(levels, cells, levelM);
  });
}

function featuresOf(name: string, text: string): Feature[] {
  let document: Partial<Feature | FeatureCollection | Geometry>;
  try {
    document = JSON.parse(text);
  } catch (cause) {
    throw new OverbrimError(
      'bad-input',
      `${name} is not JSON (${cause instanceof Error ? cause.message : cause}); expected a GeoJSON file.`,
      { cause },
    );
  }
  if (document?.type === 'FeatureCollection' && 'features' in document && Array.isArray(document.features)) {
    return document.features;
  }
  if (document?.type === 'Feature') return [document as Feature];
  if (document?.type !== undefined && ('coordinates' in document || 'geometries' in document)) {
    return [{ type: 'Feature', properties: {}, geometry: document as Geometry }];
  }
  throw new OverbrimError(
    'bad-input',
    `${name} holds ${JSON.stringify(document?.type ?? typeof document)}; expected a GeoJSON FeatureCollection, Feature or geometry.`,
  );
}

function levelOf(what: string, feature: Feature, usualLevelM: number): number {
  const level: unknown = feature?.properties?.levelM;
  if (level === undefined || level === null) return usualLevelM;
  if (typeof level !== 'number' || !Number.isFinite(Math.fround(level))) {
    throw new OverbrimError(
      'bad-input',
      `${what} has the level ${JSON.stringify(level)}; expected a number of metres from -3.4e38 to 3.4e38 as "levelM", or none.`,
    );
  }
  return level;
}

function cellsOfFeature(what: string, feature: Feature, terrain: Terrain): number[] {
  try {
    return cellsOf(what, feature.geometry, terrain);
  } catch (cause) {
    if (cause instanceof OverbrimError) throw cause;
    throw new OverbrimError(
      'bad-input',
      `${what} is not as GeoJSON has it; expected a Feature with a geometry whose coordinates are nested lists of positions, so mend the file.`,
      { cause },
    );
  }
}

function cellsOf(what: string, geometry: Geometry | null, terrain: Terrain): number[] {
  const { width, height } = terrain.grid;
  const { crs, west, north, cellWidth, cellHeight } = terrain.georeference;
  const toTerrain = fromCrs84(crs);
  // A grid of longitudes may begin anywhere: a shape is looked for as it is, and a turn to either side.
  const turns = crs.kind === 'geographic' ? [0, -360 / cellWidth, 360 / cellWidth] : [0];
  const turned = (points: readonly Point[], by: number): Point[] => points.map(([x, y]) => [x + by, y]);
  const place = (position: Position): Point => {
    const [longitude, latitude] = position;
    if (!Number.isFinite(longitude) || !Number.isFinite(latitude) || Math.abs(latitude) > 90) {
      throw new OverbrimError(
        'bad-input',
        `${what} has the position ${JSON.stringify(position)}; expected longitude and latitude in degrees.`,
      );
    }
    const [x, y] = toTerrain(longitude, latitude);
    return [(x - west) / cellWidth, (north - y) / cellHeight];
  };
  const line = (positions: Position[]): number[] => {
    const points = positions.map(place);
    return turns.flatMap((by) => cellsOfLine(turned(points, by), width, height));
  };
  const point = (position: Position): number[] => line([position, position]);
  const polygon = (rings: Position[][]): number[] => {
    refuseOpen(what, rings);
    refuseCrossing(what, rings);
    const placed = rings.map((ring) => ring.map(place));
    return turns.flatMap((by) =>
      cellsOfPolygon(
        placed.map((ring) => turned(ring, by)),
        width,
        height,
      ),
    );
  };
  switch (geometry?.type) {
    case 'Point':
      return point(geometry.coordinates);
    case 'MultiPoint':
      return geometry.coordinates.flatMap(point);
    case 'LineString':
      return line(geometry.coordinates);
    case 'MultiLineString':
      return geometry.coordinates.flatMap(line);
    case 'Polygon':
      return polygon(geometry.coordinates);
    case 'MultiPolygon':
      return geometry.coordinates.flatMap(polygon);
    case 'GeometryCollection':
      return geometry.geometries.flatMap((part) => cellsOf(what, part, terrain));
    default:
      throw new OverbrimError(
        'bad-input',
        `${what} has the geometry ${JSON.stringify((geometry as Geometry | null)?.type ?? null)}; expected points, lines or polygons.`,
      );
  }
}

function refuseOpen(what: string, rings: Position[][]): void {
  for (const ring of rings) {
    const [first, last] = [ring[0], ring[ring.length - 1]];
    if (ring.length < 4 || first[0] !== last[0] || first[1] !== last[1]) {
      throw new OverbrimError(
        'bad-input',
        `${what} is a polygon with a ring of ${ring.length} positions from ${first} to ${last}; expected at least 4, the last like the first, so close it.`,
      );
    }
  }
}

function refuseCrossing(what: string, rings: Position[][]): void {
  const polygon: Polygon = { type: 'Polygon', coordinates: rings };
  const crossing = kinks(polygon).features[0];
  if (crossing !== undefined) {
    const [longitude, latitude] = crossing.geometry.coordinates;
    throw new OverbrimError(
      'bad-input',
      `${what} is a polygon that crosses itself at ${longitude.toFixed(6)},${latitude.toFixed(6)}; mend its outline.`,
    );
  }
}
