import { OverbrimError } from '../core/index.ts';
import { cellAtPoint } from '../raster/place.ts';
import type { Crs, Terrain } from '../raster/terrain.ts';
import { type Point, transformer } from '../raster/transform.ts';
import type { TerrainStore } from './terrain-store.ts';

const number = '[+-]?(?:\\d+\\.?\\d*|\\.\\d+)(?:[eE][+-]?\\d+)?';
const pair = new RegExp(`^\\s*(${number})\\s*,\\s*(${number})\\s*$`);

/** Whether a text is a typed coordinate `x,y`. */
export function isTypedPlace(text: string): boolean {
  return pair.test(text);
}

/**
 * The cell at a typed coordinate `x,y`, in the terrain's CRS or in the one named.
 * @throws OverbrimError `bad-input` when it is no coordinate, lies outside the terrain or on a void.
 */
export async function typedCell(
  terrain: Terrain,
  name: string,
  text: string,
  crs: string | undefined,
  store: Pick<TerrainStore, 'crs'>,
): Promise<number> {
  const match = pair.exec(text);
  if (match === null) {
    throw new OverbrimError(
      'bad-input',
      `The input "${name}" is "${text}"; expected a coordinate as x,y with a point as decimal sign, such as 1234.5,678.9.`,
    );
  }
  const typed: Point = [Number(match[1]), Number(match[2])];
  const { crs: own } = terrain.georeference;
  const named = crs === undefined ? own : await namedCrs(crs, store);
  const point = crs === undefined ? typed : transformer(named, own)(...typed);
  const cell = cellAtPoint(terrain, point);
  if (cell < 0) {
    throw new OverbrimError(
      'bad-input',
      `The place ${text} (${named.name}) lies outside the terrain, which reaches from ${extentText(terrain)}; check the coordinate, the order x,y and the input "crs".`,
    );
  }
  if (Number.isNaN(terrain.grid.elevationM[cell])) {
    throw new OverbrimError(
      'bad-input',
      `The place ${text} lies on a cell without elevation (column ${cell % terrain.grid.width}, row ${Math.floor(cell / terrain.grid.width)}); choose a place on known ground.`,
    );
  }
  return cell;
}

/**
 * The CRS of typed coordinates.
 * @throws OverbrimError `bad-input` when it is not one that coordinates can be converted from.
 */
export async function namedCrs(crs: string, store: Pick<TerrainStore, 'crs'>): Promise<Crs> {
  try {
    return await store.crs(Number(crs.slice('EPSG:'.length)));
  } catch (cause) {
    if (!(cause instanceof OverbrimError) || cause.code !== 'unsupported') throw cause;
    throw new OverbrimError(
      'bad-input',
      `The input "crs" is "${crs}", which is no projected or geographic CRS of the EPSG register that can be used; give another code with --crs, or none for coordinates in the CRS of the terrain.`,
      { cause },
    );
  }
}

function extentText({ grid, georeference }: Terrain): string {
  const { west, north, cellWidth, cellHeight } = georeference;
  const east = west + grid.width * cellWidth;
  const south = north - grid.height * cellHeight;
  return `${rounded(west)},${rounded(south)} to ${rounded(east)},${rounded(north)} (${georeference.crs.name})`;
}

function rounded(value: number): string {
  return String(Number(value.toFixed(6)));
}
