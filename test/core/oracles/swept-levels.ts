import { leavingLevels, type SmallGrid, touching } from './small-grid.ts';

/**
 * Brim level of each cell by sweeps over a brimming surface until none changes it (Planchon & Darboux 2001, with no
 * slope). Float64, row-major; NaN on voids, +∞ without a way to an outlet.
 */
export function sweptLevels(grid: SmallGrid): Float64Array {
  const touch = touching(grid);
  const level = leavingLevels(grid);
  const cells = Array.from(grid.z, (_, cell) => cell).filter((cell) => !Number.isNaN(grid.z[cell]));
  let changed = true;
  while (changed) {
    changed = false;
    for (const cell of cells) {
      for (const other of touch[cell]) {
        const over = Math.max(grid.z[cell], level[other]);
        if (over < level[cell]) {
          level[cell] = over;
          changed = true;
        }
      }
    }
    cells.reverse();
  }
  return level.map((l, cell) => (Number.isNaN(grid.z[cell]) ? Number.NaN : l + 0));
}
