import { distinctLevels, leavingLevels, pieces, type SmallGrid, touching } from './small-grid.ts';

/**
 * Brim level of each cell by its definition: the lowest t at which the cell is joined, within {z ≤ t}, to a cell
 * from which water leaves at t or lower. Float64, row-major; NaN on voids, +∞ without a way to an outlet.
 */
export function thresholdLevels(grid: SmallGrid): Float64Array {
  const touch = touching(grid);
  const leaving = leavingLevels(grid);
  const level = Float64Array.from(grid.z, (z) => (Number.isNaN(z) ? Number.NaN : Number.POSITIVE_INFINITY));
  for (const t of distinctLevels(grid)) {
    for (const piece of pieces(touch, (cell) => grid.z[cell] <= t)) {
      if (!piece.some((cell) => leaving[cell] <= t)) continue;
      for (const cell of piece) if (level[cell] === Number.POSITIVE_INFINITY) level[cell] = t;
    }
  }
  return level;
}
