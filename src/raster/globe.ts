import type { Frame, Side } from '../core/grid.ts';
import type { Placement } from './georeference.ts';

/** How a geographic grid meets itself and the poles. */
export interface Globe {
  readonly frame: Frame;
  /** The last column repeats the first. */
  readonly repeatsColumn: boolean;
}

/** A part of a degree that rounding in a file may cost. */
const exact = 1e-6;

/**
 * Finds longitude wrap and poles from the geotransform alone: 360° within half a cell, with or without one column
 * more. Only a wrapped grid reaches round a pole; a row is the pole itself when its centres lie on it.
 */
export function globeOf(placement: Placement, width: number, height: number): Globe {
  const { north, cellWidth, cellHeight } = placement;
  const over = width - 360 / cellWidth;
  const repeatsColumn = width > 1 && Math.abs(over - 1) < 0.5;
  const wraps = repeatsColumn || Math.abs(over) <= 0.5;
  const side = (edge: number, centre: number): Side => {
    if (!wraps) return 'beyond';
    if (Math.abs(Math.abs(centre) - 90) <= exact * cellHeight) return 'pole-row';
    return Math.abs(Math.abs(edge) - 90) <= cellHeight / 2 ? 'pole' : 'beyond';
  };
  const south = north - height * cellHeight;
  return {
    frame: {
      wraps,
      north: side(north, north - cellHeight / 2),
      south: side(south, south + cellHeight / 2),
    },
    repeatsColumn,
  };
}
