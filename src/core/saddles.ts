import type { Neighbours } from './grid.ts';

/**
 * Neighbours are numbered as they come row by row: 0 NW, 1 N, 2 NE, 3 W, 4 E, 5 SW, 6 S, 7 SE. A mask holds a bit
 * for each neighbour that is lower in the total order.
 */
export const columnStep = [-1, 0, 1, -1, 1, -1, 0, 1] as const;
export const rowStep = [-1, -1, -1, 0, 0, 1, 1, 1] as const;
/** Bits of the four neighbours that share a side. */
export const sideBits = 0b01011010;

/**
 * For each of the 256 masks the number of arcs: groups of lower neighbours that meet each other without the cell
 * in the middle. Only a cell with two or more can be the lowest pass between two catchments, since the members
 * of one arc are already joined below it.
 *
 * With 8 neighbours water also runs diagonally, so north and east meet. With 4 it needs the corner between
 * them, and an arc counts only if it holds a neighbour that shares a side with the cell.
 */
export function arcCounts(neighbours: Neighbours): Uint8Array {
  const counts = new Uint8Array(256);
  for (let mask = 0; mask < 256; mask++) {
    let seen = 0;
    for (let first = 0; first < 8; first++) {
      if (!((mask >> first) & 1) || (seen >> first) & 1) continue;
      let arc = 1 << first;
      for (let grown = 0; grown !== arc; ) {
        grown = arc;
        for (let a = 0; a < 8; a++) {
          if (!((arc >> a) & 1)) continue;
          for (let b = 0; b < 8; b++) if ((mask >> b) & 1 && meet(a, b, neighbours)) arc |= 1 << b;
        }
      }
      seen |= arc;
      if (neighbours === 8 || arc & sideBits) counts[mask]++;
    }
  }
  return counts;
}

function meet(a: number, b: number, neighbours: Neighbours): boolean {
  const columns = Math.abs(columnStep[a] - columnStep[b]);
  const rows = Math.abs(rowStep[a] - rowStep[b]);
  return neighbours === 8 ? Math.max(columns, rows) <= 1 : columns + rows <= 1;
}
