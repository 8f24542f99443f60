export { type Brimful, brimful } from './brimful.ts';
export { caution } from './caution.ts';
export { depressions } from './depressions.ts';
export { pondNames } from './pond-names.ts';
export { spillPath } from './spill-path.ts';
export { type TerrainInputs, terrainInputs } from './terrain-inputs.ts';
export type { TerrainRequest } from './terrain-request.ts';
export type { TerrainStore, TextFile } from './terrain-store.ts';
