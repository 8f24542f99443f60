import proj4 from 'proj4';
import type { Crs } from './terrain.ts';

/** Longitude and latitude in degrees, or easting and northing in the CRS's unit. */
export type Point = [number, number];
export type Transform = (x: number, y: number) => Point;

/** OGC CRS84: longitude, latitude on WGS 84, as GeoJSON has it (RFC 7946). */
export const crs84: Pick<Crs, 'proj4'> = { proj4: '+proj=longlat +datum=WGS84 +no_defs' };

/** Leads points of one CRS to another, x before y on both sides. */
export function transformer(from: Pick<Crs, 'proj4'>, to: Pick<Crs, 'proj4'>): Transform {
  if (from.proj4 === to.proj4) return (x, y) => [x, y];
  const converter = proj4(from.proj4, to.proj4);
  return (x, y) => {
    const [u, v] = converter.forward([x, y]);
    return [u, v];
  };
}

/** From the CRS to longitude and latitude, degrees. */
export function toCrs84(crs: Pick<Crs, 'proj4'>): Transform {
  return transformer(crs, crs84);
}

/** From longitude and latitude, degrees, to the CRS. */
export function fromCrs84(crs: Pick<Crs, 'proj4'>): Transform {
  return transformer(crs84, crs);
}
