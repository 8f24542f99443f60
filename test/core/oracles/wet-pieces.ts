import { pieces, type SmallGrid, touching } from './small-grid.ts';

/**
 * The connected pieces of wet ground, that is level strictly above ground; each piece's cells ascending, pieces by
 * their first cell. Ground without a way to an outlet (level +∞ or NaN) counts as dry.
 */
export function wetPieces(grid: SmallGrid, levelM: ArrayLike<number>): number[][] {
  return pieces(touching(grid), (cell) => Number.isFinite(levelM[cell]) && levelM[cell] > grid.z[cell]);
}
