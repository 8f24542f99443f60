import type { Feature } from 'geojson';
import { type Polygon, pondOutlines, spillsInto } from '../core/index.ts';
import type { Brimful } from './brimful.ts';
import { figure, float32Figure } from './geojson-text.ts';
import { cellLonLat } from './lon-lat.ts';
import { outlinePlacing } from './outline-placing.ts';
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
  const placing = outlinePlacing(terrain);
  const options = placing.columns === undefined ? { nested } : { nested, columns: placing.columns };
  for (const { node, polygons } of pondOutlines(grid, survey, drainage, depressions, kept, options)) {
    const spillElevationM = float32Figure(depressions.spillElevationM[node]);
    const pitElevationM = float32Figure(depressions.pitElevationM[node]);
    const sillCell = drainage.tree.sillCell[depressions.pourSill[node]];
    const id = nameOf(node) ?? '';
    yield {
      type: 'Feature',
      id,
      geometry: {
        type: 'MultiPolygon',
        coordinates: polygons.map((polygon: Polygon) => [polygon.outer, ...polygon.holes].map(placing.ring)),
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
