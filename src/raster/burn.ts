import type { Point } from './transform.ts';

/**
 * Cells that a line runs through, as `row * width + column`, cells outside left out. Neighbouring cells of the
 * result share a side, so that no way leads through the line diagonally. Grid traversal by Amanatides & Woo (1987).
 * `line` holds columns and rows as fractions.
 */
export function cellsOfLine(line: readonly Point[], width: number, height: number): number[] {
  const cells: number[] = [];
  const take = (column: number, row: number): void => {
    if (column >= 0 && row >= 0 && column < width && row < height) cells.push(row * width + column);
  };
  for (let i = 0; i + 1 < line.length; i++) {
    const [x0, y0] = line[i];
    const [x1, y1] = line[i + 1];
    const stepX = x1 > x0 ? 1 : -1;
    const stepY = y1 > y0 ? 1 : -1;
    let column = Math.floor(x0);
    let row = Math.floor(y0);
    const deltaX = Math.abs(1 / (x1 - x0));
    const deltaY = Math.abs(1 / (y1 - y0));
    let nextX = x1 === x0 ? Number.POSITIVE_INFINITY : (stepX > 0 ? column + 1 - x0 : x0 - column) * deltaX;
    let nextY = y1 === y0 ? Number.POSITIVE_INFINITY : (stepY > 0 ? row + 1 - y0 : y0 - row) * deltaY;
    take(column, row);
    while (Math.min(nextX, nextY) < 1) {
      if (nextX <= nextY) {
        column += stepX;
        nextX += deltaX;
      } else {
        row += stepY;
        nextY += deltaY;
      }
      take(column, row);
    }
  }
  return cells;
}

/**
 * Cells whose centre lies inside a polygon (rings of columns and rows as fractions, even-odd rule); when none
 * does, the cells that its outline runs through.
 */
export function cellsOfPolygon(
  rings: readonly (readonly Point[])[],
  width: number,
  height: number,
): number[] {
  const cells: number[] = [];
  let top = Number.POSITIVE_INFINITY;
  let bottom = Number.NEGATIVE_INFINITY;
  for (const ring of rings) {
    for (const [, y] of ring) {
      top = Math.min(top, y);
      bottom = Math.max(bottom, y);
    }
  }
  const last = Math.min(height - 1, Math.floor(bottom));
  for (let row = Math.max(0, Math.floor(top)); row <= last; row++) {
    const crossings = crossingsAt(rings, row + 0.5);
    for (let k = 0; k + 1 < crossings.length; k += 2) {
      const from = Math.max(0, Math.ceil(crossings[k] - 0.5));
      const to = Math.min(width, Math.ceil(crossings[k + 1] - 0.5));
      for (let column = from; column < to; column++) cells.push(row * width + column);
    }
  }
  return cells.length > 0 ? cells : rings.flatMap((ring) => cellsOfLine(ring, width, height));
}

/** Columns at which rings cross the middle of a row, from west to east. */
function crossingsAt(rings: readonly (readonly Point[])[], y: number): number[] {
  const columns: number[] = [];
  for (const ring of rings) {
    for (let i = 0; i + 1 < ring.length; i++) {
      const [x0, y0] = ring[i];
      const [x1, y1] = ring[i + 1];
      if (y0 <= y !== y1 <= y) columns.push(x0 + ((y - y0) / (y1 - y0)) * (x1 - x0));
    }
  }
  return columns.sort((a, b) => a - b);
}
