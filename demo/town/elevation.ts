import { basin, basinGround } from './basin.ts';
import { leveeGround } from './levee.ts';
import { roughness, smoothGround, swaleGround } from './natural-ground.ts';
import { plan, railway, railwayCrest, railwayY, riverBed, riverDistance, underpass } from './plan.ts';
import { quarryGround } from './quarry.ts';
import { streetGround } from './streets.ts';

/** Elevations are whole steps of 1/64 m: exact in float32, and they deflate well. */
const step = 64;

/** The town's elevations in metres, `size × size` cells of 1 m, row by row from the north-west corner. */
export function townElevation(): Float32Array {
  const { size } = plan;
  const elevation = new Float32Array(size * size);
  for (let row = 0; row < size; row++) {
    for (let column = 0; column < size; column++) {
      elevation[row * size + column] = quantised(groundAt(column + 0.5, row + 0.5));
    }
  }
  return elevation;
}

export function quantised(z: number): number {
  return Math.round(z * step) / step;
}

/** One place, in the order in which things were built. */
function groundAt(x: number, y: number): number {
  const quarry = quarryGround(x, y);
  if (quarry !== null) return quarry;
  const smooth = smoothGround(x, y);
  let z = swaleGround(smooth + roughness(x, y), x, y);
  z = railwayGround(x, y, z);
  z = streetGround(x, y, z, smooth);
  z = riverGround(x, y, z);
  z = leveeGround(x, y, z);
  if (x > basin.x - 80 && x < basin.x + 160 && y > basin.y - 60 && y < 1490) z = basinGround(x, y, z);
  return z;
}

function railwayGround(x: number, y: number, ground: number): number {
  const off = Math.abs(y - railwayY(x)) - railway.halfWidth;
  // The bridge over the road is no ground.
  if (off > 30 || Math.abs(x - underpass.x) < underpass.halfWidth) return ground;
  return Math.max(ground, railwayCrest(x) - Math.max(0, off) * railway.sideSlope);
}

/** A level bed and even banks, so that the river runs to the rim without a pond. */
function riverGround(x: number, y: number, ground: number): number {
  const off = Math.abs(riverDistance(x, y)) - 8;
  if (off > 60) return ground;
  return Math.min(ground, riverBed(x) + Math.max(0, off) * 0.25);
}
