import type { Position } from 'geojson';
import { cellCentre } from '../raster/place.ts';
import type { Terrain } from '../raster/terrain.ts';
import { toCrs84 } from '../raster/transform.ts';
import { degrees } from './geojson-text.ts';

/** Centres of cells in CRS84, longitudes within ±180° also where a grid runs on past the antimeridian. */
export function cellLonLat(terrain: Terrain): (cell: number) => Position {
  const toLonLat = toCrs84(terrain.georeference.crs);
  return (cell) => {
    const [longitude, latitude] = toLonLat(...cellCentre(terrain, cell));
    const turns = Math.abs(longitude) > 180 ? Math.round(longitude / 360) : 0;
    return [degrees(longitude - 360 * turns), degrees(latitude)];
  };
}
