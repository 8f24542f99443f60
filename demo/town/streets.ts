import { railwayY, swales, underpass } from './plan.ts';

/**
 * The street grid of the two lower terraces, turned by the angle of the triangle 9, 40, 41: `u` runs along the
 * avenues, `v` across them, both in metres from a corner beside Quillet Brook.
 */
const cos = 40 / 41;
const sin = 9 / 41;
const origin = { x: 620, y: 860 };
export const blockU = 95;
export const blockV = 110;
export const halfStreet = 4;
const kerb = 0.15;
const crown = 0.08;

/** Avenues that cross the brook, on an embankment of this crest, without a culvert. */
const brookCrossings: ReadonlyMap<number, number> = new Map([
  [-1, 23],
  [1, 17],
]);

export interface Street {
  readonly name: string;
  readonly kind: 'avenue' | 'side street' | 'underpass road';
  readonly line: readonly (readonly [number, number])[];
}

export function toStreetFrame(x: number, y: number): [number, number] {
  return [(x - origin.x) * cos + (y - origin.y) * sin, (y - origin.y) * cos - (x - origin.x) * sin];
}

export function fromStreetFrame(u: number, v: number): [number, number] {
  return [origin.x + u * cos - v * sin, origin.y + u * sin + v * cos];
}

/** Where the town is built: both terraces, between its western and eastern ends. */
export function isBuiltUp(x: number, y: number): boolean {
  return x > 110 && x < 1490 && y > railwayY(x) + 28 && y < 1085;
}

export function nearBrook(x: number, y: number, distance: number): boolean {
  return Math.abs(x - swales[0].x(y)) < distance;
}

/** Whether the avenue with this number has a street surface here; side streets pass null. */
function hasStreet(x: number, y: number, avenue: number | null): boolean {
  if (!isBuiltUp(x, y)) return false;
  return (avenue !== null && brookCrossings.has(avenue)) || !nearBrook(x, y, 42);
}

/** The ground with streets: crowned, a kerb lower than the lots beside them. `smooth` is what they are laid on. */
export function streetGround(x: number, y: number, ground: number, smooth: number): number {
  const road = underpassGround(x, y, ground, smooth);
  if (!isBuiltUp(x, y)) return road;
  const [u, v] = toStreetFrame(x, y);
  const avenue = Math.round(v / blockV);
  const offAvenue = Math.abs(v - avenue * blockV);
  const offSide = Math.abs(u - Math.round(u / blockU) * blockU);
  const crossing = nearBrook(x, y, 60) ? brookCrossings.get(avenue) : undefined;
  if (crossing !== undefined && offAvenue < 16) {
    // Over the brook the avenue is a low embankment from bank to bank.
    const level = Math.max(ground, crossing);
    if (offAvenue < halfStreet) return level - kerb + crown * (1 - offAvenue / halfStreet);
    return Math.max(ground, crossing - (offAvenue - halfStreet) / 1.5);
  }
  const onAvenue = offAvenue < halfStreet && hasStreet(x, y, avenue);
  const onSide = offSide < halfStreet && hasStreet(x, y, null);
  if (onAvenue || onSide) {
    const off = Math.min(onAvenue ? offAvenue : halfStreet, onSide ? offSide : halfStreet);
    return smooth - kerb + crown * (1 - off / halfStreet);
  }
  return road;
}

/** The road that passes below the railway and climbs to the upper terrace. */
function underpassGround(x: number, y: number, ground: number, smooth: number): number {
  const off = Math.abs(x - underpass.x);
  if (off > 40 || y < 330 || y > 720) return ground;
  const along = Math.abs(y - railwayY(underpass.x)) - underpass.flatHalfLength;
  const road = underpass.bottom + Math.max(0, along) * underpass.ramp;
  const cut = Math.min(ground, road + Math.max(0, off - underpass.halfWidth) * 1.5);
  if (off < halfStreet && road > smooth) return smooth - kerb + crown * (1 - off / halfStreet);
  return cut;
}

/** Centre lines of all streets, broken where the street is. */
export function streets(): Street[] {
  const found: Street[] = [];
  for (let k = -6; k <= 6; k++) {
    const name = avenueName(k);
    for (const line of runs((s) => fromStreetFrame(s, k * blockV), k))
      found.push({ name, kind: 'avenue', line });
  }
  for (let k = -8; k <= 11; k++) {
    const name = sideNames[k + 8];
    for (const line of runs((s) => fromStreetFrame(k * blockU, s), null)) {
      found.push({ name, kind: 'side street', line });
    }
  }
  const road: [number, number][] = [];
  for (let y = 330; y <= 720; y += 15) road.push([underpass.x, y]);
  found.push({ name: 'Underway', kind: 'underpass road', line: road });
  return found;
}

/** Avenues are numbered southwards from the one through the frame's corner. */
export function avenueName(avenue: number): string {
  return avenueNames[avenue + 6];
}

function runs(at: (s: number) => [number, number], avenue: number | null): [number, number][][] {
  const lines: [number, number][][] = [];
  let line: [number, number][] = [];
  for (let s = -1400; s <= 1400; s += 5) {
    const point = at(s);
    if (hasStreet(point[0], point[1], avenue)) line.push(point);
    else {
      if (line.length > 3) lines.push(line);
      line = [];
    }
  }
  return lines;
}

const avenueNames = [
  'Teasel Walk',
  'Upper Wick',
  'Lantern Row',
  'Pennant Way',
  'Tallow Street',
  'High Quillet',
  'Middle Street',
  'Low Quillet',
  'Cooper Street',
  'Sedge Street',
  'Wharf Row',
  'Osier Way',
  'Strand End',
];

const sideNames = [
  'Alder Lane',
  'Barley Lane',
  'Candle Lane',
  'Drover Lane',
  'Elder Lane',
  'Flax Lane',
  'Gorse Lane',
  'Hazel Lane',
  'Inkhorn Lane',
  'Juniper Lane',
  'Kettle Lane',
  'Linnet Lane',
  'Mallow Lane',
  'Nettle Lane',
  'Oat Lane',
  'Plover Lane',
  'Quince Lane',
  'Rook Lane',
  'Saffron Lane',
  'Tansy Lane',
];
