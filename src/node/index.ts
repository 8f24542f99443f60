export { epsgFiles } from './epsg-files.ts';
export { fileSource } from './file-source.ts';
export { exitCodes, main } from './main.ts';
export { reachFiles } from './reach-files.ts';
export type { Terminal } from './terminal.ts';
