import { Registry } from '../host/index.ts';
import { depressions, spillPath, type TerrainStore } from '../processes/index.ts';

/** A registry with the processes that come with Overbrim. */
export function builtInProcesses(): Registry<TerrainStore> {
  return new Registry<TerrainStore>().register(depressions).register(spillPath);
}
