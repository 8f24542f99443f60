import type { JobResult, Json } from '../../src/host/index.ts';
import { depressions } from '../../src/processes/index.ts';
import { checkGeoJson, propertiesBy } from './geojson-checks.ts';
import { documentOf, type MadePlace, runInMemory, terrainFile } from './made-terrain.ts';

interface Given {
  readonly inputs?: Readonly<Record<string, Json>>;
  readonly place?: MadePlace;
}

/** Ponds of a made terrain. */
export async function pondsOf(rows: readonly (readonly number[])[], { inputs, place }: Given = {}) {
  return foundPonds(await runInMemory(depressions, { 'made.tif': await terrainFile(rows, place) }, inputs));
}

/** What the process gave, its GeoJSON held against RFC 7946. */
export function foundPonds({ outputs, notes }: JobResult) {
  const ponds = checkGeoJson(documentOf(outputs.ponds));
  const pourPoints = checkGeoJson(documentOf(outputs['pour-points']));
  const bytes = 'bytes' in outputs['brim-level'] ? outputs['brim-level'].bytes : new Uint8Array(0);
  return {
    ponds,
    pourPoints,
    byId: propertiesBy(ponds, 'id'),
    summary: documentOf(outputs.summary),
    bytes,
    notes,
  };
}
