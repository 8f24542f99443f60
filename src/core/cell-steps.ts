import type { Grid, Neighbours } from './grid.ts';
import { columnStep, rowStep, sideBits } from './saddles.ts';

/**
 * Row-major indices of a cell's neighbours inside the grid, in row order; across the seam where it wraps. On a row
 * that lies on a pole the others of the row touch it too (cellsOfPole).
 */
export function neighboursOf(grid: Grid, neighbours: Neighbours, cell: number): number[] {
  const { width, height, frame } = grid;
  const row = Math.floor(cell / width);
  const column = cell - row * width;
  const found: number[] = [];
  for (let k = 0; k < 8; k++) {
    if (neighbours === 4 && !((sideBits >> k) & 1)) continue;
    const r = row + rowStep[k];
    let c = column + columnStep[k];
    if (frame.wraps) c = (c + width) % width;
    if (r >= 0 && r < height && c >= 0 && c < width) found.push(r * width + c);
  }
  return found;
}

/** All cells of a row that lies on a pole, where they are one place and so all touch; none for a cell elsewhere. */
export function cellsOfPole(grid: Grid, cell: number): number[] {
  const { width, height, frame } = grid;
  const row = Math.floor(cell / width);
  const isPole =
    (row === 0 && frame.north === 'pole-row') || (row === height - 1 && frame.south === 'pole-row');
  return isPole ? Array.from({ length: width }, (_, column) => row * width + column) : [];
}

/** Distance between two cells' centres by the cell sizes of their rows, metres; the short way round where it wraps. */
export function distanceM(grid: Grid, a: number, b: number): number {
  const { width, metrics, frame } = grid;
  const rowA = Math.floor(a / width);
  const rowB = Math.floor(b / width);
  let columns = Math.abs(a - rowA * width - (b - rowB * width));
  if (frame.wraps) columns = Math.min(columns, width - columns);
  const east = (metrics.eastM[rowA] + metrics.eastM[rowB]) / 2;
  const south = (metrics.southM[rowA] + metrics.southM[rowB]) / 2;
  return Math.sqrt((columns * east) ** 2 + ((rowA - rowB) * south) ** 2);
}
