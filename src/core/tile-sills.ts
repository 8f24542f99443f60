import { steps } from './descend.ts';
import { haloLabel, type Labels } from './labels.ts';
import { orderedKeys, stableOrder } from './order.ts';
import type { Receivers } from './receivers.ts';
import { sideBits } from './saddles.ts';
import { cellAt, type TileWindow } from './tile-window.ts';
import { UnionFind } from './union-find.ts';

/**
 * Sills of one tile that its minimum spanning forest keeps, lowest first. The sill cell is the higher of the two
 * cells that touch and always lies in the tile; the other may lie in the halo.
 */
export interface TileSills {
  readonly elevationM: Float32Array;
  /** Row-major cells of the whole grid. */
  readonly sillCell: Float64Array;
  readonly otherCell: Float64Array;
  /** Labels of the two cells. */
  readonly sillLabel: Int32Array;
  readonly otherLabel: Int32Array;
}

/** Buffers for one tile size, grown when a tile needs more. */
export interface SillRoom {
  sill: Int32Array;
  other: Int32Array;
}

export function sillRoom(cells: number): SillRoom {
  return { sill: new Int32Array(cells), other: new Int32Array(cells) };
}

/**
 * Candidates come from cells that passed the saddle test, in the total order of sills by construction, but for
 * their elevation; a stable sort by elevation gives the total order, and Kruskal (1956) the forest. A
 * heaviest edge of a cycle is never needed again, whatever is joined, added or declared an outlet later.
 */
export function tileSills(
  window: TileWindow,
  receivers: Receivers,
  labels: Labels,
  room: SillRoom,
): TileSills {
  const { label } = labels;
  const count = candidates(window, receivers, labels, room);
  const { sill, other } = room;
  const elevationM = new Float32Array(count);
  for (let k = 0; k < count; k++) elevationM[k] = window.elevationM[sill[k]];
  const sorted = stableOrder(count, [orderedKeys(elevationM)]);
  const sets = new UnionFind(labels.pitCount + labels.halo.length);
  let kept = 0;
  const keptAt = new Int32Array(count);
  for (let k = 0; k < count; k++) {
    const at = sorted[k];
    const a = sets.root(label[sill[at]]);
    const b = sets.root(label[other[at]]);
    if (a === b) continue;
    sets.join(a, b);
    keptAt[kept++] = at;
  }
  const sills: TileSills = {
    elevationM: new Float32Array(kept),
    sillCell: new Float64Array(kept),
    otherCell: new Float64Array(kept),
    sillLabel: new Int32Array(kept),
    otherLabel: new Int32Array(kept),
  };
  for (let k = 0; k < kept; k++) {
    const at = keptAt[k];
    sills.elevationM[k] = elevationM[at];
    sills.sillCell[k] = cellAt(sill[at], window.tile, window.grid);
    sills.otherCell[k] = cellAt(other[at], window.tile, window.grid);
    sills.sillLabel[k] = label[sill[at]];
    sills.otherLabel[k] = label[other[at]];
  }
  return sills;
}

/** Fills the room with candidates and returns how many there are. */
function candidates(window: TileWindow, receivers: Receivers, labels: Labels, room: SillRoom): number {
  const { tile, grid, neighbours } = window;
  const { saddles, saddleCount, lower: lowerMask } = receivers;
  const { label } = labels;
  const step = steps(tile.width + 2);
  let count = 0;
  const lower: number[] = [];
  for (let s = 0; s < saddleCount; s++) {
    const position = saddles[s];
    const mask = neighbours === 8 ? lowerMask[position] : lowerMask[position] & sideBits;
    const own = label[position];
    lower.length = 0;
    for (let k = 0; k < 8; k++) if ((mask >> k) & 1) lower.push(position + step[k]);
    // Across the seam of a wrapped grid the order of neighbours is not that of their row-major indices.
    if (grid.wraps && lower.length > 1) lower.sort((a, b) => cellAt(a, tile, grid) - cellAt(b, tile, grid));
    if (count + 8 > room.sill.length) grow(room);
    const first = count;
    for (const n of lower) {
      const there = label[n] < 0 ? haloLabel(labels, n) : label[n];
      let known = there === own;
      for (let e = first; e < count && !known; e++) known = label[room.other[e]] === there;
      if (known) continue;
      room.sill[count] = position;
      room.other[count] = n;
      count++;
    }
  }
  return count;
}

/** Room for twice as many candidates. */
function grow(room: SillRoom): void {
  for (const name of ['sill', 'other'] as const) {
    const larger = new Int32Array(room[name].length * 2 + 8);
    larger.set(room[name]);
    room[name] = larger;
  }
}
