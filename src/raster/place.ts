import type { Terrain } from './terrain.ts';
import type { Point } from './transform.ts';

type Placed = Pick<Terrain, 'grid' | 'georeference'>;

/** Centre of a cell in units of the terrain's CRS. */
export function cellCentre({ grid, georeference }: Placed, cell: number): Point {
  const row = Math.floor(cell / grid.width);
  const column = cell - row * grid.width;
  return [
    georeference.west + (column + 0.5) * georeference.cellWidth,
    georeference.north - (row + 0.5) * georeference.cellHeight,
  ];
}

/** Column and row of a point as fractions (0,0 = outer north-west corner); longitudes are brought into the grid. */
export function gridPosition({ grid, georeference }: Placed, [x, y]: Point): Point {
  let column = (x - georeference.west) / georeference.cellWidth;
  if (georeference.crs.kind === 'geographic') {
    const around = 360 / georeference.cellWidth;
    const turned = column - around * Math.floor(column / around);
    // What is more than two turns away is no longitude.
    const isNear = Math.abs(column) <= 2 * around;
    if (isNear && (column < 0 || column >= grid.width) && turned <= grid.width) column = turned;
  }
  return [column, (georeference.north - y) / georeference.cellHeight];
}

/** The cell that holds a point, −1 outside the terrain. Points on the outer south and east sides count as inside. */
export function cellAtPoint(terrain: Placed, point: Point): number {
  const { width, height } = terrain.grid;
  const [x, y] = gridPosition(terrain, point);
  if (!(x >= 0 && x <= width && y >= 0 && y <= height)) return -1;
  return Math.min(Math.floor(y), height - 1) * width + Math.min(Math.floor(x), width - 1);
}
