import type { FeatureCollection } from 'geojson';
import type Feature from 'ol/Feature.js';
import GeoJSON from 'ol/format/GeoJSON.js';
import type MultiPolygon from 'ol/geom/MultiPolygon.js';
import type Point from 'ol/geom/Point.js';
import type Polygon from 'ol/geom/Polygon.js';
import type Projection from 'ol/proj/Projection.js';

/** Place in a view. */
export type Place = readonly [number, number];

/** A pond in a view, with its pour point and where its overflow goes. */
export interface PondOnView {
  readonly id: string;
  readonly outline: Feature<MultiPolygon>;
  /** A place inside its largest piece. */
  readonly inside: Place;
  /** Longer side of its extent, units of the view. */
  readonly reach: number;
  readonly pourPoint: Place | null;
  readonly spillsInto: PondOnView | null;
}

/**
 * Joins the outputs `ponds` and `pour-points` of the process `depressions` (CRS84), in a view's projection. Ponds
 * that lie in others come after them, so that they are drawn above.
 */
export function pondsOnView(
  ponds: FeatureCollection,
  pourPoints: FeatureCollection,
  view: Projection,
): Map<string, PondOnView> {
  const format = new GeoJSON({ dataProjection: 'EPSG:4326', featureProjection: view });
  const sills = new Map<string, Place>();
  for (const feature of format.readFeatures(pourPoints) as Feature<Point>[]) {
    const place = feature.getGeometry()?.getCoordinates();
    if (place) sills.set(String(feature.get('pond')), [place[0], place[1]]);
  }
  type Draft = Omit<PondOnView, 'spillsInto'> & { spillsInto: PondOnView | null };
  const drafts = new Map<string, Draft>();
  const outlines = format.readFeatures(ponds) as Feature<MultiPolygon>[];
  outlines.sort((one, other) => other.get('areaM2') - one.get('areaM2'));
  for (const outline of outlines) {
    const geometry = outline.getGeometry();
    if (!geometry) continue;
    const id = String(outline.get('id'));
    const [west, south, east, north] = geometry.getExtent();
    const largest = largestOf(geometry.getPolygons());
    const [x, y] = largest.getInteriorPoint().getCoordinates();
    drafts.set(id, {
      id,
      outline,
      inside: [x, y],
      reach: Math.max(east - west, north - south),
      pourPoint: sills.get(id) ?? null,
      spillsInto: null,
    });
  }
  for (const draft of drafts.values()) {
    const next = draft.outline.get('spillsInto');
    draft.spillsInto = next === null ? null : (drafts.get(String(next)) ?? null);
  }
  return drafts;
}

function largestOf(polygons: readonly Polygon[]): Polygon {
  return polygons.reduce((best, polygon) => (polygon.getArea() > best.getArea() ? polygon : best));
}
