import { OverbrimError } from './error.ts';
import type { RowMetrics } from './metrics.ts';

/**
 * One elevation grid. Cells are numbered row by row from the north-west corner: `index = row * width + column`.
 * `elevationM` is `height × width` float32 metres, NaN = void, never −0, never infinite.
 */
export interface Grid {
  readonly width: number;
  readonly height: number;
  readonly elevationM: Float32Array;
  readonly metrics: RowMetrics;
  readonly frame: Frame;
  /** Rectangles of voids that are narrow gaps between the files of a mosaic: walls unless declared open. */
  readonly gaps: readonly CellRect[];
}

/** A rectangle of cells. */
export interface CellRect {
  readonly column: number;
  readonly row: number;
  readonly width: number;
  readonly height: number;
}

/** How the four sides of a grid meet the rest of the world. */
export interface Frame {
  /** First and last column are neighbours (a grid that spans 360° of longitude, of at least 3 columns). */
  readonly wraps: boolean;
  /** `beyond`: the data ends here · `pole`: the side is the pole itself, nothing lies beyond · `pole-row`: the row's cells lie exactly on the pole and are one place. */
  readonly north: Side;
  readonly south: Side;
}

export type Side = 'beyond' | 'pole' | 'pole-row';

/** The frame of a grid that is a plain cut-out: data ends on all four sides. */
export const plainFrame: Frame = { wraps: false, north: 'beyond', south: 'beyond' };

/** Which neighbours water runs to: all eight, or only the four that share a side. */
export type Neighbours = 4 | 8;

/**
 * Checks and normalises elevations in place (−0 becomes 0) and joins them with their metrics.
 * @throws OverbrimError `bad-input` when the shape does not fit, a value is infinite, or every cell is void.
 */
export function gridOf(
  width: number,
  height: number,
  elevationM: Float32Array,
  metrics: RowMetrics,
  frame: Frame = plainFrame,
  gaps: readonly CellRect[] = [],
): Grid {
  if (!(Number.isInteger(width) && Number.isInteger(height) && width > 0 && height > 0)) {
    throw new OverbrimError(
      'bad-input',
      `A grid of ${width} × ${height} cells was given; both sides must be whole numbers of at least 1.`,
    );
  }
  if (elevationM.length !== width * height) {
    throw new OverbrimError(
      'bad-input',
      `${elevationM.length} elevations were given for ${width} × ${height} cells; expected ${width * height}, row by row.`,
    );
  }
  if (metrics.areaM2.length !== height) {
    throw new OverbrimError(
      'bad-input',
      `Metrics of ${metrics.areaM2.length} rows were given for a grid of ${height} rows; make them for the same grid.`,
    );
  }
  if (frame.wraps && width < 3) {
    throw new OverbrimError(
      'bad-input',
      `A grid of ${width} columns is said to wrap around; expected at least 3 columns, so give it as a plain frame.`,
    );
  }
  let voids = 0;
  for (let i = 0; i < elevationM.length; i++) {
    const z = elevationM[i];
    if (z !== z) voids++;
    else if (z === 0) elevationM[i] = 0;
    else if (z - z !== 0) {
      throw new OverbrimError(
        'bad-input',
        `The elevation at column ${i % width}, row ${Math.floor(i / width)} is ${z}; expected a finite number of metres or a void, so declare the value as no-data or mend the file.`,
      );
    }
  }
  if (voids === elevationM.length) {
    throw new OverbrimError(
      'bad-input',
      `All ${voids} cells are void; expected at least one elevation, so check the extent and the no-data value.`,
    );
  }
  return { width, height, elevationM, metrics, frame, gaps };
}
