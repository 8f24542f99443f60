import type Feature from 'ol/Feature.js';
import Point from 'ol/geom/Point.js';
import Fill from 'ol/style/Fill.js';
import Stroke from 'ol/style/Stroke.js';
import Style, { type StyleFunction } from 'ol/style/Style.js';
import { arrowhead, dot } from './marks.ts';
import { css, type Rgb } from './packed-colour.ts';
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

/** What is selected: a line around the shore, so that a small pond is not covered, and its pour point, larger. */
export function selectedStyle(palette: Palette): StyleFunction {
  const shore = [band(palette.halo, 7), band(palette.accent, 5), band(palette.halo, 2)];
  const sill = new Style({ image: dot(palette, 4), zIndex: 2 });
  return (feature, resolution) => {
    const turn: number | null | undefined = feature.get('bearing');
    if (turn === undefined) return shore;
    return turn === null ? sill : [arrow(feature as Feature<Point>, palette, turn, resolution, 1.15), sill];
  };
}

/** Far beyond any canvas, pixels. */
const farPx = 1e5;

/** A stroke of which only the outer half is painted: what reaches inwards is clipped away. */
function band(colour: Rgb, width: number): Style {
  return new Style({
    renderer: (coordinates, { context, pixelRatio }) => {
      const rings = (coordinates as number[][][][]).flat();
      const trace = (): void => {
        for (const ring of rings) {
          for (const [i, [x, y]] of ring.entries()) i === 0 ? context.moveTo(x, y) : context.lineTo(x, y);
          context.closePath();
        }
      };
      context.save();
      context.beginPath();
      context.rect(-farPx, -farPx, 2 * farPx, 2 * farPx);
      trace();
      context.clip('evenodd');
      context.beginPath();
      trace();
      context.strokeStyle = css(colour);
      context.lineWidth = width * pixelRatio;
      context.lineJoin = 'round';
      context.stroke();
      context.restore();
    },
  });
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
