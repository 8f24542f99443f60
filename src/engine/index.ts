export { builtInProcesses } from './built-in.ts';
export { type Reach, TerrainShelf } from './terrain-shelf.ts';
