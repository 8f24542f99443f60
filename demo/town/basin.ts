/**
 * The detention basin: a flat floor, sides that rise 1 in 4 to a level crest, a weir notch in the south side.
 * Sides are cut in steps of one cell, so the capacity up to the weir is a plain sum.
 */
export const basin = {
  x: 1580,
  y: 1005,
  width: 80,
  height: 40,
  floor: 15,
  rise: 0.25,
  crest: 18.5,
  crestWidth: 4,
  weir: 17.25,
  weirX: 1617,
  weirWidth: 6,
  inlet: 17.75,
  inletX: 1618,
  inletWidth: 4,
} as const;

const steps = (basin.crest - basin.floor) / basin.rise;

/** The ground in and around the basin, given the ground that was there. */
export function basinGround(x: number, y: number, ground: number): number {
  const right = basin.x + basin.width;
  const bottom = basin.y + basin.height;
  const ring = Math.ceil(Math.max(basin.x - x, x - right, basin.y - y, y - bottom, 0));
  const beyond = ring - steps - basin.crestWidth;
  const isSouth = y > bottom;
  const inWeir = x > basin.weirX && x < basin.weirX + basin.weirWidth && isSouth;
  const inInlet = x > basin.inletX && x < basin.inletX + basin.inletWidth && y < basin.y;
  let z = Math.min(basin.floor + basin.rise * ring, basin.crest);
  if (beyond > 0) z = Math.max(ground, basin.crest - beyond / 3);
  if (inWeir && beyond <= 0) z = Math.min(z, basin.weir);
  if (inInlet && beyond <= 12) z = Math.min(z, basin.inlet + 0.02 * Math.max(0, ring - steps));
  // The tail ditch falls steeply down the terrace's edge, then gently over the valley floor to the river.
  const tail = y - bottom - steps - basin.crestWidth;
  const off = Math.max(0, Math.abs(x - basin.weirX - basin.weirWidth / 2) - basin.weirWidth / 2);
  const bed = Math.max(basin.weir - 0.1 - 0.04 * tail, 12.2 - 0.0045 * tail);
  if (tail > 0 && tail < 420 && off < 30) z = Math.min(z, bed + 0.3 * off);
  return z;
}

/** Volume below the weir: the floor, and each ring of cells a step higher, worked out from the drawing. */
export function basinCapacityM3(): number {
  const depth = basin.weir - basin.floor;
  let volume = basin.width * basin.height * depth;
  for (let ring = 1; ring * basin.rise < depth; ring++) {
    const outer = (basin.width + 2 * ring) * (basin.height + 2 * ring);
    const inner = (basin.width + 2 * ring - 2) * (basin.height + 2 * ring - 2);
    volume += (outer - inner) * (depth - ring * basin.rise);
  }
  return volume;
}
