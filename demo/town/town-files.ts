import { buildings } from './buildings.ts';
import { culverts } from './culverts.ts';
import { townElevation } from './elevation.ts';
import { collection, lineFeature, polygonFeature, type ToLonLat } from './geojson.ts';
import { landCover } from './land-cover.ts';
import { plan } from './plan.ts';
import { streets } from './streets.ts';
import { townTruths } from './truths.ts';

/** CRS keys of OGC GeoTIFF 1.1: projected, cells are areas, UTM zone 10 south, EGM2008 heights in metres. */
const geoKeys = {
  directory: [
    [1, 1, 1, 5],
    [1024, 0, 1, 1],
    [1025, 0, 1, 1],
    [3072, 0, 1, plan.epsg],
    [4096, 0, 1, plan.verticalEpsg],
    [4099, 0, 1, 9001],
  ].flat(),
  doubles: [],
  ascii: '',
};

/** What the package has to do for the town; `C` is its notion of a coordinate reference system. */
export interface TownTools<C> {
  readonly cloudOptimizedGeoTiff: (raster: {
    readonly width: number;
    readonly height: number;
    readonly samples: Float32Array;
    readonly noData: null;
    readonly georeference: {
      readonly crs: C;
      readonly west: number;
      readonly north: number;
      readonly cellWidth: number;
      readonly cellHeight: number;
      readonly pixelIsPoint: boolean;
      readonly geoKeys: typeof geoKeys;
    };
    readonly metadata: { readonly description: string; readonly unit: string };
  }) => Uint8Array;
  readonly toCrs84: (crs: C) => (easting: number, northing: number) => readonly [number, number];
}

/** All files of the town by name, in the CRS of `plan.epsg`; the same bytes each time. */
export function townFiles<C>(crs: C, tools: TownTools<C>): Map<string, Uint8Array> {
  const { name, size, west, north } = plan;
  const toDegrees = tools.toCrs84(crs);
  const toLonLat: ToLonLat = (x, y) => toDegrees(west + x, north - y);
  const text = (content: string): Uint8Array => new TextEncoder().encode(content);
  return new Map([
    [
      'elevation.tif',
      tools.cloudOptimizedGeoTiff({
        width: size,
        height: size,
        samples: townElevation(),
        noData: null,
        georeference: { crs, west, north, cellWidth: 1, cellHeight: 1, pixelIsPoint: false, geoKeys },
        metadata: { description: `Ground elevation of ${name}, an invented town`, unit: 'm' },
      }),
    ],
    [
      'streets.geojson',
      text(
        collection(
          streets().map(({ name, kind, line }) => lineFeature(line, { name, kind, widthM: 8 }, toLonLat)),
        ),
      ),
    ],
    [
      'buildings.geojson',
      text(
        collection(
          buildings().map(({ use, corners }, i) => polygonFeature(corners, { id: i + 1, use }, toLonLat)),
        ),
      ),
    ],
    [
      'culverts.geojson',
      text(collection(culverts().map(({ line, ...properties }) => lineFeature(line, properties, toLonLat)))),
    ],
    [
      'land-cover.geojson',
      text(collection(landCover().map(({ cover, ring }) => polygonFeature(ring, { cover }, toLonLat)))),
    ],
    ['town.json', text(`${JSON.stringify(townTruths(), null, 2)}\n`)],
  ]);
}
