import type { FeatureCollection } from 'geojson';
import { surveyView } from '../../../src/engine/survey-view.ts';
import { TerrainShelf } from '../../../src/engine/terrain-shelf.ts';
import { checkedInputs } from '../../../src/host/check-inputs.ts';
import type { SurveyView } from '../../../src/map/index.ts';
import { epsgFiles } from '../../../src/node/epsg-files.ts';
import { brimful, depressions, spillPath, type TerrainInputs } from '../../../src/processes/index.ts';
import { memorySource } from '../../../src/raster/byte-source.ts';
import { documentOf, runInMemory } from '../../processes/made-terrain.ts';

/** What the analysis hands to a map. */
export interface Analysed {
  readonly view: SurveyView;
  readonly ponds: FeatureCollection;
  readonly pourPoints: FeatureCollection;
  readonly path: FeatureCollection;
}

/** Runs both processes on a file; the path starts at `from`, in the terrain's CRS. */
export async function analysed(file: Uint8Array, from: string, minima: Record<string, number> = {}) {
  const files = { 'elevation.tif': file };
  const found = (await runInMemory(depressions, files, minima)).outputs;
  const traced = (await runInMemory(spillPath, files, { from })).outputs;
  const collection = (body: Parameters<typeof documentOf>[0]) => documentOf(body) as FeatureCollection;
  return {
    view: await viewOf(file),
    ponds: collection(found.ponds),
    pourPoints: collection(found['pour-points']),
    path: collection(traced['spill-path']),
  } satisfies Analysed;
}

async function viewOf(file: Uint8Array): Promise<SurveyView> {
  const shelf = new TerrainShelf({
    source: async (name) => memorySource(name, file),
    epsg: epsgFiles,
  });
  const context = {
    signal: new AbortController().signal,
    progress: () => {},
    breathe: async () => {},
    note: () => {},
    record: () => {},
  };
  const inputs = checkedInputs(depressions.description, { terrain: ['elevation.tif'] }) as TerrainInputs;
  return surveyView(await brimful(inputs, context, shelf));
}
