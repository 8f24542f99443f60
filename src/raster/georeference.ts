import { OverbrimError } from '../core/error.ts';
import type { Directory, TiffFile } from './directories.ts';
import { numbersOf, tags } from './tag-values.ts';

/** Outer north-west corner and cell sizes, in units of the CRS. */
export interface Placement {
  readonly west: number;
  readonly north: number;
  readonly cellWidth: number;
  readonly cellHeight: number;
}

/**
 * Where the cells of the full-resolution image lie, from tie point and scale (tags 33922, 33550) or from the
 * transformation (tag 34264). Values that stand for points (PixelIsPoint) have their cells around them, so the
 * corner moves half a cell out (OGC GeoTIFF 1.1, clause 7.1 and annex H).
 * @throws OverbrimError `unsupported` without a georeference, or for one that is rotated, mirrored or by many points.
 */
export async function placementOf(
  tiff: TiffFile,
  directory: Directory,
  pixelIsPoint: boolean,
): Promise<Placement> {
  const { name } = tiff.reader;
  const matrix = await numbersOf(tiff, directory, tags.transformation);
  const scale = await numbersOf(tiff, directory, tags.cellScale);
  const ties = await numbersOf(tiff, directory, tags.tiePoints);
  let cellWidth: number;
  let cellHeight: number;
  let west: number;
  let north: number;
  if (scale.length >= 2 && ties.length === 6) {
    [cellWidth, cellHeight] = scale;
    west = ties[3] - ties[0] * cellWidth;
    north = ties[4] + ties[1] * cellHeight;
  } else if (matrix.length === 16) {
    if (matrix[1] !== 0 || matrix[4] !== 0) {
      throw unsupported(
        `${name} is rotated or sheared against its CRS (tag 34264); expected rows that run east, so warp it to a north-up grid first`,
      );
    }
    cellWidth = matrix[0];
    cellHeight = -matrix[5];
    west = matrix[3];
    north = matrix[7];
  } else if (ties.length > 6) {
    throw unsupported(
      `${name} is placed by ${ties.length / 6} control points; expected one tie point and a cell size, so warp it to a north-up grid first`,
    );
  } else {
    throw unsupported(
      `${name} has no georeference (tags 33550 and 33922, or 34264); expected a GeoTIFF, so give it its place and cell size`,
    );
  }
  if (![west, north, cellWidth, cellHeight].every(Number.isFinite) || cellWidth === 0 || cellHeight === 0) {
    throw unsupported(
      `${name} has cells of ${cellWidth} × ${cellHeight} at ${west}, ${north}; expected finite numbers above 0, so mend its georeference`,
    );
  }
  if (cellWidth < 0 || cellHeight < 0) {
    const how = cellHeight < 0 ? 'has its first row in the south' : 'has its first column in the east';
    throw unsupported(`${name} ${how}; expected a north-up grid, so flip or warp it first`);
  }
  const out = pixelIsPoint ? 0.5 : 0;
  return { west: west - out * cellWidth, north: north + out * cellHeight, cellWidth, cellHeight };
}

function unsupported(message: string): OverbrimError {
  return new OverbrimError('unsupported', `${message}.`);
}
