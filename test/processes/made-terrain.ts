import { TerrainShelf } from '../../src/engine/index.ts';
import type { Json, Process } from '../../src/host/index.ts';
import { Job, type JobResult, type OutputBody } from '../../src/host/index.ts';
import { epsgFiles } from '../../src/node/epsg-files.ts';
import type { TerrainStore } from '../../src/processes/index.ts';
import { memorySource } from '../../src/raster/byte-source.ts';
import { crsFromEpsg } from '../../src/raster/crs.ts';
import type { Georeference } from '../../src/raster/terrain.ts';
import { cloudOptimizedGeoTiff } from '../../src/raster/write-cog.ts';

/** Where a made terrain lies; left out, at sea where the equator meets 3° east, with cells of 10 m. */
export interface MadePlace {
  readonly epsg?: number;
  readonly west?: number;
  readonly north?: number;
  readonly cellSize?: number;
  /** EPSG code of the vertical unit (key 4099); null leaves the key out. */
  readonly verticalUnit?: number | null;
}

/** Elevations row by row, NaN = void, as the bytes of a GeoTIFF. */
export async function terrainFile(
  rows: readonly (readonly number[])[],
  place: MadePlace = {},
): Promise<Uint8Array> {
  return samplesFile(rows[0].length, rows.length, Float32Array.from(rows.flat()), place);
}

export async function samplesFile(
  width: number,
  height: number,
  samples: Float32Array,
  { epsg = 32631, west = 500_000, north = 1000, cellSize = 10, verticalUnit = 9001 }: MadePlace = {},
): Promise<Uint8Array> {
  const crs = await crsFromEpsg(epsg, epsgFiles);
  const isProjected = crs.kind === 'projected';
  // Keys 1024 model, 1025 raster type, 2048 or 3072 CRS, 4099 vertical unit (OGC GeoTIFF 1.1).
  const entries = [
    [1024, 0, 1, isProjected ? 1 : 2],
    [1025, 0, 1, 1],
    [isProjected ? 3072 : 2048, 0, 1, epsg],
    ...(verticalUnit === null ? [] : [[4099, 0, 1, verticalUnit]]),
  ];
  const georeference: Georeference = {
    crs,
    west,
    north,
    cellWidth: cellSize,
    cellHeight: cellSize,
    pixelIsPoint: false,
    geoKeys: { directory: [1, 1, 0, entries.length, ...entries.flat()], doubles: [], ascii: '' },
  };
  return cloudOptimizedGeoTiff({ width, height, samples, noData: Number.NaN, georeference });
}

/** Runs a process on files held in memory; `terrain` names one of them unless given. */
export function runInMemory(
  process: Process<TerrainStore>,
  files: Readonly<Record<string, Uint8Array | string>>,
  inputs: Readonly<Record<string, Json>> = {},
): Promise<JobResult> {
  const shelf = new TerrainShelf({
    source: async (reference) => {
      const file = files[reference];
      if (file === undefined) throw new Error(`The test has no file ${reference}`);
      return memorySource(reference, typeof file === 'string' ? new TextEncoder().encode(file) : file);
    },
    epsg: epsgFiles,
  });
  const software = { name: 'test', version: '0' };
  return new Job(process, { terrain: [Object.keys(files)[0]], ...inputs }, shelf, { software }).result;
}

/** An output as the JSON document that its file would hold. */
export function documentOf(body: OutputBody): unknown {
  if ('json' in body) return body.json;
  if ('text' in body) return JSON.parse([...body.text].join(''));
  throw new Error('The output is bytes, no document.');
}
