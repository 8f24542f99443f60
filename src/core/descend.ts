import type { ReceiverRoom } from './receiver-room.ts';
import { columnStep, rowStep, sideBits } from './saddles.ts';
import type { TileWindow } from './tile-window.ts';

/** The receiver of a cell that has none: a pit. */
export const pitMark = -1;
/** The receiver of a void. */
export const voidMark = -2;

/** The plain pass: eight comparisons a cell. Serves every elevation, and as reference for the quick one. */
export function descend(window: TileWindow, room: ReceiverRoom): void {
  const { width, height } = window.tile;
  const stride = width + 2;
  const allowed = window.neighbours === 8 ? 0b11111111 : sideBits;
  const inverse = new Float64Array(8);
  for (let r = 1; r <= height; r++) {
    setInverseDistances(inverse, window, r - 1);
    for (let i = r * stride + 1; i <= r * stride + width; i++)
      descendCell(window, room, i, inverse, allowed, 0);
  }
}

/** Columns beside the seam of a wrapped grid, where west and east change places in the order of indices. */
export function descendAtSeam(window: TileWindow, room: ReceiverRoom): void {
  const { column, width, height } = window.tile;
  const stride = width + 2;
  const allowed = window.neighbours === 8 ? 0b11111111 : sideBits;
  const inverse = new Float64Array(8);
  for (let r = 1; r <= height; r++) {
    setInverseDistances(inverse, window, r - 1);
    if (column === 0) descendCell(window, room, r * stride + 1, inverse, allowed, -1);
    if (column + width === window.grid.width)
      descendCell(window, room, r * stride + width, inverse, allowed, 1);
  }
}

/** Receiver and lower neighbours of one cell. */
function descendCell(
  window: TileWindow,
  room: ReceiverRoom,
  i: number,
  inverse: Float64Array,
  allowed: number,
  onSeam: -1 | 0 | 1,
): void {
  const z = window.elevationM;
  const stride = window.tile.width + 2;
  const z0 = z[i];
  room.lower[i] = 0;
  if (Number.isNaN(z0)) {
    room.to[i] = voidMark;
    return;
  }
  let mask = 0;
  for (let k = 0; k < 8; k++) {
    const there = z[i + rowStep[k] * stride + columnStep[k]];
    if (there < z0 || (there === z0 && comesBefore(k, onSeam))) mask |= 1 << k;
  }
  room.lower[i] = mask;
  let receiver = pitMark;
  let steepest = 0;
  let first = 8;
  for (const group of distanceGroups) {
    let lowest = -1;
    for (const k of group) {
      const there = z[i + rowStep[k] * stride + columnStep[k]];
      if (!((allowed >> k) & 1) || !(there < z0)) continue;
      if (lowest < 0 || there < z[i + rowStep[lowest] * stride + columnStep[lowest]]) lowest = k;
    }
    if (lowest < 0) continue;
    const at = i + rowStep[lowest] * stride + columnStep[lowest];
    const slope = (z0 - z[at]) * inverse[lowest];
    if (slope > steepest || (slope === steepest && lowest < first)) {
      steepest = slope;
      first = lowest;
      receiver = at;
    }
  }
  if (receiver === pitMark && (mask & allowed) !== 0) {
    const k = onSeam === 0 ? lowestBit(mask & allowed) : firstBefore(mask & allowed, onSeam);
    receiver = i + rowStep[k] * stride + columnStep[k];
  }
  room.to[i] = receiver;
}

/** Neighbours at one distance: north and south, west and east, diagonal. */
const distanceGroups = [
  [1, 6],
  [3, 4],
  [0, 2, 5, 7],
] as const;

/** Window offsets of the eight neighbours. */
export function steps(stride: number): Int32Array {
  return Int32Array.of(-stride - 1, -stride, -stride + 1, -1, 1, stride - 1, stride, stride + 1);
}

export function lowestBit(mask: number): number {
  return 31 - Math.clz32(mask & -mask);
}

/** Inverse distances from a cell of one row to its eight neighbours, 1/m; infinite where neighbours coincide. */
export function setInverseDistances(out: Float64Array, window: TileWindow, row: number): void {
  const east = window.eastM[row];
  const south = window.southM[row];
  const diagonal = 1 / Math.sqrt(east * east + south * south);
  for (let k = 0; k < 8; k++) {
    out[k] = columnStep[k] === 0 ? 1 / south : (sideBits >> k) & 1 ? 1 / east : diagonal;
  }
}

/** Whether neighbour k has a smaller row-major index than the cell. Across the seam, west and east change places. */
function comesBefore(k: number, onSeam: -1 | 0 | 1): boolean {
  if (k === 3) return onSeam !== -1;
  if (k === 4) return onSeam === 1;
  return k < 3;
}

/** The neighbour of smallest row-major index among those of a mask that come before the cell on the seam. */
function firstBefore(mask: number, onSeam: -1 | 0 | 1): number {
  const rowOrder = onSeam === -1 ? [1, 2, 0, 3, 4] : [2, 0, 1, 4, 3];
  for (const k of rowOrder) if ((mask >> k) & 1) return k;
  return lowestBit(mask);
}
