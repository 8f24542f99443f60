import proj4 from 'proj4';
import type { SurveyView } from '../../src/map/survey-view.ts';
import type { Crs } from '../../src/raster/terrain.ts';

export const utm33: Crs = {
  kind: 'projected',
  name: 'WGS 84 / UTM zone 33N',
  epsg: 32633,
  proj4: '+proj=utm +zone=33 +datum=WGS84 +units=m +no_defs',
  unitM: 1,
  semiMajorM: 6378137,
  semiMinorM: 6356752.314245179,
};

export const wgs84: Crs = {
  ...utm33,
  kind: 'geographic',
  name: 'WGS 84',
  epsg: 4326,
  proj4: '+proj=longlat +datum=WGS84 +no_defs',
  unitM: null,
};

/** A view whose cells all are one dry leaf, with what is given in place of that. */
export function madeView(given: Partial<SurveyView> & { width: number; height: number }): SurveyView {
  const cells = given.width * given.height;
  return {
    georeference: {
      crs: utm33,
      west: 430_000,
      north: 5_300_000,
      cellWidth: 5,
      cellHeight: 5,
      pixelIsPoint: false,
      geoKeys: { directory: [], doubles: [], ascii: '' },
    },
    wraps: false,
    elevationM: new Float32Array(cells).fill(10),
    leaf: new Int32Array(cells),
    levelM: Float32Array.of(0),
    pondOfLeaf: Int32Array.of(-1),
    ponds: [],
    ...given,
  };
}

/** Numbers from 0 to 1, the same for a seed. */
export function randomNumbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/** Web mercator to the CRS by proj4 alone. */
export function fromMercator(crs: Crs): (x: number, y: number) => [number, number] {
  const way = proj4('EPSG:3857', crs.proj4);
  return (x, y) => way.forward([x, y]) as [number, number];
}
