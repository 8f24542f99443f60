import { cellSizes } from './cell-sizes.ts';
import type { Shade } from './pooled-shade.ts';
import type { SurveyView } from './survey-view.ts';

export interface Light {
  /** Where the light comes from, degrees clockwise from north. */
  readonly azimuthDeg: number;
  /** Its height above the horizon, degrees. */
  readonly altitudeDeg: number;
  /** Factor on elevations. */
  readonly exaggeration: number;
}

/**
 * From the north-west, as maps have it by common practice, since light from below turns hills into hollows; heights
 * doubled, since kerbs and banks are low.
 */
export const northWestLight: Light = { azimuthDeg: 315, altitudeDeg: 45, exaggeration: 2 };

const radians = Math.PI / 180;

/**
 * Shaded relief: the cosine between the ground's normal and the light (Lambert), on 1…255 for 0…1; 0 on voids.
 * Gradients by the weighted differences of the eight neighbours (Horn, Hill shading and the reflectance map,
 * Proceedings of the IEEE 69(1), 1981, eq. for p and q); a neighbour that is void or beyond the grid takes the
 * cell's own elevation.
 */
export function hillshade(survey: SurveyView, light: Light = northWestLight): Shade {
  const { width, height, wraps, elevationM } = survey;
  const { eastM, southM } = cellSizes(survey);
  const azimuth = light.azimuthDeg * radians;
  const altitude = light.altitudeDeg * radians;
  const up = Math.sin(altitude);
  const east = Math.cos(altitude) * Math.sin(azimuth);
  const north = Math.cos(altitude) * Math.cos(azimuth);
  const value = new Uint8Array(width * height);
  for (let row = 0; row < height; row++) {
    const above = row > 0 ? -width : 0;
    const below = row + 1 < height ? width : 0;
    // A row on a pole has no east–west distance, hence no slope that way.
    const perEast = eastM[row] > 0 ? light.exaggeration / (8 * eastM[row]) : 0;
    const perNorth = light.exaggeration / (8 * southM[row]);
    for (let column = 0; column < width; column++) {
      const cell = row * width + column;
      const z = elevationM[cell];
      if (Number.isNaN(z)) continue;
      const left = column > 0 ? -1 : wraps ? width - 1 : 0;
      const right = column + 1 < width ? 1 : wraps ? 1 - width : 0;
      const nw = or(elevationM[cell + above + left], z);
      const ne = or(elevationM[cell + above + right], z);
      const sw = or(elevationM[cell + below + left], z);
      const se = or(elevationM[cell + below + right], z);
      const n = or(elevationM[cell + above], z);
      const s = or(elevationM[cell + below], z);
      const w = or(elevationM[cell + left], z);
      const e = or(elevationM[cell + right], z);
      const p = (ne + 2 * e + se - nw - 2 * w - sw) * perEast;
      const q = (nw + 2 * n + ne - sw - 2 * s - se) * perNorth;
      const lit = (up - p * east - q * north) / Math.sqrt(1 + p * p + q * q);
      value[cell] = lit > 0 ? 1 + Math.round(254 * lit) : 1;
    }
  }
  return { width, height, value };
}

function or(elevation: number, own: number): number {
  return Number.isNaN(elevation) ? own : elevation;
}
