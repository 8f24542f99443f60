import { OverbrimError } from './error.ts';
import type { Grid, Neighbours } from './grid.ts';
import { joinTiles } from './join-tiles.ts';
import type { Survey } from './survey.ts';
import { surveyTile, type TileSurvey, tileRoom } from './tile-survey.ts';
import { shapeOf, tilesOf, tileWindow } from './tile-window.ts';

export interface SurveyOptions {
  readonly neighbours?: Neighbours;
  /** Side of a tile in cells, 1 to 512; changes no result. */
  readonly tileSize?: number;
  /** Row-major cells that become pits of their own, ascending: inlets, drains, pumps, cells of an outlet reach. */
  readonly madePits?: ArrayLike<number>;
  /** Order in which tiles are done, positions in `tilesOf(…)`; changes no result. */
  readonly tileOrder?: readonly number[];
}

/** Largest side of a tile; larger ones only cost memory and fall out of the processor's cache. */
export const largestTile = 512;
const usualTile = 256;

/**
 * Surveys a grid tile by tile. The same grid, neighbours and made pits give the same bits for any tile size and
 * order.
 * @throws OverbrimError `bad-input` when the tile size is out of range or the neighbours are not 8 or 4.
 */
export function surveyOf(grid: Grid, options: SurveyOptions = {}): Survey {
  const steps = surveySteps(grid, options);
  for (;;) {
    const step = steps.next();
    if (step.done) return step.value;
  }
}

/** The same in steps of one tile, for callers that must breathe: yields the share of tiles done, returns the survey. */
export function* surveySteps(grid: Grid, options: SurveyOptions = {}): Generator<number, Survey> {
  const size = options.tileSize ?? usualTile;
  if (!(Number.isInteger(size) && size >= 1 && size <= largestTile)) {
    throw new OverbrimError(
      'bad-input',
      `The tile size is ${size}; expected a whole number of cells from 1 to ${largestTile}.`,
    );
  }
  const neighbours = options.neighbours ?? 8;
  if (neighbours !== 4 && neighbours !== 8) {
    throw new OverbrimError('bad-input', `The number of neighbours is ${neighbours}; expected 8 or 4.`);
  }
  const madePits = options.madePits ?? [];
  const tiles = tilesOf(grid.width, grid.height, size);
  const room = tileRoom(Math.min(size, Math.max(grid.width, grid.height)));
  const done: TileSurvey[] = new Array(tiles.length);
  const order = options.tileOrder ?? tiles.map((_, i) => i);
  for (let i = 0; i < order.length; i++) {
    done[order[i]] = surveyTile(tileWindow(grid, tiles[order[i]], neighbours, madePits), room);
    yield (i + 1) / tiles.length;
  }
  return joinTiles(shapeOf(grid), grid.metrics, neighbours, madePits, size, done);
}
