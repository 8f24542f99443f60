import type Projection from 'ol/proj/Projection.js';
import { viewToTerrain } from './projections.ts';
import type { SurveyView } from './survey-view.ts';

/** What the grid says of one place. */
export interface ReadOut {
  /** Row-major. */
  readonly cell: number;
  readonly column: number;
  readonly row: number;
  /** The place itself in the terrain's CRS. */
  readonly x: number;
  readonly y: number;
  /** Null on a void; the other values then are null as well. */
  readonly groundM: number | null;
  /** Null where it is dry. */
  readonly waterM: number | null;
  /** 0 where it is dry. */
  readonly depthM: number | null;
  /** Id of the outermost pond that wets the cell. */
  readonly pond: string | null;
}

/**
 * Ground and water at a coordinate of the view, from the grid and never from the picture; null beside the terrain.
 * @param levelM water level of each leaf, metres
 * @throws OverbrimError `unsupported` as viewToTerrain.
 */
export function readOut(
  survey: SurveyView,
  view: Projection,
  coordinate: readonly number[],
  levelM: Float32Array = survey.levelM,
): ReadOut | null {
  const [x, y] = viewToTerrain(view, survey.georeference.crs)(coordinate[0], coordinate[1]);
  const cell = cellAt(survey, x, y);
  if (cell < 0) return null;
  const row = Math.floor(cell / survey.width);
  const place = { cell, column: cell - row * survey.width, row, x, y };
  const leaf = survey.leaf[cell];
  if (leaf < 0) return { ...place, groundM: null, waterM: null, depthM: null, pond: null };
  const groundM = survey.elevationM[cell];
  const level = levelM[leaf];
  if (!(level > groundM && level < Number.POSITIVE_INFINITY)) {
    return { ...place, groundM, waterM: null, depthM: 0, pond: null };
  }
  const pond = survey.pondOfLeaf[leaf];
  return {
    ...place,
    groundM,
    waterM: level,
    depthM: level - groundM,
    pond: pond < 0 ? null : survey.ponds[pond],
  };
}

/** The cell that holds a point of the terrain's CRS, by the rule that painting goes by; −1 outside. */
export function cellAt({ width, height, wraps, georeference }: SurveyView, x: number, y: number): number {
  const { west, north, cellWidth, cellHeight, crs } = georeference;
  let column = (x - west) / cellWidth;
  const row = (north - y) / cellHeight;
  if (crs.kind === 'geographic') {
    const around = 360 / cellWidth;
    column -= Math.floor(column / around) * around;
    if (wraps && column >= width) column = width - 1;
  }
  if (!(column >= 0 && column < width && row >= 0 && row < height)) return -1;
  return Math.floor(row) * width + Math.floor(column);
}
