import { drawn, eased, noise } from './noise.ts';
import { plan, railwayCrest, railwayY, riverBed, riverDistance, riverY, swales } from './plan.ts';

const { seed, size } = plan;

/** A round hollow: water will stand in it. */
interface Hollow {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly depth: number;
}

/** Hollows on a jittered lattice of 180 m, away from the railway, the brook and the town's earthworks. */
export const hollows: readonly Hollow[] = scattered();

/** Terraces, valley floor and hollows, without small roughness: what streets are laid upon. */
export function smoothGround(x: number, y: number): number {
  const warp = 28 * noise(x, y, 260, seed + 1);
  const northOfRiver = 1400 - y + warp;
  const height = northOfRiver >= 0 ? northBank(northOfRiver, railwayY(x) - y) : southBank(-northOfRiver);
  const upland = eased((Math.abs(northOfRiver) - 250) / 200);
  const rolling = 0.75 * noise(x, y, 310, seed + 2) + 0.45 * noise(x, y, 130, seed + 3);
  let z = riverBed(x) + height + upland * rolling - hollowDepth(x, y);
  const north = railwayY(x) - y;
  // The terrace meets the railway flush, so that no ditch runs beside it.
  if (north > 4 && north < 60)
    z = Math.max(z, railwayCrest(railwayReach(x)) + Math.min(0.3 * (north - 4), 1.5 + 0.012 * (north - 9)));
  return z;
}

/** Small roughness of fields and gardens, a few centimetres. */
export function roughness(x: number, y: number): number {
  return (
    0.07 * noise(x, y, 23, seed + 5) + 0.035 * noise(x, y, 9.3, seed + 6) + 0.014 * noise(x, y, 3.7, seed + 7)
  );
}

/** The ground after brook and swales have been cut into it. */
export function swaleGround(z: number, x: number, y: number): number {
  let lowest = z;
  if (y > riverY(x)) return z;
  for (const swale of swales) {
    if (y < swale.from || y > swale.to) continue;
    const off = Math.abs(x - swale.x(y)) - swale.halfWidth;
    if (off < 120) lowest = Math.min(lowest, swale.bed(y) + Math.max(0, off) * swale.sideSlope);
  }
  return lowest;
}

/** The dip of the crest does not concern the ground beside it. */
function railwayReach(x: number): number {
  return Math.abs(x - 620) < 70 ? 550 : x;
}

function northBank(n: number, northOfRailway: number): number {
  const first = 2.2 + 0.004 * Math.min(n, 290) + 4.6 * eased((n - 290) / 55);
  const second = first + 0.004 * span(n, 345, 520) + 6 * eased((n - 520) / 50) + 0.006 * span(n, 570, 800);
  return second + 6.5 * eased((northOfRailway - 4) / 75) + 0.012 * span(northOfRailway, 60, 900);
}

function southBank(s: number): number {
  return 2.2 + 0.004 * Math.min(s, 230) + 5 * eased((s - 230) / 70) + 0.012 * span(s, 300, 800);
}

function span(value: number, from: number, to: number): number {
  return Math.min(to, Math.max(from, value)) - from;
}

function hollowDepth(x: number, y: number): number {
  let depth = 0;
  // Bent out of round, as hollows are.
  const bentX = x + 9 * noise(x, y, 38, seed + 8);
  const bentY = y + 9 * noise(x, y, 38, seed + 9);
  for (const hollow of hollows) {
    const dx = bentX - hollow.x;
    const dy = bentY - hollow.y;
    const t = (dx * dx + dy * dy) / (hollow.radius * hollow.radius);
    if (t < 1) depth += hollow.depth * (1 - t) * (1 - t);
  }
  return depth;
}

function scattered(): Hollow[] {
  const found: Hollow[] = [];
  for (let row = 0; row < 11; row++) {
    for (let column = 0; column < 11; column++) {
      const n = row * 11 + column;
      const x = 100 + 180 * column + 110 * (drawn(n, 1, seed) - 0.5);
      const y = 100 + 180 * row + 110 * (drawn(n, 2, seed) - 0.5);
      const radius = 16 + 26 * drawn(n, 3, seed);
      const depth = 0.7 + 1.6 * drawn(n, 4, seed);
      if (drawn(n, 5, seed) < 0.78 && isFree(x, y, radius)) found.push({ x, y, radius, depth });
    }
  }
  return found;
}

function isFree(x: number, y: number, radius: number): boolean {
  const inside = Math.min(x, y, size - x, size - y) > radius + 12;
  const offRiver = Math.abs(riverDistance(x, y)) > radius + 45;
  const offRailway = Math.abs(railwayY(x) - y) > radius + 45;
  const offBrook = y > 1250 || Math.abs(x - swales[0].x(y)) > radius + (y < 650 ? 70 : 40);
  const offQuarry = x < 1400 || x > 1850 || y > 420 || y < 50;
  const offBasin = x < 1480 || x > 1760 || y < 900 || y > 1200;
  return inside && offRiver && offRailway && offBrook && offQuarry && offBasin;
}
