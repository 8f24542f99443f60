import { haloLabel, type Labels } from './labels.ts';
import { type Receivers, steps } from './receivers.ts';
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

/** Candidates of one tile that a sort key has room for: elevation takes 32 of its 53 bits. */
const sequenceRoom = 2 ** 21;

/** Buffers for one tile size. */
export interface SillRoom {
  readonly keys: Float64Array;
  readonly sill: Int32Array;
  readonly other: Int32Array;
}

export function sillRoom(cells: number): SillRoom {
  const most = Math.min(sequenceRoom, cells * 8);
  return { keys: new Float64Array(most), sill: new Int32Array(most), other: new Int32Array(most) };
}

/**
 * Candidates come from cells that passed the saddle test, in the total order of sills by construction, but for
 * their elevation; sorting by (elevation, sequence) gives the total order, and Kruskal (1956) the forest. A
 * heaviest edge of a cycle is never needed again, whatever is joined, added or declared an outlet later.
 */
export function tileSills(
  window: TileWindow,
  receivers: Receivers,
  labels: Labels,
  room: SillRoom,
): TileSills {
  const { keys, sill, other } = room;
  const { label } = labels;
  const count = candidates(window, receivers, labels, room);
  const sorted = keys.subarray(0, count).sort();
  const sets = new UnionFind(labels.pitCount + labels.halo.length);
  let kept = 0;
  const keptAt = new Int32Array(count);
  for (let k = 0; k < count; k++) {
    const at = sorted[k] % sequenceRoom;
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
    sills.elevationM[k] = window.elevationM[sill[at]];
    sills.sillCell[k] = cellAt(sill[at], window.tile, window.grid);
    sills.otherCell[k] = cellAt(other[at], window.tile, window.grid);
    sills.sillLabel[k] = label[sill[at]];
    sills.otherLabel[k] = label[other[at]];
  }
  return sills;
}

/** Fills the room with candidates and their sort keys and returns how many there are. */
function candidates(window: TileWindow, receivers: Receivers, labels: Labels, room: SillRoom): number {
  const { tile, grid, elevationM: z, neighbours } = window;
  const { saddles, saddleCount, saddleMasks } = receivers;
  const { label } = labels;
  const step = steps(tile.width + 2);
  const bits = new Int32Array(z.buffer, z.byteOffset, z.length);
  let count = 0;
  const lower: number[] = [];
  for (let s = 0; s < saddleCount; s++) {
    const position = saddles[s];
    const mask = neighbours === 8 ? saddleMasks[s] : saddleMasks[s] & sideBits;
    const own = label[position];
    lower.length = 0;
    for (let k = 0; k < 8; k++) if ((mask >> k) & 1) lower.push(position + step[k]);
    // Across the seam of a wrapped grid the order of neighbours is not that of their row-major indices.
    if (grid.wraps && lower.length > 1) lower.sort((a, b) => cellAt(a, tile, grid) - cellAt(b, tile, grid));
    const b = bits[position];
    const ordered = (b < 0 ? ~b : b | 0x80000000) >>> 0;
    const first = count;
    for (const n of lower) {
      const there = label[n] < 0 ? haloLabel(labels, n) : label[n];
      let known = there === own;
      for (let e = first; e < count && !known; e++) known = label[room.other[e]] === there;
      if (known) continue;
      room.sill[count] = position;
      room.other[count] = n;
      room.keys[count] = ordered * sequenceRoom + count;
      count++;
    }
  }
  return count;
}
