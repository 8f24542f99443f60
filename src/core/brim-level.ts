import type { Drainage } from './drainage.ts';
import type { Grid } from './grid.ts';
import type { Survey } from './survey.ts';

/**
 * Brim level of each cell: max(ground, the highest sill on the lowest way to an outlet), metres, row-major;
 * NaN on voids and on ground without any way to an outlet.
 */
export function brimLevels(grid: Grid, survey: Survey, drainage: Drainage): Float32Array {
  const { elevationM } = grid;
  const { leaf } = survey;
  const { levelM } = drainage;
  const out = new Float32Array(elevationM.length);
  for (let cell = 0; cell < out.length; cell++) {
    const l = leaf[cell];
    const level = l < 0 ? Number.POSITIVE_INFINITY : levelM[l];
    const z = elevationM[cell];
    out[cell] = level === Number.POSITIVE_INFINITY ? Number.NaN : z > level ? z : level;
  }
  return out;
}
