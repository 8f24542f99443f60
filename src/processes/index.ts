export { caution } from './caution.ts';
export { depressions } from './depressions.ts';
export { spillPath } from './spill-path.ts';
export type { TerrainStore } from './terrain-store.ts';
