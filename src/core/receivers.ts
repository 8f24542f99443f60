import { arcCounts, columnStep, sideBits } from './saddles.ts';
import type { TileWindow } from './tile-window.ts';

/** The receiver of a cell that has none: a pit. */
export const pitMark = -1;
/** The receiver of a void. */
export const voidMark = -2;

/** Where the water of a tile's cells runs, and where two catchments may meet. */
export interface Receivers {
  /** Window position of the receiver of each window position, or a mark; halo positions hold nothing. */
  readonly to: Int32Array;
  /** Window positions of pits, row by row; `pitCount` of them. */
  readonly pits: Int32Array;
  readonly pitCount: number;
  /** Window positions of cells that may be sills, row by row; `saddleCount` of them. */
  readonly saddles: Int32Array;
  readonly saddleCount: number;
  /** Lower neighbours of each of those as a mask (see saddles.ts). */
  readonly saddleMasks: Uint8Array;
}

const arcs = { 4: arcCounts(4), 8: arcCounts(8) };

/**
 * One pass over a tile: each cell's water runs to the neighbour of steepest metric descent (the first such in
 * row order); without a lower one to the first equal neighbour of smaller row-major index, so that a flat needs
 * no special case; else the cell is a pit. Beside it the saddle test: cells whose lower neighbours form two or
 * more arcs are the only ones that can be sills. A made pit counts as one more arc.
 */
export function receiversOf(window: TileWindow, room: ReceiverRoom): Receivers {
  const { tile, elevationM: z, neighbours } = window;
  const stride = tile.width + 2;
  const { to, pits, saddles, saddleMasks, made } = room;
  const counts = arcs[neighbours];
  const diagonals = neighbours === 8;
  for (const position of window.madePits) made[position] = 1;
  const anyMade = window.madePits.length > 0;
  let pitCount = 0;
  let saddleCount = 0;
  const step = steps(stride);
  const slope = new Float64Array(8);
  for (let r = 1; r <= tile.height; r++) {
    setInverseDistances(slope, window, r - 1);
    const [dNW, dN, , dW] = slope;
    const dD = diagonals ? dNW : 0;
    const start = r * stride;
    for (let c = 1; c <= tile.width; c++) {
      const i = start + c;
      const z0 = z[i];
      if (z0 !== z0) {
        to[i] = voidMark;
        continue;
      }
      let mask = 0;
      let best = 0;
      let receiver = pitMark;
      const onSeam = seam(window, c);
      if (onSeam === 0) {
        // Neighbours that come before the cell are lower when equal, those after it are not.
        let fall = z0 - z[i - stride - 1];
        if (fall >= 0) {
          mask = 1;
          const s = fall * dD;
          if (s > best) {
            best = s;
            receiver = i - stride - 1;
          }
        }
        fall = z0 - z[i - stride];
        if (fall >= 0) {
          mask |= 2;
          const s = fall * dN;
          if (s > best) {
            best = s;
            receiver = i - stride;
          }
        }
        fall = z0 - z[i - stride + 1];
        if (fall >= 0) {
          mask |= 4;
          const s = fall * dD;
          if (s > best) {
            best = s;
            receiver = i - stride + 1;
          }
        }
        fall = z0 - z[i - 1];
        if (fall >= 0) {
          mask |= 8;
          const s = fall * dW;
          if (s > best) {
            best = s;
            receiver = i - 1;
          }
        }
        fall = z0 - z[i + 1];
        if (fall > 0) {
          mask |= 16;
          const s = fall * dW;
          if (s > best) {
            best = s;
            receiver = i + 1;
          }
        }
        fall = z0 - z[i + stride - 1];
        if (fall > 0) {
          mask |= 32;
          const s = fall * dD;
          if (s > best) {
            best = s;
            receiver = i + stride - 1;
          }
        }
        fall = z0 - z[i + stride];
        if (fall > 0) {
          mask |= 64;
          const s = fall * dN;
          if (s > best) {
            best = s;
            receiver = i + stride;
          }
        }
        fall = z0 - z[i + stride + 1];
        if (fall > 0) {
          mask |= 128;
          const s = fall * dD;
          if (s > best) {
            best = s;
            receiver = i + stride + 1;
          }
        }
      } else {
        for (let k = 0; k < 8; k++) {
          const fall = z0 - z[i + step[k]];
          if (fall > 0 || (fall === 0 && comesBefore(k, onSeam))) mask |= 1 << k;
          if (fall > 0 && (diagonals || (sideBits >> k) & 1) && fall * slope[k] > best) {
            best = fall * slope[k];
            receiver = i + step[k];
          }
        }
      }
      if (receiver === pitMark) {
        const equal = diagonals ? mask : mask & sideBits;
        if (equal !== 0) receiver = i + step[onSeam === 0 ? lowestBit(equal) : firstBefore(equal, onSeam)];
      }
      if (anyMade && made[i] === 1) {
        receiver = pitMark;
        if (counts[mask] >= 1) {
          saddles[saddleCount] = i;
          saddleMasks[saddleCount++] = mask;
        }
      } else if (counts[mask] >= 2) {
        saddles[saddleCount] = i;
        saddleMasks[saddleCount++] = mask;
      }
      to[i] = receiver;
      if (receiver === pitMark) pits[pitCount++] = i;
    }
  }
  for (const position of window.madePits) made[position] = 0;
  return { to, pits, pitCount, saddles, saddleCount, saddleMasks };
}

/** Buffers for one tile size, to be used again for each tile. */
export interface ReceiverRoom {
  readonly to: Int32Array;
  readonly pits: Int32Array;
  readonly saddles: Int32Array;
  readonly saddleMasks: Uint8Array;
  readonly made: Uint8Array;
}

export function receiverRoom(cells: number): ReceiverRoom {
  return {
    to: new Int32Array(cells),
    pits: new Int32Array(cells),
    saddles: new Int32Array(cells),
    saddleMasks: new Uint8Array(cells),
    made: new Uint8Array(cells),
  };
}

/** Window offsets of the eight neighbours. */
export function steps(stride: number): Int32Array {
  return Int32Array.of(-stride - 1, -stride, -stride + 1, -1, 1, stride - 1, stride, stride + 1);
}

/** −1 on the first column of a wrapped grid, 1 on its last, else 0. */
function seam(window: TileWindow, c: number): -1 | 0 | 1 {
  if (!window.grid.wraps) return 0;
  const column = window.tile.column + c - 1;
  return column === 0 ? -1 : column === window.grid.width - 1 ? 1 : 0;
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

function lowestBit(mask: number): number {
  return 31 - Math.clz32(mask & -mask);
}

/** Inverse distances from a cell of one row to its eight neighbours, 1/m; infinite where neighbours coincide. */
function setInverseDistances(out: Float64Array, window: TileWindow, row: number): void {
  const east = window.eastM[row];
  const south = window.southM[row];
  const diagonal = 1 / Math.sqrt(east * east + south * south);
  for (let k = 0; k < 8; k++) {
    out[k] = columnStep[k] === 0 ? 1 / south : (sideBits >> k) & 1 ? 1 / east : diagonal;
  }
}
