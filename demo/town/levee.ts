import { riverY } from './plan.ts';

/** The levee on the north bank, tied into the first terrace at both ends, with one low place. */
export const levee = {
  west: 800,
  east: 1500,
  tieY: 1075,
  offRiver: 34,
  crest: 15.5,
  lowX: 1130,
  lowHalfWidth: 12,
  lowCrest: 14.5,
  fade: 8,
  halfWidth: 3,
  sideSlope: 1 / 2.5,
} as const;

const line = leveeLine();

/** Centre line of the levee, from its western tie to its eastern one. */
export function leveeLine(): [number, number][] {
  const points: [number, number][] = [[levee.west, levee.tieY]];
  for (let x = levee.west; x <= levee.east; x += 10) points.push([x, riverY(x) - levee.offRiver]);
  points.push([levee.east, levee.tieY]);
  return points;
}

/** The ground with the levee on it. */
export function leveeGround(x: number, y: number, ground: number): number {
  if (x < levee.west - 20 || x > levee.east + 20 || y < levee.tieY - 20 || y > 1480) return ground;
  let least = 400;
  for (let i = 1; i < line.length; i++) {
    const [ax, ay] = line[i - 1];
    const [bx, by] = line[i];
    // Most pieces are too far away to matter.
    if (x < Math.min(ax, bx) - 20 || x > Math.max(ax, bx) + 20) continue;
    const length2 = (bx - ax) * (bx - ax) + (by - ay) * (by - ay);
    const t = Math.min(1, Math.max(0, ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / length2));
    const dx = x - ax - t * (bx - ax);
    const dy = y - ay - t * (by - ay);
    least = Math.min(least, dx * dx + dy * dy);
  }
  if (least >= 400) return ground;
  return Math.max(ground, crestAt(x) - Math.max(0, Math.sqrt(least) - levee.halfWidth) * levee.sideSlope);
}

function crestAt(x: number): number {
  const off = Math.abs(x - levee.lowX) - levee.lowHalfWidth;
  const t = Math.min(1, Math.max(0, off / levee.fade));
  return levee.lowCrest + (levee.crest - levee.lowCrest) * t;
}
