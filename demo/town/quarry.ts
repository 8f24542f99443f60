/**
 * The quarry: prisms with vertical walls along cell edges, one cut into the other, all elevations multiples of
 * 1/64 m, so that every capacity is known exactly. Each pit is deeper than the way out of it.
 *
 * A quarry that overflows at the gate (35.5) holds a floor (31.0) whose water, below 31.5, is parted by the lip
 * around the sump. In the floor lie an east and a west cut, joined by a trench (30.25); in the west cut two pits.
 */
interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly elevation: number;
}

const box = (x: number, y: number, width: number, height: number, elevation: number): Box => ({
  x,
  y,
  width,
  height,
  elevation,
});

const rim = box(1494, 114, 252, 222, 36);
const gate = box(1616, 324, 8, 12, 35.5);
const floor = box(1506, 126, 228, 198, 31);
const west = box(1520, 150, 80, 110, 28);
const westDeep = box(1530, 160, 30, 40, 25);
const westShallow = box(1566, 214, 24, 30, 26);
const east = box(1640, 150, 80, 110, 27);
const eastDeep = box(1660, 180, 40, 44, 24.5);
const trench = box(1600, 200, 40, 4, 30.25);
const lip = box(1670, 280, 40, 34, 31.5);
const sump = box(1676, 286, 28, 22, 29.5);

/** In this order: each is cut into those before it. */
const boxes: readonly Box[] = [
  rim,
  gate,
  floor,
  west,
  westDeep,
  westShallow,
  east,
  eastDeep,
  trench,
  lip,
  sump,
];

/** The ground inside the quarry's rim, null outside. */
export function quarryGround(x: number, y: number): number | null {
  let elevation: number | null = null;
  for (const b of boxes) {
    if (x > b.x && x < b.x + b.width && y > b.y && y < b.y + b.height) elevation = b.elevation;
  }
  return elevation;
}

const areaOf = (b: Box): number => b.width * b.height;
const held = (area: number, b: Box, level: number): number => area * (level - b.elevation);

/** The quarry's ponds as its geometry gives them: capacity is a sum of areas times depths, worked out by hand. */
export function quarryPonds() {
  const westFloor = areaOf(west) - areaOf(westDeep) - areaOf(westShallow);
  const eastFloor = areaOf(east) - areaOf(eastDeep);
  const bareFloor = areaOf(floor) - areaOf(west) - areaOf(east) - areaOf(trench) - areaOf(lip);
  const lipOnly = areaOf(lip) - areaOf(sump);
  const westHolds = (level: number): number =>
    held(westFloor, west, level) +
    held(areaOf(westDeep), westDeep, level) +
    held(areaOf(westShallow), westShallow, level);
  const eastHolds = (level: number): number =>
    held(eastFloor, east, level) + held(areaOf(eastDeep), eastDeep, level);
  const floorHolds = (level: number): number =>
    westHolds(level) + eastHolds(level) + held(areaOf(trench), trench, level) + held(bareFloor, floor, level);
  const floorArea = areaOf(floor) - areaOf(lip);
  const full = gate.elevation;
  const quarryHolds = floorHolds(full) + held(lipOnly, lip, full) + held(areaOf(sump), sump, full);
  return [
    pond('quarry', null, eastDeep, full, areaOf(floor), quarryHolds, floor),
    pond('floor', 'quarry', eastDeep, lip.elevation, floorArea, floorHolds(lip.elevation), floor),
    pond('sump', 'quarry', sump, lip.elevation, areaOf(sump), held(areaOf(sump), sump, lip.elevation), sump),
    pond('west cut', 'floor', westDeep, trench.elevation, areaOf(west), westHolds(trench.elevation), west),
    pond('east cut', 'floor', eastDeep, trench.elevation, areaOf(east), eastHolds(trench.elevation), east),
    pond(
      'west cut, deep pit',
      'west cut',
      westDeep,
      west.elevation,
      areaOf(westDeep),
      held(areaOf(westDeep), westDeep, west.elevation),
      westDeep,
    ),
    pond(
      'west cut, shallow pit',
      'west cut',
      westShallow,
      west.elevation,
      areaOf(westShallow),
      held(areaOf(westShallow), westShallow, west.elevation),
      westShallow,
    ),
  ];
}

function pond(
  name: string,
  parent: string | null,
  deepest: Box,
  spillElevationM: number,
  areaM2: number,
  capacityM3: number,
  bounds: Box,
) {
  return {
    name,
    parent,
    pitElevationM: deepest.elevation,
    pit: { column: deepest.x, row: deepest.y },
    spillElevationM,
    depthM: spillElevationM - deepest.elevation,
    areaM2,
    capacityM3,
    bounds: { column: bounds.x, row: bounds.y, columns: bounds.width, rows: bounds.height },
  };
}
