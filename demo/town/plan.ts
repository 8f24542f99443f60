import { throughKnots, wave } from './noise.ts';

/**
 * The plan of the invented town of Brimsallow. Places are metres east (x) and south (y) of the north-west corner,
 * elevations metres. It lies in UTM zone 10 south near 48.9° S 123.4° W, open ocean farther from any land than
 * any other, so that nobody takes it for a real town.
 */
export const plan = {
  name: 'Brimsallow',
  seed: 20731,
  epsg: 32710,
  verticalEpsg: 3855,
  west: 470000,
  north: 4588000,
  size: 2000,
} as const;

/** The river Sallow: bed elevation, falling east all the way to the rim, and centre line. */
export function riverBed(x: number): number {
  return 12 - 0.0016 * x;
}

export function riverY(x: number): number {
  return 1400 + 80 * wave(x / 650) + 20 * wave(x / 210 + 0.3);
}

/** Distance to the river's centre line, positive to the south; slopes stay below 1, so this is near enough. */
export function riverDistance(x: number, y: number): number {
  const slope = (riverY(x + 1) - riverY(x - 1)) / 2;
  return (y - riverY(x)) / Math.sqrt(1 + slope * slope);
}

/** The railway: straight line at the foot of the uppermost terrace, its crest with a dip over Quillet Brook. */
export const railway = { halfWidth: 4, sideSlope: 1 / 1.75, dipX: 620, dipHalfLength: 70, dipDepth: 0.75 };

export function railwayY(x: number): number {
  return 610 - 0.03 * x;
}

export function railwayCrest(x: number): number {
  const t = (x - railway.dipX) / railway.dipHalfLength;
  return 29.375 - 0.0016 * x - (Math.abs(t) < 1 ? railway.dipDepth * (1 - t * t) : 0);
}

/** A channel that runs south: centre line and bed by y, flat bottom, sides of one slope. */
export interface Swale {
  readonly name: string;
  readonly from: number;
  readonly to: number;
  readonly x: (y: number) => number;
  readonly bed: (y: number) => number;
  readonly halfWidth: number;
  readonly sideSlope: number;
}

const brook: [number, number][] = [
  [0, 33.5],
  [300, 28],
  [600, 22.5],
  [700, 21.5],
  [870, 16.5],
  [1060, 12.75],
  [1150, 11.75],
  [1420, 10.9],
];
const tansy: [number, number][] = [
  [120, 41],
  [230, 37.5],
  [560, 28.4],
  [600, 26.4],
  [700, 25.2],
  [880, 23.2],
  [940, 18],
  [1090, 16.4],
  [1180, 13.2],
  [1460, 11.5],
];
const quarrySwale: [number, number][] = [
  [345, 35.25],
  [450, 31.5],
  [560, 24.7],
  [620, 24.3],
  [870, 22.5],
  [930, 18.3],
  [985, 17.75],
];

export const swales: readonly Swale[] = [
  {
    name: 'Quillet Brook',
    from: 0,
    to: 1420,
    x: (y) => 620 + 45 * wave(y / 300),
    bed: (y) => throughKnots(brook, y),
    halfWidth: 3,
    sideSlope: 0.3,
  },
  {
    name: 'Tansy Dell',
    from: 120,
    to: 1460,
    x: (y) => 230 + 30 * wave(y / 240 + 0.5),
    bed: (y) => throughKnots(tansy, y),
    halfWidth: 2,
    sideSlope: 0.2,
  },
  {
    name: 'Dun Gutter',
    from: 345,
    to: 985,
    x: (y) => 1620 + 25 * wave((y - 345) / 320),
    bed: (y) => throughKnots(quarrySwale, y),
    halfWidth: 2,
    sideSlope: 0.2,
  },
];

export const underpass = { x: 1180, halfWidth: 6, bottom: 23.5, flatHalfLength: 12, ramp: 0.07 };
