import type Feature from 'ol/Feature.js';
import Point from 'ol/geom/Point.js';
import Fill from 'ol/style/Fill.js';
import Stroke from 'ol/style/Stroke.js';
import Style, { type StyleFunction } from 'ol/style/Style.js';
import { arrowhead, dot } from './marks.ts';
import { css } from './packed-colour.ts';
import type { Palette } from './palette.ts';

/** Ponds smaller than this on the screen show no pour point and no link, CSS pixels. */
const leastPx = 10;
/** From the pour point to the middle of its arrowhead, CSS pixels. */
const arrowPx = 8.5;

/** The shore of a pond; the inside is clear but takes clicks. */
export function outlineStyle({ shore }: Palette): Style {
  return new Style({
    stroke: new Stroke({ color: css(shore), width: 1 }),
    fill: new Fill({ color: css(shore, 0) }),
  });
}

/** Features need `reach` (units of the view). */
export function linkStyle({ accent, halo }: Palette): StyleFunction {
  const styles = [
    new Style({ stroke: new Stroke({ color: css(halo, 0.6), width: 3 }) }),
    new Style({ stroke: new Stroke({ color: css(accent, 0.6), width: 1.25 }) }),
  ];
  return (feature, resolution) => (feature.get('reach') < leastPx * resolution ? undefined : styles);
}

/** A dot on the sill and an arrowhead before it. Features need `reach` and `bearing` (null = no arrow). */
export function pourPointStyle(palette: Palette): StyleFunction {
  const base = new Style({ image: dot(palette, 3.5), zIndex: 2 });
  return (feature, resolution) => {
    if (feature.get('reach') < leastPx * resolution) return undefined;
    const turn: number | null = feature.get('bearing');
    return turn === null ? base : [arrow(feature as Feature<Point>, palette, turn, resolution), base];
  };
}

/** What is selected: a double shore and its pour point, larger. */
export function selectedStyle(palette: Palette): StyleFunction {
  const shore = [
    new Style({ stroke: new Stroke({ color: css(palette.halo), width: 6 }) }),
    new Style({ stroke: new Stroke({ color: css(palette.accent), width: 3 }) }),
  ];
  const sill = new Style({ image: dot(palette, 5), zIndex: 2 });
  return (feature, resolution) => {
    const turn: number | null | undefined = feature.get('bearing');
    if (turn === undefined) return shore;
    return turn === null ? sill : [arrow(feature as Feature<Point>, palette, turn, resolution, 1.4), sill];
  };
}

function arrow(
  feature: Feature<Point>,
  palette: Palette,
  turn: number,
  resolution: number,
  factor = 1,
): Style {
  const [x, y] = feature.getGeometry()?.getCoordinates() ?? [Number.NaN, Number.NaN];
  const ahead = arrowPx * factor * resolution;
  return new Style({
    geometry: new Point([x + Math.sin(turn) * ahead, y + Math.cos(turn) * ahead]),
    image: arrowhead(palette, 7 * factor, turn),
    zIndex: 1,
  });
}
