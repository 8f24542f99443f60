import type { CellRect, Grid, Neighbours, Side } from './grid.ts';

/** A rectangle of cells that is surveyed on its own. */
export type Tile = CellRect;

/** What a tile needs to know of the grid that it is cut from. */
export interface GridShape {
  readonly width: number;
  readonly height: number;
  readonly wraps: boolean;
  readonly north: Side;
  readonly south: Side;
}

/**
 * A tile's elevations with a halo of one cell: `(height + 2) × (width + 2)` float32 metres, row-major, NaN = void
 * or beyond the grid. Across the seam of a wrapped grid the halo holds the cells of the other side.
 */
export interface TileWindow {
  readonly tile: Tile;
  readonly grid: GridShape;
  readonly elevationM: Float32Array;
  /** Cell sizes of the tile's own rows, metres and square metres. */
  readonly eastM: Float64Array;
  readonly southM: Float64Array;
  readonly areaM2: Float64Array;
  readonly uniform: boolean;
  /** Largest cell area of the whole grid, the bound for sums of areas. */
  readonly areaBoundM2: number;
  /** Window positions of cells that are made pits. */
  readonly madePits: readonly number[];
  /** Gaps of the grid that may reach into the window. */
  readonly gaps: readonly CellRect[];
  readonly neighbours: Neighbours;
}

/** The tiles of a grid, row by row; those of the last column and row may be smaller. */
export function tilesOf(width: number, height: number, size: number): Tile[] {
  const tiles: Tile[] = [];
  for (let row = 0; row < height; row += size) {
    for (let column = 0; column < width; column += size) {
      tiles.push({
        column,
        row,
        width: Math.min(size, width - column),
        height: Math.min(size, height - row),
      });
    }
  }
  return tiles;
}

export function shapeOf(grid: Grid): GridShape {
  const { width, height, frame } = grid;
  return { width, height, wraps: frame.wraps, north: frame.north, south: frame.south };
}

/** Cuts a tile with its halo out of a grid in memory. `madePits` are row-major cells of the whole grid, ascending. */
export function tileWindow(
  grid: Grid,
  tile: Tile,
  neighbours: Neighbours,
  madePits: ArrayLike<number>,
): TileWindow {
  const shape = shapeOf(grid);
  const stride = tile.width + 2;
  const window = new Float32Array(stride * (tile.height + 2)).fill(Number.NaN);
  for (let r = -1; r <= tile.height; r++) {
    const row = tile.row + r;
    if (row < 0 || row >= grid.height) continue;
    const start = row * grid.width;
    const to = (r + 1) * stride;
    window.set(grid.elevationM.subarray(start + tile.column, start + tile.column + tile.width), to + 1);
    const west = columnBeside(tile.column - 1, shape);
    const east = columnBeside(tile.column + tile.width, shape);
    if (west >= 0) window[to] = grid.elevationM[start + west];
    if (east >= 0) window[to + stride - 1] = grid.elevationM[start + east];
  }
  const pits: number[] = [];
  for (let i = firstAtLeast(madePits, tile.row * grid.width); i < madePits.length; i++) {
    const row = Math.floor(madePits[i] / grid.width);
    if (row >= tile.row + tile.height) break;
    const column = madePits[i] - row * grid.width - tile.column;
    if (column >= 0 && column < tile.width) pits.push((row - tile.row + 1) * stride + column + 1);
  }
  const rows = [tile.row, tile.row + tile.height] as const;
  const { metrics } = grid;
  return {
    tile,
    grid: shape,
    elevationM: window,
    eastM: metrics.eastM.slice(...rows),
    southM: metrics.southM.slice(...rows),
    areaM2: metrics.areaM2.slice(...rows),
    uniform: metrics.uniform,
    areaBoundM2: metrics.areaBoundM2,
    madePits: pits,
    gaps: grid.gaps.filter((gap) => isNear(gap, tile, grid)),
    neighbours,
  };
}

/** The column itself, the one on the other side of the seam, or −1 beyond the grid. */
export function columnBeside(column: number, grid: GridShape): number {
  if (column >= 0 && column < grid.width) return column;
  return grid.wraps ? (column + grid.width) % grid.width : -1;
}

/** Row-major index in the whole grid of a window position, or −1 beyond the grid. */
export function cellAt(position: number, tile: Tile, grid: GridShape): number {
  const stride = tile.width + 2;
  const r = Math.floor(position / stride);
  const row = tile.row + r - 1;
  const column = columnBeside(tile.column + position - r * stride - 1, grid);
  return row < 0 || row >= grid.height || column < 0 ? -1 : row * grid.width + column;
}

/** Whether a rectangle may touch a tile or its halo; columns count as near wherever the grid wraps. */
function isNear(rect: CellRect, tile: Tile, grid: Grid): boolean {
  const rows = rect.row <= tile.row + tile.height && tile.row <= rect.row + rect.height;
  const columns = rect.column <= tile.column + tile.width && tile.column <= rect.column + rect.width;
  return rows && (columns || grid.frame.wraps);
}

function firstAtLeast(sorted: ArrayLike<number>, value: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle] < value) low = middle + 1;
    else high = middle;
  }
  return low;
}
