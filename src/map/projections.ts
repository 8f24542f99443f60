import Projection from 'ol/proj/Projection.js';
import {
  addCoordinateTransforms,
  addProjection,
  get,
  getTransform,
  type TransformFunction,
} from 'ol/proj.js';
import { OverbrimError } from '../core/error.ts';
import type { Crs, Georeference } from '../raster/terrain.ts';
import { fromCrs84, type Point, type Transform, toCrs84 } from '../raster/transform.ts';

/** Half the side of the square around a terrain that its projection claims, metres: far beyond any projected CRS's use. */
const reachM = 1e6;

/** The code under which the map library knows a CRS: the EPSG code, or the definition itself for a user-defined one. */
export function projectionCode(crs: Crs): string {
  return crs.epsg === null ? crs.proj4 : `EPSG:${crs.epsg}`;
}

/**
 * The terrain's own CRS as a projection for views, registered with the map library unless the page has done so.
 * Only this one code is added: handing our proj4 to the library as a whole would displace the page's own.
 */
export function terrainProjection({ crs, west, north }: Georeference): Projection {
  const code = projectionCode(crs);
  const known = get(code);
  if (known !== null) return known;
  const projected = crs.unitM !== null;
  const reach = reachM / (crs.unitM ?? 1);
  const projection = new Projection({
    code,
    units: projected ? (crs.unitM === 1 ? 'm' : 'ft') : 'degrees',
    ...(projected ? { metersPerUnit: crs.unitM ?? 1 } : {}),
    // Without an extent, tiles and zoom levels of such a view are undefined.
    extent: projected ? [west - reach, north - reach, west + reach, north + reach] : [-180, -90, 180, 90],
    global: false,
  });
  addProjection(projection);
  const forward = fromCrs84(crs);
  const inverse = toCrs84(crs);
  const there = ([x, y]: number[]) => forward(x, y);
  const back = ([x, y]: number[]) => inverse(x, y);
  addCoordinateTransforms('EPSG:4326', projection, there, back);
  const toDegrees = transformOf('EPSG:3857', 'EPSG:4326');
  const toMercator = transformOf('EPSG:4326', 'EPSG:3857');
  addCoordinateTransforms(
    'EPSG:3857',
    projection,
    (point: number[]) => there(toDegrees(point.slice(0, 2), undefined, 2)),
    (point: number[]) => toMercator(back(point), undefined, 2),
  );
  return projection;
}

/**
 * Leads coordinates of a view to the terrain's CRS, by way of longitude and latitude unless both are the same.
 * @throws OverbrimError `unsupported` when the view's projection has no way to EPSG:4326.
 */
export function viewToTerrain(view: Projection, crs: Crs): Transform {
  if (view.getCode() === projectionCode(crs)) return (x, y) => [x, y];
  const toLonLat = transformOf(view.getCode(), 'EPSG:4326');
  const toTerrain = fromCrs84(crs);
  return (x, y) => {
    const [longitude, latitude] = toLonLat([x, y], undefined, 2);
    // Beyond its use a projection gives no place or throws; either way no cell is there.
    if (!(Math.abs(latitude) <= 90)) return nowhere;
    try {
      return toTerrain(longitude, latitude);
    } catch {
      return nowhere;
    }
  };
}

/** Why nothing of a terrain can be shown in a view's projection; null when it can. */
export function hasNoWay(view: Projection, crs: Crs): OverbrimError | null {
  try {
    viewToTerrain(view, crs);
    return null;
  } catch (error) {
    if (error instanceof OverbrimError) return error;
    throw error;
  }
}

const nowhere: Point = [Number.NaN, Number.NaN];

function transformOf(from: string, to: string): TransformFunction {
  const known = get(from) !== null;
  try {
    const found = known ? getTransform(from, to) : null;
    if (found !== null) return found;
  } catch {
    // Newer versions throw where older ones hand the coordinates back unchanged; ours is one sentence for both.
  }
  throw new OverbrimError(
    'unsupported',
    `The view's projection is ${from}, from which no way to ${to} is known; register it with proj4 before the map is made.`,
  );
}
