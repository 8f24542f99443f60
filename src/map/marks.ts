import CircleStyle from 'ol/style/Circle.js';
import Fill from 'ol/style/Fill.js';
import RegularShape from 'ol/style/RegularShape.js';
import Stroke from 'ol/style/Stroke.js';
import { css } from './packed-colour.ts';
import type { Palette } from './palette.ts';

type Ink = Pick<Palette, 'accent' | 'halo'>;

/** A dot with a rim. */
export function dot({ accent, halo }: Ink, radius: number): CircleStyle {
  return new CircleStyle({
    radius,
    fill: new Fill({ color: css(accent) }),
    stroke: new Stroke({ color: css(halo), width: 1.5 }),
  });
}

/** An open ring: where something starts. */
export function ring({ accent, halo }: Ink, radius: number): CircleStyle {
  return new CircleStyle({
    radius,
    fill: new Fill({ color: css(halo) }),
    stroke: new Stroke({ color: css(accent), width: 2.5 }),
  });
}

/** An arrowhead that turns with the view; bearing in radians clockwise from north. */
export function arrowhead({ accent, halo }: Ink, radius: number, bearing: number): RegularShape {
  return new RegularShape({
    points: 3,
    radius,
    scale: [0.8, 1.1],
    rotation: bearing,
    rotateWithView: true,
    fill: new Fill({ color: css(accent) }),
    stroke: new Stroke({ color: css(halo), width: 1.5, lineJoin: 'round' }),
  });
}

/** A cross: the way ends without an outlet. */
export function cross({ accent }: Ink, radius: number): RegularShape {
  return new RegularShape({
    points: 4,
    radius,
    radius2: 0,
    angle: Math.PI / 4,
    stroke: new Stroke({ color: css(accent), width: 3 }),
  });
}
