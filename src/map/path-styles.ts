import type LineString from 'ol/geom/LineString.js';
import type MultiLineString from 'ol/geom/MultiLineString.js';
import Point from 'ol/geom/Point.js';
import Stroke from 'ol/style/Stroke.js';
import Style, { type StyleFunction } from 'ol/style/Style.js';
import { arrowhead, cross, ring } from './marks.ts';
import { bearing } from './overflow.ts';
import { css } from './packed-colour.ts';
import type { Palette } from './palette.ts';

/** Lines shorter than this get no arrowhead on the way, CSS pixels. */
const leastArrowPx = 70;
/** Cells make lines of steps; a bearing is taken over this way, CSS pixels. */
const bearingPx = 18;

/**
 * Legs of a spill path, told apart by their lines: land solid, pond dashed, culvert dotted. A ring at the start, an
 * arrowhead on each long leg and at the outlet, a cross where no way leads on. Features are those of the process
 * `spill-path`.
 */
export function pathStyle(palette: Palette): StyleFunction {
  const line = (color: string, width: number, lineDash?: number[], zIndex = 1): Style =>
    new Style({
      zIndex,
      stroke: new Stroke({
        color,
        width,
        lineJoin: 'round',
        lineCap: lineDash ? 'butt' : 'round',
        ...(lineDash ? { lineDash } : {}),
      }),
    });
  // Under all legs, so that no leg's halo cuts into the one before.
  const halo = line(css(palette.halo, 0.85), 6.5, undefined, 0);
  const byKind = new Map([
    ['land', line(css(palette.accent), 3)],
    ['pond', line(css(palette.accent), 3, [9, 6])],
    ['culvert', line(css(palette.accent), 3, [3, 4])],
  ]);
  return (feature, resolution) => {
    const parts = partsOf(feature.getGeometry() as LineString | MultiLineString);
    const styles = [halo, byKind.get(feature.get('kind')) ?? line(css(palette.accent), 3)];
    const mark = (at: number[], image: ReturnType<typeof cross>): void => {
      styles.push(new Style({ geometry: new Point(at), image, zIndex: 2 }));
    };
    const first = parts[0];
    const last = parts[parts.length - 1];
    const length = last.getLength();
    const turn = (along: number): number | null => {
      const back = Math.min(bearingPx * resolution, length) / length;
      return bearing(placeAt(last, Math.max(0, along - back)), placeAt(last, along));
    };
    if (length > leastArrowPx * resolution) {
      const middle = turn(0.5);
      if (middle !== null) mark([...placeAt(last, 0.5)], arrowhead(palette, 7, middle));
    }
    const end = feature.get('endsAt');
    if (end === 'outlet') mark([...placeAt(last, 1)], arrowhead(palette, 9, turn(1) ?? 0));
    else if (end) mark([...placeAt(last, 1)], cross(palette, 8));
    if (feature.get('leg') === 1) {
      styles.push(
        new Style({ geometry: new Point(first.getFirstCoordinate()), image: ring(palette, 5), zIndex: 3 }),
      );
    }
    return styles;
  };
}

function partsOf(geometry: LineString | MultiLineString): LineString[] {
  return geometry.getType() === 'LineString'
    ? [geometry as LineString]
    : (geometry as MultiLineString).getLineStrings();
}

function placeAt(line: LineString, fraction: number): [number, number] {
  const [x, y] = line.getLength() > 0 ? line.getCoordinateAt(fraction) : line.getFirstCoordinate();
  return [x, y];
}
