import { OverbrimError } from '../core/error.ts';
import type { CellRect } from '../core/grid.ts';
import type { ElevationFile } from './elevation-file.ts';
import { globeOf } from './globe.ts';
import { type Mosaic, mosaicOf } from './mosaic.ts';

/** Which part of the terrain to read, and how finely. */
export interface Extract {
  /** Cells at full resolution, counted from the north-west corner of all files together. */
  readonly window?: CellRect;
  /** West, south, east, north in units of the CRS; cells that touch it are read. Instead of `window`. */
  readonly bbox?: readonly [number, number, number, number];
  /** Most cells to read: the finest overview within it is taken. Default: full resolution. */
  readonly cellBudget?: number;
}

/** What will be read: a mosaic at one level, and a rectangle of its cells. */
export interface Plan {
  readonly level: number;
  readonly mosaic: Mosaic;
  readonly rect: CellRect;
  /** The mosaic's last column repeats its first and lies outside `rect`. */
  readonly droppedColumn: boolean;
}

/**
 * Chooses window and overview without reading a cell.
 * @throws OverbrimError `too-large` when more cells would be read than can be, `bad-input` for a cell budget below
 * every level or an extent outside the terrain.
 */
export function readingPlan(files: readonly ElevationFile[], extract: Extract, mostCells: number): Plan {
  const full = mosaicOf(files);
  const budget = Math.min(extract.cellBudget ?? Number.POSITIVE_INFINITY, mostCells);
  const plan = planAt(files, full, full, 0, extract);
  const cells = plan.rect.width * plan.rect.height;
  if (cells <= budget) return plan;
  if (extract.cellBudget === undefined) {
    throw new OverbrimError(
      'too-large',
      `The terrain has ${plan.rect.width} × ${plan.rect.height} = ${cells} cells; at most ${mostCells} are read, so give an extent (--extent) or a cell budget (--cell-budget).`,
    );
  }
  const levels = Math.min(...files.map((file) => file.levels.length));
  let smallest = cells;
  for (let level = 1; level < levels; level++) {
    const coarse = planAt(files, mosaicOf(files, level), full, level, extract);
    smallest = coarse.rect.width * coarse.rect.height;
    if (smallest <= budget) return coarse;
  }
  const found = `The terrain has ${cells} cells and ${smallest} in its coarsest overview`;
  if (extract.cellBudget > mostCells) {
    throw new OverbrimError(
      'too-large',
      `${found}; at most ${mostCells} are read, so give a smaller extent (--extent) or add overviews to the file.`,
    );
  }
  throw new OverbrimError(
    'bad-input',
    `${found}; the budget is ${budget}, so raise it (--cell-budget), give a smaller extent (--extent) or add overviews to the file.`,
  );
}

function planAt(
  files: readonly ElevationFile[],
  mosaic: Mosaic,
  full: Mosaic,
  level: number,
  extract: Extract,
): Plan {
  const geographic = files[0].crs.kind === 'geographic';
  const repeats = geographic && globeOf(mosaic.placement, mosaic.width, mosaic.height).repeatsColumn;
  const width = repeats ? mosaic.width - 1 : mosaic.width;
  const whole = { column: 0, row: 0, width, height: mosaic.height };
  const rect = cut(windowOn(mosaic, full, extract) ?? whole, whole);
  if (rect.width < 1 || rect.height < 1) {
    const { west, north, cellWidth, cellHeight } = full.placement;
    throw new OverbrimError(
      'bad-input',
      `The extent (--extent) lies outside the terrain; expected one within ${full.width} × ${full.height} cells, that is west ${west}, south ${north - full.height * cellHeight}, east ${west + full.width * cellWidth}, north ${north}.`,
    );
  }
  return { level, mosaic, rect, droppedColumn: repeats };
}

/** The asked window in cells of a level, rounded outwards. */
function windowOn(mosaic: Mosaic, full: Mosaic, { window, bbox }: Extract): CellRect | null {
  const { west, north, cellWidth, cellHeight } = mosaic.placement;
  if (window) {
    const across = full.placement.cellWidth / cellWidth;
    const down = full.placement.cellHeight / cellHeight;
    return outwards(
      window.column * across,
      window.row * down,
      (window.column + window.width) * across,
      (window.row + window.height) * down,
    );
  }
  if (!bbox) return null;
  return outwards(
    (bbox[0] - west) / cellWidth,
    (north - bbox[3]) / cellHeight,
    (bbox[2] - west) / cellWidth,
    (north - bbox[1]) / cellHeight,
  );
}

function outwards(left: number, top: number, right: number, bottom: number): CellRect {
  // A window drawn along cell sides must not grow by a cell for a rounding error.
  const slack = 1e-6;
  const column = Math.floor(left + slack);
  const row = Math.floor(top + slack);
  return {
    column,
    row,
    width: Math.ceil(right - slack) - column,
    height: Math.ceil(bottom - slack) - row,
  };
}

/** What two rectangles share; a width or height of 0 or less when nothing. */
export function cut(a: CellRect, b: CellRect): CellRect {
  const column = Math.max(a.column, b.column);
  const row = Math.max(a.row, b.row);
  return {
    column,
    row,
    width: Math.min(a.column + a.width, b.column + b.width) - column,
    height: Math.min(a.row + a.height, b.row + b.height) - row,
  };
}
