import type { Feature, Position } from 'geojson';
import { type Polygon, pondOutlines, spillsInto } from '../core/index.ts';
import { cornerAt } from '../raster/place.ts';
import type { Terrain } from '../raster/terrain.ts';
import { toCrs84 } from '../raster/transform.ts';
import type { Brimful } from './brimful.ts';
import { degrees, figure, float32Figure } from './geojson-text.ts';
import { cellLonLat } from './lon-lat.ts';
import { pondNames } from './pond-names.ts';

/** Least sizes of ponds that are written. */
export interface PondMinima {
  readonly depthM: number;
  readonly areaM2: number;
  readonly capacityM3: number;
  /** Also ponds inside others. */
  readonly nested: boolean;
}

/** 1 for each node that is a pond and reaches the minima. */
export function keptPonds({ depressions, measures }: Brimful, minima: PondMinima): Uint8Array {
  return depressions.isPond.map((isPond, node) => {
    const depthM = depressions.spillElevationM[node] - depressions.pitElevationM[node];
    return isPond === 1 &&
      (minima.nested || depressions.parent[node] < 0) &&
      depthM >= minima.depthM &&
      measures.areaM2[node] >= minima.areaM2 &&
      measures.capacityM3[node] >= minima.capacityM3
      ? 1
      : 0;
  });
}

/** The kept ponds as features: a MultiPolygon each, along cell edges. */
export function* pondFeatures(analysis: Brimful, kept: Uint8Array, nested: boolean): Generator<Feature> {
  const { terrain, grid, survey, drainage, depressions, measures } = analysis;
  const nameOf = pondNames(survey, drainage, depressions);
  const into = spillsInto(survey, drainage, depressions, kept);
  const cutColumn = antimeridianColumn(terrain);
  const ring = ringPlacer(terrain, cutColumn);
  for (const { node, polygons } of pondOutlines(grid, survey, drainage, depressions, kept, {
    nested,
    cutColumn,
  })) {
    const spillElevationM = float32Figure(depressions.spillElevationM[node]);
    const pitElevationM = float32Figure(depressions.pitElevationM[node]);
    const sillCell = drainage.tree.sillCell[depressions.pourSill[node]];
    const id = nameOf(node) ?? '';
    yield {
      type: 'Feature',
      id,
      geometry: {
        type: 'MultiPolygon',
        coordinates: polygons.map((polygon: Polygon) => [polygon.outer, ...polygon.holes].map(ring)),
      },
      properties: {
        id,
        parent: nested ? nameOf(depressions.parent[node]) : null,
        spillElevationM,
        pitElevationM,
        depthM: figure(spillElevationM - pitElevationM),
        areaM2: figure(measures.areaM2[node]),
        capacityM3: figure(measures.capacityM3[node]),
        catchmentAreaM2: figure(measures.catchmentAreaM2[node]),
        contributingAreaM2: figure(measures.contributingAreaM2[node]),
        spillsInto: nameOf(into[node]),
        touchesEdge: measures.touchesEdge[node] === 1,
        heldByOutlet: depressions.spillElevationM[node] > grid.elevationM[sillCell],
      },
    };
  }
}

/** Pour points of the kept ponds: the sill cell at which each overflows. */
export function* pourPointFeatures(analysis: Brimful, kept: Uint8Array): Generator<Feature> {
  const { terrain, survey, drainage, depressions } = analysis;
  const nameOf = pondNames(survey, drainage, depressions);
  const into = spillsInto(survey, drainage, depressions, kept);
  const position = cellLonLat(terrain);
  for (let node = 0; node < kept.length; node++) {
    if (kept[node] === 0) continue;
    const sillCell = drainage.tree.sillCell[depressions.pourSill[node]];
    yield {
      type: 'Feature',
      geometry: { type: 'Point', coordinates: position(sillCell) },
      properties: {
        pond: nameOf(node),
        spillElevationM: float32Figure(depressions.spillElevationM[node]),
        spillsInto: nameOf(into[node]),
      },
    };
  }
}

/** The column of cell corners at 180° where it lies inside a geographic grid, −1 otherwise. */
export function antimeridianColumn({ grid, georeference }: Terrain): number {
  if (georeference.crs.kind !== 'geographic') return -1;
  const column = Math.round((180 - georeference.west) / georeference.cellWidth);
  const offset = georeference.west + column * georeference.cellWidth - 180;
  const isEdge = Math.abs(offset) < georeference.cellWidth * 1e-3;
  return isEdge && column > 0 && column < grid.width ? column : -1;
}

/** Turns rings of corner numbers into CRS84 positions; what lies east of the antimeridian comes back at −180°. */
function ringPlacer(terrain: Terrain, cutColumn: number): (ring: readonly number[]) => Position[] {
  const toLonLat = toCrs84(terrain.georeference.crs);
  const across = terrain.grid.width + 1;
  return (ring) => {
    const isBeyond = cutColumn >= 0 && ring.some((vertex) => vertex % across > cutColumn);
    return ring.map((vertex) => {
      const column = vertex % across;
      const [longitude, latitude] = toLonLat(...cornerAt(terrain, column, (vertex - column) / across));
      return [degrees(unwrapped(longitude, isBeyond, terrain, column)), degrees(latitude)];
    });
  };
}

/** Projection libraries may bring longitudes back into ±180°; the grid's own longitude is the steady one. */
function unwrapped(longitude: number, isBeyond: boolean, terrain: Terrain, column: number): number {
  if (terrain.georeference.crs.kind !== 'geographic') return longitude;
  const own = terrain.georeference.west + column * terrain.georeference.cellWidth;
  const turns = Math.round((own - longitude) / 360);
  return longitude + 360 * turns - (isBeyond ? 360 : 0);
}
