import type { RasterOut, Samples } from '../../src/raster/raster-out.ts';
import type { Crs, GeoKeyTags, Georeference } from '../../src/raster/terrain.ts';

const utm10South: Crs = {
  kind: 'projected',
  name: 'WGS 84 / UTM zone 10S',
  epsg: 32710,
  proj4: '+proj=utm +zone=10 +south +datum=WGS84 +units=m +no_defs',
  unitM: 1,
  semiMajorM: 6378137,
  semiMinorM: 6356752.314245179,
};

export const utmKeys: GeoKeyTags = {
  directory: [1, 1, 0, 3, 1024, 0, 1, 1, 1025, 0, 1, 1, 3072, 0, 1, 32710],
  doubles: [],
  ascii: '',
};

/** A transverse Mercator that has no code: every parameter stands in the doubles and the text. */
export const userDefinedKeys: GeoKeyTags = {
  directory: [
    [1, 1, 0, 14],
    [1024, 0, 1, 1],
    [1025, 0, 1, 1],
    [1026, 34737, 14, 0],
    [2048, 0, 1, 4326],
    [3072, 0, 1, 32767],
    [3073, 34737, 14, 0],
    [3074, 0, 1, 32767],
    [3075, 0, 1, 1],
    [3076, 0, 1, 9001],
    [3080, 34736, 1, 0],
    [3081, 34736, 1, 1],
    [3082, 34736, 1, 2],
    [3083, 34736, 1, 3],
    [3092, 34736, 1, 4],
  ].flat(),
  doubles: [-123.25, -48.5, 200000, 300000, 0.99987654321],
  ascii: 'Sallow grid 7|',
};

export function georeferenceOf(keys: GeoKeyTags = utmKeys, pixelIsPoint = false): Georeference {
  return {
    crs: utm10South,
    west: 470000,
    north: 4588000,
    cellWidth: 2,
    cellHeight: 2.5,
    pixelIsPoint,
    geoKeys: keys,
  };
}

export function rasterOf(
  width: number,
  height: number,
  samples: Samples,
  noData: number | null = null,
): RasterOut {
  return { width, height, samples, noData, georeference: georeferenceOf() };
}

/** Waves with digits in every byte of the mantissa, voids in a block and sprinkled about. */
export function wavyFloats(width: number, height: number, noData: number | null = Number.NaN): Float32Array {
  const samples = new Float32Array(width * height);
  for (let i = 0; i < samples.length; i++) {
    const column = i % width;
    const row = Math.floor(i / width);
    const isVoid = noData !== null && ((column < 3 && row < 3 && i > 0) || i % 97 === 5);
    samples[i] = isVoid ? noData : 30 * Math.sin(column / 17) + 12 * Math.cos(row / 11) + (i % 7) / 10;
  }
  return samples;
}
