import type OlMap from 'ol/Map.js';
import { transformExtent } from 'ol/proj.js';
import { hasNoWay, terrainProjection } from '../map/projections.ts';
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
  if (hasNoWay(shown, view.georeference.crs)) return;
  fitExtent(map, transformExtent(extent, own, shown, 8));
}

/** Maps without a size, and how to end their waiting for one. */
const waiting = new WeakMap<OlMap, () => void>();

/** Moves the map to an extent of its own view; one that is hidden, as soon as it has a size. */
export function fitExtent(map: OlMap, extent: number[], leastResolution = 0): void {
  waiting.get(map)?.();
  const view = map.getView();
  const [width, height] = map.getSize() ?? [0, 0];
  if (!(width > 0 && height > 0)) {
    const onSize = (): void => {
      end();
      if (map.getView() === view) fitExtent(map, extent, leastResolution);
    };
    const end = (): void => {
      map.un('change:size', onSize);
      waiting.delete(map);
    };
    map.on('change:size', onSize);
    waiting.set(map, end);
    return;
  }
  const margin = Math.min(marginPx, width / 4, height / 4);
  view.fit(extent, {
    padding: [margin, margin, margin, margin],
    minResolution: leastResolution,
    duration: matchMedia('(prefers-reduced-motion: reduce)').matches ? 0 : 250,
  });
}
