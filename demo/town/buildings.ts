import { drawn } from './noise.ts';
import { plan, swales } from './plan.ts';
import { blockU, blockV, fromStreetFrame, halfStreet, isBuiltUp, nearBrook } from './streets.ts';

const { seed } = plan;

export interface Building {
  readonly use: 'house' | 'row of houses' | 'workshop' | 'hall';
  /** Corners, unclosed. */
  readonly corners: readonly (readonly [number, number])[];
}

/** Footprints along the avenues, a garden's depth behind the kerb; the ground does not know of them. */
export function buildings(): Building[] {
  const found: Building[] = [];
  for (let avenue = -7; avenue <= 6; avenue++) {
    for (let block = -9; block <= 12; block++) {
      for (const side of [1, -1]) found.push(...frontage(avenue, block, side));
    }
  }
  return found;
}

function frontage(avenue: number, block: number, side: number): Building[] {
  const found: Building[] = [];
  const series = ((avenue + 10) * 50 + block + 10) * 2 + (side > 0 ? 1 : 0);
  let u = block * blockU + halfStreet + 4;
  const end = (block + 1) * blockU - halfStreet - 4;
  for (let n = 0; n < 12; n++) {
    const kind = drawn(n, series, seed + 11);
    const use = kind < 0.6 ? 'house' : kind < 0.85 ? 'row of houses' : kind < 0.95 ? 'workshop' : 'hall';
    const length =
      { house: 9, 'row of houses': 24, workshop: 18, hall: 28 }[use] + 3 * drawn(n, series, seed + 12);
    const depth =
      { house: 9, 'row of houses': 10, workshop: 16, hall: 20 }[use] + 2 * drawn(n, series, seed + 13);
    if (u + length > end) break;
    const near = avenue * blockV + side * (halfStreet + 5 + 3 * drawn(n, series, seed + 14));
    const far = near + side * depth;
    const corners = [
      fromStreetFrame(u, near),
      fromStreetFrame(u + length, near),
      fromStreetFrame(u + length, far),
      fromStreetFrame(u, far),
    ];
    if (drawn(n, series, seed + 15) < 0.88 && corners.every(isBuildable)) found.push({ use, corners });
    u += length + 5 + 6 * drawn(n, series, seed + 16);
  }
  return found;
}

function isBuildable([x, y]: readonly [number, number]): boolean {
  const offTansy = Math.abs(x - swales[1].x(y)) > 14;
  return isBuiltUp(x, y) && !nearBrook(x, y, 50) && offTansy && Math.abs(x - 1180) > 20;
}
