import type OlMap from 'ol/Map.js';
import { transformExtent } from 'ol/proj.js';
import { terrainProjection } from '../map/projections.ts';
import type { SurveyView } from './running.ts';

/** Room left around what is fitted, CSS pixels. */
const marginPx = 24;

/** West, south, east, north of the grid in the terrain's CRS. */
export function extentOf({
  width,
  height,
  georeference: g,
}: SurveyView): readonly [number, number, number, number] {
  return [g.west, g.north - height * g.cellHeight, g.west + width * g.cellWidth, g.north];
}

/** Moves the map so that the whole terrain is in sight. */
export function fitMap(map: OlMap, view: SurveyView): void {
  const extent = [...extentOf(view)];
  const own = terrainProjection(view.georeference);
  const shown = map.getView().getProjection();
  fitExtent(map, transformExtent(extent, own, shown, 8));
}

/** Moves the map to an extent of its own view. */
export function fitExtent(map: OlMap, extent: number[], leastResolution = 0): void {
  map.getView().fit(extent, {
    padding: [marginPx, marginPx, marginPx, marginPx],
    minResolution: leastResolution,
    duration: matchMedia('(prefers-reduced-motion: reduce)').matches ? 0 : 250,
  });
}
