import { steps } from './descend.ts';
import type { Labels } from './labels.ts';
import { columnStep, rowStep, sideBits } from './saddles.ts';
import { cellAt, type TileWindow } from './tile-window.ts';

/**
 * Pieces of void of one tile, 8-connected, halo included, so that pieces of two tiles that share a void cell are
 * the same piece. Cells of a gap between files make pieces of their own.
 */
export interface VoidPieces {
  readonly count: number;
  /** Piece of each window position, −1 on ground and beyond the grid; empty when the tile has no void. */
  readonly piece: Int32Array;
  /** 1 for a piece with a cell on the rim of the data. */
  readonly onRim: Uint8Array;
  /** 1 for a piece of a gap between files. */
  readonly isGap: Uint8Array;
  /** Void cells of the tile itself, a piece. */
  readonly cells: Float64Array;
  /** Smallest row-major index of a piece's cells, halo included. */
  readonly firstCell: Float64Array;
}

/** Each catchment's lowest cell beside a piece of void. */
export interface BesideVoid {
  readonly label: number;
  readonly piece: number;
  readonly position: number;
}

const none: VoidPieces = {
  count: 0,
  piece: new Int32Array(0),
  onRim: new Uint8Array(0),
  isGap: new Uint8Array(0),
  cells: new Float64Array(0),
  firstCell: new Float64Array(0),
};

export function voidPiecesOf(window: TileWindow): VoidPieces {
  const { tile, grid, elevationM: z } = window;
  const stride = tile.width + 2;
  if (!holdsVoid(window)) return none;
  const piece = new Int32Array(z.length).fill(-1);
  const step = steps(stride);
  const isGapCell = gapTest(window);
  const onRim: number[] = [];
  const isGap: number[] = [];
  const cells: number[] = [];
  const firstCell: number[] = [];
  const stack: number[] = [];
  for (let first = 0; first < z.length; first++) {
    if (z[first] === z[first] || piece[first] >= 0 || cellAt(first, tile, grid) < 0) continue;
    const id = onRim.push(0) - 1;
    const ofGap = isGapCell(first);
    isGap.push(ofGap ? 1 : 0);
    cells.push(0);
    firstCell.push(Number.POSITIVE_INFINITY);
    piece[first] = id;
    stack.push(first);
    for (let at = stack.pop(); at !== undefined; at = stack.pop()) {
      const r = Math.floor(at / stride);
      const c = at - r * stride;
      firstCell[id] = Math.min(firstCell[id], cellAt(at, tile, grid));
      if (r > 0 && c > 0 && r <= tile.height && c <= tile.width) {
        cells[id]++;
        if (isOnRim(window, r, c)) onRim[id] = 1;
      }
      for (let k = 0; k < 8; k++) {
        const nr = r + rowStep[k];
        const nc = c + columnStep[k];
        if (nr < 0 || nc < 0 || nr > tile.height + 1 || nc > tile.width + 1) continue;
        const n = at + step[k];
        if (z[n] === z[n] || piece[n] >= 0 || cellAt(n, tile, grid) < 0 || isGapCell(n) !== ofGap) continue;
        piece[n] = id;
        stack.push(n);
      }
    }
  }
  return {
    count: onRim.length,
    piece,
    onRim: Uint8Array.from(onRim),
    isGap: Uint8Array.from(isGap),
    cells: Float64Array.from(cells),
    firstCell: Float64Array.from(firstCell),
  };
}

/** Whether a window position (row and column from 1 inside the tile) lies where the data ends. */
export function isOnRim(window: TileWindow, r: number, c: number): boolean {
  const { tile, grid } = window;
  const row = tile.row + r - 1;
  const column = tile.column + c - 1;
  return (
    (row === 0 && grid.north === 'beyond') ||
    (row === grid.height - 1 && grid.south === 'beyond') ||
    (!grid.wraps && (column === 0 || column === grid.width - 1))
  );
}

/** For each catchment and piece of void that touch, the lowest cell of the catchment that touches. */
export function besideVoid(window: TileWindow, labels: Labels, pieces: VoidPieces): BesideVoid[] {
  if (pieces.count === 0) return [];
  const { tile, elevationM: z, neighbours } = window;
  const stride = tile.width + 2;
  const step = steps(stride);
  const lowest = new Map<number, BesideVoid>();
  for (let r = 1; r <= tile.height; r++) {
    for (let position = r * stride + 1; position <= r * stride + tile.width; position++) {
      if (z[position] !== z[position]) continue;
      for (let k = 0; k < 8; k++) {
        if (neighbours === 4 && !((sideBits >> k) & 1)) continue;
        const piece = pieces.piece[position + step[k]];
        if (piece < 0) continue;
        const label = labels.label[position];
        const key = label * pieces.count + piece;
        const held = lowest.get(key);
        if (held === undefined || z[position] < z[held.position]) lowest.set(key, { label, piece, position });
      }
    }
  }
  return [...lowest.values()];
}

/** Whether a window position lies in a gap between files. */
function gapTest(window: TileWindow): (position: number) => boolean {
  const { tile, grid, gaps } = window;
  if (gaps.length === 0) return () => false;
  return (position) => {
    const cell = cellAt(position, tile, grid);
    const row = Math.floor(cell / grid.width);
    const column = cell - row * grid.width;
    return gaps.some(
      (gap) =>
        row >= gap.row &&
        row < gap.row + gap.height &&
        column >= gap.column &&
        column < gap.column + gap.width,
    );
  };
}

function holdsVoid(window: TileWindow): boolean {
  const { tile, grid, elevationM: z } = window;
  for (let i = 0; i < z.length; i++) if (z[i] !== z[i] && cellAt(i, tile, grid) >= 0) return true;
  return false;
}
