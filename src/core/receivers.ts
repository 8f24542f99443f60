import { descend, descendAtSeam, pitMark } from './descend.ts';
import { descendByKeys } from './descend-by-keys.ts';
import type { ReceiverRoom } from './receiver-room.ts';
import { arcCounts } from './saddles.ts';
import type { TileWindow } from './tile-window.ts';

/** Where the water of a tile's cells runs, and where two catchments may meet. */
export interface Receivers {
  /** Window position of the receiver of each window position, or a mark; halo positions hold nothing. */
  readonly to: Int32Array;
  /** Lower neighbours of each window position as a mask (see saddles.ts). */
  readonly lower: Uint8Array;
  /** Window positions of pits, row by row; `pitCount` of them. */
  readonly pits: Int32Array;
  readonly pitCount: number;
  /** Window positions of cells that may be sills, row by row; `saddleCount` of them. */
  readonly saddles: Int32Array;
  readonly saddleCount: number;
}

const arcs = { 4: arcCounts(4), 8: arcCounts(8) };

/**
 * Each cell's water runs to the neighbour of steepest metric descent: of the neighbours at one distance (north and
 * south, west and east, diagonal) the lowest, and of those the steepest; among equals the first in row order.
 * Without a lower one it runs to the first equal neighbour of smaller row-major index, so that a flat needs no
 * special case; else the cell is a pit.
 *
 * Beside it the saddle test: cells whose lower neighbours form two or more arcs are the only ones that can be
 * sills. A made pit counts as one more arc.
 */
export function receiversOf(window: TileWindow, room: ReceiverRoom): Receivers {
  if (!descendByKeys(window, room)) descend(window, room);
  if (window.grid.wraps) descendAtSeam(window, room);
  for (const position of window.madePits) room.to[position] = pitMark;
  return { ...room, ...pitsAndSaddles(window, room) };
}

/** Lists pits and possible sills, row by row. */
function pitsAndSaddles(window: TileWindow, room: ReceiverRoom): { pitCount: number; saddleCount: number } {
  const { width, height } = window.tile;
  const { to, lower, pits, saddles } = room;
  const counts = arcs[window.neighbours];
  const made = new Set(window.madePits);
  let pitCount = 0;
  let saddleCount = 0;
  for (let r = 1; r <= height; r++) {
    const start = r * (width + 2);
    for (let i = start + 1; i <= start + width; i++) {
      const isPit = to[i] === pitMark;
      if (isPit) pits[pitCount++] = i;
      const count = counts[lower[i]];
      if (count >= 2 || (isPit && count === 1 && made.has(i))) saddles[saddleCount++] = i;
    }
  }
  return { pitCount, saddleCount };
}
