// The names that a program or page needs to open a terrain and ask questions of it; each room hands on its own as
// overbrim/core, overbrim/raster, overbrim/host and overbrim/processes.
export { type ErrorCode, OverbrimError } from './core/index.ts';
export { builtInProcesses, type Reach, TerrainShelf } from './engine/index.ts';
export {
  type Inputs,
  Job,
  type JobContext,
  type JobOptions,
  type JobProgress,
  type JobResult,
  type Lineage,
  type Process,
  type ProcessDescription,
  Registry,
} from './host/index.ts';
export { caution, type TerrainStore } from './processes/index.ts';
export {
  blobSource,
  cloudOptimizedGeoTiff,
  memorySource,
  openTerrain,
  type Terrain,
  urlSource,
} from './raster/index.ts';
