import { OverbrimError } from '../core/error.ts';
import type { CellRect } from '../core/grid.ts';
import type { ElevationFile } from './elevation-file.ts';
import type { Placement } from './georeference.ts';
import type { ImageLayout } from './image-layout.ts';

/** One file's place in the common grid, in cells of it. */
export interface Part extends CellRect {
  readonly file: ElevationFile;
  readonly layout: ImageLayout;
}

/** Several files on one grid; a single file is a mosaic of one. */
export interface Mosaic {
  readonly placement: Placement;
  readonly width: number;
  readonly height: number;
  /** In the order in which the files were named: where they overlap, the first with a value wins. */
  readonly parts: readonly Part[];
}

/** Share of a cell by which tiles may lie off their common grid. */
const alignment = 1e-3;

/**
 * Puts files of one CRS, cell size and alignment on their common grid.
 * `level` 0 is the full resolution, 1 each file's first overview, and so on.
 * @throws OverbrimError `unsupported` when a file does not fit the first.
 */
export function mosaicOf(files: readonly ElevationFile[], level = 0): Mosaic {
  const placed = files.map((file) => placedLevel(file, level));
  const first = placed[0];
  const { cellWidth, cellHeight } = first.placement;
  const offsets = placed.map(({ placement, layout, file }) => {
    const sizeOff = Math.max(
      Math.abs(placement.cellWidth / cellWidth - 1) * layout.width,
      Math.abs(placement.cellHeight / cellHeight - 1) * layout.height,
    );
    if (sizeOff > alignment) {
      throw misfit(
        file,
        first.file,
        `has cells of ${placement.cellWidth} × ${placement.cellHeight}`,
        `${cellWidth} × ${cellHeight}`,
      );
    }
    const column = (placement.west - first.placement.west) / cellWidth;
    const row = (first.placement.north - placement.north) / cellHeight;
    const off = Math.max(Math.abs(column - Math.round(column)), Math.abs(row - Math.round(row)));
    if (off > alignment) {
      throw misfit(file, first.file, `lies ${off.toFixed(3)} of a cell off the grid`, `at most ${alignment}`);
    }
    return { column: Math.round(column), row: Math.round(row) };
  });
  const left = Math.min(...offsets.map(({ column }) => column));
  const top = Math.min(...offsets.map(({ row }) => row));
  const parts = placed.map(({ file, layout }, i) => ({
    file,
    layout,
    column: offsets[i].column - left,
    row: offsets[i].row - top,
    width: layout.width,
    height: layout.height,
  }));
  return {
    placement: {
      west: first.placement.west + left * cellWidth,
      north: first.placement.north - top * cellHeight,
      cellWidth,
      cellHeight,
    },
    width: Math.max(...parts.map((part) => part.column + part.width)),
    height: Math.max(...parts.map((part) => part.row + part.height)),
    parts,
  };
}

/** @throws OverbrimError `unsupported` for another CRS or another vertical datum than the first file's. */
export function checkSameReference(files: readonly ElevationFile[]): void {
  const first = files[0];
  for (const file of files) {
    if (file.crs.proj4 !== first.crs.proj4) {
      throw misfit(file, first, `is in ${file.crs.name}`, first.crs.name);
    }
    const datum = file.vertical.datum;
    const known = files.find((other) => other.vertical.datum !== null)?.vertical.datum ?? null;
    if (datum !== null && datum !== known) {
      throw new OverbrimError(
        'unsupported',
        `${file.reader.name} has heights above ${datum} and other files above ${known}, which may differ by metres; bring all to one vertical datum first.`,
      );
    }
  }
}

/** An overview covers the same ground as the full image, so its cells are larger by the ratio of their numbers. */
function placedLevel(
  file: ElevationFile,
  level: number,
): { file: ElevationFile; layout: ImageLayout; placement: Placement } {
  const layout = file.levels[level];
  const { placement, levels } = file;
  return {
    file,
    layout,
    placement: {
      ...placement,
      cellWidth: (placement.cellWidth * levels[0].width) / layout.width,
      cellHeight: (placement.cellHeight * levels[0].height) / layout.height,
    },
  };
}

function misfit(file: ElevationFile, first: ElevationFile, found: string, expected: string): OverbrimError {
  return new OverbrimError(
    'unsupported',
    `${file.reader.name} ${found}; expected ${expected} as in ${first.reader.name}, so warp it to the same grid first.`,
  );
}
